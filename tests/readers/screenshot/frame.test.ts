import { describe, expect, it } from "vitest";
import { evenEnds } from "../../../app/readers/screenshot/divisions.ts";
import { findFrame } from "../../../app/readers/screenshot/frame.ts";
import { type Color, curve, fill, grid, outline, paper } from "./paint.ts";

const INK: Color = [120, 130, 140];

function plot(manner: { dot?: number; outlined?: boolean; columns?: number; rows?: number } = {}) {
  const p = paper(480, 320, [24, 26, 30]);
  fill(p, 50, 40, 450, 280, [10, 11, 14]);
  grid(p, [50, 40, 450, 280], manner.columns ?? 10, manner.rows ?? 8, [45, 48, 55], manner.dot);
  if (manner.outlined !== false) outline(p, 50, 40, 450, 280, INK);
  return p;
}

describe("findFrame", () => {
  it("finds the outline and counts the divisions", () => {
    const found = findFrame(plot());
    expect(found?.frame).toMatchObject({ columns: 10, rows: 8 });
    for (const [side, place] of [
      ["left", 50],
      ["top", 40],
      ["right", 450],
      ["bottom", 280],
    ] as const) {
      expect(Math.abs((found?.frame[side] ?? 0) - place)).toBeLessThan(0.5);
    }
    expect(found?.confidence).toBeGreaterThan(0.9);
  });

  it("finds a frame whose grid is dotted", () => {
    expect(findFrame(plot({ dot: 4 }))?.frame).toMatchObject({ columns: 10, rows: 8 });
  });

  it("finds a plot without an outline by its area and the ends of its grid", () => {
    const { frame } = findFrame(plot({ outlined: false })) ?? {};
    expect(Math.abs((frame?.left ?? 0) - 50)).toBeLessThan(1.5);
    expect(Math.abs((frame?.bottom ?? 0) - 280)).toBeLessThan(1.5);
  });

  it("is not led astray by buttons, a window border and a trace along the top line", () => {
    const p = plot({ columns: 5, rows: 6 });
    outline(p, 1, 1, 478, 318, INK);
    for (let y = 50; y < 260; y += 45) outline(p, 456, y, 474, y + 36, INK);
    curve(
      p,
      50,
      450,
      (x) => (Math.abs(x - 240) < 30 ? 40 + 180 - 6 * Math.abs(x - 240) : 40),
      [255, 120, 60],
    );
    const { frame } = findFrame(p) ?? {};
    expect(frame).toMatchObject({ columns: 5, rows: 6 });
    expect(Math.abs((frame?.right ?? 0) - 450)).toBeLessThan(1);
    expect(Math.abs((frame?.top ?? 0) - 40)).toBeLessThan(1);
  });

  it("says nothing where there is no plot", () => {
    expect(findFrame(paper(300, 200, [255, 255, 255]))).toBeNull();
    const noise = paper(300, 200, [128, 128, 128]);
    let state = 7;
    for (let i = 0; i < noise.data.length; i++) {
      state = (state * 1103515245 + 12345) & 0x7fffffff;
      if (i % 4 !== 3) noise.data[i] = state >> 16;
    }
    expect(findFrame(noise)).toBeNull();
  });

  it("takes a given frame as it is", () => {
    const given = { left: 52.5, top: 41, right: 449, bottom: 279.5 };
    expect(findFrame(plot(), given)?.frame).toMatchObject(given);
  });
});

describe("evenEnds", () => {
  it("corrects an outer line that a trace has moved", () => {
    const inner = [29, 58, 87, 116, 145];
    const [first, last] = evenEnds(inner, 0.1, 176.2);
    expect(first).toBeCloseTo(0, 0);
    expect(last).toBeCloseTo(174, 0);
  });

  it("leaves lines that have another offset than the frame", () => {
    expect(evenEnds([20, 60, 100, 140], 0, 150)).toEqual([0, 150]);
  });

  it("leaves a plot with few lines", () => {
    expect(evenEnds([50], 0, 101)).toEqual([0, 101]);
  });
});
