import { describe, expect, test } from "vitest";
import { analyse } from "../../../app/measurement/analyse.ts";
import { halfDepthWidthHz, sweepAgain } from "../../../app/measurement/dips/advice.ts";
import { resonatorSweep, sweepOf, truthOf } from "../resonators.ts";

const grid = Float64Array.from({ length: 101 }, (_, i) => 10e6 + i * 50e3);

describe("too few points", () => {
  test("four steps and more need nothing, less asks for a narrower sweep around the dip", () => {
    expect(sweepAgain(grid, 50, 12.5e6, 200e3)).toBeNull();
    const advice = sweepAgain(grid, 50, 12.5e6, 199e3);
    expect(advice).not.toBeNull();
    if (!advice) return;
    expect(advice.startHz).toBeLessThan(12.5e6 - 199e3);
    expect(advice.stopHz).toBeGreaterThan(12.5e6 + 199e3);
    expect(advice.points % 2).toBe(1);
    const stepHz = (advice.stopHz - advice.startHz) / (advice.points - 1);
    expect(199e3 / stepHz).toBeGreaterThanOrEqual(20);
  });

  test("a spike keeps room for where it may be and bounded points", () => {
    const advice = sweepAgain(grid, 50, 12.5e6, 1);
    expect(advice?.points).toBe(10_001);
    expect((advice?.stopHz ?? 0) - (advice?.startHz ?? 0)).toBeGreaterThanOrEqual(200e3);
  });

  test("the sweep that is advised needs no further advice, and finds the same dip", () => {
    const shape = { r: 1.3, q: 60, points: 61 };
    const [dip] = analyse(resonatorSweep({ ...shape, spanHz: 8e6 })).dips.filter((d) => !d.edge);
    expect(dip.advice).not.toBeNull();
    const { startHz, stopHz, points } = dip.advice as NonNullable<typeof dip.advice>;
    const middle = (startHz + stopHz) / 2;
    const again = resonatorSweep({ ...shape, points, spanHz: stopHz - startHz, offset: 0 });
    expect(Math.abs(middle - 14.15e6)).toBeLessThan((stopHz - startHz) / 4);
    const result = analyse(again);
    const [better] = result.dips.filter((d) => !d.edge);
    expect(better.advice).toBeNull();
    expect(Math.abs((better.bandwidth?.widthHz ?? 0) / (truthOf(shape).widthHz ?? 1) - 1)).toBeLessThan(1e-6);
    expect(analyse(resonatorSweep({ ...shape, spanHz: 8e6 })).warnings.map((w) => w.code)).toContain(
      "few-points-in-dip",
    );
  });
});

describe("width at half depth", () => {
  test("a triangle in abs Γ", () => {
    const { frequencyHz, magnitude } = sweepOf([0.9, 0.1, 0.9]);
    const half = 0.1 * 10 ** (10 / 20);
    expect(halfDepthWidthHz(frequencyHz, magnitude, 1, 20)).toBeCloseTo((2 * (half - 0.1) * 1e4) / 0.8, 6);
  });

  test("ends of the sweep, gaps and a perfect match stay finite", () => {
    for (const values of [
      [0.1, 0.9],
      [Number.NaN, 0.1, Number.NaN],
      [0.9, 0, 0.9],
    ]) {
      const { frequencyHz, magnitude } = sweepOf(values);
      const index = magnitude.findIndex((v) => v < 0.2);
      const width = halfDepthWidthHz(
        frequencyHz,
        magnitude,
        index,
        values.includes(0) ? Number.POSITIVE_INFINITY : 12,
      );
      expect(Number.isFinite(width)).toBe(true);
      expect(width).toBeGreaterThanOrEqual(0);
    }
  });
});
