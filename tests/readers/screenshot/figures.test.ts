import { describe, expect, it } from "vitest";
import {
  endValue,
  plainNumber,
  repairedNumber,
  tickCandidates,
} from "../../../app/readers/screenshot/figures.ts";
import type { Word } from "../../../app/readers/screenshot/picture.ts";

const word = (text: string, width = 16): Word => ({
  text,
  confidence: 0.9,
  left: 0,
  right: width,
  top: 0,
  bottom: 10,
});
const values = (w: Word) => tickCandidates(w).map((c) => c.value);
const best = (w: Word) => tickCandidates(w).sort((a, b) => b.weight - a.weight)[0]?.value;

describe("printed figures", () => {
  it.each([
    ["-40", -40],
    ["—40", -40],
    ["5-", 5],
    ["0,5", 0.5],
    ["12.5", 12.5],
  ])("reads %s", (text, value) => {
    expect(plainNumber(text)).toBe(value);
  });

  it.each(["MHz", "", "-", "1.2.3", "dB/div"])("takes %s for no number", (text) => {
    expect(plainNumber(text)).toBeNull();
  });

  it("puts letters back that were digits, but makes no word a number", () => {
    expect(repairedNumber("43s")).toBe(435);
    expect(repairedNumber("6.@")).toBe(6);
    expect(repairedNumber("Hold")).toBeNull();
  });

  it("offers a lost decimal point, rather where the print is wide", () => {
    expect(best(word("60", 16))).toBe(60);
    expect(best(word("60", 22))).toBe(6);
  });

  it("offers powers of ten for raised digits", () => {
    expect(best(word("10°"))).toBe(1);
    expect(best(word("10?"))).toBe(100);
    expect(values(word("3x10!"))).toContain(30);
  });

  it("ends an axis at the label near it, else at a round number", () => {
    expect(endValue(4.97, 5, 0.05)).toBe(5);
    expect(endValue(1.004, 20, 0.14)).toBe(1);
    expect(endValue(7.2003, 1, 0.001)).toBe(7.2);
  });
});
