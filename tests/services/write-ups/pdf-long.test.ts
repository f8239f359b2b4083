import { describe, expect, it } from "vitest";
import { articleTokens } from "~/services/markdown.server";
import { pdfContent } from "~/services/write-ups/pdf-content";

const PLACE = { origin: "https://swale.example", figure: () => null };

/** Each part's words. */
function partsOf(markdown: string): string[] {
  const textOf = (node: unknown): string => {
    if (typeof node === "string") return node;
    if (Array.isArray(node)) return node.map(textOf).join("");
    const { text, table } = node as { text?: unknown; table?: { body: unknown } };
    return text !== undefined ? textOf(text) : table ? textOf(table.body) : "";
  };
  return pdfContent(articleTokens(markdown) ?? [], PLACE).map(textOf);
}

describe("text that is set for printing", () => {
  it("is one part while it is a paragraph as people write them", () => {
    expect(partsOf("*a* and b. ".repeat(300))).toHaveLength(1);
  });

  it.each([
    ["words", "word ".repeat(7000)],
    ["looks", "*a* b ".repeat(4500)],
    ["one word without end", "a".repeat(30_000)],
    ["code", `\`\`\`\n${"code ".repeat(6000)}\n\`\`\``],
  ])("is parted where it is very long, and nothing is lost: %s", (_, markdown) => {
    const parts = partsOf(markdown);
    expect(parts.length).toBeGreaterThan(2);
    expect(Math.max(...parts.map(({ length }) => length))).toBeLessThanOrEqual(6000);
    const plain = (text: string) => text.replace(/[*`\s]/g, "");
    expect(plain(parts.join(""))).toBe(plain(markdown));
  });
});
