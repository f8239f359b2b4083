import { describe, expect, test } from "vitest";
import { bandFigures, swrAt } from "../../app/measurement/band-figures.ts";
import { dipOffset } from "../../app/measurement/dip-offsets.ts";
import type { Sweep } from "../../app/measurement/sweep.ts";

/** A series resonator R = 50 Ω, Q = 12, f0 = 14.15 MHz: SWR 2 at 13.739242 and 14.573039 MHz, 1.5 at 13.911351 and 14.392743 (closed form, REFERENCE 3). */
function resonator(stepHz = 10e3, complex = true): Sweep {
  const hz = Float64Array.from({ length: Math.round(4e6 / stepHz) + 1 }, (_, i) => 12e6 + i * stepHz);
  const gammaRe = new Float64Array(hz.length);
  const gammaIm = new Float64Array(hz.length);
  for (const [i, f] of hz.entries()) {
    const u = 12 * (f / 14.15e6 - 14.15e6 / f);
    gammaRe[i] = (u * u) / (4 + u * u);
    gammaIm[i] = (2 * u) / (4 + u * u);
  }
  const magnitude = hz.map((_, i) => Math.hypot(gammaRe[i], gammaIm[i]));
  return {
    frequencyHz: hz,
    magnitude,
    referenceOhm: 50,
    plane: "port",
    ...(complex ? { gammaRe, gammaIm } : {}),
  };
}

const swrTrue = (hz: number) => {
  const u = Math.abs(12 * (hz / 14.15e6 - 14.15e6 / hz));
  const g = u / Math.hypot(2, u);
  return (1 + g) / (1 - g);
};

describe("a resonator, closed form", () => {
  test.each([true, false])("edges, middle, share and best, with phase: %s", (complex) => {
    const [band] = bandFigures(resonator(10e3, complex), [
      { name: "20 m", lowHz: 14.0033e6, highHz: 14.3512e6, swrLimit: 1.5 },
    ]);
    expect(band.swrLow).toBeCloseTo(swrTrue(14.0033e6), 3);
    expect(band.swrHigh).toBeCloseTo(swrTrue(14.3512e6), 3);
    expect(band.swrMiddle).toBeCloseTo(swrTrue(14.17725e6), 3);
    expect(band).toMatchObject({ covered: 1, shareUnder: 1, bestHz: 14.15e6, limitSwr: 1.5 });
    expect(band.bestSwr).toBeCloseTo(1, 9);
  });

  test("share under the limit is the closed form's width over the band's", () => {
    const bands = [
      { name: "wide", lowHz: 13e6, highHz: 15e6 },
      { name: "half", lowHz: 14.15e6, highHz: 15e6, swrLimit: 1.5 },
    ];
    const [wide, half] = bandFigures(resonator(), bands);
    expect(wide.shareUnder).toBeCloseTo((14.573039 - 13.739242) / 2, 4);
    expect(half.shareUnder).toBeCloseTo((14.392743 - 14.15) / 0.85, 4);
  });

  test("a band narrower than the step, and between two samples", () => {
    const [band] = bandFigures(resonator(100e3), [{ name: "narrow", lowHz: 14.51e6, highHz: 14.58e6 }]);
    expect(band.covered).toBeCloseTo(1, 9);
    expect(band.swrLow).toBeCloseTo(swrTrue(14.51e6), 1);
    expect(band.shareUnder).toBeCloseTo(0.9, 1);
    expect(band.bestHz).toBe(14.51e6);
  });

  test("the fitted dip is the best where one lies in the band", () => {
    const dips = [{ frequencyHz: 14.1512e6, minimumSwr: 1.01, edge: false }];
    const [band] = bandFigures(resonator(), [{ name: "20 m", lowHz: 14e6, highHz: 14.35e6 }], dips);
    expect(band).toMatchObject({ bestHz: 14.1512e6, bestSwr: 1.01 });
  });
});

