import { describe, expect, test } from "vitest";
import {
  formatDegrees,
  formatElement,
  formatImpedance,
  formatOhm,
} from "../../../app/measurement/complex/format.ts";

const shown = (text: string) => text.replaceAll("\u2009", " ");

describe("impedances and elements in words", () => {
  test.each([
    [36.54, "36.5 Ω"],
    [0.5, "0.500 Ω"],
    [1236, "1.24 kΩ"],
    [0, "0 Ω"],
    [Number.POSITIVE_INFINITY, "∞ Ω"],
    [Number.NaN, "unknown"],
    [null, "unknown"],
  ])("%s Ω as %s", (ohm, text) => expect(shown(formatOhm(ohm))).toBe(text));

  test.each([
    [{ re: 36.5, im: 21.25 }, "36.5 + j21.3 Ω"],
    [{ re: 200, im: -300 }, "200 − j300 Ω"],
    [{ re: 50, im: -0.001 }, "50.0 + j0.0 Ω"],
    [{ re: 2, im: -0.5 }, "2.00 − j0.50 Ω"],
    [{ re: Number.POSITIVE_INFINITY, im: 0 }, "∞ Ω"],
    [{ re: Number.NaN, im: 0 }, "unknown"],
  ])("%o as %s", (z, text) => expect(shown(formatImpedance(z))).toBe(text));

  test.each([
    ["inductor", 0.4515e-6, "0.452 µH"],
    ["inductor", 21.2e-9, "21.2 nH"],
    ["inductor", 0.02, "20.0 mH"],
    ["capacitor", 282.19e-12, "282 pF"],
    ["capacitor", 1.34e-9, "1.34 nF"],
    ["capacitor", 0.2e-12, "0.200 pF"],
    ["capacitor", Number.NaN, "unknown"],
  ] as const)("%s of %f as %s", (kind, value, text) =>
    expect(shown(formatElement({ kind, value }))).toBe(text),
  );

  test("degrees", () => {
    expect(formatDegrees(-113.63)).toBe("−113.6°");
    expect(formatDegrees(null)).toBe("unknown");
  });
});
