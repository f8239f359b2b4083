import { describe, expect, it } from "vitest";
import { alignToLines } from "../../../app/readers/screenshot/align.ts";
import { fitTicks, type Tick } from "../../../app/readers/screenshot/tick-fit.ts";

const tick = (position: number, ...values: number[]): Tick => ({
  position,
  candidates: values.map((value, i) => ({ value, weight: i === 0 ? 1 : 0.5 })),
});

describe("fitTicks", () => {
  it("agrees on a line in spite of wrong labels", () => {
    const ticks = [tick(0, 0), tick(50, -10), tick(100, 24), tick(150, -30), tick(200, 46, -40)];
    const fit = fitTicks(ticks, 200, "linear");
    expect(fit?.inliers).toBe(4);
    expect(fit?.slope).toBeCloseTo(-0.2, 6);
    expect(fit?.intercept).toBeCloseTo(0, 6);
  });

  it("finds decades on a logarithmic axis and no line through them", () => {
    const ticks = [tick(0, 1), tick(100, 10), tick(200, 100)];
    expect(fitTicks(ticks, 200, "log")?.slope).toBeCloseTo(0.01, 9);
    expect(fitTicks(ticks, 200, "linear")?.inliers).toBe(2);
  });

  it("needs two labels that differ", () => {
    expect(fitTicks([tick(0, 5)], 100, "linear")).toBeNull();
    expect(fitTicks([tick(0, 5), tick(90, 5)], 100, "linear")).toBeNull();
    expect(fitTicks([], 100, "linear")).toBeNull();
  });

  it("prefers labels that are whole multiples of their distance", () => {
    const ticks = [9.8, 8.8, 7.8]
      .map((v, i) => tick(40 * i, v, Math.trunc(v)))
      .concat(tick(120, 6), tick(160, 5));
    const fit = fitTicks(ticks, 160, "linear");
    expect(fit?.intercept).toBeCloseTo(9, 6);
  });
});

describe("alignToLines", () => {
  it("moves all labels as those beside lines miss them", () => {
    const labels = [0, 100, 200, 300].map((position) => ({ position }));
    expect(alignToLines(labels, [2, 102, 302], 6).map((l) => l.position)).toEqual([2, 102, 202, 302]);
  });

  it("leaves labels where lines are near by chance only", () => {
    const labels = [0, 100, 200, 300].map((position) => ({ position }));
    expect(alignToLines(labels, [3, 196], 6)).toEqual(labels);
  });
});
