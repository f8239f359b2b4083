import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { ANALYSIS_VERSION, analyse } from "../../app/measurement/analyse.ts";
import type { Dip, Sweep } from "../../app/measurement/sweep.ts";
import { normals, resonatorSweep, sweepOf, truthOf } from "./resonators.ts";

const codes = (sweep: Sweep) => analyse(sweep).warnings.map((warning) => warning.code);
const inner = (sweep: Sweep) => analyse(sweep).dips.filter((dip) => !dip.edge);

describe("nothing in it", () => {
  test.each<[string, number[], string]>([
    ["empty", [], "no-points"],
    ["one point", [0.4], "too-few-points"],
    ["two points", [0.4, 0.9], "too-few-points"],
    ["only gaps", [Number.NaN, Number.NaN, Number.NaN], "only-gaps"],
    ["flat", new Array(40).fill(0.3), "flat"],
  ])("%s says so", (_, values, code) => {
    const analysis = analyse(sweepOf(values));
    expect(analysis.dips.filter((dip) => !dip.edge)).toEqual([]);
    expect(analysis.warnings.map((w) => w.code)).toContain(code);
    expect(analysis.noiseDb).toBe(0);
    expect(analysis.version).toBe(ANALYSIS_VERSION);
  });

  test("pure noise has no dips at any length", () => {
    const normal = normals(2);
    for (const n of [50, 500, 5000, 200_000]) {
      for (const sigmaDb of [0.1, 0.3]) {
        const values = Array.from({ length: n }, () => 0.8 * 10 ** ((sigmaDb * normal()) / 20));
        expect(inner(sweepOf(values))).toEqual([]);
      }
    }
  });
});

describe("settings", () => {
  test("are kept as used; senseless ones fall back", () => {
    const sweep = resonatorSweep({ r: 1.2, q: 12, points: 201, spanHz: 6e6 });
    expect(analyse(sweep, { swrLimit: 3 }).settings).toEqual({ swrLimit: 3, minimumProminenceDb: 3 });
    expect(analyse(sweep, { swrLimit: 1, minimumProminenceDb: -1 }).settings.swrLimit).toBe(2);
    expect(
      analyse(sweep, { swrLimit: Number.NaN, minimumProminenceDb: Number.NaN }).settings.minimumProminenceDb,
    ).toBe(3);
    expect(analyse(sweep, { swrLimit: undefined }).settings.swrLimit).toBe(2);
  });

  test("a higher prominence hides, a higher limit widens", () => {
    const sweep = resonatorSweep({ r: 1.2, q: 12, points: 201, spanHz: 6e6 });
    expect(analyse(sweep, { minimumProminenceDb: 40 }).dips).toEqual([]);
    const width = (swrLimit: number) => analyse(sweep, { swrLimit }).dips[0].bandwidth?.widthHz ?? 0;
    expect(width(3)).toBeGreaterThan(width(2));
  });
});

