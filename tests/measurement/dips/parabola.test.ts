import { describe, expect, test } from "vitest";
import { parabolaDip, parabolaTop } from "../../../app/measurement/dips/parabola.ts";
import { resonatorSweep } from "../resonators.ts";

describe("three points", () => {
  test("any parabola, any spacing: its very vertex", () => {
    for (const [bend, x0, y0] of [
      [-2, 0.3, 7],
      [-1e-6, 1.2e6, 20],
      [-300, -0.01, 1],
    ]) {
      const y = (x: number) => y0 + bend * (x - x0) ** 2;
      const width = Math.sqrt(1 / -bend);
      for (const [left, right] of [
        [-1, 1],
        [-0.2, 1.7],
        [-1.5, 0.1],
      ]) {
        const x = [x0 + left * width, x0 + 0.03 * width, x0 + right * width];
        const top = parabolaTop(x, x.map(y));
        expect(Math.abs((top?.x ?? 0) - x0)).toBeLessThan(1e-9 * width + 1e-9 * Math.abs(x0));
        expect(top?.y).toBeCloseTo(y0, 9);
      }
    }
  });

  test("a line, a valley, infinities have none", () => {
    expect(parabolaTop([0, 1, 2], [1, 2, 3])).toBeNull();
    expect(parabolaTop([0, 1, 2], [3, 1, 3])).toBeNull();
    expect(parabolaTop([0, 1, 2], [3, Number.POSITIVE_INFINITY, 3])).toBeNull();
    expect(parabolaTop([0, 1, 2], [1, 1, 1])).toBeNull();
  });
});

describe("a dip by its parabola", () => {
  const dipOf = (stepHz: number, offset: number, noise = 0) => {
    const { frequencyHz, magnitude } = resonatorSweep({ r: 1.5, q: 12, points: 21, stepHz, offset });
    const index = magnitude.indexOf(Math.min(...magnitude));
    return parabolaDip(frequencyHz, magnitude, index, noise);
  };

  test("the step's part covers what the step does, and falls with its square", () => {
    for (const offset of [0, 0.2, 0.37, 0.49, 0.8]) {
      for (const stepHz of [40e3, 80e3, 160e3]) {
        const dip = dipOf(stepHz, offset);
        expect(Math.abs((dip?.frequencyHz ?? 0) - 14.15e6)).toBeLessThanOrEqual(
          (dip?.frequencyHalfHz ?? 0) + 1,
        );
        expect(dip?.frequencyHalfHz ?? 1e9).toBeLessThan(stepHz);
      }
    }
    expect(dipOf(20e3, 0.37)?.frequencyHalfHz ?? 1e9).toBeLessThan(
      (dipOf(160e3, 0.37)?.frequencyHalfHz ?? 0) / 20,
    );
  });

  test("noise widens the interval; a bend that may be scatter is no dip", () => {
    const quiet = dipOf(40e3, 0.37);
    const noisy = dipOf(40e3, 0.37, 0.02);
    expect(noisy?.frequencyHalfHz ?? 0).toBeGreaterThan(2 * (quiet?.frequencyHalfHz ?? 0));
    const width = (dip: typeof noisy) => (dip ? dip.swr.high - dip.swr.low : Number.NaN);
    expect(width(noisy)).toBeGreaterThan(width(quiet));
    expect(noisy?.stepShare).toBeLessThan(quiet?.stepShare ?? 0);
    expect(dipOf(40e3, 0.37, 0.5)).toBeNull();
  });
});
