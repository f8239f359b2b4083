import { describe, expect, it } from "vitest";
import { correctSweep } from "../../../app/measurement/correction/correct.ts";
import type { ReadAs } from "../../../app/measurement/correction/scale-faults.ts";
import { bench, codes, scalarSweep } from "./benches.ts";

const AT = Array.from({ length: 30 }, (_, i) => (i + 1) * 1e6);
const levels = (db: number | ((mhz: number) => number)) =>
  scalarSweep(
    AT,
    AT.map((hz) => 10 ** ((typeof db === "number" ? db : db(hz / 1e6)) / 20)),
  );
const antenna = levels((mhz) => -13 - 20 / (1 + ((mhz - 14) / 2) ** 2));
const GOOD = { open: levels(-12.8), short: levels(-13.2), load: levels(-53) };

function told(references: Parameters<typeof bench>[0], readAs?: ReadAs, sweep = antenna) {
  return correctSweep(sweep, bench({ ...GOOD, ...references }, { loadReturnLossDb: 46 }), readAs).warnings;
}

describe("faults of the references", () => {
  it("finds none in a good bench", () => {
    expect(told({})).toEqual([]);
  });

  it("names a load that is not one, and where", () => {
    const [warning, ...more] = told({ load: levels((mhz) => (mhz > 20 ? -16 : -50)) });
    expect(more).toEqual([]);
    expect(warning.code).toBe("load-not-a-load");
    expect(warning.message).toContain("only 3.0 dB less than open and short above 20 MHz");
  });

  it("names an open and a short that disagree, and where", () => {
    const [warning] = told({ open: levels((mhz) => (mhz < 6 ? -11 : -13.2)) });
    expect(warning.code).toBe("open-short-disagree");
    expect(warning.message).toContain("by more than 1 dB below 6 MHz");
    expect(codes(told({ open: levels(-12.3) }))).toEqual([]);
  });

  it("counts the same sweep given twice as one", () => {
    const done = correctSweep(antenna, bench({ ...GOOD, short: { ...GOOD.open } }, { loadReturnLossDb: 46 }));
    expect(codes(done.warnings)).toEqual(["open-is-short"]);
    expect(done.sweep.benchLimits?.match[0]).toBe(0.2);
  });

  it("names references that end too early", () => {
    const few = (sweep: typeof antenna) =>
      scalarSweep(sweep.frequencyHz.slice(4, 20), sweep.magnitude.slice(4, 20));
    const warnings = told({ open: few(GOOD.open), short: few(GOOD.short) });
    expect(codes(warnings)).toEqual(["references-short"]);
    expect(warnings[0].message).toBe(
      "The references reach from 5 to 20 MHz: 14 of 30 points of the sweep lie outside and are left out. Nothing is extrapolated.",
    );
    const elsewhere = scalarSweep([100e6, 200e6], [0.2, 0.2]);
    const none = correctSweep(antenna, bench({ open: elsewhere }));
    expect(none.correction.kind).toBe("none");
    expect(none.warnings[0].message).toContain("no point of the sweep lies in it, and nothing was corrected");
    const apart = told({ open: few(GOOD.open), short: elsewhere });
    expect(apart[0].message).toContain("have no range in common");
  });

  it("names another reference impedance", () => {
    expect(codes(told({ load: { ...GOOD.load, referenceOhm: 75 } }))).toEqual(["references-other-ohm"]);
  });
});

describe("levels and losses mixed up", () => {
  it("shows where the reading says so", () => {
    const level = { quantity: "level", zeroDb: 0 } as const;
    expect(codes(told({}, { sweep: level, open: level, short: level, load: level }))).toEqual([]);
    expect(codes(told({}, { sweep: level, open: { quantity: "return-loss" } }))).toEqual(["level-and-loss"]);
    expect(codes(told({}, { sweep: level, open: { quantity: "level", zeroDb: -13 } }))).toEqual([
      "other-zero",
    ]);
    expect(codes(told({}, { open: level }))).toEqual([]);
  });

  it("shows in the outcome where it does not", () => {
    const normalised = levels((mhz) => -20 / (1 + ((mhz - 14) / 2) ** 2));
    const [over] = told({}, undefined, normalised);
    expect(over.code).toBe("not-one-scale");
    expect(over.message).toContain("read as a level and the other as a loss");
    const [under] = told({}, undefined, levels(-50));
    expect(under.code).toBe("all-far-below");
    expect(under.message).toContain("than 37 dB");
  });
});
