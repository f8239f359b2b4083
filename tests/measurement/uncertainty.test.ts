import { describe, expect, test } from "vitest";
import { analyse } from "../../app/measurement/analyse.ts";
import { combine, student95, swrInterval } from "../../app/measurement/uncertainty.ts";
import scipy from "../fixtures/measurement/scipy.json";
import { normals, resonatorSweep, type Shape, truthOf, uniforms } from "./resonators.ts";

describe("parts", () => {
  test("independent parts add as squares; one that is not known makes the whole not known", () => {
    expect(combine(3, 4)).toBe(5);
    expect(combine()).toBe(0);
    expect(combine(3, null)).toBeNull();
    expect(combine(3, Number.NaN)).toBeNull();
  });

  /** Truth: scipy.stats.t.ppf(0.975, ν) (tests/reference/scipy_dips.py). */
  test.each(scipy.student95)("Student's t for %d degrees of freedom", (freedom, quantile) => {
    expect(Math.abs(student95(freedom) / quantile - 1)).toBeLessThan(freedom < 4 ? 0.004 : 0.001);
  });

  test("no freedom, no quantile", () => {
    expect(student95(0)).toBeNaN();
    expect(student95(Number.NaN)).toBeNaN();
  });

  test("SWR from the interval of reflected power", () => {
    expect(swrInterval(0.04, 0.03)?.low).toBeCloseTo(1.1 / 0.9, 12);
    expect(swrInterval(0.04, 0.05)?.low).toBe(1);
    expect(swrInterval(0.9, 0.2)?.high).toBe(Number.POSITIVE_INFINITY);
    expect(swrInterval(0.04, null)).toBeNull();
  });
});

type Kind = "decibel" | "complex" | "even";

/** Share of 2,000 simulated sweeps with known truth whose 95 % intervals cover it. */
function coverage(shape: Shape, kind: Kind, sigmaDb: number, trials: number) {
  const uniform = uniforms(5);
  const normal = normals(6);
  const truth = truthOf(shape);
  const sigma = (sigmaDb * Math.LN10) / 20;
  let frequency = 0;
  let swr = 0;
  let width = 0;
  for (let trial = 0; trial < trials; trial++) {
    const sweep = resonatorSweep({ ...shape, offset: uniform(), complex: true });
    const { gammaRe, gammaIm } = sweep as Required<typeof sweep>;
    for (let i = 0; i < shape.points; i++) {
      if (kind === "complex") {
        gammaRe[i] += sigma * normal();
        gammaIm[i] += sigma * normal();
        sweep.magnitude[i] = Math.hypot(gammaRe[i], gammaIm[i]);
      } else if (kind === "even") sweep.magnitude[i] = Math.abs(sweep.magnitude[i] + sigma * normal());
      else sweep.magnitude[i] *= 10 ** ((sigmaDb * normal()) / 20);
    }
    const measured = kind === "complex" ? sweep : { ...sweep, gammaRe: undefined, gammaIm: undefined };
    const inner = analyse(measured).dips.filter((dip) => !dip.edge);
    if (inner.length !== 1) continue;
    const [dip] = inner;
    if (Math.abs(dip.frequencyHz - 14.15e6) <= (dip.frequencyUncertaintyHz ?? 0)) frequency++;
    if (truth.swr >= (dip.minimumSwrNoiseLow ?? 9) && truth.swr <= (dip.minimumSwrNoiseHigh ?? 0)) swr++;
    const { widthHz, widthUncertaintyHz } = dip.bandwidth ?? { widthHz: 0, widthUncertaintyHz: 0 };
    if (Math.abs(widthHz - (truth.widthHz ?? 0)) <= (widthUncertaintyHz ?? 0)) width++;
  }
  return { frequency: frequency / trials, swr: swr / trials, width: width / trials };
}

/** MEASUREMENT section 3: 93 to 97 % of at least 2,000 trials. */
describe("intervals cover the truth", () => {
  const cases: [string, Kind, Shape, number][] = [
    ["a detector's scatter in dB, 20 points in the band", "decibel", shapeOf(1.4, 12, 20), 0.1],
    ["the same, near match, 30 points", "decibel", shapeOf(1.06, 12, 30), 0.1],
    ["a receiver's scatter in complex Γ", "complex", shapeOf(1.4, 12, 20), 0.1],
    ["an even scatter of abs Γ, lossy line", "even", shapeOf(1.4, 30, 16, 0.95), 0.08],
  ];
  test.each(cases)("%s", { timeout: 60_000 }, (_, kind, shape, sigmaDb) => {
    const shares = coverage(shape, kind, sigmaDb, 2000);
    for (const share of [shares.frequency, shares.swr]) {
      expect(share).toBeGreaterThanOrEqual(0.93);
      expect(share).toBeLessThanOrEqual(0.97);
    }
    expect(shares.width).toBeGreaterThan(0.92);
    expect(shares.width).toBeLessThan(0.98);
  });
});

function shapeOf(r: number, q: number, pointsPerBand: number, a = 1): Shape {
  const stepHz = (truthOf({ r, q, a }).widthHz as number) / pointsPerBand;
  return { r, q, a, points: 8 * pointsPerBand + 1, stepHz };
}
