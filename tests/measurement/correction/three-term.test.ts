import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { correctSweep } from "../../../app/measurement/correction/correct.ts";
import { applyTerms, solveTerms } from "../../../app/measurement/correction/three-term.ts";
import { bench, codes, complexSweep, measured, polar, type Terms } from "./benches.ts";

interface Pair {
  re: number[];
  im: number[];
}
/** Made by tests/reference/one_port.py with scikit-rf. */
const reference: {
  frequencyHz: number[];
  cases: (Record<"open" | "short" | "load" | "measured" | "corrected", Pair> & {
    standards: Record<"openCapacitanceF" | "shortInductanceH" | "offsetDelayS" | "loadOhm", number>;
  })[];
} = JSON.parse(readFileSync(new URL("../../fixtures/measurement/one-port.json", import.meta.url), "utf8"));
const F = reference.frequencyHz;
const sweepOf = ({ re, im }: Pair) => complexSweep(F, re, im);

describe("three-term correction against scikit-rf", () => {
  it.each(reference.cases.map((one, i) => ({ ...one, i })))("agrees to 1e-9, case $i", (one) => {
    const refs = { open: sweepOf(one.open), short: sweepOf(one.short), load: sweepOf(one.load) };
    const done = correctSweep(sweepOf(one.measured), bench(refs, one.standards));
    expect(done.correction).toEqual({ kind: "three-term", plane: "port", fromHz: F[0], toHz: F[30] });
    expect(done.sweep.plane).toBe("port");
    let worst = 0;
    F.forEach((_, k) => {
      const [re, im] = [done.sweep.gammaRe?.[k] ?? Number.NaN, done.sweep.gammaIm?.[k] ?? Number.NaN];
      worst = Math.max(worst, Math.abs(re - one.corrected.re[k]), Math.abs(im - one.corrected.im[k]));
      expect(done.sweep.magnitude[k]).toBe(Math.hypot(re, im));
    });
    expect(worst).toBeLessThan(1e-9);
  });
});

/** REFERENCE section 6, computed with independent code. */
const TERMS: Terms = { d: polar(0.05, 30), m: polar(0.1, -60), t: polar(0.9, -20) };
const SEEN = {
  open: { re: 0.896904961, im: -0.376834081 },
  short: { re: -0.780723377, im: 0.250195715 },
  load: { re: 0.04330127, im: 0.025 },
};
const IDEAL = { open: { re: 1, im: 0 }, short: { re: -1, im: 0 }, load: { re: 0, im: 0 } };

describe("the error terms", () => {
  it("come out of three ideal standards", () => {
    const terms = solveTerms(SEEN, IDEAL);
    expect(terms?.directivity.re).toBeCloseTo(TERMS.d.re, 8);
    expect(terms?.match.im).toBeCloseTo(TERMS.m.im, 8);
    expect(terms?.tracking.im).toBeCloseTo(TERMS.t.im, 8);
  });

  it.each([
    { is: "25 Ω", seen: [-0.236625054, 0.117975672], gamma: [-1 / 3, 0] },
    { is: "100 Ω", seen: [0.326679695, -0.08766421], gamma: [1 / 3, 0] },
    { is: "73+j42.5 Ω", seen: [0.364855871, 0.153968824], gamma: [0.273704256, 0.250955847] },
  ])("turn what was measured into $is", ({ seen, gamma }) => {
    const terms = solveTerms(SEEN, IDEAL);
    const out = terms && applyTerms(terms, { re: seen[0], im: seen[1] });
    expect(out?.re).toBeCloseTo(gamma[0], 8);
    expect(out?.im).toBeCloseTo(gamma[1], 8);
  });

  it("hold for any three distinct standards, and for no two", () => {
    const actual = { open: polar(1, -20), short: polar(0.97, 160), load: polar(0.12, 75) };
    const seen = {
      open: measured(TERMS, actual.open),
      short: measured(TERMS, actual.short),
      load: measured(TERMS, actual.load),
    };
    const terms = solveTerms(seen, actual);
    const back = terms && applyTerms(terms, measured(TERMS, { re: 0.3, im: -0.6 }));
    expect(back?.re).toBeCloseTo(0.3, 12);
    expect(back?.im).toBeCloseTo(-0.6, 12);
    expect(solveTerms({ ...seen, short: seen.open }, actual)).toBeNull();
    expect(solveTerms({ ...seen, load: { re: seen.open.re + 0.01, im: seen.open.im } }, actual)).toBeNull();
    expect(solveTerms(seen, { ...actual, load: actual.short })).toBeNull();
    expect(solveTerms({ ...seen, load: { re: Number.NaN, im: 0 } }, actual)).toBeNull();
  });

  it("spread a load of 51 Ω that was taken for 50 over every result", () => {
    const seen = { ...IDEAL, load: { re: 1 / 101, im: 0 } };
    const terms = solveTerms(seen, IDEAL);
    const db = (gamma: number) =>
      -20 * Math.log10(Math.abs(terms ? applyTerms(terms, { re: gamma, im: 0 }).re : 0));
    expect(db(1 / 3)).toBeCloseTo(9.7756, 3);
    expect(db(0)).toBeCloseTo(40.086, 3);
  });
});

