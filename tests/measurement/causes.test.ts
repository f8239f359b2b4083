import { describe, expect, test } from "vitest";
import type { Antenna } from "../../app/measurement/antenna.ts";
import type { CauseContext } from "../../app/measurement/causes/cause.ts";
import { discriminate } from "../../app/measurement/causes/discriminate.ts";
import { standingOf } from "../../app/measurement/causes/rank.ts";
import { ripplePeriodOf } from "../../app/measurement/causes/ripple.ts";
import { causesOf } from "../../app/measurement/causes.ts";
import { bareAntenna, part } from "./antennas.ts";

const at = (mhz: number) => ({ frequencyHz: mhz * 1e6, frequencyUncertaintyHz: 2e3, edge: false });
const context = (antenna: Antenna, over: Partial<CauseContext> = {}): CauseContext => ({
  antenna,
  dips: [],
  ripplePeriodHz: null,
  references: [],
  ...over,
});
const withFeedline = (antenna: Antenna, lengthM: number | null): Antenna => ({
  ...antenna,
  feedline: { cable: null, lengthM, velocityFactor: null, route: "" },
});

describe("parts", () => {
  test("the nearest against its own tolerance comes first, with its arithmetic and a measurement", () => {
    const antenna = bareAntenna(part("vertical", 10.2), part("mast", 7.4), part("wire", 3.1));
    const causes = causesOf(at(29.9), context(antenna));
    expect(causes[0]).toMatchObject({
      kind: "part",
      part: "mast",
      order: 3,
      title: "may be mast, 3 × quarter wave",
    });
    expect(causes[0].arithmetic).toContain(
      "3 × 0.984 × c/(4 × 7.4\u2009m) = 29.89\u2009MHz; the dip is there",
    );
    expect(causes[0].test).toBe(
      "Clip 0.74\u2009m of wire to the end of mast: this cause predicts −2.7\u2009MHz.",
    );
    for (const cause of causes) expect(cause.title.startsWith("may be ")).toBe(true);
    expect(causes.map(({ score }) => score)).toEqual(
      causes.map(({ score }) => score).toSorted((a, b) => b - a),
    );
    expect(new Set(causes.map((c) => c.part)).size).toBe(causes.length);
  });

  test("a length that is not said offers nothing; nothing known, nothing offered", () => {
    const mute = bareAntenna({ ...part("mast", 7.4), lengthM: null });
    expect(causesOf(at(29.9), context(withFeedline(mute, null)))).toEqual([]);
    expect(causesOf(at(29.9), context(bareAntenna()))).toEqual([]);
    for (const bad of [Number.NaN, 0, -1, Number.POSITIVE_INFINITY])
      expect(causesOf({ frequencyHz: bad }, context(bareAntenna(part("mast", 7))))).toEqual([]);
  });

  test("too far off is not offered", () => {
    expect(causesOf(at(14), context(bareAntenna(part("vertical", 10.2))))).toEqual([]);
  });

  test("an uncertain dip widens the tolerance", () => {
    const antenna = context(bareAntenna(part("vertical", 10.2)));
    const sure = causesOf({ frequencyHz: 7.1e6, frequencyUncertaintyHz: 0 }, antenna)[0];
    const unsure = causesOf({ frequencyHz: 7.1e6, frequencyUncertaintyHz: 500e3 }, antenna)[0];
    expect(unsure.toleranceHz).toBeCloseTo(Math.hypot(sure.toleranceHz, 500e3), 0);
  });
});

describe("ranking", () => {
  const near = { predictedHz: 20e6, toleranceHz: 0.4e6, spacingHz: 14e6, weight: 1 };

  test("falls with the offset, and with how crowded the series is", () => {
    const score = (dipHz: number, over = {}) =>
      standingOf(dipHz, 0, { ...near, ...over })?.score ?? Number.NaN;
    expect(score(20e6)).toBeGreaterThan(score(20.3e6));
    expect(score(20.3e6)).toBeGreaterThan(score(20.8e6));
    expect(score(20e6)).toBeGreaterThan(score(20e6, { spacingHz: 2e6 }));
    expect(score(20e6)).toBeGreaterThan(score(20e6, { weight: 0.2 }));
    expect(standingOf(21.1e6, 0, near)).toBeNull();
  });

  /** Density of Student's t with 5 degrees of freedom: 0.379607 at 0, 0.219680 at 1 (closed form 8/(3π√5)·(1 + t²/5)^−3). */
  test("is the logarithm of the two densities' ratio", () => {
    const density = (t: number) => (8 / (3 * Math.PI * Math.sqrt(5))) * (1 + (t * t) / 5) ** -3;
    const scale = 0.4e6 / 2.571;
    for (const offset of [0, 0.1e6, -0.35e6, 0.9e6]) {
      const found = standingOf(20e6 + offset, 0, near);
      expect(found?.score).toBeCloseTo(Math.log((density(offset / scale) / scale) * 14e6), 3);
      expect(found?.byChance).toBeCloseTo((2 * Math.abs(offset)) / 14e6, 12);
    }
  });
});

