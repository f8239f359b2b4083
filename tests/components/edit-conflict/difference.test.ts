import { describe, expect, it } from "vitest";
import { difference, type Part } from "../../../app/components/edit-conflict/difference.ts";

/** Own words in brackets. */
const shown = (parts: Part[]) => parts.map(({ text, own }) => (own ? `[${text}]` : text)).join("");
const both = (one: string, other: string) => difference(one, other).map(shown);

describe("the difference of two texts", () => {
  it("marks what only one of them says", () => {
    expect(both("the reed bank", "the wet reed bank")).toEqual(["the reed bank", "the [wet ]reed bank"]);
    expect(both("three radials", "nine radials")).toEqual(["[three ]radials", "[nine ]radials"]);
  });

  it("puts together to the texts themselves, lines and all", () => {
    const one = "# Reeds\n\nThe pole  stands\nin water.";
    const other = "# Reeds\n\nThe mast stands in water, mostly.\n";
    const [a, b] = difference(one, other);
    expect([a, b].map((parts) => parts.map(({ text }) => text).join(""))).toEqual([one, other]);
    expect(shown(b)).toContain("[mast ]");
  });

  it("finds none between equal texts, and all of it against nothing", () => {
    expect(both("a b", "a b")).toEqual(["a b", "a b"]);
    expect(both("a b", "")).toEqual(["[a b]", ""]);
    expect(both("", "")).toEqual(["", ""]);
  });

  it("gives up on texts that are very long, not on telling that they differ", () => {
    const long = "word ".repeat(5000);
    expect(difference(long, `${long}x`).map((parts) => parts.map(({ own }) => own))).toEqual([
      [true],
      [true],
    ]);
    expect(difference(long, long)[0][0].own).toBe(false);
  });
});
