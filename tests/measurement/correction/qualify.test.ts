import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { compareBenches } from "../../../app/measurement/correction/compare.ts";
import { qualifyBench } from "../../../app/measurement/correction/qualify.ts";
import { allowedError, swrLimits } from "../../../app/measurement/correction/wish.ts";
import { swrToGamma } from "../../../app/measurement/reflection.ts";
import { bench, codes, complexSweep, measured, polar, scalarSweep } from "./benches.ts";

const WISH = { swr: 1.5, tolerance: 0.1 };
const AT = Array.from({ length: 50 }, (_, i) => (i + 1) * 10e6);
type Db = number | ((mhz: number) => number);
const levels = (db: Db, at = AT) =>
  scalarSweep(
    at,
    at.map((hz) => 10 ** ((typeof db === "number" ? db : db(hz / 1e6)) / 20)),
  );

/** The nodal solution of an ideal bridge and of one with an arm of 49.6 Ω, made by tests/reference/bridge.py. */
const nodal: { lossDb: Record<"open" | "short", number>; arms: number[][] } = JSON.parse(
  readFileSync(new URL("../../fixtures/measurement/bridge.json", import.meta.url), "utf8"),
);

describe("qualifyBench", () => {
  it("gives an ideal bridge 12.0412 dB of insertion loss, and one with an arm of 49.6 Ω 47.92 dB of directivity", () => {
    const references = {
      open: levels(-nodal.lossDb.open),
      short: levels(-nodal.lossDb.short),
      load: levels(-nodal.lossDb.open - (nodal.arms.find(([ohm]) => ohm === 49.6)?.[1] ?? 0)),
      through: levels(0),
    };
    const quality = qualifyBench(bench(references), WISH);
    expect(quality.insertionLossDb[10]).toBeCloseTo(12.0412, 4);
    expect(quality.directivityDb[10]).toBeCloseTo(47.92, 2);
    expect(quality.flatnessDb[10]).toBeCloseTo(0, 9);
    expect(quality.ranges).toEqual([{ fromHz: 10e6, toHz: 500e6 }]);
    expect(quality.limits).toEqual([]);
    expect(codes(quality.missing)).toEqual(["load-return-loss"]);
  });

  it("says in plain words where a bench ends, and what ends it", () => {
    const references = {
      open: levels((mhz) => (mhz > 210 ? -11.6 : -12.1)),
      short: levels((mhz) => (mhz > 210 ? -13 : -12.3)),
      load: levels((mhz) => (mhz < 40 ? -32 : -50)),
    };
    const quality = qualifyBench(bench(references, { loadReturnLossDb: 60 }), WISH);
    const said = Object.fromEntries(quality.limits.map((limit) => [limit.code, limit]));
    expect(said["open-short-disagree"].message).toBe(
      "Above 210 MHz the open and the short disagree by more than 1 dB (1.4 dB at most).",
    );
    expect(said["open-short-disagree"]).toMatchObject({ fromHz: 220e6, toHz: 500e6 });
    expect(said.directivity.message).toMatch(
      /^Below 40 MHz the directivity is down to 19\.\d dB; an SWR of 1.5 ± 0.1 needs 30\.2 dB\.$/,
    );
    expect(said["load-not-a-load"]).toBeUndefined();
    const [range] = quality.ranges;
    expect(range.fromHz).toBe(40e6);
    for (let i = 0; i < AT.length; i++) {
      const inside = quality.ranges.some(({ fromHz, toHz }) => AT[i] >= fromHz && AT[i] <= toHz);
      const { low, high } = swrLimits(1.5, quality.left, i);
      expect(inside).toBe(high <= 1.6 && low >= 1.4);
    }
  });

  it("says when the match and the 0 dB line are what is too poor", () => {
    const references = { open: levels(-11.9), short: levels(-12.6), load: levels(-70) };
    const quality = qualifyBench(bench(references, { loadReturnLossDb: 70 }), { swr: 3, tolerance: 0.05 });
    expect(codes(quality.limits)).toEqual(["match-and-line"]);
    expect(quality.limits[0].message).toMatch(/^Everywhere directivity alone would do/);
    expect(quality.ranges).toEqual([]);
  });

  it("names a load that is not one, and a 0 dB line that falls away", () => {
    const line = (mhz: number) => (mhz > 400 ? -30 : -12);
    const references = { open: levels(line), short: levels(line), load: levels((mhz) => line(mhz) - 4) };
    const { limits } = qualifyBench(bench(references), WISH);
    expect(limits.find(({ code }) => code === "load-not-a-load")?.message).toMatch(
      /^Everywhere the load returns only 4\.0 dB less than open and short/,
    );
    // What is no load shows no directivity.
    expect(codes(limits)).not.toContain("directivity");
    expect(limits.find(({ code }) => code === "zero-line-falls")?.message).toMatch(
      /^Above 400 MHz .*\(18 dB at most\)/,
    );
  });

  it("says that a load returns as much as the open, and tells a hair over a decibel as more than one", () => {
    const references = { open: levels(-12), short: levels(-13.02), load: levels(-12) };
    const said = qualifyBench(bench(references), WISH).limits.map(({ message }) => message);
    expect(said[0]).toMatch(/^Everywhere the load returns as much as open and short/);
    expect(said[1]).toMatch(/disagree by more than 1 dB \(1\.02 dB at most\)/);
  });

  it("says of references with phase that open and short are exchanged, and nothing when they are not", () => {
    const at = Array.from({ length: 100 }, (_, i) => (i + 1) * 1e6);
    // A delay of 5 ns there and back, and a directivity of 34 dB.
    const seen = (gamma: number) => {
      const turned = at.map((hz) => polar(gamma, -360 * hz * 5e-9));
      return complexSweep(
        at,
        turned.map(({ re }) => 0.02 + re),
        turned.map(({ im }) => im),
      );
    };
    const quality = (open: number, short: number) =>
      qualifyBench(bench({ open: seen(open), short: seen(short), load: seen(0) }), WISH);
    expect(codes(quality(1, -1).limits)).not.toContain("open-short-swapped");
    const swapped = quality(-1, 1);
    expect(swapped.correction).toBe("three-term");
    expect(swapped.limits[0]).toMatchObject({ code: "open-short-swapped", fromHz: 1e6, toHz: 100e6 });
    expect(swapped.limits[0].message).toMatch(/^Open and short seem to be exchanged/);
  });

  it("says what is missing of an empty bench and of each part", () => {
    const empty = qualifyBench(bench({}), WISH);
    expect(empty).toMatchObject({ correction: "none", ranges: [], limits: [] });
    expect(empty.frequencyHz.length).toBe(0);
    expect(codes(empty.missing)).toEqual(["zero-line", "load", "match", "through"]);
    const one = qualifyBench(bench({ open: levels(-12) }), WISH);
    expect(codes(one.missing)).toEqual(["short", "load", "match", "through"]);
    expect(one.directivityDb[0]).toBeNaN();
    expect(one.testPortMatchDb[0]).toBeNaN();
    expect(one.openShortDisagreementDb[0]).toBeNaN();
    expect(one.insertionLossDb[0]).toBeNaN();
    expect(one.ranges).toEqual([]);
  });

  it("keeps to where open and short overlap", () => {
    const late = AT.slice(20);
    const quality = qualifyBench(bench({ open: levels(-12), short: levels(-12, late) }), WISH);
    expect(quality.frequencyHz[0]).toBe(late[0]);
    expect(quality.frequencyHz.length).toBe(late.length);
  });

  it("gives a complex bench its own directivity and match, and no range before the load is known", () => {
    const terms = { d: polar(0.05, 30), m: polar(0.1, -60), t: polar(0.9, -20) };
    const flat = (gamma: { re: number; im: number }) => {
      const { re, im } = measured(terms, gamma);
      return complexSweep(
        AT,
        AT.map(() => re),
        AT.map(() => im),
      );
    };
    const references = {
      open: flat({ re: 1, im: 0 }),
      short: flat({ re: -1, im: 0 }),
      load: flat({ re: 0, im: 0 }),
    };
    const quality = qualifyBench(bench(references), WISH);
    expect(quality.correction).toBe("three-term");
    expect(quality.directivityDb[3]).toBeCloseTo(-20 * Math.log10(0.05 / 0.9), 9);
    expect(quality.testPortMatchDb[3]).toBeCloseTo(20, 9);
    expect(quality.ranges).toEqual([]);
    expect(codes(quality.missing)).toEqual(["load-return-loss", "through"]);
    const known = qualifyBench(bench(references, { loadReturnLossDb: 40 }), WISH);
    expect(known.ranges).toEqual([{ fromHz: 10e6, toHz: 500e6 }]);
  });
});

