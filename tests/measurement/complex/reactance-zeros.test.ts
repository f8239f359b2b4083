import { describe, expect, test } from "vitest";
import { nearestZero, reactanceZeros } from "../../../app/measurement/complex/reactance-zeros.ts";
import truth from "../../fixtures/measurement/nec-q/truth.json";
import { even, impedanceSweep, necSweep, parallelResonator, seriesResonator } from "./sweeps.ts";

/** Truth: series and parallel resonators in closed form, whose X is zero at f0 with R there; NEC-2 fixtures by scipy's splines. */
const decks = import.meta.glob("../../fixtures/measurement/nec-q/*.csv", {
  query: "?raw",
  import: "default",
  eager: true,
}) as Record<string, string>;

describe("zeros of the reactance", () => {
  test.each([20, 50, 200])("a series resonator of %i Ω", (r) => {
    const zeros = reactanceZeros(impedanceSweep(even(12e6, 16e6, 401), seriesResonator(r, 12, 14.1503e6)));
    expect(zeros).toHaveLength(1);
    expect(zeros[0].kind).toBe("series");
    expect(Math.abs(zeros[0].frequencyHz / 14.1503e6 - 1)).toBeLessThan(1e-7);
    expect(zeros[0].resistanceOhm).toBeCloseTo(r, 3);
    expect(Math.abs(zeros[0].frequencyHz - 14.1503e6)).toBeLessThanOrEqual(zeros[0].frequencyHalfHz + 1);
  });

  test("a parallel resonator of 3 kΩ, whose reactance falls", () => {
    const zeros = reactanceZeros(impedanceSweep(even(20e6, 30e6, 801), parallelResonator(3000, 9, 26.69e6)));
    expect(zeros).toHaveLength(1);
    expect(zeros[0].kind).toBe("parallel");
    expect(zeros[0].frequencyHz / 26.69e6).toBeCloseTo(1, 6);
    expect(zeros[0].resistanceOhm / 3000).toBeCloseTo(1, 3);
  });

  test("all of a lossy line's: short at the end of 30 m, a zero each quarter wave, kinds in turn", () => {
    // Z = Z0·tanh(αl + jβl): zeros of X at l = n·λ/4, series (R = Z0·tanh αl) for even n, parallel (Z0·coth αl) for odd.
    const [z0, loss, quarterHz] = [50, 0.1, 299_792_458 / (4 * 30)];
    const line = (hz: number) => {
      const theta = (Math.PI / 2) * (hz / quarterHz);
      const [s, c] = [Math.tanh(loss), Math.tan(theta)];
      const below = 1 + (s * c) ** 2;
      return { re: (z0 * s * (1 + c * c)) / below, im: (z0 * c * (1 - s * s)) / below };
    };
    const zeros = reactanceZeros(impedanceSweep(even(1e6, 21e6, 1001), line));
    expect(zeros.map(({ kind }) => kind)).toEqual([
      ...Array.from({ length: 8 }, (_, n) => (n % 2 === 0 ? "parallel" : "series")),
    ]);
    for (const [n, zero] of zeros.entries()) {
      expect(zero.frequencyHz / (quarterHz * (n + 1))).toBeCloseTo(1, 6);
      const r = n % 2 === 0 ? z0 / Math.tanh(loss) : z0 * Math.tanh(loss);
      expect(zero.resistanceOhm / r).toBeCloseTo(1, 4);
    }
  });

  test.each(Object.entries(truth))("NEC-2 %s at scipy's frequency", (name, { zeroMhz, ohm }) => {
    const zeros = reactanceZeros(necSweep(decks[`../../fixtures/measurement/nec-q/${name}.csv`]));
    const zero = nearestZero(zeros, zeroMhz * 1e6);
    expect(zero?.kind).toBe("series");
    expect(Math.abs((zero?.frequencyHz ?? 0) / (zeroMhz * 1e6) - 1)).toBeLessThan(2e-5);
    expect((zero?.resistanceOhm ?? 0) / ohm).toBeCloseTo(1, 3);
  });

  test("noise makes one crossing, not many, and its interval covers the truth", () => {
    let covered = 0;
    const trials = 400;
    for (let start = 1; start <= trials; start++) {
      const offset = ((start * 37) % 100) * 50;
      const f0Hz = 14.15e6 + offset;
      const zeros = reactanceZeros(
        impedanceSweep(even(13e6, 15.3e6, 461), seriesResonator(40, 10, f0Hz), { sigma: 0.01, start }),
      );
      expect(zeros).toHaveLength(1);
      if (Math.abs(zeros[0].frequencyHz - f0Hz) <= zeros[0].frequencyHalfHz) covered++;
    }
    expect(covered / trials).toBeGreaterThan(0.9);
  });

  test("no zero in a scalar sweep, in none, at the open end's turn, on a flat line, across a gap", () => {
    const sweep = impedanceSweep(even(13e6, 15e6, 201), seriesResonator(50, 10, 14e6));
    expect(reactanceZeros({ ...sweep, gammaRe: undefined, gammaIm: undefined })).toEqual([]);
    expect(reactanceZeros(impedanceSweep([], seriesResonator(50, 10, 14e6)))).toEqual([]);
    expect(reactanceZeros(impedanceSweep([1e6], seriesResonator(50, 10, 14e6)))).toEqual([]);
    expect(reactanceZeros(impedanceSweep(even(1e6, 2e6, 101), () => ({ re: 50, im: 0 })))).toEqual([]);
    // An open line without loss: X jumps from +∞ to −∞ where Γ passes 1, which is no zero.
    const open = (hz: number) => ({ re: 0, im: 50 * Math.tan(Math.PI * (hz / 10e6)) });
    expect(reactanceZeros(impedanceSweep(even(4.01e6, 6.02e6, 88), open))).toEqual([]);
    const gap = { ...sweep, gammaRe: sweep.gammaRe?.slice(), gammaIm: sweep.gammaIm?.slice() };
    gap.gammaIm?.fill(Number.NaN, 95, 106);
    gap.gammaRe?.fill(Number.NaN, 95, 106);
    expect(reactanceZeros(gap)).toEqual([]);
    expect(nearestZero([], 1e6)).toBeNull();
  });

  test("a zero exactly on a sample", () => {
    const zeros = reactanceZeros(impedanceSweep(even(13e6, 15e6, 201), seriesResonator(35, 10, 14e6)));
    expect(zeros).toHaveLength(1);
    expect(zeros[0].frequencyHz / 14e6).toBeCloseTo(1, 6);
    expect(zeros[0].resistanceOhm).toBeCloseTo(35, 1);
  });
});
