import { describe, expect, test } from "vitest";
import { analyse } from "../../app/measurement/analyse.ts";
import { impedanceToGamma } from "../../app/measurement/reflection.ts";
import type { Sweep } from "../../app/measurement/sweep.ts";
import dipole from "../fixtures/measurement/nec/dipole.csv?raw";
import dipoleDips from "../fixtures/measurement/nec/dipole.json";
import groundPlane from "../fixtures/measurement/nec/ground-plane.csv?raw";
import groundPlaneDips from "../fixtures/measurement/nec/ground-plane.json";

/**
 * Feed impedances of the NEC-2 solver (Debian's nec2c, decks beside the fixtures) for a half-wave dipole
 * (12-16 MHz) and a ground-plane vertical for 14.1 MHz from 10 to 146 MHz; truth: cubic splines, bounded
 * minimisation and Brent's method in scipy on the same impedances (tests/reference/nec_dips.py).
 */
function sweepOf(csv: string, complex: boolean): Sweep {
  const rows = csv
    .trim()
    .split("\n")
    .slice(1)
    .map((line) => line.split(",").map(Number));
  const gamma = rows.map(([, re, im]) => impedanceToGamma({ re, im }, 50));
  const sweep: Sweep = {
    frequencyHz: Float64Array.from(rows, ([mhz]) => mhz * 1e6),
    magnitude: Float64Array.from(gamma, ({ re, im }) => Math.hypot(re, im)),
    referenceOhm: 50,
    plane: "port",
  };
  if (!complex) return sweep;
  return {
    ...sweep,
    gammaRe: Float64Array.from(gamma, (g) => g.re),
    gammaIm: Float64Array.from(gamma, (g) => g.im),
  };
}

interface TrueDip {
  mhz: number;
  swr: number;
  low: number | null;
  high: number | null;
}

const MODELS: [string, string, TrueDip[], number][] = [
  ["half-wave dipole", dipole, dipoleDips, 10_000],
  ["ground-plane vertical", groundPlane, groundPlaneDips, 100_000],
];

describe.each(MODELS)("%s", (_, csv, truth, stepHz) => {
  test.each([true, false])("with phase: %s", (complex) => {
    const { dips } = analyse(sweepOf(csv, complex));
    const inner = dips.filter((dip) => !dip.edge);
    expect(inner).toHaveLength(truth.length);
    for (const [k, dip] of inner.entries()) {
      const { mhz, swr, low, high } = truth[k];
      expect(Math.abs(dip.frequencyHz - mhz * 1e6)).toBeLessThan(stepHz / 8);
      expect(Math.abs(dip.minimumSwr / swr - 1)).toBeLessThan(0.008);
      expect(dip.minimumSwrNoiseLow ?? 9).toBeLessThan(swr * 1.002);
      expect(dip.minimumSwrNoiseHigh ?? 0).toBeGreaterThan(swr / 1.002);
      expect(Math.abs(dip.frequencyHz - mhz * 1e6)).toBeLessThan(
        1.5 * (dip.frequencyUncertaintyHz ?? 0) + 50,
      );
      expect(dip.bandwidth === null).toBe(swr > 2);
      if (!dip.bandwidth) continue;
      expect(Math.abs((dip.bandwidth.lowHz ?? 0) - (low ?? 0) * 1e6)).toBeLessThan(
        stepHz / (complex ? 500 : 50),
      );
      expect(Math.abs((dip.bandwidth.highHz ?? 0) - (high ?? 0) * 1e6)).toBeLessThan(
        stepHz / (complex ? 500 : 50),
      );
    }
  });
});

describe("figures of the same models, computed apart in plain Python", () => {
  test("dipole: lowest 1.4372 at 14.312 MHz, 13.9770 to 14.6727 MHz, Q from the slope 10.36", () => {
    const [dip] = analyse(sweepOf(dipole, true)).dips;
    expect(dip.minimumSwr).toBeCloseTo(1.4372, 4);
    expect(dip.frequencyHz / 1e6).toBeCloseTo(14.312, 3);
    expect((dip.bandwidth?.lowHz ?? 0) / 1e6).toBeCloseTo(13.977, 3);
    expect((dip.bandwidth?.highHz ?? 0) / 1e6).toBeCloseTo(14.6727, 3);
    expect(Math.abs((dip.q ?? 0) / 10.36 - 1)).toBeLessThan(0.02);
  });

  test("without phase its Q is a range that holds the 10.36 within 1 %", () => {
    const [dip] = analyse(sweepOf(dipole, false)).dips;
    expect(dip.q).toBeNull();
    expect((dip.qLow ?? 0) * 0.99).toBeLessThan(10.36);
    expect(dip.qHigh ?? 0).toBeGreaterThan(10.36);
  });

  test("vertical with radials at 45°: 14.071 MHz 1.0738, 13.4576 to 14.7803 MHz", () => {
    const [dip] = analyse(sweepOf(groundPlane, true)).dips.filter((d) => !d.edge);
    expect(Math.abs(dip.minimumSwr - 1.0738)).toBeLessThan(0.008);
    expect(Math.abs(dip.frequencyHz / 1e6 - 14.071)).toBeLessThan(0.012);
    expect((dip.bandwidth?.lowHz ?? 0) / 1e6).toBeCloseTo(13.4576, 3);
    expect((dip.bandwidth?.highHz ?? 0) / 1e6).toBeCloseTo(14.7803, 3);
  });

  test("in noise the dipole's dip stays within its interval", () => {
    const sweep = sweepOf(dipole, false);
    const magnitude = sweep.magnitude.map((v, i) => v * (1 + 0.004 * Math.sin(i * i)));
    const [dip] = analyse({ ...sweep, magnitude }).dips;
    expect(dip.method).toBe("fit");
    expect(Math.abs(dip.frequencyHz - 14.312e6)).toBeLessThan(2 * (dip.frequencyUncertaintyHz ?? 0));
    expect(dip.minimumSwrNoiseLow ?? 9).toBeLessThan(1.441);
    expect(dip.minimumSwrNoiseHigh ?? 0).toBeGreaterThan(1.433);
  });
});