describe("the error a wish allows", () => {
  it("brings SWR to the edge of its tolerance and no further", () => {
    const d = allowedError(WISH);
    const limits = (directivity: number) => ({
      directivity: Float64Array.of(directivity),
      tracking: Float64Array.of(0),
      match: Float64Array.of(0),
    });
    expect(swrLimits(1.5, limits(d), 0).high).toBeCloseTo(1.6, 9);
    expect(swrLimits(1.5, limits(d), 0).low).toBeGreaterThan(1.4);
    expect(allowedError({ swr: 1.05, tolerance: 0.1 })).toBeCloseTo(swrToGamma(1.15) - swrToGamma(1.05), 12);
    expect(allowedError({ swr: 1.5, tolerance: 0 })).toBeNaN();
  });

  /** REFERENCE section 5: limits of the return loss with directivity alone, computed. */
  it.each([
    [30, 20, 17.61, 23.3],
    [40, 30, 27.61, 33.3],
    [35, 10, 9.52, 10.5],
    [25, 15, 12.61, 18.3],
    [20, 20, 13.98, Number.POSITIVE_INFINITY],
  ])("with %d dB of directivity a return loss of %d dB is %d to %d dB", (directivity, read, low, high) => {
    const m = 10 ** (-read / 20);
    const limits = {
      directivity: Float64Array.of(10 ** (-directivity / 20)),
      tracking: Float64Array.of(0),
      match: Float64Array.of(0),
    };
    const swr = swrLimits((1 + m) / (1 - m), limits, 0);
    const loss = (s: number) => -20 * Math.log10(swrToGamma(s));
    expect(loss(swr.high)).toBeCloseTo(low, 2);
    if (Number.isFinite(high)) expect(loss(swr.low)).toBeCloseTo(high, 1);
    else expect(swr.low).toBeCloseTo(1, 9);
  });

  /**
   * REFERENCE section 5: D 40 dB, M 30 dB, T 0.1 dB: 10 dB → 9.550..10.475 (SWR 1.8547..1.9987); 20 → 19.057..21.059.
   */
  it.each([
    [10, 9.55, 10.475],
    [20, 19.057, 21.059],
    [30, 27.531, 33.463],
  ])("with directivity, match and tracking a return loss of %d dB is %d to %d dB", (read, low, high) => {
    const m = 10 ** (-read / 20);
    const limits = {
      directivity: Float64Array.of(0.01),
      tracking: Float64Array.of(10 ** (0.1 / 20) - 1),
      match: Float64Array.of(10 ** (-30 / 20)),
    };
    const swr = swrLimits((1 + m) / (1 - m), limits, 0);
    const loss = (s: number) => -20 * Math.log10(swrToGamma(s));
    expect(loss(swr.high)).toBeCloseTo(low, 2);
    expect(loss(swr.low)).toBeCloseTo(high, 2);
  });
});

