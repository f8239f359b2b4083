import { describe, expect, test } from "vitest";
import { bandAt, bandSources, bandsOverlapping, type ItuRegion } from "../../app/measurement/bands.ts";

/**
 * Truth: IARU Region 1 HF band plan (2020), IARU Region 2 MF/HF band plan (2008), IARU Region 3 document
 * R3-004 rev. 3 (2019); what of them was seen stands beside the data.
 */
describe("single frequencies", () => {
  test.each([
    [14.35, [1, 2, 3], "20 m"],
    [14, [1, 2, 3], "20 m"],
    [3.85, [2, 3], "80 m"],
    [7.25, [2], "40 m"],
    [147, [2, 3], "2 m"],
    [1.805, [2, 3], "160 m"],
    [53, [2, 3], "6 m"],
    [70.2, [1], "4 m"],
    [435, [1, 2, 3], "70 cm"],
    [10.12, [1, 2, 3], "30 m"],
    [18.1, [1, 2, 3], "17 m"],
    [5.36, [1, 2, 3], "60 m"],
  ])("%d MHz in regions %j", (mhz, regions, name) => {
    for (const region of [1, 2, 3] as ItuRegion[]) {
      expect(bandAt(region, mhz * 1e6)?.name ?? null).toBe(regions.includes(region) ? name : null);
    }
    expect(bandAt(null, mhz * 1e6)?.name).toBe(name);
  });

  test("just outside", () => {
    for (const region of [1, 2, 3, null] as (ItuRegion | null)[]) {
      expect(bandAt(region, 14.3501e6)).toBeNull();
      expect(bandAt(region, 13.9999e6)).toBeNull();
      expect(bandAt(region, Number.NaN)).toBeNull();
    }
    expect(bandAt(3, 7.2001e6)).toBeNull();
  });
});

/**
 * First and last kilohertz of the published segments that were seen: IARU Region 1 HF band plan, 16 October 2020
 * (docslib.org/doc/5353906), its 18 MHz part at uba.be, the 50-52 MHz plan of 2011 (dokumen.tips), 70 and 144 MHz of 2004
 * (hamradio.com.pl); IARU Region 2 MF/HF band plan, 1 January 2008 (docslib.org/doc/13887483).
 */
describe("edges of the published plans", () => {
  test.each([
    [1, "160 m", 1810, 2000],
    [1, "80 m", 3500, 3800],
    [1, "60 m", 5351.5, 5366.5],
    [1, "17 m", 18_068, 18_168],
    [1, "6 m", 50_000, 52_000],
    [1, "4 m", 70_000, 70_500],
    [1, "2 m", 144_000, 146_000],
    [2, "160 m", 1800, 2000],
    [2, "80 m", 3500, 4000],
  ] as [ItuRegion, string, number, number][])(
    "region %d, %s: %d to %d kHz",
    (region, name, lowKhz, highKhz) => {
      const band = bandAt(region, ((lowKhz + highKhz) / 2) * 1e3);
      expect(band).toMatchObject({ name, lowHz: lowKhz * 1e3, highHz: highKhz * 1e3 });
      expect(bandAt(region, lowKhz * 1e3 - 1)).toBeNull();
      expect(bandAt(region, highKhz * 1e3 + 1)).toBeNull();
    },
  );

  test("every band of a region lies within the general one of its name, and none overlaps the next", () => {
    for (const region of [1, 2, 3] as ItuRegion[]) {
      const bands = bandsOverlapping(region, 0, 1e9);
      for (const [i, band] of bands.entries()) {
        const general = bandsOverlapping(null, band.lowHz, band.highHz).find(
          ({ name }) => name === band.name,
        );
        expect(general?.lowHz ?? Number.POSITIVE_INFINITY).toBeLessThanOrEqual(band.lowHz);
        expect(general?.highHz ?? 0).toBeGreaterThanOrEqual(band.highHz);
        if (i > 0) expect(band.lowHz).toBeGreaterThan(bands[i - 1].highHz);
      }
    }
  });
});

describe("ranges", () => {
  test("bands that a sweep touches, ascending", () => {
    expect(bandsOverlapping(1, 1e6, 30e6).map((band) => band.name)).toEqual([
      "160 m",
      "80 m",
      "60 m",
      "40 m",
      "30 m",
      "20 m",
      "17 m",
      "15 m",
      "12 m",
      "10 m",
    ]);
    expect(bandsOverlapping(2, 14.35e6, 18e6).map((band) => band.name)).toEqual(["20 m"]);
    expect(bandsOverlapping(2, 15e6, 16e6)).toEqual([]);
  });

  test("no region: the union, and it says so", () => {
    const [forty] = bandsOverlapping(null, 7e6, 7.1e6);
    expect(forty).toMatchObject({ lowHz: 7e6, highHz: 7.3e6, region: null });
    expect(forty.remark).toContain("general");
  });

  test("sources carry a date and what was seen", () => {
    expect(bandSources(null)).toHaveLength(3);
    for (const source of bandSources(null)) {
      expect(source.date).toMatch(/^\d{4}-\d{2}-\d{2}$/);
      expect(source.seen).toContain("seen");
    }
  });
});
