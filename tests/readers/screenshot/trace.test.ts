import { describe, expect, it } from "vitest";
import { findFrame } from "../../../app/readers/screenshot/frame.ts";
import { hexOf, lookApart, oklab, rgbOf } from "../../../app/readers/screenshot/oklab.ts";
import { findTraces } from "../../../app/readers/screenshot/traces.ts";
import { type Color, curve, fill, grid, outline, type Paper, paper } from "./paint.ts";

const BOX = { left: 40, top: 30, right: 440, bottom: 270 };
const TRACE: Color = [255, 176, 46];

function plot(dot = 1): Paper {
  const p = paper(480, 300, [10, 11, 14]);
  grid(p, [40, 30, 440, 270], 10, 8, [52, 54, 61], dot);
  outline(p, 40, 30, 440, 270, [108, 111, 120]);
  return p;
}

function read(p: Paper, color: Color | null = null) {
  const found = findFrame(p, BOX);
  if (!found) throw new Error("no frame");
  return findTraces(p, found, color);
}

/** Misses of the first trace over the columns in which `rowAt` is less steep than 3 rows a column. */
function misses(p: Paper, rowAt: (x: number) => number): number[] {
  const { row, left } = read(p).traces[0].trace;
  return [...row]
    .map((r, i) => [r, left + i])
    .filter(([, x]) => Math.abs(rowAt(x + 1) - rowAt(x - 1)) < 6)
    .map(([r, x]) => Math.abs(r - rowAt(x)))
    .sort((a, b) => a - b);
}

const valley = (x: number) => 60 + 150 * Math.exp(-(((x - 230) / 25) ** 2)) + 4 * Math.sin(x / 40);

describe("findTraces", () => {
  it.each([[1], [4]])(
    "follows a smoothed stroke over a grid (dots every %i pixels) to a fraction of a pixel",
    (dot) => {
      const p = plot(dot);
      curve(p, 40, 440, valley, TRACE);
      const found = misses(p, valley);
      expect(found.length).toBeGreaterThan(330);
      expect(found[found.length >> 1]).toBeLessThan(0.15);
      expect(found[Math.floor(found.length * 0.95)]).toBeLessThan(0.6);
    },
  );

  it("gives the lowest end of a dip of one column", () => {
    const p = plot();
    curve(p, 40, 440, () => 80, TRACE);
    fill(p, 200, 80, 200, 190, TRACE);
    const { row, left } = read(p).traces[0].trace;
    expect(row[200 - left]).toBeCloseTo(190, 0);
    expect(row[195 - left]).toBeCloseTo(80, 1);
  });

  it("goes on below a marker and says that it is less sure there", () => {
    const p = plot();
    curve(p, 40, 440, valley, TRACE);
    fill(p, 300, 40, 308, 100, [230, 230, 230]);
    const { row, uncertainty, left } = read(p).traces[0].trace;
    expect(Math.abs(row[304 - left] - valley(304))).toBeLessThan(1.5);
    expect(uncertainty[304 - left]).toBeGreaterThan(uncertainty[390 - left]);
  });

  it("chooses the sweep before a flat reference, or the colour that is given", () => {
    const p = plot();
    curve(p, 40, 440, () => 45, [111, 168, 220]);
    curve(p, 40, 440, valley, TRACE);
    const { traces } = read(p);
    expect(lookApart(traces[0].color, TRACE)).toBeLessThan(0.1);
    expect(traces).toHaveLength(2);
    const other = read(p, [111, 168, 220]).traces[0].trace;
    expect(other.row[100]).toBeCloseTo(45, 1);
  });

  it("leaves the columns empty in which the trace is outside the plot", () => {
    const p = plot();
    const steep = (x: number) => 20 + 200 * Math.exp(-(((x - 230) / 20) ** 2));
    curve(p, 180, 280, (x) => Math.max(30, steep(x)), TRACE);
    const { trace } = read(p).traces[0];
    expect(Number.isNaN(trace.row[60])).toBe(true);
    expect(trace.explained).toBeGreaterThan(0.95);
    expect(trace.share).toBeLessThan(0.4);
  });

  it("finds none on an empty grid", () => {
    const found = read(plot());
    expect(found.confidence).toBeLessThan(0.4);
  });
});

describe("oklab", () => {
  it("puts white at lightness 1, black at 0, greys on the axis", () => {
    expect(oklab([255, 255, 255]).map((v) => Math.round(1000 * v))).toEqual([1000, 0, 0]);
    expect(oklab([0, 0, 0])).toEqual([0, 0, 0]);
    expect(Math.hypot(...oklab([90, 90, 90]).slice(1))).toBeLessThan(1e-3);
  });

  it("writes and reads colours", () => {
    expect(hexOf([255, 176.4, 46])).toBe("#ffb02e");
    expect(rgbOf("#ffb02e")).toEqual([255, 176, 46]);
    expect(rgbOf("orange")).toBeNull();
  });
});
