import { describe, expect, it } from "vitest";
import type { Frame } from "../../../app/readers/screenshot/frame.ts";
import { namedAxis, tickAxis, unitOf } from "../../../app/readers/screenshot/frequency-axis.ts";
import type { Word } from "../../../app/readers/screenshot/picture.ts";
import {
  labelledAxis,
  namedQuantity,
  rangedAxis,
  referencedAxis,
} from "../../../app/readers/screenshot/value-axis.ts";

const FRAME: Frame = { left: 100, top: 50, right: 500, bottom: 250, columns: 10, rows: 8 };
const CHAR = 8;

/** Words of one printed row from a place on. */
function row(text: string, left: number, top: number, confidence = 0.95): Word[] {
  let x = left;
  return text.split(" ").map((part) => {
    const word = { text: part, confidence, left: x, right: x + part.length * CHAR, top, bottom: top + 10 };
    x += (part.length + 1) * CHAR;
    return word;
  });
}

const label = (text: string, middle: number): Word => ({
  text,
  confidence: 0.9,
  left: 90 - text.length * CHAR,
  right: 90,
  top: middle - 5,
  bottom: middle + 5,
});
const tick = (text: string, middle: number): Word => ({
  text,
  confidence: 0.9,
  left: middle - (text.length * CHAR) / 2,
  right: middle + (text.length * CHAR) / 2,
  top: 260,
  bottom: 270,
});

describe("frequency axis", () => {
  it("reads start and stop, with and without a colon, and misread letters", () => {
    const words = [
      ...row("Start: 1.500 MHz", 100, 260),
      ...row("5top 31.500 MHz", 380, 260),
      ...row("RBW 10 kHz", 200, 275),
    ];
    expect(namedAxis(words)).toMatchObject({ startHz: 1.5e6, stopHz: 31.5e6, scale: "linear", assumed: [] });
  });

  it("reads centre and span in other units", () => {
    const words = [...row("Center 145 MHz", 100, 260), ...row("Span 500 kHz", 380, 260)];
    expect(namedAxis(words)).toMatchObject({ startHz: 144.75e6, stopHz: 145.25e6 });
  });

  it("says that the unit was assumed, and nothing without a pair", () => {
    expect(namedAxis([...row("Start 1", 100, 260), ...row("Stop 5", 380, 260)])?.assumed).toHaveLength(1);
    expect(namedAxis(row("Start 1.5 MHz", 100, 260))).toBeNull();
  });

  it("reads ticks, linear and logarithmic, beyond the outermost label", () => {
    const linear = [
      tick("20", 180),
      tick("40", 260),
      tick("60", 340),
      tick("80", 420),
      ...row("Frequency (MHz)", 240, 280),
    ];
    expect(tickAxis(linear, FRAME, [])).toMatchObject({ startHz: 0, stopHz: 100e6, scale: "linear" });
    const log = [tick("10°", 100), tick("10!", 300), tick("10?", 500), ...row("MHz", 280, 280)];
    expect(tickAxis(log, FRAME, [])).toMatchObject({ startHz: 1e6, stopHz: 100e6, scale: "log" });
  });

  it("knows the units", () => {
    expect(["Hz", "kHz", "MH2", "GHz", "dB"].map(unitOf)).toEqual([1, 1e3, 1e6, 1e9, null]);
  });
});

describe("vertical axis", () => {
  it("reads labels of which some are wrong", () => {
    const words = [
      label("0", 50),
      label("-8", 90),
      label("16", 130),
      label("-24", 170),
      label("-32", 210),
      label("J", 250),
    ];
    expect(labelledAxis(words, FRAME, [], "s11-db")).toMatchObject({ top: 0, bottom: -40 });
  });

  it("knows that SWR begins at 1, also where the points were lost", () => {
    const words = ["60", "50", "40", "30", "20", "10"].map((text, i) => label(text, 50 + 40 * i));
    expect(labelledAxis(words, FRAME, [], "swr")).toMatchObject({ top: 6, bottom: 1 });
  });

  it("reckons from the reference and the divisions", () => {
    const words = [...row("Ref -5.00 dBm", 100, 30), ...row("Scale 5 dB/div", 300, 30)];
    expect(referencedAxis(words, FRAME)).toMatchObject({ top: -5, bottom: -45 });
    expect(referencedAxis(words, { ...FRAME, rows: null })?.assumed).toHaveLength(2);
    expect(referencedAxis(row("Ref 5 dB", 100, 30), FRAME)).toBeNull();
  });

  it("reads a printed range", () => {
    expect(rangedAxis(row("SWR 1 to 6", 100, 30))).toMatchObject({ top: 6, bottom: 1 });
  });

  it.each([
    ["VSWR", "swr"],
    ["Level (dBm)", "level"],
    ["Return loss (dB)", "return-loss"],
    ["S11 dB", "s11-db"],
  ])("takes %s for %s", (text, quantity) => {
    expect(namedQuantity(text.split(" "))?.quantity).toBe(quantity);
  });

  it("guesses nothing from other words", () => {
    expect(namedQuantity(["Hold", "Peak", "501"])).toBeNull();
  });
});
