import { describe, expect, it } from "vitest";
import { articleTokens } from "~/services/markdown.server";
import { forPrint, printable, printDocument } from "~/services/write-ups/document.server";
import type { FrozenFigure } from "~/services/write-ups/frozen";
import { pdfContent } from "~/services/write-ups/pdf-content";
import type { Publication } from "~/services/write-ups/published.server";

function content(markdown: string) {
  const figure = (subject: string, n: number) => ({ text: `${n} ${subject}` });
  return pdfContent(articleTokens(markdown) ?? [], { origin: "https://swale.example", figure });
}

/** Every text in it, in its order. */
function textsOf(part: unknown): string[] {
  if (typeof part === "string") return [part];
  if (Array.isArray(part)) return part.flatMap(textsOf);
  if (typeof part !== "object" || part === null) return [];
  const { text, stack, ul, ol, columns, table } = part as Record<string, unknown>;
  return [text, stack, ul, ol, columns, (table as { body?: unknown } | undefined)?.body].flatMap(textsOf);
}

describe("pdfContent", () => {
  it("hands looks down to each piece of running text", () => {
    expect(content("a **b *c*** ~~d~~ `e` $f$")).toMatchObject([
      {
        text: [
          { text: "a " },
          { text: "b ", bold: true },
          { text: "c", bold: true, italics: true },
          { text: " " },
          { text: "d", decoration: "lineThrough" },
          { text: " " },
          { text: "e", font: "Sometype Mono" },
          { text: " " },
          { text: "f", font: "Sometype Mono" },
        ],
      },
    ]);
  });

  it.each([
    ["a page elsewhere", "[x](https://a.example/b)", "https://a.example/b"],
    ["a page here", "[x](/methods)", "https://swale.example/methods"],
    ["a plate", "[x](plate:k3f)", "https://swale.example/plates/k3f"],
    ["a dip, which is of the project alone", "[x](dip:k3f)", undefined],
    ["what would run", "[x](javascript:alert(1))", undefined],
    ["a place in the text", "[x](#s-y)", undefined],
  ])("links to %s", (_, markdown, link) => {
    const [paragraph] = content(markdown) as { text: { text: string; link?: string }[] }[];
    expect(paragraph.text[0]).toMatchObject({ text: "x" });
    expect(paragraph.text[0].link).toBe(link);
  });

  it("loses no words of what people write", () => {
    const markdown =
      "# One\n\ntwo[^n] &Omega; <b>\n\n- three\n  - four\n- [x] five\n\n> six\n\n|seven|\n|-|\n|eight|\n\n```\nnine\n```\n\n$$\nten\n$$\n\n![eleven](#dip:abc)\n\n<div>twelve</div>\n\n[^n]: thirteen";
    const text = textsOf(content(markdown)).join(" ");
    for (const word of "One two Ω <b> three four [x] five six seven eight nine ten 1 twelve thirteen".split(
      " ",
    )) {
      expect(text).toContain(word);
    }
    expect(text).toContain("1 dip:abc");
  });

  it("numbers figures as the page does: what is not there takes no number", () => {
    const figure = (subject: string, n: number) => (subject === "dip:gone" ? null : { text: `Figure ${n}` });
    const tokens = articleTokens("![a](#dip:gone)\n\n![b](#dip:here)") ?? [];
    const texts = textsOf(pdfContent(tokens, { origin: "", figure }));
    expect(texts).toContain("Figure 1");
    expect(texts.join("")).toContain("There is no such figure");
  });
});

describe("a printed write-up", () => {
  const figure: FrozenFigure = {
    subject: "dip:abc",
    label: null,
    title: "The dip",
    wide: '<svg xmlns="http://www.w3.org/2000/svg" width="40" height="20" viewBox="0 0 40 20"><rect fill="var(--color-paper)" width="40" height="20"/><text x="2" y="12" font-family="var(--font-mono)">7 MHz</text></svg>',
    narrow: null,
    numbers: { columns: ["Dip", "SWR"], rows: [["7.1 MHz", "1.21 (1.12–1.31)"]] },
    path: "/projects/p/dips/abc",
    asOf: "2026-05-01T10:00:00.000Z",
  };
  const publication = {
    version: { title: "A dip", number: 2, body: "Words.\n\n![c](#dip:abc)", publishedAt: new Date(0) },
    by: null,
    writer: "Ada Marsh",
    project: { title: "Reed loop", demo: 0 },
    writeUp: { publicId: "w", publishedNumber: 2 },
    frozen: { figures: [figure], project: "A vertical", licence: "CC-BY-4.0" },
  } as unknown as Publication;
  const task = { publication, origin: "https://swale.example", plates: new Map(), drawings: new Map() };

  it("has the numbers with their limits, of when they are, who wrote it and where it is", () => {
    const text = textsOf(printable(task).content).join(" ");
    for (const part of [
      "1.21 (1.12–1.31)",
      "numbers as of 1 May 2026, 10:00 UTC",
      "Ada Marsh and former member",
      "https://swale.example/write-ups/w",
      "CC BY 4.0",
    ]) {
      expect(text).toContain(part);
    }
    expect(text).not.toContain("/projects/p");
  });

  it("is the same bytes each time, with our fonts in it", async () => {
    const [one, other] = [await printDocument(task), await printDocument(task)];
    expect(one.equals(other)).toBe(true);
    expect(one.subarray(0, 5).toString()).toBe("%PDF-");
    expect(one.toString("latin1")).toContain("AtkinsonHyperlegibleNext-Regular");
  });

  it("has the colours of paper and no name that only a page knows", () => {
    const svg = forPrint(figure.wide ?? "");
    expect(svg).toContain('fill="#f6f2e8"');
    expect(svg).not.toContain("var(");
  });
});
