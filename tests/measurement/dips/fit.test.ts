import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { fitDip } from "../../../app/measurement/dips/fit.ts";
import { leastSquares } from "../../../app/measurement/dips/least-squares.ts";
import {
  edgesAt,
  hzAt,
  lowestHz,
  lowestPower,
  resonatorOf,
  resonatorPower,
} from "../../../app/measurement/dips/resonator.ts";
import { fitWindow } from "../../../app/measurement/dips/window.ts";
import scipy from "../../fixtures/measurement/scipy.json";
import { normals, resonatorSweep, truthOf } from "../resonators.ts";

const NO_NOISE = { db: 0, gamma: 0, sweepDb: 0 };

function fitOf(sweep: ReturnType<typeof resonatorSweep>, noise = NO_NOISE) {
  const { frequencyHz, magnitude } = sweep;
  const index = magnitude.indexOf(Math.min(...magnitude));
  const prominence =
    20 * Math.log10(Math.min(magnitude[0], magnitude[magnitude.length - 1]) / magnitude[index]);
  const window = fitWindow(magnitude, index, prominence, 0, magnitude.length - 1);
  return fitDip(frequencyHz, magnitude, index, window, noise, false);
}

/** Truth: scipy.optimize.curve_fit with absolute sigma (tests/reference/scipy_dips.py). */
describe("Levenberg–Marquardt as scipy has it", () => {
  test.each(scipy.fits.map((fit, k) => [k, fit] as const))("fit %d: values and covariance", (_, fit) => {
    const weight = Float64Array.from(fit.sigma, (s) => 1 / (s * s));
    const [x, y] = [Float64Array.from(fit.x), Float64Array.from(fit.y)];
    const solution = leastSquares({
      model: resonatorPower,
      x,
      y,
      weight,
      start: Float64Array.of(0.8, 0, Math.log(12), 0.98),
      free: 4,
    });
    expect(solution.converged).toBe(true);
    for (let i = 0; i < 4; i++) {
      const sigma = Math.sqrt(fit.covariance[i][i]);
      expect(Math.abs(solution.p[i] - fit.p[i]) / sigma).toBeLessThan(1e-4);
      for (let j = 0; j < 4; j++) {
        const scale = sigma * Math.sqrt(fit.covariance[j][j]);
        expect(
          Math.abs((solution.inverse as Float64Array)[4 * i + j] - fit.covariance[i][j]) / scale,
        ).toBeLessThan(2e-3);
      }
    }
  });

  test("what cannot be told is said: no slope, no covariance", () => {
    const x = Float64Array.of(0, 0.1, 0.2, 0.3, 0.4);
    const { inverse } = leastSquares({
      model: (p) => (_, gradient) => {
        gradient.fill(0);
        return p[0];
      },
      x,
      y: x,
      weight: x.map(() => 1),
      start: Float64Array.of(1),
      free: 1,
    });
    expect(inverse).toBeNull();
  });

  test("a model that is not finite never throws", () => {
    const x = Float64Array.of(1, 2, 3);
    const solution = leastSquares({
      model: () => () => Number.NaN,
      x,
      y: x,
      weight: x,
      start: Float64Array.of(1, 1),
      free: 2,
    });
    expect(solution.converged).toBe(false);
  });

  test.each([[[]], [[0.12]], [[0.12, -0.07]], [[0.12, -0.07, 0.04]]])(
    "slopes agree with differences, with %j beside",
    (extra) => {
      const p = Float64Array.of(0.8, 0.01, Math.log(9), ...extra, 0.97);
      const gradient = new Float64Array(p.length);
      const unused = new Float64Array(p.length);
      for (const x of [-0.2, -0.03, 0.01, 0.012, 0.15]) {
        resonatorPower(p)(x, gradient);
        for (let i = 0; i < p.length; i++) {
          const [up, down] = [Float64Array.from(p), Float64Array.from(p)];
          up[i] += 1e-6;
          down[i] -= 1e-6;
          const slope = (resonatorPower(up)(x, unused) - resonatorPower(down)(x, unused)) / 2e-6;
          expect(Math.abs(slope - gradient[i])).toBeLessThan(1e-7);
        }
      }
    },
  );
});

