import { describe, expect, it } from "vitest";
import { cardVerdict, offsetFromBand, widthBar } from "../../app/charts/card-words.ts";
import { formatNoteCount, speakFrequency } from "../../app/charts/words.ts";
import { chartDip } from "./sample.ts";

const bands = [
  { name: "40 m", lowHz: 7e6, highHz: 7.2e6 },
  { name: "17 m", lowHz: 18.068e6, highHz: 18.168e6 },
];

describe("offsetFromBand", () => {
  it("says how far a dip lies from the nearest design band", () => {
    const near = (frequencyHz: number) =>
      offsetFromBand(chartDip({ frequencyHz }), bands)?.replace("\u2009", " ");
    expect(near(18.204e6)).toBe("36 kHz above 17 m");
    expect(near(6.95e6)).toBe("50 kHz below 40 m");
    expect(near(7.1e6)).toBeUndefined();
    expect(near(52e6)).toBeUndefined();
    expect(offsetFromBand(chartDip(), [])).toBeNull();
  });
});

describe("cardVerdict", () => {
  it("says the verdict, or for an open dip where it lies", () => {
    const said = (change: Parameters<typeof chartDip>[0]) => cardVerdict(chartDip(change), bands);
    expect(said({ verdict: "settled", verdictText: "the 40 m element" })).toEqual({
      text: "settled: the 40 m element",
      tone: "moss",
    });
    expect(said({ verdict: "proposed" })).toEqual({ text: "proposed", tone: "heather" });
    expect(said({ inDesignBand: true }).tone).toBe("plain");
    expect(said({ frequencyHz: 52e6, inDesignBand: false })).toEqual({
      text: "open, outside the design bands",
      tone: "clay",
    });
    expect(said({ inDesignBand: null })).toEqual({ text: "open", tone: "plain" });
  });
});

describe("widthBar", () => {
  it("holds the dip and its design band on one scale", () => {
    const bar = widthBar(chartDip(), bands);
    for (const part of [bar.band, bar.dip]) {
      expect(part?.from).toBeGreaterThanOrEqual(0);
      expect((part?.from ?? 0) + (part?.width ?? 2)).toBeLessThanOrEqual(1);
    }
    // Band and bandwidth are both 7.0 to 7.2 MHz.
    expect(bar.band?.from).toBeCloseTo(bar.dip?.from ?? -1, 12);
    expect(bar.at).toBeCloseTo(0.5, 9);
  });

  it("has no band where none is near and no width where there is none", () => {
    const bar = widthBar(chartDip({ frequencyHz: 52e6, bandwidth: null }), bands);
    expect(bar).toMatchObject({ band: null, dip: null });
    expect(bar.at).toBeCloseTo(0.5, 9);
  });

  it("draws an edge that was not found at the width that is at least there", () => {
    const bandwidth = {
      ...(chartDip().bandwidth as NonNullable<ReturnType<typeof chartDip>["bandwidth"]>),
      highHz: null,
      open: true,
    };
    const bar = widthBar(chartDip({ bandwidth }), []);
    expect(bar.dip?.width).toBeGreaterThan(0);
  });
});

describe("words", () => {
  it("counts notes and speaks units", () => {
    expect([0, 1, 4].map(formatNoteCount)).toEqual(["no notes yet", "1 note", "4 notes"]);
    expect(speakFrequency(7.118e6, 900)).toBe("7.1180 megahertz");
    expect(speakFrequency(1.2e9, 1e6)).toBe("1.200 gigahertz");
  });
});
