import { describe, expect, test } from "vitest";
import {
  formatDb,
  formatDbLimits,
  formatFrequency,
  formatNoise,
  formatPercent,
  formatRange,
  formatSwr,
  formatWidth,
  formatWidthLimits,
  parseFrequency,
} from "../../app/measurement/units.ts";

/** The rule is MEASUREMENT section 3: numbers print with the digits that their uncertainty supports. */
describe("frequencies", () => {
  test.each([
    [18_104_321, 1000, "18.104\u2009MHz"],
    [18_104_321, 3200, "18.104\u2009MHz"],
    [18_104_321, 12_000, "18.10\u2009MHz"],
    [18_104_321, 900, "18.1043\u2009MHz"],
    [18_104_321, 400_000, "18.1\u2009MHz"],
    [18_104_321, 4_000_000, "18\u2009MHz"],
    [435_000_000, 150, "435.0000\u2009MHz"],
    [2_450_000_000, 1_000_000, "2.450\u2009GHz"],
    [475_300, 30, "475.30\u2009kHz"],
    [60, 1, "60\u2009Hz"],
  ])("%d Hz known to %d Hz", (hz, uncertainty, text) => {
    expect(formatFrequency(hz, uncertainty)).toBe(text);
  });

  test("without an uncertainty: six digits, no empty ones", () => {
    expect(formatFrequency(1_000_000, null)).toBe("1\u2009MHz");
    expect(formatFrequency(14_150_000)).toBe("14.15\u2009MHz");
    expect(formatFrequency(7_081_234.5, null)).toBe("7.08123\u2009MHz");
    expect(formatFrequency(0)).toBe("0\u2009Hz");
    expect(formatFrequency(14_150_000, 0)).toBe("14.15\u2009MHz");
  });

  test("unknown is said", () => {
    expect(formatFrequency(null)).toBe("unknown");
    expect(formatFrequency(Number.NaN)).toBe("unknown");
    expect(formatWidth(null)).toBe("unknown");
  });

  test("widths", () => {
    expect(formatWidth(260_000, 4000)).toBe("260\u2009kHz");
    expect(formatWidth(260_400)).toBe("260\u2009kHz");
    expect(formatWidth(1_223_000)).toBe("1.22\u2009MHz");
    expect(formatWidth(1_223_000, 500)).toBe("1.223\u2009MHz");
  });

  test.each([
    ["18.104 MHz", 18_104_000],
    ["18,104mhz", 18_104_000],
    ["7.1e6", 7_100_000],
    ["450 kHz", 450_000],
    ["1.2 G", 1.2e9],
    [" 50 Hz ", 50],
    ["", null],
    ["20 m", 20_000_000],
    ["-3 MHz", null],
    ["1,234,567", null],
    ["high", null],
  ])("reads %j", (text, hz) => {
    const found = parseFrequency(text);
    if (hz === null) expect(found).toBeNull();
    else expect(found).toBeCloseTo(hz, 3);
  });
});

describe("SWR, dB, ranges", () => {
  test("SWR with its limits", () => {
    expect(formatSwr(1.21, 1.12, 1.31)).toBe("1.21 (1.12–1.31)");
    expect(formatSwr(1.2143, 1.2142, 1.2144)).toBe("1.21");
    expect(formatSwr(1.2, null, null)).toBe("1.20");
    expect(formatSwr(1.2, 1, null)).toBe("1.20");
    expect(formatSwr(1.9, 1, Number.POSITIVE_INFINITY)).toBe("1.90 (1.00–∞)");
    expect(formatSwr(3.2, 1.9, 8.1)).toBe("3 (2–8)");
    expect(formatSwr(37.25)).toBe("37.3");
    expect(formatSwr(412.4)).toBe("412");
    expect(formatSwr(Number.POSITIVE_INFINITY)).toBe("∞");
    expect(formatSwr(null)).toBe("unknown");
    expect(formatSwr(Number.NaN)).toBe("unknown");
  });

  test("dB", () => {
    expect(formatDb(20.43)).toBe("20.4\u2009dB");
    expect(formatDb(20.43, 0.02)).toBe("20.43\u2009dB");
    expect(formatDb(20.43, 3)).toBe("20\u2009dB");
    expect(formatDb(-0.25, 0.1)).toBe("−0.3\u2009dB");
    expect(formatDb(-0.01)).toBe("0.0\u2009dB");
    expect(formatDb(Number.POSITIVE_INFINITY)).toBe("∞\u2009dB");
    expect(formatDb(null)).toBe("unknown");
  });

  test("ranges and shares", () => {
    expect(formatRange(11.23, 15.71)).toBe("11.2–15.7");
    expect(formatRange(12.001, 12.002)).toBe("12");
    expect(formatRange(1, Number.POSITIVE_INFINITY)).toBe("1–∞");
    expect(formatRange(null, 3)).toBe("unknown");
    expect(formatPercent(0.0317)).toBe("3.2\u2009%");
    expect(formatPercent(null)).toBe("unknown");
  });
});

test("no digits below a part in a million of a frequency, nor below a thousandth of a width", () => {
  expect(formatFrequency(14_309_999.5, 0.4)).toBe("14.31000\u2009MHz");
  expect(formatFrequency(433_900_000.1, 3)).toBe("433.9000\u2009MHz");
  expect(formatFrequency(7_089_371, 2_600)).toBe("7.089\u2009MHz");
  expect(formatWidth(870_160, 12)).toBe("870.2\u2009kHz");
});

test("noise shows one digit, and no less than files carry", () => {
  expect(formatNoise(0.0432)).toBe("0.04\u2009dB");
  expect(formatNoise(4.8e-8)).toBe("under 0.001\u2009dB");
  expect(formatNoise(0)).toBe("under 0.001\u2009dB");
  expect(formatNoise(null)).toBe("unknown");
});

describe("numbers with limits", () => {
  test.each<[number | null, number | null, number | null, string]>([
    [20.43, 18.93, 22.31, "20\u2009dB (19–22)"],
    [20.43, 20.21, 20.63, "20.4\u2009dB (20.2–20.6)"],
    [20.43, null, 22.31, "20.4\u2009dB"],
    [40, 22.31, Number.POSITIVE_INFINITY, "40.0\u2009dB (22.3–∞)"],
    [40, 22.31, 200, "40\u2009dB (22–∞)"],
    [20.43, -200, 200, "20\u2009dB (−∞–∞)"],
    [null, 1, 2, "unknown"],
  ])("return loss %s from %s to %s is %s", (db, low, high, words) => {
    expect(formatDbLimits(db, low, high)).toBe(words);
  });

  test.each<[number, number | null, number | null, string]>([
    [321_700, 269_300, 378_200, "322\u2009kHz (269–378)"],
    [321_700, 319_300, 324_200, "322\u2009kHz (319–324)"],
    [321_700, null, null, "322\u2009kHz"],
  ])("width %s from %s to %s is %s", (hz, low, high, words) => {
    expect(formatWidthLimits(hz, low, high)).toBe(words);
  });
});
