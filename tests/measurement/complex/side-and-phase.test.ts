import { describe, expect, test } from "vitest";
import { gammaAt, impedanceAt } from "../../../app/measurement/complex/gamma-at.ts";
import { impedanceColumns } from "../../../app/measurement/complex/impedance.ts";
import { unwrappedPhaseDeg } from "../../../app/measurement/complex/phase.ts";
import { sideAt } from "../../../app/measurement/complex/side.ts";
import type { Sweep } from "../../../app/measurement/sweep.ts";
import { even, impedanceSweep, seriesResonator } from "./sweeps.ts";

/** Truth: closed forms of the resonators and of a line's phase −2βl; check values of REFERENCE section 2. */
const scalar = (sweep: Sweep) => ({ ...sweep, gammaRe: undefined, gammaIm: undefined });

describe("which side of the reference", () => {
  test.each([
    [35.7, "under"],
    [70, "over"],
  ])("%f Ω at the dip is %s", (r, side) => {
    const sweep = impedanceSweep(even(13e6, 15e6, 401), seriesResonator(r, 10, 14.001e6), { sigma: 0.001 });
    const found = sideAt(sweep, 14.001e6);
    expect(found?.side).toBe(side);
    expect(found?.ratio).toBeCloseTo(r / 50, 1);
    expect(found?.benchUnknown).toBe(true);
  });

  test("is not told where noise or the bench's directivity could hide it, and says which", () => {
    const noisy = impedanceSweep(even(13e6, 15e6, 401), seriesResonator(50.5, 10, 14.001e6), { sigma: 0.01 });
    expect(sideAt(noisy, 14.001e6)?.side).toBeNull();
    const clean = impedanceSweep(even(13e6, 15e6, 401), seriesResonator(52, 10, 14.001e6));
    expect(sideAt(clean, 14.001e6)?.side).toBe("over");
    const limit = (directivity: number) => new Float64Array(401).fill(directivity);
    const bench = { directivity: limit(0.0316), tracking: limit(0), match: limit(0) };
    const known = sideAt({ ...clean, benchLimits: bench }, 14.001e6);
    expect(known?.side).toBeNull();
    expect(known?.benchUnknown).toBe(false);
    expect(
      sideAt(
        impedanceSweep(even(1e6, 2e6, 11), () => ({ re: 50, im: 0 })),
        1.5e6,
      )?.side,
    ).toBeNull();
  });

  test("null for a scalar sweep, outside, beside a gap", () => {
    const sweep = impedanceSweep(even(13e6, 15e6, 11), seriesResonator(40, 10, 14e6));
    expect(sideAt(scalar(sweep), 14e6)).toBeNull();
    expect(sideAt(sweep, 16e6)).toBeNull();
    sweep.gammaRe?.fill(Number.NaN, 5, 6);
    expect(sideAt(sweep, 14.1e6)).toBeNull();
  });
});

describe("Γ and Z between samples", () => {
  const f0Hz = 14.1234e6;
  const sweep = impedanceSweep(even(12e6, 16e6, 201), seriesResonator(40, 12, f0Hz));

  test("follow the resonator to a ten-thousandth at a fiftieth of its width", () => {
    for (const hz of [13.00777e6, 14.1234e6, 14.9001e6]) {
      const z = impedanceAt(sweep, hz);
      const exact = seriesResonator(40, 12, f0Hz)(hz);
      expect(Math.hypot((z?.re ?? 0) - exact.re, (z?.im ?? 0) - exact.im) / 50).toBeLessThan(1e-4);
    }
  });

  test("samples come back as they are, nothing outside or beside a gap", () => {
    expect(gammaAt(sweep, sweep.frequencyHz[7])).toEqual({ re: sweep.gammaRe?.[7], im: sweep.gammaIm?.[7] });
    expect(gammaAt(sweep, 11.999e6)).toBeNull();
    expect(gammaAt(sweep, 16.001e6)).toBeNull();
    expect(gammaAt(sweep, Number.NaN)).toBeNull();
    expect(gammaAt(scalar(sweep), 14e6)).toBeNull();
    expect(gammaAt(impedanceSweep([], seriesResonator(40, 12, f0Hz)), 14e6)).toBeNull();
    expect(impedanceColumns(scalar(sweep))).toBeNull();
  });

  test("columns: the reference's check values", () => {
    const columns = impedanceColumns(impedanceSweep([1e6, 2e6], () => ({ re: 73, im: 42.5 })));
    expect(columns?.resistanceOhm[1]).toBeCloseTo(73, 9);
    expect(columns?.reactanceOhm[0]).toBeCloseTo(42.5, 9);
  });
});

describe("phase without jumps", () => {
  test("a line's −2βl over many turns", () => {
    // 20 m of velocity factor 0.66: a turn each VF·c/2l = 4.94658 MHz (REFERENCE section 7).
    const turnHz = (0.66 * 299_792_458) / (2 * 20);
    const line = (hz: number) => {
      const angle = -2 * Math.PI * (hz / turnHz);
      const [re, im] = [0.9 * Math.cos(angle), 0.9 * Math.sin(angle)];
      const below = (1 - re) ** 2 + im ** 2;
      return { re: (50 * (1 - re * re - im * im)) / below, im: (100 * im) / below };
    };
    const sweep = impedanceSweep(even(1e6, 60e6, 301), line);
    const phase = unwrappedPhaseDeg(sweep) as Float64Array;
    for (const i of [0, 100, 300]) {
      expect(phase[i] - phase[0]).toBeCloseTo((-360 * (sweep.frequencyHz[i] - 1e6)) / turnHz, 6);
    }
  });

  test("gaps and zeros of Γ are unknown and do not break it", () => {
    const sweep = impedanceSweep([1, 2, 3, 4], () => ({ re: 25, im: 0 }));
    sweep.gammaRe?.set([Number.NaN, -0.3, 0, 0.3]);
    sweep.gammaIm?.set([0.1, 0.01, 0, 0.01]);
    const phase = unwrappedPhaseDeg(sweep) as Float64Array;
    expect([...phase].map((value) => Number.isNaN(value))).toEqual([true, false, true, false]);
    expect(unwrappedPhaseDeg(scalar(sweep))).toBeNull();
  });
});