describe("methods", () => {
  test("a resonator is fitted", () => {
    const [dip] = inner(resonatorSweep({ r: 1.4, q: 12, points: 201, spanHz: 6e6 }));
    expect(dip).toMatchObject({ method: "fit", edge: false, advice: null });
    expect(dip.returnLossDb).toBeCloseTo(15.563, 3);
  });

  test("another shape has a parabola", () => {
    const values = Array.from(
      { length: 101 },
      (_, i) => 0.1 + 0.8 * Math.min(1, (Math.abs(i - 50.3) / 40) ** 1.5),
    );
    const [dip] = inner(sweepOf(values));
    expect(dip.method).toBe("parabola");
    expect(Math.abs(dip.frequencyHz - (1e6 + 50.3e4))).toBeLessThan(3000);
    expect(dip.frequencyUncertaintyHz).toBeGreaterThan(0);
  });

  test("one deep sample between crests is only that", () => {
    const [dip] = inner(sweepOf([0.9, 0.9, 0.2, 0.9, 0.9]));
    expect(dip).toMatchObject({
      method: "sample",
      frequencyHz: 1.02e6,
      minimumSwrNoiseLow: null,
      minimumSwrNoiseHigh: null,
    });
    expect(dip.frequencyUncertaintyHz).toBeCloseTo(1e4, 6);
    expect(dip.advice).not.toBeNull();
  });

  test("a plateau stands at its middle, with its half as uncertainty and more", () => {
    const [dip, ...more] = inner(sweepOf([0.9, 0.8, 0.2, 0.2, 0.2, 0.2, 0.2, 0.8, 0.9]));
    expect(more).toEqual([]);
    expect(dip.frequencyHz).toBeCloseTo(1.04e6, 3);
    expect(dip.frequencyUncertaintyHz ?? 0).toBeGreaterThanOrEqual(2e4);
  });

  test("a shoulder is no second dip", () => {
    const values = [0.95, 0.9, 0.6, 0.6, 0.6, 0.6, 0.3, 0.1, 0.3, 0.7, 0.9, 0.95];
    expect(inner(sweepOf(values)).map((dip) => dip.sampleIndex)).toEqual([7]);
  });

  test("on the first or last point: an edge dip without fitted numbers", () => {
    const whole = resonatorSweep({ r: 1.2, q: 12, points: 401, spanHz: 6e6 });
    const at = whole.frequencyHz.findIndex((f) => f > 14.15e6);
    for (const [from, to] of [
      [at, 401],
      [0, at],
    ]) {
      const sweep = {
        ...whole,
        frequencyHz: whole.frequencyHz.slice(from, to),
        magnitude: whole.magnitude.slice(from, to),
      };
      const [dip, ...more] = analyse(sweep).dips;
      expect(more).toEqual([]);
      expect(dip).toMatchObject({
        edge: true,
        method: "sample",
        frequencyUncertaintyHz: null,
        advice: null,
        q: null,
      });
      expect(dip.sampleIndex).toBe(from === 0 ? sweep.magnitude.length - 1 : 0);
      expect(dip.bandwidth?.open).toBe(true);
      expect(codes(sweep)).toContain("edge-dip");
    }
  });

  test("two equal dips, each with its own numbers", () => {
    const one = resonatorSweep({ r: 1.3, q: 60, f0Hz: 14e6, points: 801, spanHz: 4e6, offset: 0 });
    const magnitude = one.magnitude.map((v, i) => v * one.magnitude[Math.max(0, i - 200)]);
    const dips = inner({ ...one, magnitude });
    expect(dips).toHaveLength(2);
    expect(dips[1].frequencyHz - dips[0].frequencyHz).toBeCloseTo(1e6, -5);
    expect(dips.every((dip) => dip.bandwidth && !dip.bandwidth.shared)).toBe(true);
  });

  test("a perfect match: SWR 1, a finite return loss, whole numbers everywhere", () => {
    const sweep = resonatorSweep({ r: 1, q: 12, points: 201, spanHz: 6e6, offset: 0 });
    expect(Math.min(...sweep.magnitude)).toBe(0);
    const [dip] = inner(sweep);
    expect(dip.minimumSwr).toBeCloseTo(1, 6);
    expectSound(dip);
  });

  test("uneven steps change nothing", () => {
    const even = resonatorSweep({ r: 1.4, q: 12, points: 400, spanHz: 6e6 });
    const picked = [...even.frequencyHz.keys()].filter((i) => i % 3 !== 0 && i % 7 !== 2);
    const pick = (values: Float64Array) => Float64Array.from(picked, (i) => values[i]);
    const [dip] = inner({ ...even, frequencyHz: pick(even.frequencyHz), magnitude: pick(even.magnitude) });
    expect(Math.abs(dip.frequencyHz / 14.15e6 - 1)).toBeLessThan(1e-9);
    expect(
      Math.abs((dip.bandwidth?.widthHz ?? 0) / (truthOf({ r: 1.4, q: 12 }).widthHz ?? 1) - 1),
    ).toBeLessThan(1e-6);
  });
});

