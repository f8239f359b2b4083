import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import {
  addedLossDb,
  type Feedline,
  matchedLossDb,
  removeFeedline,
  swrBeyond,
} from "../../app/measurement/feedline.ts";
import { gammaToSwr, swrToGamma } from "../../app/measurement/reflection.ts";
import { codes, complexSweep, scalarSweep } from "./correction/benches.ts";

interface Pair {
  re: number[];
  im: number[];
}
/** Made by tests/reference/one_port.py with scikit-rf. */
const reference: {
  frequencyHz: number[];
  lines: (Omit<Feedline, "name"> & { seen: Pair; antenna: Pair })[];
} = JSON.parse(readFileSync(new URL("../fixtures/measurement/one-port.json", import.meta.url), "utf8"));

/** A line whose matched loss is `db` at every frequency asked for here: 1 MHz. */
const losing = (db: number, lengthM = 10): Feedline => ({
  name: "own values",
  k1: db / lengthM,
  k2: 0,
  lengthM,
  velocityFactor: 0.66,
});

describe("removeFeedline", () => {
  it.each(reference.lines.map((one, i) => ({ ...one, i })))(
    "agrees with scikit-rf to 1e-9, line $i",
    ({ seen, antenna, ...line }) => {
      const { sweep, warnings } = removeFeedline(complexSweep(reference.frequencyHz, seen.re, seen.im), {
        name: "own values",
        ...line,
      });
      expect(warnings).toEqual([]);
      expect(sweep.plane).toBe("antenna");
      for (let i = 0; i < reference.frequencyHz.length; i++) {
        expect(Math.abs((sweep.gammaRe?.[i] ?? Number.NaN) - antenna.re[i])).toBeLessThan(1e-9);
        expect(Math.abs((sweep.gammaIm?.[i] ?? Number.NaN) - antenna.im[i])).toBeLessThan(1e-9);
        expect(sweep.magnitude[i]).toBeCloseTo(0.6, 9);
      }
    },
  );

  /** REFERENCE section 7, "shack → antenna". */
  it.each([
    [1.5, 3, 2.3281],
    [2, 3, 4.9717],
    [3, 2, 8.6361],
  ])("takes SWR %d behind %d dB for %d at the antenna", (here, db, there) => {
    const { sweep } = removeFeedline(scalarSweep([1e6], [swrToGamma(here)]), losing(db));
    expect(gammaToSwr(sweep.magnitude[0])).toBeCloseTo(there, 3);
    expect(swrBeyond(here, db)).toBeCloseTo(there, 3);
  });

  it("keeps abs Γ over 1 and says that the cable entry is wrong", () => {
    const { sweep, warnings } = removeFeedline(scalarSweep([1e6, 2e6], [swrToGamma(2), 0.01]), losing(6));
    expect(sweep.magnitude[0]).toBeCloseTo(1.327, 3);
    expect(codes(warnings)).toEqual(["feedline-over-unity"]);
    expect(warnings[0].message).toContain("1 of 2 points");
    expect(swrBeyond(2, 6)).toBe(Number.POSITIVE_INFINITY);
  });

  it("turns 10 m of velocity factor 0.66 at 14.1 MHz by 2 × 256.5411°", () => {
    const line = { ...losing(0), lengthM: 10 };
    const { sweep } = removeFeedline(complexSweep([14.1e6], [1], [0]), line);
    const degrees = (Math.atan2(sweep.gammaIm?.[0] ?? 0, sweep.gammaRe?.[0] ?? 0) * 180) / Math.PI;
    expect((degrees + 720) % 360).toBeCloseTo((2 * 256.5411) % 360, 3);
    expect(sweep.magnitude[0]).toBe(1);
  });

  it("takes limits and a picture's limits along, and adds what the cable's sheet leaves open", () => {
    const limits = () => ({
      directivity: Float64Array.of(0.01),
      tracking: Float64Array.of(0.02),
      match: Float64Array.of(0.05),
    });
    const pictureLimits = {
      frequencyHz: Float64Array.of(5),
      magnitudeLow: Float64Array.of(0.1),
      magnitudeHigh: Float64Array.of(0.3),
    };
    const seen = { ...scalarSweep([100e6], [0.2]), benchLimits: limits(), pictureLimits };
    const g = 10 ** (0.3 / 10);
    const own = removeFeedline(seen, { ...losing(0.3), k1: 0.003 });
    expect(own.sweep.benchLimits?.directivity[0]).toBeCloseTo(0.01 * g, 12);
    expect(own.sweep.benchLimits?.tracking[0]).toBeCloseTo(0.02, 12);
    expect(own.sweep.benchLimits?.match[0]).toBeCloseTo(0.05 / g, 12);
    expect(own.sweep.pictureLimits?.magnitudeHigh[0]).toBeCloseTo(0.3 * g, 12);
    const half = 0.01 * g + 0.02 * 0.2 * g + (0.05 / g) * (0.2 * g) ** 2;
    expect(half).toBeCloseTo(g * (0.01 + 0.02 * 0.2 + 0.05 * 0.04), 12);
    expect(own.sweep.benchLimits?.feedline).toBeUndefined();
    const sheet = removeFeedline(seen, { ...losing(0.3), k1: 0.003, name: "RG-213/U (solid PE)" });
    expect(sheet.sweep.benchLimits?.tracking[0]).toBeCloseTo(0.02 + (g ** 0.2 - 1) * 1.02, 12);
    expect(sheet.sweep.benchLimits?.feedline?.[0]).toBeCloseTo((g ** 0.2 - 1) * 1.02, 12);
  });

  it("leaves out what the sheet does not cover, and nothing with own values", () => {
    const seen = scalarSweep([0.5e6, 1e6, 7e6, 200e6, 201e6], [0.1, 0.1, 0.1, 0.1, 0.1]);
    const line = { ...losing(0), lengthM: 1, name: "RG-213/U (solid PE)" };
    const { sweep, warnings } = removeFeedline(seen, line);
    expect(Array.from(sweep.magnitude, Number.isNaN)).toEqual([true, false, false, false, true]);
    expect(codes(warnings)).toEqual(["cable-range"]);
    expect(warnings[0].message).toContain("2 of 5 points");
    expect(removeFeedline(seen, { ...line, name: "own values" }).warnings).toEqual([]);
  });

  it("follows the skin effect below a sheet that begins later, and says so, but not on a steel core", () => {
    const seen = scalarSweep([0.9e6, 1e6, 7e6, 30e6], [0.1, 0.1, 0.1, 0.1]);
    const low = removeFeedline(seen, { ...losing(0), name: "LMR-400" });
    expect(Array.from(low.sweep.magnitude, Number.isNaN)).toEqual([true, false, false, false]);
    expect(codes(low.warnings)).toEqual(["cable-range", "cable-below-sheet"]);
    expect(low.warnings[1].message).toContain("begins at 30 MHz: at 2 of 4 points");
    const steel = removeFeedline(seen, { ...losing(0), name: "RG-174" });
    expect(Array.from(steel.sweep.magnitude, Number.isNaN)).toEqual([true, true, true, false]);
  });

  it("takes a 75 Ω cable out in 75 Ω where there is phase, and says what it can't do where there is none", () => {
    const line: Feedline = { name: "RG-59", k1: 0, k2: 0, lengthM: 299792458 / 100e6 / 4, velocityFactor: 1 };
    // A quarter wave of 75 Ω turns 50 Ω into 75²/50 = 112.5 Ω.
    const seen = (112.5 - 50) / (112.5 + 50);
    const benchLimits = {
      directivity: Float64Array.of(0.01),
      tracking: Float64Array.of(0),
      match: Float64Array.of(0),
    };
    const complex = removeFeedline({ ...complexSweep([100e6], [seen], [0]), benchLimits }, line);
    expect(complex.sweep.benchLimits).toBeUndefined();
    expect(complex.sweep.magnitude[0]).toBeCloseTo(0, 12);
    expect(complex.sweep.referenceOhm).toBe(50);
    expect(codes(complex.warnings)).toEqual(["cable-impedance"]);
    const scalar = removeFeedline(scalarSweep([100e6], [seen]), line);
    expect(scalar.sweep.magnitude[0]).toBeCloseTo(seen, 12);
    expect(scalar.warnings[0].message).toContain("a guess");
  });

  it.each([
    { is: "a negative length", change: { lengthM: -1 } },
    { is: "no velocity factor", change: { velocityFactor: 0 } },
    { is: "a velocity factor over 1", change: { velocityFactor: 1.2 } },
    { is: "a gain", change: { k1: -0.1 } },
    { is: "a loss that is no number", change: { k2: Number.NaN } },
    { is: "an endless line", change: { lengthM: Number.POSITIVE_INFINITY } },
  ])("removes nothing for $is", ({ change }) => {
    const seen = scalarSweep([1e6], [0.5]);
    const { sweep, warnings } = removeFeedline(seen, { ...losing(1), ...change });
    expect(sweep).toBe(seen);
    expect(codes(warnings)).toEqual(["feedline-impossible"]);
  });

  it("keeps gaps, and copes with no points", () => {
    const { sweep, warnings } = removeFeedline(scalarSweep([1e6, 2e6], [Number.NaN, 0.1]), losing(1));
    expect(sweep.magnitude[0]).toBeNaN();
    expect(warnings).toEqual([]);
    expect(removeFeedline(scalarSweep([], []), losing(1)).sweep.magnitude.length).toBe(0);
  });
});

