import { describe, expect, test } from "vitest";
import {
  type Antenna,
  type AntennaElement,
  type ElementKind,
  NO_ANTENNA,
} from "../../app/measurement/antenna.ts";
import { notJudged, type Prediction, predictionsOf } from "../../app/measurement/elements.ts";
import { bareAntenna, part } from "./antennas.ts";

const FOOT = 0.3048;
const firstOf = (kind: ElementKind, lengthM: number) =>
  predictionsOf(bareAntenna(part(kind, lengthM)), 1e9)[0];
const oddOf = (predictions: Prediction[], series: string) =>
  predictions.filter((p) => p.series === series && p.order % 2 === 1);

describe("first resonance: handbook lengths", () => {
  /** 234/f and 468/f ft (REFERENCE 8; on-the-numbers.co.uk/useful-info.html, seen), 1005/f ft (ARRL Antenna Book; from memory, not seen). */
  test.each([
    ["vertical", 16.5957, 14.1],
    ["dipole", 33.1915, 14.1],
    ["dipole", 65.9155, 7.1],
    ["dipole", 128.2192, 3.65],
    ["vertical", 1.6027, 146],
    ["loop", 1005 / 21.2, 21.2],
    ["loop", 1005 / 7.1, 7.1],
  ] as [ElementKind, number, number][])("%s of %d ft: %d MHz", (kind, feet, mhz) => {
    expect(firstOf(kind, feet * FOOT).frequencyHz / 1e6 / mhz).toBeCloseTo(1, 3);
  });

  test("the metric rules 143/f and 71.5/f lie inside", () => {
    const dipole = firstOf("dipole", 143 / 14.1);
    expect(dipole.lowHz).toBeLessThan(14.1e6);
    expect(dipole.highHz).toBeGreaterThan(14.1e6);
    const vertical = firstOf("vertical", 71.5 / 14.1);
    expect(vertical.lowHz).toBeLessThan(14.1e6);
    expect(vertical.highHz).toBeGreaterThan(14.1e6);
  });

  /** L = 492·(n − 0.05)/f ft (ARRL Antenna Book; from memory, not seen): 3 half waves at 21.2 MHz are 68.46 ft. */
  test("long wires: n half waves", () => {
    for (const n of [1, 2, 3, 5, 8]) {
      const feet = (492 * (n - 0.05)) / 21.2;
      const found = predictionsOf(bareAntenna(part("wire", feet * FOOT)), 30e6).find(
        (p) => p.series === "half" && p.order === n,
      );
      expect((found?.frequencyHz ?? 0) / 21.2e6).toBeCloseTo(1, 2);
    }
  });
});

describe("higher resonances: NEC-2 (REFERENCE 11, dips of the sweep)", () => {
  test("a vertical of 5.0709 m: its first seven dips each within their range, at most 1 % off from the third order on", () => {
    const dips = [14.288, 43.572, 72.979, 102.423, 131.886, 161.359, 190.84];
    const predictions = oddOf(predictionsOf(bareAntenna(part("vertical", 5.0709)), 200e6), "quarter");
    for (const [i, mhz] of dips.entries()) {
      expect(predictions[i].order).toBe(2 * i + 1);
      expect(predictions[i].lowHz).toBeLessThan(mhz * 1e6);
      expect(predictions[i].highHz).toBeGreaterThan(mhz * 1e6);
      if (i > 0) expect(Math.abs(predictions[i].frequencyHz / mhz / 1e6 - 1)).toBeLessThan(0.01);
    }
  });

  test("a dipole of 10.1418 m: 14.312, 43.72 and 73.20 MHz", () => {
    const predictions = oddOf(predictionsOf(bareAntenna(part("dipole", 10.1418)), 80e6), "half");
    for (const [i, mhz] of [14.312, 43.72, 73.2].entries()) {
      expect(predictions[i].lowHz).toBeLessThan(mhz * 1e6);
      expect(predictions[i].highHz).toBeGreaterThan(mhz * 1e6);
    }
  });
});

