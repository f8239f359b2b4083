import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { PAPER_PALETTE, PEAT_PALETTE } from "../../app/charts/palette.ts";

/** Contrast as WCAG 2.2 defines it (relative luminance, success criteria 1.4.3 and 1.4.11). */

const css = readFileSync(new URL("../../app/app.css", import.meta.url), "utf8");
const tokens = Object.fromEntries(
  [...css.matchAll(/--color-([\w-]+): light-dark\((#[0-9a-f]{6}), (#[0-9a-f]{6})\)/g)].map(
    ([, name, light, dark]) => [name, [light, dark] as const],
  ),
);
const THEMES = ["light", "dark"] as const;
const TEXT = ["ink", "soft", "fen", "heather", "iris", "clay", "moss", "alarm"];
const GROUNDS = ["paper", "surface"];

function luminance(colour: string): number {
  const [r, g, b] = [1, 3, 5].map((at) => {
    const part = Number.parseInt(colour.slice(at, at + 2), 16) / 255;
    return part <= 0.04045 ? part / 12.92 : ((part + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
}

function contrast(a: string, b: string): number {
  const [low, high] = [luminance(a), luminance(b)].sort((x, y) => x - y);
  return (high + 0.05) / (low + 0.05);
}

function pair(front: string, ground: string, theme: number): number {
  return contrast(tokens[front][theme], tokens[ground][theme]);
}

describe.each(THEMES.map((name, index) => [name, index] as const))("%s", (_, theme) => {
  it.each(TEXT.flatMap((front) => GROUNDS.map((ground) => [front, ground])))(
    "%s as text on %s has 4.5:1",
    (front, ground) => {
      expect(pair(front, ground, theme)).toBeGreaterThanOrEqual(4.5);
    },
  );

  it.each([
    ["on-fen", "fen"],
    ["ink", "land"],
    ["soft", "land"],
    ["heather", "land"],
    ["clay", "land"],
    ["ink", "wash"],
    ["fen", "wash"],
  ])("%s as text on %s has 4.5:1", (front, ground) => {
    expect(pair(front, ground, theme)).toBeGreaterThanOrEqual(4.5);
  });

  it.each([
    ["edge", "paper"],
    ["edge", "surface"],
    ["allocation", "paper"],
    ["moss", "water"],
    ["moss", "land"],
    ["fen", "land"],
    ["ink", "water"],
    ["heather", "land"],
    ["moss", "wash"],
  ])("%s as a mark on %s has 3:1", (front, ground) => {
    expect(pair(front, ground, theme)).toBeGreaterThanOrEqual(3);
  });
});

describe("the measure itself", () => {
  it("is 21 for black on white and 1 for a colour on itself", () => {
    expect(contrast("#000000", "#ffffff")).toBeCloseTo(21, 9);
    expect(contrast("#1f6f63", "#1f6f63")).toBe(1);
  });

  it("reads every token", () => {
    expect(Object.keys(tokens).length).toBeGreaterThanOrEqual(16);
  });
});

describe("drawings without a style sheet", () => {
  it("use the page's colours", () => {
    for (const [name, [light, dark]] of Object.entries(tokens)) {
      if (!(name in PAPER_PALETTE)) continue;
      expect(PAPER_PALETTE[name as keyof typeof PAPER_PALETTE]).toBe(light);
      expect(PEAT_PALETTE[name as keyof typeof PEAT_PALETTE]).toBe(dark);
    }
  });
});
