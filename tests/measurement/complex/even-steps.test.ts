import { expect, test } from "vitest";
import { evenSteps } from "../../../app/measurement/complex/even-steps.ts";
import { even, impedanceSweep, seriesResonator } from "./sweeps.ts";

/** Truth: Γ of a series resonator of R = Z0 runs on the circle of radius 1/2 about 1/2: even steps are even angles on it. */
const sweep = impedanceSweep(even(10e6, 18e6, 20_001), seriesResonator(50, 60, 14e6));

test("steps are even on the circle that a resonator draws, where frequencies are not", () => {
  const kept = evenSteps(sweep, 0, 20_000, 60);
  expect(kept.length).toBeGreaterThan(50);
  expect(kept.length).toBeLessThan(65);
  const angle = (i: number) => Math.atan2(sweep.gammaIm?.[i] ?? 0, (sweep.gammaRe?.[i] ?? 0) - 0.5);
  const turns = kept.slice(1, -1).map((at, k) => {
    const turn = angle(at) - angle(kept[k]);
    return Math.abs(turn - 2 * Math.PI * Math.round(turn / (2 * Math.PI)));
  });
  expect(Math.max(...turns) / Math.min(...turns)).toBeLessThan(1.2);
});

test("the ends are kept, gaps are not, and a scalar sweep has none", () => {
  const gap = { ...sweep, gammaRe: sweep.gammaRe?.slice() };
  gap.gammaRe?.fill(Number.NaN, 9000, 9500);
  const kept = evenSteps(gap, 100, 19_000, 40);
  expect(kept[0]).toBe(100);
  expect(kept.at(-1)).toBe(19_000);
  expect(kept.filter((i) => i >= 9000 && i < 9500)).toEqual([]);
  expect(evenSteps({ ...sweep, gammaRe: undefined }, 0, 10, 5)).toEqual([]);
  expect(
    evenSteps(
      impedanceSweep([1e6, 2e6], () => ({ re: 50, im: 0 })),
      0,
      1,
      5,
    ),
  ).toEqual([0, 1]);
});
