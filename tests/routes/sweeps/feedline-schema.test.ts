import { describe, expect, it } from "vitest";
import { CABLES } from "~/measurement/cables";
import { cableSchema, figuresOf } from "~/routes/cables/cables.schema";
import { feedlineFields, feedlineFrom, feedlineSchema } from "~/routes/sweeps/feedline.schema";

const REEL = { publicId: "reel000001", name: "Reel", k1: 0.02, k2: 0.001, velocityFactor: 0.8 };
const OWN = [{ ...REEL, points: null }];

describe("the feedline's form", () => {
  it("fills in again what it kept: a cable of the table, one's own, and figures", () => {
    const lines = [
      { cable: CABLES[0].name, lengthM: "12,5" },
      { cable: "own:reel000001", lengthM: "3", velocityFactor: "0.79" },
      { cable: "values", lengthM: "7", k1: "0.01", k2: "0.002", velocityFactor: "0.66" },
    ].map((fields) => feedlineFrom(feedlineSchema.parse(fields), OWN));
    expect(lines[0]).toMatchObject({ lengthM: 12.5, velocityFactor: CABLES[0].velocityFactor });
    expect(lines[1]).toMatchObject({ name: "Reel", k1: 0.02, velocityFactor: 0.79 });
    for (const line of lines) {
      if (!line) throw new Error("no line");
      expect(feedlineFrom(feedlineSchema.parse(feedlineFields(line, OWN)), OWN)).toEqual(line);
    }
  });

  it("keeps how far the points of one's own cable reach, where they span a range", () => {
    const form = feedlineSchema.parse({ cable: "own:reel000001", lengthM: "3" });
    const of = (...mhz: number[]) =>
      feedlineFrom(form, [{ ...REEL, points: mhz.map((one) => ({ mhz: one, dbPer100m: 3 })) }])?.rangeMhz;
    expect([of(30, 7, 144), of(10), of()]).toEqual([{ low: 7, high: 144 }, undefined, undefined]);
    expect(feedlineFrom(form, OWN)).not.toHaveProperty("rangeMhz");
  });

  it("knows no cable that is not there", () => {
    const form = feedlineSchema.parse({ cable: "own:gone000000", lengthM: "3" });
    expect(feedlineFrom(form, OWN)).toBeNull();
  });

  it.each([{ lengthM: "0" }, { lengthM: "-3" }, { lengthM: "1001" }, { lengthM: "3", velocityFactor: "0" }])(
    "refuses %o",
    (fields) => {
      expect(feedlineSchema.safeParse({ cable: CABLES[0].name, ...fields }).success).toBe(false);
    },
  );
});

describe("a cable's form", () => {
  it("fits k1 and k2 to points in any order, with commas or points", () => {
    // Made of k1 = 0.02 and k2 = 0.0005 dB per metre, in dB for 100 m.
    const loss = (mhz: number) => (100 * (0.02 * Math.sqrt(mhz) + 0.0005 * mhz)).toFixed(6);
    const points = [100, 10, 400].map((mhz) => `${mhz} ${loss(mhz).replace(".", ",")}`).join("\n");
    const figures = figuresOf(cableSchema.parse({ name: "Reel", points, velocityFactor: "0.8" }));
    expect(figures.k1).toBeCloseTo(0.02, 6);
    expect(figures.k2).toBeCloseTo(0.0005, 7);
    expect(figures.points?.map(({ mhz }) => mhz)).toEqual([10, 100, 400]);
  });

  it.each([
    { points: "10" },
    { points: "10 -2" },
    { points: "ten two" },
    { points: "", k1: "0" },
    { points: "10 2", velocityFactor: "2" },
    { points: "10 2", name: CABLES[0].name },
  ])("refuses %o", (fields) => {
    expect(cableSchema.safeParse({ name: "Reel", velocityFactor: "0.8", ...fields }).success).toBe(false);
  });
});
