import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { snippet } from "~/services/snippets";

const drawn = (text: string, words: string[], max?: number) =>
  snippet(text, words, max)
    .map((part) => (part.marked ? `[${part.text}]` : part.text))
    .join("");

describe("snippet", () => {
  it.each<[string, string[], string]>([
    ["Two chokes at the feed", ["choke"], "Two [chokes] at the feed"],
    ["Grüße", ["gruss", "gru"], "[Grüße]"],
    ["echoke", ["choke"], "echoke"],
    ["<b>choke</b>", ["choke", "b"], "<[b]>[choke]</[b]>"],
    ["", ["x"], ""],
  ])("marks words by their beginning: %s", (text, words, expected) => {
    expect(drawn(text, words)).toBe(expected);
  });

  it("cuts a long text around the first word found, at words", () => {
    const text = `${"reed ".repeat(100)}choke ${"bank ".repeat(100)}`;
    const cut = drawn(text, ["choke"], 60);
    expect(cut).toMatch(/^… (reed )+\[choke\]( bank)+ …$/);
    expect(cut.length).toBeLessThan(80);
  });

  it("never invents or loses a character inside what it shows", () => {
    fc.assert(
      fc.property(
        fc.string({ unit: "grapheme", maxLength: 400 }),
        fc.string({ maxLength: 3 }),
        (text, word) => {
          const plain = snippet(text, [word], 50)
            .map((part) => part.text)
            .join("")
            .replace(/^… /, "")
            .replace(/ …$/, "");
          expect(text).toContain(plain);
        },
      ),
    );
  });
});