describe("addedLossDb", () => {
  /** REFERENCE section 7: matched loss, SWR at the load, total, added. */
  it.each([
    [1, 2, 1.1959, 0.1959],
    [1, 3, 1.5039, 0.5039],
    [1, 5, 2.1235, 1.1235],
    [2, 3, 2.7941, 0.7941],
    [3, 3, 3.9677, 0.9677],
    [3, 10, 7.0077, 4.0077],
    [0.5, 20, 3.3513, 2.8513],
    [6, 20, 13.1832, 7.1832],
  ])("for %d dB and SWR %d is %d less the matched loss", (matched, swr, total, added) => {
    expect(addedLossDb(matched, swr)).toBeCloseTo(added, 3);
    expect(addedLossDb(matched, swr) + matched).toBeCloseTo(total, 3);
  });

  it("is nothing on a matched or lossless line, endless for a load that takes nothing, and NaN for nonsense", () => {
    expect(addedLossDb(3, 1)).toBeCloseTo(0, 12);
    expect(addedLossDb(0, 5)).toBe(0);
    expect(addedLossDb(1, Number.POSITIVE_INFINITY)).toBe(Number.POSITIVE_INFINITY);
    expect(addedLossDb(-1, 2)).toBeNaN();
    expect(addedLossDb(1, 0.5)).toBeNaN();
    expect(addedLossDb(0, 0.5)).toBeNaN();
  });
});

