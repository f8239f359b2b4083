import { describe, expect, test } from "vitest";
import { analyse } from "../../../app/measurement/analyse.ts";
import { bandwidthOf, stretchAround } from "../../../app/measurement/dips/bandwidth.ts";
import { crossingHz } from "../../../app/measurement/dips/crossing.ts";
import type { Sweep } from "../../../app/measurement/sweep.ts";
import { resonatorSweep, sweepOf, truthOf } from "../resonators.ts";

const inner = (sweep: Sweep, swrLimit = 2) => analyse(sweep, { swrLimit }).dips.filter((dip) => !dip.edge);

describe("closed form, 20 points in a bandwidth and more", () => {
  test("frequency, lowest SWR and edges within 1e-6, over r, Q, loss, frequency, limit, with and without phase", () => {
    let checked = 0;
    for (const r of [0.55, 0.75, 1, 1.3, 1.9])
      for (const q of [3, 12, 150])
        for (const a of [1, 0.93])
          for (const f0Hz of [1.9e6, 145e6])
            for (const s of [1.5, 2, 3])
              for (const complex of [false, true]) {
                const truth = truthOf({ r, q, a, f0Hz }, s);
                const stepHz = (truth.widthHz ?? f0Hz / q) / 20;
                const points = Math.min(241, 2 * Math.floor((0.9 * f0Hz) / stepHz / 2) + 1);
                const [dip, ...more] = inner(resonatorSweep({ r, q, a, f0Hz, points, stepHz, complex }), s);
                expect(more).toEqual([]);
                expect(Math.abs(dip.frequencyHz / f0Hz - 1)).toBeLessThan(1e-6);
                expect(Math.abs(dip.minimumSwr / truth.swr - 1)).toBeLessThan(1e-6);
                if (truth.lowHz === null || truth.highHz === null) {
                  expect(dip.bandwidth).toBeNull();
                  continue;
                }
                expect(Math.abs((dip.bandwidth?.lowHz ?? 0) / truth.lowHz - 1)).toBeLessThan(1e-6);
                expect(Math.abs((dip.bandwidth?.highHz ?? 0) / truth.highHz - 1)).toBeLessThan(1e-6);
                checked++;
              }
    expect(checked).toBeGreaterThan(150);
  });

  /** R = 50 Ω, Q = 12, f0 = 14.15 MHz in 50 Ω, computed apart. */
  test.each([
    [1.5, 13.911351, 14.392743],
    [2, 13.739242, 14.573039],
    [3, 13.485576, 14.84716],
  ])("SWR %d: from %d to %d MHz", (s, low, high) => {
    const [dip] = inner(resonatorSweep({ r: 1, q: 12, points: 401, spanHz: 8e6 }), s);
    expect((dip.bandwidth?.lowHz ?? 0) / 1e6).toBeCloseTo(low, 6);
    expect((dip.bandwidth?.highHz ?? 0) / 1e6).toBeCloseTo(high, 6);
  });

  test("Q 3 at 100 MHz, SWR 2: 88.90694 to 112.47716 MHz", () => {
    const [dip] = inner(resonatorSweep({ r: 1, q: 3, f0Hz: 100e6, points: 301, spanHz: 120e6 }));
    expect((dip.bandwidth?.lowHz ?? 0) / 1e6).toBeCloseTo(88.90694, 4);
    expect((dip.bandwidth?.highHz ?? 0) / 1e6).toBeCloseTo(112.47716, 4);
  });
});

describe("edges between samples", () => {
  test("cubic on complex Γ, cubic on abs Γ², straight: better in this order at 10 points in a bandwidth", () => {
    const errors = [true, false].map((complex) => {
      const sweep = resonatorSweep({ r: 1.4, q: 12, points: 61, stepHz: 83_379, complex });
      const { high, i } = highSide(sweep);
      return [true, false].map((smooth) => Math.abs(crossingHz(sweep, i, 1 / 3, smooth) / high - 1));
    });
    const [[complexCubic], [cubic, straight]] = errors;
    expect(complexCubic).toBeLessThan(2e-6);
    expect(cubic).toBeLessThan(2e-5);
    expect(straight).toBeLessThan(2e-4);
    expect(straight).toBeGreaterThan(cubic);
  });

  test("the step of a coarse sweep: SWR 2.40 at 14.00 and 1.90 at 14.05 MHz crosses 2 at 14.0387 on abs Γ", () => {
    const gamma = (s: number) => (s - 1) / (s + 1);
    const sweep = sweepOf([gamma(2.4), gamma(1.9)], 14e6, 50_000);
    expect(crossingHz(sweep, 0, 1 / 3, true)).toBeCloseTo(14.03867e6, -2);
  });

  test("a gap beside the step: a line in place of the cubic", () => {
    const sweep = sweepOf([Number.NaN, 0.2, 0.4, 0.5]);
    expect(crossingHz(sweep, 1, 0.3, true)).toBeCloseTo(1.015e6, 3);
  });
});