describe("a corrected complex sweep", () => {
  const at = Array.from({ length: 41 }, (_, i) => 1e6 + i * 1e6);
  const delayed = (hz: number): Terms => ({ ...TERMS, t: polar(0.9, (-hz / 1e6) * 1.5) });
  const seenAt = (gamma: { re: number; im: number }, grid = at) => {
    const values = grid.map((hz) => measured(delayed(hz), gamma));
    return complexSweep(
      grid,
      values.map(({ re }) => re),
      values.map(({ im }) => im),
    );
  };
  const refs = { open: seenAt(IDEAL.open), short: seenAt(IDEAL.short), load: seenAt(IDEAL.load) };
  const antenna = seenAt({ re: 0.2, im: 0.4 });

  it("leaves limits unknown while nothing is known of the load, and says what would help", () => {
    const done = correctSweep(antenna, bench(refs));
    expect(codes(done.warnings)).toEqual(["load-taken-as-ideal"]);
    expect(done.sweep.benchLimits?.directivity[3]).toBeNaN();
    expect(done.sweep.benchLimits?.match[3]).toBeNaN();
  });

  it("carries the load's own return loss as what is left, and the truth lies within", () => {
    for (const angle of [0, 50, 130, 180, 290]) {
      const load = polar(10 ** (-30 / 20), angle);
      const wrong = { ...refs, load: seenAt(load) };
      for (const gamma of [polar(0.9, 10), polar(0.5, 200), polar(0.05, 77), polar(0, 0)]) {
        const { sweep } = correctSweep(seenAt(gamma), bench(wrong, { loadReturnLossDb: 30 }));
        const [m, limits] = [sweep.magnitude[7], sweep.benchLimits];
        if (!limits) throw new Error("no limits");
        expect(limits.directivity[7]).toBeCloseTo(10 ** (-30 / 20), 12);
        const half = limits.directivity[7] + limits.tracking[7] * m + limits.match[7] * m * m;
        expect(Math.abs(m - Math.hypot(gamma.re, gamma.im))).toBeLessThanOrEqual(half);
      }
    }
  });

  it("interpolates real and imaginary part of references on another grid and leaves out what lies beyond", () => {
    const coarse = at.filter((_, i) => i >= 4 && i % 4 === 0);
    const few = {
      open: seenAt(IDEAL.open, coarse),
      short: seenAt(IDEAL.short, coarse),
      load: seenAt(IDEAL.load, coarse),
    };
    const done = correctSweep(antenna, bench(few));
    expect(done.correction.fromHz).toBe(5e6);
    expect(done.sweep.gammaRe?.slice(0, 4).every(Number.isNaN)).toBe(true);
    expect(done.sweep.gammaRe?.[4]).toBeCloseTo(0.2, 12);
    expect(done.sweep.gammaRe?.[6]).toBeCloseTo(0.2, 2);
    expect(codes(done.warnings)).toContain("references-short");
    expect(done.warnings[0].message).toContain("reach from 5 to 41 MHz: 4 of 41 points");
  });

  it("says that open and short are exchanged, and exchanges nothing", () => {
    const swapped = { open: refs.short, short: refs.open, load: refs.load };
    const done = correctSweep(antenna, bench(swapped));
    expect(codes(done.warnings)).toContain("open-short-swapped");
    expect(done.sweep.gammaRe?.[5]).toBeCloseTo(-0.2, 12);
    expect(codes(correctSweep(antenna, bench(refs)).warnings)).not.toContain("open-short-swapped");
  });

  it("corrects nothing from two equal standards", () => {
    const done = correctSweep(antenna, bench({ ...refs, short: refs.open }));
    expect(done.correction).toEqual({ kind: "none", plane: "instrument", fromHz: null, toHz: null });
    expect(done.sweep).toBe(antenna);
    expect(codes(done.warnings)).toEqual(["equal-standards"]);
  });

  it("falls back to size and reference phase where one standard is missing, and says so", () => {
    const done = correctSweep(antenna, bench({ open: refs.open, short: refs.short }));
    expect(done.correction.kind).toBe("scalar");
    expect(codes(done.warnings)).toEqual(["open-short-disagree", "no-three-term", "directivity-unknown"]);
    const [mean, k] = [(refs.open.magnitude[9] + refs.short.magnitude[9]) / 2, 9];
    expect(done.sweep.magnitude[k]).toBeCloseTo(antenna.magnitude[k] / mean, 12);
    expect(Math.atan2(done.sweep.gammaIm?.[k] ?? 0, done.sweep.gammaRe?.[k] ?? 0)).toBeCloseTo(
      Math.atan2(0.4, 0.2),
      0,
    );
  });

  it("keeps the phase as measured where the references have none", () => {
    const { gammaRe: _re, gammaIm: _im, ...scalar } = refs.open;
    const done = correctSweep(antenna, bench({ open: scalar }));
    expect(codes(done.warnings)).toContain("phase-as-measured");
    const k = 12;
    expect((done.sweep.gammaIm?.[k] ?? 0) / (done.sweep.gammaRe?.[k] ?? 1)).toBeCloseTo(
      (antenna.gammaIm?.[k] ?? 0) / (antenna.gammaRe?.[k] ?? 1),
      12,
    );
  });
});