describe("trouble", () => {
  test("over 1: kept, warned of, never a dip, never a negative SWR", () => {
    const sweep = resonatorSweep({ r: 1.4, q: 12, points: 201, spanHz: 6e6 });
    sweep.magnitude[3] = 1.4;
    sweep.magnitude[4] = 1.1;
    sweep.magnitude[5] = 1.5;
    const analysis = analyse(sweep);
    expect(analysis.dips.filter((dip) => !dip.edge)).toHaveLength(1);
    expect(analysis.warnings.find((w) => w.code === "over-unity")?.message).toContain("3 of 201");
    expect(sweep.magnitude[5]).toBe(1.5);
  });

  test("gaps are counted and no dip reaches across", () => {
    const sweep = resonatorSweep({ r: 1.4, q: 12, points: 201, spanHz: 6e6 });
    sweep.magnitude.fill(Number.NaN, 20, 30);
    expect(analyse(sweep).warnings.find((w) => w.code === "gaps")?.message).toContain("10 of 201");
    expect(inner(sweep)).toHaveLength(1);
  });

  test("noise that asks for more than the settings says so", () => {
    const normal = normals(8);
    const sweep = resonatorSweep({ r: 1.3, q: 12, points: 801, spanHz: 8e6 });
    const magnitude = sweep.magnitude.map((v) => v * 10 ** ((0.7 * normal()) / 20));
    expect(codes({ ...sweep, magnitude })).toContain("noisy");
    expect(inner({ ...sweep, magnitude })).toHaveLength(1);
  });

  test("a receiver's scatter does not break a deep dip into many", () => {
    const normal = normals(4);
    for (let k = 0; k < 40; k++) {
      const sweep = resonatorSweep({ r: 1.05, q: 12, points: 1201, spanHz: 8e6 });
      const magnitude = sweep.magnitude.map((v) => Math.hypot(v + 0.03 * normal(), 0.03 * normal()));
      expect(inner({ ...sweep, magnitude })).toHaveLength(1);
    }
  });

  test("half a pixel and the trace's width count for pictures", () => {
    const sweep = resonatorSweep({ r: 1.4, q: 12, points: 601, spanHz: 12e6 });
    const [plain] = inner(sweep);
    const pictureLimits = {
      frequencyHz: new Float64Array(601).fill(10_000),
      magnitudeLow: sweep.magnitude.map((v) => v - 0.01),
      magnitudeHigh: sweep.magnitude.map((v) => v + 0.01),
    };
    const [dip] = inner({ ...sweep, pictureLimits });
    expect(plain.frequencyUncertaintyHz ?? 1e9).toBeLessThan(1);
    expect(dip.frequencyUncertaintyHz).toBeCloseTo(10_000, 0);
    const [low, high] = [1 / 6 - 0.01, 1 / 6 + 0.01].map((g) => (1 + g) / (1 - g));
    expect(dip.minimumSwrNoiseLow).toBeCloseTo(low, 4);
    expect(dip.minimumSwrNoiseHigh).toBeCloseTo(high, 4);
  });

  test("limits that need a bench stay unknown", () => {
    const [dip] = inner(resonatorSweep({ r: 1.4, q: 12, points: 201, spanHz: 6e6 }));
    expect([dip.minimumSwrLow, dip.minimumSwrHigh]).toEqual([null, null]);
  });

  test("thousands of dips end in time, with the best fitted", () => {
    const values = Array.from({ length: 40_000 }, (_, i) => 0.5 + (0.3 + (i % 977) / 5000) * Math.cos(i / 3));
    const analysis = analyse(sweepOf(values));
    expect(analysis.dips.length).toBeGreaterThan(2000);
    expect(analysis.warnings.map((w) => w.code)).toContain("many-dips");
  });
});

test("any numbers end in sound findings", () => {
  const value = fc.oneof(
    { weight: 8, arbitrary: fc.double({ min: 0, max: 1.2, noNaN: true }) },
    fc.constantFrom(0, 1, Number.NaN, 0.5, Number.POSITIVE_INFINITY, 1e-300),
  );
  const input = fc.record({
    values: fc.array(value, { maxLength: 60 }),
    steps: fc.array(fc.double({ min: 0.001, max: 1e6, noNaN: true }), { minLength: 60, maxLength: 60 }),
    swrLimit: fc.constantFrom(1.1, 2, 6),
    complex: fc.boolean(),
  });
  fc.assert(
    fc.property(input, ({ values, steps, swrLimit, complex }) => {
      const sweep = sweepOf(values);
      let hz = 1000;
      for (let i = 0; i < values.length; i++) {
        sweep.frequencyHz[i] = hz;
        hz += steps[i];
      }
      if (complex) {
        sweep.gammaRe = sweep.magnitude.map((v, i) => v * Math.cos(i));
        sweep.gammaIm = sweep.magnitude.map((v, i) => v * Math.sin(i));
      }
      const analysis = analyse(sweep, { swrLimit });
      expect(analysis.noiseDb).toBeGreaterThanOrEqual(0);
      for (const dip of analysis.dips) expectSound(dip);
    }),
    { numRuns: 800 },
  );
});

function expectSound(dip: Dip): void {
  expect(dip.frequencyHz).toBeGreaterThan(0);
  expect(dip.minimumSwr).toBeGreaterThanOrEqual(1);
  expect(Number.isFinite(dip.returnLossDb)).toBe(true);
  expect(Number.isFinite(dip.prominenceDb)).toBe(true);
  if (dip.frequencyUncertaintyHz !== null) expect(dip.frequencyUncertaintyHz).toBeGreaterThanOrEqual(0);
  if (dip.minimumSwrNoiseLow !== null) {
    expect(dip.minimumSwrNoiseLow).toBeLessThanOrEqual(dip.minimumSwr * (1 + 1e-12));
    expect(dip.minimumSwrNoiseHigh).toBeGreaterThanOrEqual(dip.minimumSwr * (1 - 1e-12));
  }
  for (const q of [dip.q, dip.qLow, dip.qHigh]) if (q !== null) expect(q).toBeGreaterThan(0);
  const { bandwidth } = dip;
  if (!bandwidth) return;
  expect(bandwidth.widthHz).toBeGreaterThanOrEqual(0);
  expect(bandwidth.open).toBe(bandwidth.lowHz === null || bandwidth.highHz === null);
  expect(bandwidth.fractional === null).toBe(bandwidth.open);
  if (bandwidth.widthUncertaintyHz !== null) expect(bandwidth.widthUncertaintyHz).toBeGreaterThanOrEqual(0);
}