describe("what is predicted", () => {
  test("ascending, each range around its frequency, with its arithmetic", () => {
    const all = predictionsOf(
      bareAntenna(
        part("vertical", 10.07),
        part("mast", 7.4),
        part("guy", 4.6),
        part("loop", 20),
        part("radial", 10),
      ),
      150e6,
    );
    expect(all.map((p) => p.frequencyHz)).toEqual(all.map((p) => p.frequencyHz).toSorted((a, b) => a - b));
    for (const p of all) {
      expect(p.lowHz).toBeLessThan(p.frequencyHz);
      expect(p.highHz).toBeGreaterThan(p.frequencyHz);
      expect(p.arithmetic).toContain("× c/");
    }
    const third = all.find((p) => p.part === "vertical" && p.order === 3);
    expect(third?.arithmetic).toBe("3 × 0.984 × c/(4 × 10.07\u2009m) = 21.97\u2009MHz");
    expect(third?.what).toBe("3 × quarter wave");
  });

  test("insulated wire is slower by 3 %", () => {
    const bare = firstOf("wire", 10).frequencyHz;
    const covered = predictionsOf(bareAntenna({ ...part("wire", 10), insulated: true }), 1e9)[0].frequencyHz;
    expect(covered / bare).toBeCloseTo(0.97, 3);
  });

  test("the feedline's outside: with a choke less usual, and no longer joined to the antenna", () => {
    const antenna: Antenna = {
      ...bareAntenna(part("dipole", 20.1)),
      feedline: { cable: null, lengthM: 16, velocityFactor: null, route: "" },
    };
    const open = predictionsOf(antenna, 30e6).filter((p) => p.part === "feedline");
    expect(open.some((p) => p.condition.includes("together with half of"))).toBe(true);
    const choked = predictionsOf({ ...antenna, choke: { turns: 9, core: "", where: "" } }, 30e6).filter(
      (p) => p.part === "feedline",
    );
    expect(choked.some((p) => p.condition.includes("together"))).toBe(false);
    expect(Math.max(...choked.map((p) => p.weight))).toBeLessThan(Math.max(...open.map((p) => p.weight)));
    // Half wave and quarter wave of 16 m by themselves.
    expect(choked[0].frequencyHz / 1e6).toBeCloseTo((0.9516 * 299.792458) / 64, 3);
  });
});

describe("what can't be judged is named, never guessed", () => {
  test("lengths not said, zero, negative, NaN", () => {
    const elements: AntennaElement[] = [
      { ...part("mast", 7), lengthM: null, name: "Mast by the shed" },
      part("guy", 0),
      part("wire", -3),
      part("radial", Number.NaN),
      part("vertical", 5),
    ];
    const antenna = {
      ...bareAntenna(...elements),
      feedline: { cable: null, lengthM: null, velocityFactor: null, route: "" },
    };
    expect(predictionsOf(antenna, 100e6).every((p) => p.part === "vertical")).toBe(true);
    expect(notJudged(antenna)).toEqual([
      { part: "mast", name: "Mast by the shed", reason: "length not said" },
      { part: "guy", name: "guy", reason: "length is not more than zero" },
      { part: "wire", name: "wire", reason: "length is not more than zero" },
      { part: "radial", name: "radial", reason: "length not said" },
      { part: "feedline", name: "the feedline's outer surface", reason: "length not said" },
    ]);
  });

  test("nothing said at all, and a kilometre: still an end", () => {
    expect(predictionsOf(NO_ANTENNA, 1e9)).toEqual([]);
    expect(notJudged(NO_ANTENNA)).toHaveLength(1);
    expect(predictionsOf(bareAntenna(part("wire", 1000)), 1e12).length).toBeLessThan(200);
    expect(predictionsOf(bareAntenna(part("wire", 10)), Number.NaN)).toEqual([]);
  });
});