describe("what the sweep does not say is null", () => {
  test("outside, partly outside, gaps, no points, one point, no width", () => {
    const sweep = resonator();
    const [out] = bandFigures(sweep, [{ name: "40 m", lowHz: 7e6, highHz: 7.2e6 }]);
    expect(out).toMatchObject({
      covered: 0,
      shareUnder: null,
      bestHz: null,
      bestSwr: null,
      swrLow: null,
      swrMiddle: null,
      swrHigh: null,
    });
    const [part] = bandFigures(sweep, [{ name: "part", lowHz: 15.5e6, highHz: 16.5e6 }]);
    expect(part).toMatchObject({ covered: 0.5, shareUnder: 0, swrMiddle: expect.any(Number), swrHigh: null });
    const gap = { ...resonator(10e3, false) };
    gap.magnitude = gap.magnitude.map((v, i) =>
      gap.frequencyHz[i] > 14.1e6 && gap.frequencyHz[i] < 14.2e6 ? Number.NaN : v,
    );
    const [gapped] = bandFigures(gap, [{ name: "20 m", lowHz: 14e6, highHz: 14.3e6 }]);
    expect(gapped.covered).toBeCloseTo(0.2 / 0.3, 6);
    expect(gapped.swrMiddle).toBeNull();
    const empty = { ...gap, frequencyHz: new Float64Array(0), magnitude: new Float64Array(0) };
    expect(bandFigures(empty, [{ name: "x", lowHz: 1e6, highHz: 2e6 }])[0]).toMatchObject({
      covered: 0,
      shareUnder: null,
      bestSwr: null,
    });
    const one = { ...gap, frequencyHz: Float64Array.of(14.1e6), magnitude: Float64Array.of(0.2) };
    const [single] = bandFigures(one, [{ name: "x", lowHz: 14e6, highHz: 14.2e6 }]);
    expect(single).toMatchObject({ covered: 0, shareUnder: null, bestHz: 14.1e6 });
    expect(single.swrMiddle).toBeCloseTo(1.5, 9);
    expect(bandFigures(sweep, [{ name: "x", lowHz: 14.1e6, highHz: 14.1e6 }])[0].covered).toBe(0);
    expect(bandFigures(sweep, [{ name: "x", lowHz: Number.NaN, highHz: 14e6 }])[0].shareUnder).toBeNull();
  });

  test("SWR over abs Γ 1 is Infinity, not a number", () => {
    const sweep = { ...resonator(10e3, false), magnitude: resonator().magnitude.map(() => 1.02) };
    expect(swrAt(sweep, 14.105e6)).toBe(Number.POSITIVE_INFINITY);
  });
});

describe("a dip and its nearest design band", () => {
  const bands = [
    { name: "40 m", lowHz: 7e6, highHz: 7.2e6 },
    { name: "17 m", lowHz: 18.068e6, highHz: 18.168e6 },
  ];

  test("offset in hertz and share, and the length by proportion (REFERENCE 8: 20.0 m, 7.25 → 7.10 MHz is 20.4225 m)", () => {
    const offset = dipOffset(7.25e6, bands, [{ lengthM: 20, frequencyHz: 7.25e6 }]);
    expect(offset).toMatchObject({ band: bands[0], targetHz: 7.1e6, offsetHz: 150e3, inside: false });
    expect(offset?.share).toBeCloseTo(0.15 / 7.1, 12);
    expect(offset?.trim?.lengthM).toBeCloseTo(20.4225, 4);
  });

  test("inside comes before nearer to another's middle; no history, no trim", () => {
    const wide = [{ name: "wide", lowHz: 10e6, highHz: 30e6 }, ...bands];
    expect(dipOffset(17.9e6, wide)?.band.name).toBe("wide");
    expect(dipOffset(17.9e6, bands)).toMatchObject({ band: bands[1], trim: null });
  });

  test("nothing to measure against", () => {
    expect(dipOffset(7e6, [])).toBeNull();
    expect(dipOffset(Number.NaN, bands)).toBeNull();
    expect(dipOffset(0, bands)).toBeNull();
  });
});