describe("closed form", () => {
  test("any resonator is found again from its own samples", () => {
    const shape = fc.record({
      r: fc.double({ min: 0.4, max: 2.5, noNaN: true }),
      q: fc.double({ min: 2.5, max: 400, noNaN: true }),
      a: fc.double({ min: 0.75, max: 1, noNaN: true }),
      f0Hz: fc.double({ min: 1.5e6, max: 1.3e9, noNaN: true }),
      offset: fc.double({ min: 0, max: 1, noNaN: true }),
    });
    fc.assert(
      fc.property(shape, (given) => {
        const stepHz = given.f0Hz / given.q / 22;
        const points = Math.min(151, 2 * Math.floor((0.9 * given.f0Hz) / stepHz / 2) + 1);
        const fit = fitOf(resonatorSweep({ ...given, points, stepHz }));
        expect(fit).not.toBeNull();
        if (!fit) return;
        const { resonator, power } = fit;
        expect(Math.abs(resonator.f0Hz / given.f0Hz - 1)).toBeLessThan(1e-9);
        const swr = (1 + Math.sqrt(power)) / (1 - Math.sqrt(power));
        expect(Math.abs(swr / truthOf(given).swr - 1)).toBeLessThan(1e-6);
        expect(resonator.farPower).toBeCloseTo(given.a ** 2, 7);
        expect(resonator.kappa / ((given.r * given.q) / (given.r + 1))).toBeCloseTo(1, 6);
      }),
      { numRuns: 150 },
    );
  });

  test("edges, and none where the resonator stays above or below", () => {
    const resonator = { f0Hz: 1, farPower: 1, depth: 0.9, kappa: 5, skew: 0, tilt: 0, curve: 0 };
    expect(lowestPower(resonator)).toBeCloseTo(0.1, 12);
    expect(lowestPower({ ...resonator, depth: 1.01 })).toBeCloseTo(-0.01, 12);
    expect(edgesAt(resonator, 0.05)).toBeNull();
    expect(edgesAt(resonator, 1)).toBeNull();
    const [low, high] = edgesAt(resonator, 1 / 9) as [number, number];
    expect(low).toBe(-high);
    expect(1 - 0.9 / (1 + high * high)).toBeCloseTo(1 / 9, 12);
  });

  /** Truth: the samples of the same function, a grid of a million. */
  test.each([
    { skew: 0.2, tilt: 0, curve: 0 },
    { skew: -0.15, tilt: 0.08, curve: 0 },
    { skew: 0.01, tilt: -0.1, curve: 0 },
    { skew: 0.1, tilt: -0.06, curve: 0.05 },
    { skew: 0, tilt: 0, curve: -0.04 },
  ])("skew, tilted and curved: lowest point and edges, %j", ({ skew, tilt, curve }) => {
    const p = Float64Array.of(0.9, 0, Math.log(5), skew, tilt, curve, 1);
    const resonator = resonatorOf(p, 1);
    const gradient = new Float64Array(7);
    const at = (hz: number) => resonatorPower(p)(Math.log(hz), gradient);
    let best = 0.9;
    for (let hz = 0.9; hz < 1.1; hz += 2e-7) if (at(hz) < at(best)) best = hz;
    expect(Math.abs(lowestHz(resonator) - best)).toBeLessThan(3e-7);
    expect(Math.abs(lowestPower(resonator) - at(best))).toBeLessThan(1e-9);
    for (const w of edgesAt(resonator, 0.3) as [number, number])
      expect(at(hzAt(resonator, w))).toBeCloseTo(0.3, 10);
  });

  /** Γm = D + (1+T)·Γ with constant D and T is that resonator exactly. */
  test("a resonator seen through constant errors of a bench is fitted to the last digits", () => {
    const sweep = resonatorSweep({ r: 1.3, q: 12, points: 121, spanHz: 3e6, complex: true });
    const { gammaRe, gammaIm } = sweep as Required<typeof sweep>;
    const seen = sweep.magnitude.map((_, i) =>
      Math.hypot(0.02 + 1.01 * gammaRe[i] + 0.02 * gammaIm[i], -0.04 + 1.01 * gammaIm[i] - 0.02 * gammaRe[i]),
    );
    const fit = fitOf({ ...sweep, magnitude: seen });
    expect(fit?.whole).toBe(true);
    let worst = 0;
    const gradient = new Float64Array(6);
    const r = (fit as NonNullable<typeof fit>).resonator;
    const p = Float64Array.of(r.depth, Math.log(r.f0Hz), Math.log(r.kappa), r.skew, r.tilt, r.farPower);
    for (let i = 30; i < 90; i++)
      worst = Math.max(
        worst,
        Math.abs(resonatorPower(p)(Math.log(sweep.frequencyHz[i]), gradient) - seen[i] ** 2),
      );
    expect(worst).toBeLessThan(1e-9);
  });
});

describe("what is refused", () => {
  test("a shape that is no resonator, without noise to excuse it", () => {
    const sweep = resonatorSweep({ r: 1.3, q: 12, points: 121, spanHz: 4e6 });
    const bent = sweep.magnitude.map((v, i) => v * (1 + 0.2 * Math.sin(i / 7)));
    expect(fitOf({ ...sweep, magnitude: bent })).toBeNull();
  });

  test("fewer than five samples", () => {
    expect(fitOf(resonatorSweep({ r: 1.3, q: 12, points: 4, spanHz: 1e6 }))).toBeNull();
  });

  test("five samples with as much left over as the noise allows are taken", () => {
    const fit = fitOf(resonatorSweep({ r: 1.3, q: 12, points: 5, spanHz: 2.4e6 }));
    expect(Math.abs((fit?.frequencyHz ?? 0) / 14.15e6 - 1)).toBeLessThan(1e-6);
  });
});

describe("long sweeps", () => {
  test("100,001 noisy samples are fitted on all of them, quickly, and as well as their number allows", () => {
    const normal = normals(21);
    const sweep = resonatorSweep({ r: 1.4, q: 12, points: 100_001, spanHz: 4e6 });
    const magnitude = sweep.magnitude.map((v) => v * 10 ** ((0.1 * normal()) / 20));
    const fit = fitOf({ ...sweep, magnitude }, { db: 0.1, gamma: 0.01, sweepDb: 0.1 });
    expect(fit?.frequencyHalfHz).toBeLessThan(150);
    expect(fit?.frequencyHalfHz).toBeGreaterThan(20);
    expect(Math.abs((fit?.frequencyHz ?? 0) - 14.15e6)).toBeLessThan(2 * (fit?.frequencyHalfHz ?? 0));
    expect(Math.abs(Math.sqrt(fit?.power ?? 0) - 1 / 6)).toBeLessThan(2e-4);
  });
});
