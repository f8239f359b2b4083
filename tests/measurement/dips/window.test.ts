import { describe, expect, test } from "vitest";
import { meanPoints, selectPoints } from "../../../app/measurement/dips/points.ts";
import { resonatorPower } from "../../../app/measurement/dips/resonator.ts";
import { fitWindow } from "../../../app/measurement/dips/window.ts";
import { normals, resonatorSweep } from "../resonators.ts";

const window = (
  values: number[],
  index: number,
  prominenceDb: number,
  before = 0,
  after = values.length - 1,
) => fitWindow(Float64Array.from(values), index, prominenceDb, before, after);

describe("how far a fit reaches", () => {
  test("to the first sample over SWR 5 on each side", () => {
    const values = [0.99, 0.9, 0.8, 0.6, 0.3, 0.1, 0.2, 0.5, 0.66, 0.7, 0.95];
    expect(window(values, 5, 19)).toEqual({ from: 2, to: 9 });
  });

  test("in scatter: between the first sample over SWR 5 and the last one under it", () => {
    const values = [0.99, 0.9, 0.7, 0.6, 0.68, 0.5, 0.1, 0.5, 0.68, 0.64, 0.7, 0.65, 0.69, 0.9, 0.95];
    const scattered = (sigma: number) => fitWindow(Float64Array.from(values), 6, 19, 0, 14, sigma);
    expect(scattered(0)).toEqual({ from: 4, to: 8 });
    expect(scattered(0.02)).toEqual({ from: 3, to: 9 });
  });

  test("a shallow dip: half of the way to its crest", () => {
    const values = [0.95, 0.94, 0.92, 0.86, 0.78, 0.7, 0.78, 0.86, 0.92, 0.94, 0.95];
    const { from, to } = window(values, 5, 20 * Math.log10(0.95 / 0.7));
    expect(from).toBeLessThanOrEqual(3);
    expect(to).toBeGreaterThanOrEqual(7);
  });

  test("to the crest before a neighbour, and not over it", () => {
    const values = [0.9, 0.1, 0.3, 0.5, 0.4, 0.1, 0.9];
    expect(window(values, 1, 14, 0, 5)).toEqual({ from: 0, to: 3 });
    expect(window(values, 5, 14, 1, 6)).toEqual({ from: 3, to: 6 });
  });

  test("to the end of the sweep or the last sample before a gap", () => {
    expect(window([0.4, 0.2, 0.1, 0.2, 0.5], 2, 12)).toEqual({ from: 0, to: 4 });
    expect(window([0.9, Number.NaN, 0.2, 0.1, 0.2, Number.NaN, 0.9], 3, 6)).toEqual({ from: 2, to: 4 });
    expect(window([0.1], 0, 3)).toEqual({ from: 0, to: 0 });
  });

  test("a perfect match", () => {
    expect(window([0.9, 0.3, 0, 0.3, 0.9], 2, Number.POSITIVE_INFINITY)).toEqual({ from: 0, to: 4 });
  });
});

describe("points of a long window", () => {
  const sweep = resonatorSweep({ r: 1.3, q: 12, points: 40_001, spanHz: 3e6 });
  const whole = { from: 100, to: 39_900 };
  const p = Float64Array.of(1 - (0.3 / 2.3) ** 2, 0, Math.log((1.3 * 12) / 2.3), 1);

  test("a selection is bounded, ascending and made of samples", () => {
    const { x, y, weight } = selectPoints(sweep.frequencyHz, sweep.magnitude, whole, 14.15e6, 240);
    expect(x.length).toBeLessThanOrEqual(240);
    expect(x.length).toBeGreaterThan(200);
    expect([y.length, weight.length]).toEqual([x.length, x.length]);
    for (let k = 1; k < x.length; k++) expect(x[k]).toBeGreaterThan(x[k - 1]);
    expect(y[0]).toBe(sweep.magnitude[100] ** 2);
    const few = selectPoints(sweep.frequencyHz, sweep.magnitude, { from: 7, to: 11 }, 14.15e6, 240);
    expect(few.x.length).toBe(5);
  });

  test("means lie on the resonator itself: the bend inside a block is taken off", () => {
    const gradient = new Float64Array(4);
    for (const most of [50, 400]) {
      const { x, y } = meanPoints(sweep.frequencyHz, sweep.magnitude, whole, 14.15e6, most, p);
      let worst = 0;
      for (let k = 0; k < x.length; k++)
        worst = Math.max(worst, Math.abs(y[k] - resonatorPower(p)(x[k], gradient)));
      expect(worst).toBeLessThan(most === 50 ? 2e-5 : 3e-7);
    }
  });

  test("means of noise are as much quieter as their number allows", () => {
    const normal = normals(31);
    const noisy = sweep.magnitude.map((v) => v + 0.01 * normal());
    const gradient = new Float64Array(4);
    const { x, y } = meanPoints(sweep.frequencyHz, noisy, whole, 14.15e6, 400, p);
    let sum = 0;
    for (let k = 0; k < x.length; k++) {
      const model = resonatorPower(p)(x[k], gradient);
      sum += (y[k] - 1e-4 - model) ** 2 / (4 * model * 1e-4);
    }
    const share = Math.sqrt(sum / x.length) * Math.sqrt(39_801 / x.length);
    expect(share).toBeGreaterThan(0.9);
    expect(share).toBeLessThan(1.1);
  });
});