describe("a cable of points of one's own", () => {
  const line = { ...losing(1), rangeMhz: { low: 2, high: 4 } };
  const seen = scalarSweep([1e6, 2e6, 3e6, 4e6, 5e6], [0.5, 0.5, 0.5, 0.5, 0.5]);

  it("has a loss from its first point to its last, ends included, and says where it has none", () => {
    const { sweep, warnings } = removeFeedline(seen, line);
    expect(Array.from(sweep.magnitude, Number.isNaN)).toEqual([true, false, false, false, true]);
    expect(codes(warnings)).toEqual(["cable-range"]);
    expect(warnings[0].message).toMatch(/^2 of 5 points lie outside .*\(2 to 4 MHz\)/);
  });

  it("says nothing where the sweep lies within them, and differs in nothing from k1 and k2 there", () => {
    const inside = scalarSweep([2e6, 3e6], [0.5, 0.5]);
    const { sweep, warnings } = removeFeedline(inside, line);
    expect(warnings).toEqual([]);
    expect(sweep.magnitude).toEqual(removeFeedline(inside, losing(1)).sweep.magnitude);
  });
});

describe("matchedLossDb", () => {
  it("is k1·√f + k2·f in MHz for every metre", () => {
    // LMR-400's own formula, per 100 ft: 150 MHz 1.537 dB (REFERENCE section 7).
    const line = { k1: 0.12229 / 30.48, k2: 0.00026 / 30.48, lengthM: 30.48 };
    expect(matchedLossDb(line, 150e6)).toBeCloseTo(1.537, 3);
  });
});