function highSide(sweep: Sweep) {
  const high = truthOf({ r: 1.4, q: 12 }).highHz as number;
  return { high, i: sweep.frequencyHz.findIndex((f) => f > high) - 1 };
}

describe("no edge, shared, none", () => {
  test("never below the limit: null, not 0", () => {
    const [dip] = inner(resonatorSweep({ r: 2.2, q: 12, points: 201, spanHz: 6e6 }));
    expect(dip.minimumSwr).toBeCloseTo(2.2, 6);
    expect(dip.bandwidth).toBeNull();
  });

  test("lowest SWR equal to the limit has the width of a point", () => {
    const sweep = sweepOf([0.9, 0.5, 1 / 3, 0.5, 0.9]);
    const input = { sweep, index: 2, swrLimit: 2, shared: false, fit: null, noise: { db: 0, gamma: 0 } };
    const stretch = stretchAround(sweep.magnitude, 2, 1 / 3);
    expect(bandwidthOf({ ...input, lowest: 1 / 3, stretch })?.widthHz).toBeLessThan(1);
  });

  test("the sweep ends inside: open, at least, no fraction, no Q", () => {
    const whole = resonatorSweep({ r: 1.2, q: 12, points: 401, spanHz: 4e6 });
    const at = whole.frequencyHz.findIndex((f) => f > 14e6);
    const sweep = {
      ...whole,
      frequencyHz: whole.frequencyHz.slice(at),
      magnitude: whole.magnitude.slice(at),
    };
    const [dip] = inner(sweep);
    const { bandwidth } = dip;
    expect(bandwidth?.open).toBe(true);
    expect(bandwidth?.lowHz).toBeNull();
    expect(
      Math.abs((bandwidth?.highHz ?? 0) / (truthOf({ r: 1.2, q: 12 }).highHz as number) - 1),
    ).toBeLessThan(1e-6);
    expect(bandwidth?.widthHz).toBeCloseTo((bandwidth?.highHz ?? 0) - sweep.frequencyHz[0], 0);
    expect(bandwidth?.fractional).toBeNull();
    expect(bandwidth?.widthUncertaintyHz).toBeNull();
    expect([dip.q, dip.qLow, dip.qHigh]).toEqual([null, null, null]);
    expect(analyse(sweep).warnings.map((w) => w.code)).toContain("open-band");
  });

  test("a gap inside opens an edge as the end of the sweep does", () => {
    const sweep = resonatorSweep({ r: 1.2, q: 12, points: 401, spanHz: 4e6 });
    for (let i = 0; i < 401; i++)
      if (sweep.frequencyHz[i] > 14.3e6 && sweep.frequencyHz[i] < 14.4e6) sweep.magnitude[i] = Number.NaN;
    const dip = inner(sweep).find((d) => Math.abs(d.frequencyHz - 14.15e6) < 1e4);
    expect(dip?.bandwidth).toMatchObject({ open: true, highHz: null });
    expect(dip?.bandwidth?.lowHz).not.toBeNull();
  });

  test("two dips in one stretch share it and have no Q", () => {
    const a = resonatorSweep({ r: 1.02, q: 12, f0Hz: 14e6, points: 601, spanHz: 6e6, offset: 0 });
    const magnitude = a.frequencyHz.map((f) => {
      const x = (f - 14e6) / 1e6;
      return Math.min(0.95, Math.hypot(0.02, (x * x - 0.09) * 1.6));
    });
    const found = inner({ ...a, magnitude });
    expect(found).toHaveLength(2);
    for (const dip of found) {
      expect(dip.bandwidth?.shared).toBe(true);
      expect([dip.q, dip.qLow, dip.qHigh]).toEqual([null, null, null]);
    }
    expect(found[0].bandwidth?.lowHz).toBeCloseTo(found[1].bandwidth?.lowHz ?? 0, 6);
    // abs Γ = 1/3 where (x² − 0.09)·1.6 = √(1/9 − 0.0004)
    const x = Math.sqrt(0.09 + Math.sqrt(1 / 9 - 0.0004) / 1.6);
    expect(found[1].bandwidth?.highHz).toBeCloseTo(14e6 + x * 1e6, -1);
    expect(analyse({ ...a, magnitude }).warnings.map((w) => w.code)).toContain("shared-band");
  });

  /** 13.95 to 14.40 MHz: over the geometric mean 14.17321 MHz. */
  test("the fraction is over the geometric mean of the edges", () => {
    const [dip] = inner(resonatorSweep({ r: 1, q: 12, points: 401, spanHz: 8e6 }));
    const { lowHz, highHz, fractional, widthHz } = dip.bandwidth as NonNullable<typeof dip.bandwidth>;
    expect(fractional).toBeCloseTo(widthHz / Math.sqrt((lowHz as number) * (highHz as number)), 12);
    expect(fractional).toBeCloseTo(1 / Math.SQRT2 / 12, 9);
  });
});