describe("compareBenches", () => {
  const made = (load: Db, short: Db = -12.2, at = AT) =>
    qualifyBench(
      bench(
        { open: levels(-12, at), short: levels(short, at), load: levels(load, at) },
        { loadReturnLossDb: 80 },
      ),
      WISH,
    );

  it("gives differences at the second bench's frequencies, and what they mean", () => {
    const after = made((mhz) => (mhz > 300 ? -38 : -52), -12.2, AT.slice(5));
    const { frequencyHz, directivityDb, words } = compareBenches(made(-40), after);
    expect(frequencyHz[0]).toBe(AT[5]);
    expect(directivityDb[0]).toBeCloseTo(12, 0);
    expect(directivityDb[44]).toBeCloseTo(-2, 0);
    expect(words[0]).toMatch(
      /^The directivity is 1[12]\.\d dB better in the middle, but worse above 300 MHz\.$/,
    );
    expect(words).toContain("The disagreement of open and short is the same within 0.5 dB.");
    expect(words).toContain("The insertion loss can't be compared: it is not known on both sides.");
    expect(words[words.length - 1]).toMatch(/^An SWR of 1.5 is known to ± 0.1 from .*; before nowhere\.$/);
  });

  it("says when there is nothing to compare", () => {
    const { words, frequencyHz } = compareBenches(
      made(-40, -12.2, AT.slice(0, 10)),
      made(-40, -12.2, AT.slice(20)),
    );
    expect(frequencyHz.length).toBe(0);
    expect(words).toEqual(["The two have no frequency in common, so nothing can be compared."]);
  });
});