describe("other causes", () => {
  test("the bench's own dip outranks all", () => {
    const references = [{ role: "load" as const, frequencyHz: 29.92e6, frequencyUncertaintyHz: 5e3 }];
    const [first] = causesOf(at(29.9), context(bareAntenna(part("mast", 7.5)), { references }));
    expect(first).toMatchObject({
      kind: "reference",
      part: null,
      title: "may be of the bench: its load sweep has the same dip",
    });
    const far = causesOf(at(31), context(bareAntenna(), { references }));
    expect(far).toEqual([]);
  });

  /** 20 m of velocity factor 0.66: 4.94658 MHz (REFERENCE 7). */
  test("dips a feedline's period apart may be its ripple; others not", () => {
    const ripplePeriodHz = 4.94658e6;
    const dips = [at(20.1), at(25.05), at(30)];
    const [first] = causesOf(dips[1], context(bareAntenna(), { dips, ripplePeriodHz }));
    expect(first).toMatchObject({ kind: "ripple" });
    expect(first.arithmetic).toContain("4.947\u2009MHz");
    expect(first.arithmetic).toContain("on the other side too");
    const [single] = causesOf(dips[0], context(bareAntenna(), { dips, ripplePeriodHz }));
    expect(single.score).toBeLessThan(first.score);
    expect(causesOf(at(27), context(bareAntenna(), { dips, ripplePeriodHz }))).toEqual([]);
    expect(causesOf(dips[1], context(bareAntenna(), { dips, ripplePeriodHz: null }))).toEqual([]);
    expect(causesOf(dips[1], context(bareAntenna(), { dips, ripplePeriodHz: 0 }))).toEqual([]);
  });

  test("the period of a feedline, by its own velocity factor or its cable's; else not known", () => {
    const line = { cable: null, lengthM: 20, velocityFactor: 0.66 };
    expect((ripplePeriodOf(line) ?? 0) / 1e6).toBeCloseTo(4.94658, 5);
    expect(ripplePeriodOf({ ...line, velocityFactor: null })).toBeNull();
    expect(ripplePeriodOf({ ...line, velocityFactor: null, cable: "RG-213" }) ?? 0).toBeCloseTo(
      4.94658e6,
      -2,
    );
    for (const lengthM of [null, 0, -1, Number.NaN]) expect(ripplePeriodOf({ ...line, lengthM })).toBeNull();
    for (const velocityFactor of [0, -0.5, 1.2, Number.NaN])
      expect(ripplePeriodOf({ ...line, velocityFactor })).toBeNull();
    expect(ripplePeriodOf(null)).toBeNull();
  });

  /** NEC-2 vertical: dips at 14.288, 43.572 and 72.979 MHz (REFERENCE 11). */
  test("odd multiples of a lower dip, unless a part already says so", () => {
    const dips = [at(14.288), at(43.572), at(72.979)];
    const [third] = causesOf(dips[1], context(bareAntenna(), { dips }));
    expect(third).toMatchObject({ kind: "multiple", order: 3 });
    expect(third.title).toContain("3-fold of the dip at 14.288");
    const fifth = causesOf(dips[2], context(bareAntenna(), { dips }));
    expect(fifth[0]).toMatchObject({ kind: "multiple", order: 5 });
    const known = causesOf(dips[1], context(bareAntenna(part("vertical", 5.0709)), { dips }));
    expect(known.map(({ kind }) => kind)).toEqual(["part"]);
    const even = causesOf(at(28.6), context(bareAntenna(), { dips: [at(14.288)] }));
    expect(even).toEqual([]);
    const edge = causesOf(dips[1], context(bareAntenna(), { dips: [{ ...at(14.288), edge: true }] }));
    expect(edge).toEqual([]);
  });
});

describe("telling causes apart", () => {
  const antenna = withFeedline(bareAntenna(part("mast", 7.4)), 12);

  test("a metre more of feedline moves the one by f·1/(l + 1), the other by nothing", () => {
    const causes = causesOf(at(29.9), context(antenna));
    expect(causes.map((c) => c.part).toSorted()).toEqual(["feedline", "mast"]);
    const feedline = causes.findIndex((c) => c.part === "feedline");
    const tests = discriminate(causes);
    const metre = tests.find(({ change }) => change.includes("feedline"));
    expect(metre?.change).toBe("Add 1\u2009m of feedline");
    expect(metre?.shiftHz[feedline] ?? 0).toBeCloseTo(-29.9e6 / 13, 0);
    expect(metre?.shiftHz[1 - feedline]).toBe(0);
    expect(metre?.words).toContain("predicts −2.3\u2009MHz");
    expect(metre?.words).toContain("predicts nothing");
  });

  test("a reference stays when the antenna goes; a multiple does not say what moves it", () => {
    const references = [{ role: "load" as const, frequencyHz: 29.9e6, frequencyUncertaintyHz: null }];
    const causes = causesOf(at(29.9), context(antenna, { references, dips: [at(9.77)] }));
    const swap = discriminate(causes).find(({ change }) => change.includes("load"));
    expect(swap?.words).toContain("that the dip stays");
    expect(swap?.words).toContain("that it goes");
  });

  /** 16 m of feedline on through half of a 20.1 m dipole: a half wave on 26.05 m. */
  test("a dipole's piece moves the feedline's cause by the half that lies in its path", () => {
    const joined = withFeedline(bareAntenna(part("dipole", 20.1)), 16);
    const causes = causesOf(at(5.4), context(joined));
    expect(causes[0].path).toMatchObject({ lengthM: 26.05, joined: { part: "dipole", share: 0.5 } });
    const beside = causesOf(at(7.1), context(bareAntenna(part("dipole", 20.1))));
    const [clip] = discriminate([beside[0], causes[0]]).filter(({ change }) => change.includes("dipole"));
    expect(clip.change).toBe("Clip 2\u2009m of wire to the end of dipole");
    expect(clip.shiftHz[0] ?? 0).toBeCloseTo((-7.1e6 * 2) / 22.1, 0);
    expect(clip.shiftHz[1] ?? 0).toBeCloseTo((-5.4e6 * 1) / 27.05, 0);
  });

  test("no cause, nothing to try", () => {
    expect(discriminate([])).toEqual([]);
  });
});
