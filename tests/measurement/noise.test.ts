import { describe, expect, test } from "vitest";
import { noiseDb, noiseGamma, noiseNear } from "../../app/measurement/noise.ts";
import { normals, resonatorSweep } from "./resonators.ts";

describe("σ of known noise", () => {
  test.each([0.01, 0.05, 0.2, 0.8])("%d dB on a flat trace", (sigmaDb) => {
    const normal = normals(7);
    const magnitude = Float64Array.from({ length: 20_001 }, () => 0.9 * 10 ** ((sigmaDb * normal()) / 20));
    expect(Math.abs(noiseDb(magnitude) / sigmaDb - 1)).toBeLessThan(0.05);
  });

  test("dips do not raise it: a narrow and a wide one", () => {
    const normal = normals(3);
    for (const q of [10, 200]) {
      const { magnitude } = resonatorSweep({ r: 1.2, q, points: 801, spanHz: 8e6 });
      const noisy = magnitude.map((v) => v * 10 ** ((0.05 * normal()) / 20));
      expect(noiseDb(noisy)).toBeGreaterThan(0.04);
      expect(noiseDb(noisy)).toBeLessThan(0.06);
    }
  });

  test("coarse sampling of smooth dips is not taken for noise", () => {
    for (const pointsPerBand of [3, 5, 10, 20, 40]) {
      const { magnitude } = resonatorSweep({ r: 1.4, q: 12, points: 61, stepHz: 833_797 / pointsPerBand });
      expect(noiseDb(magnitude)).toBeLessThan(0.5);
      if (pointsPerBand >= 10) expect(noiseDb(magnitude)).toBeLessThan(0.01);
    }
  });

  test("a trace rounded to 0.1 dB has at least the σ of its rounding", () => {
    const { magnitude } = resonatorSweep({ r: 1.4, q: 12, points: 2001, spanHz: 20e6 });
    const rounded = magnitude.map((v) => 10 ** (Math.round(200 * Math.log10(v)) / 200));
    expect(noiseDb(rounded)).toBeGreaterThan(0.95 * (0.1 / Math.sqrt(12)));
    expect(noiseDb(rounded)).toBeLessThan(0.06);
    expect(noiseDb(magnitude)).toBeLessThan(0.001);
  });

  test("a million points give what ten thousand give", () => {
    const normal = normals(5);
    const magnitude = Float64Array.from({ length: 1_000_001 }, () => 0.8 * 10 ** ((0.1 * normal()) / 20));
    expect(Math.abs(noiseDb(magnitude) / 0.1 - 1)).toBeLessThan(0.05);
  });

  test("σ of abs Γ, everywhere and near a sample", () => {
    const normal = normals(11);
    const magnitude = Float64Array.from(
      { length: 5000 },
      (_, i) => 0.7 + (i < 2500 ? 0.01 : 0.03) * normal(),
    );
    expect(noiseNear(magnitude, 1000).gamma).toBeLessThan(0.015);
    expect(noiseNear(magnitude, 4000).gamma).toBeGreaterThan(0.02);
    expect(noiseGamma(magnitude)).toBeGreaterThan(0.012);
    expect(noiseGamma(magnitude)).toBeLessThan(0.025);
  });
});

describe("nothing to tell", () => {
  test.each([
    ["empty", []],
    ["one point", [0.5]],
    ["two", [0.5, 0.4]],
    ["four", [0.5, 0.4, 0.5, 0.4]],
    ["flat", new Array(50).fill(0.5)],
    ["only gaps", new Array(50).fill(Number.NaN)],
    ["a straight line of zeros", new Array(50).fill(0)],
  ])("%s gives 0", (_, values) => {
    expect(noiseDb(Float64Array.from(values))).toBe(0);
    expect(noiseGamma(Float64Array.from(values))).toBe(0);
  });

  test("gaps part the trace and are no step", () => {
    const magnitude = Float64Array.from({ length: 300 }, (_, i) =>
      i % 30 === 7 ? Number.NaN : i < 150 ? 0.9 : 0.1,
    );
    expect(noiseDb(magnitude)).toBeLessThan(1e-12);
  });
});
