import { Parser } from "htmlparser2";
import { describe, expect, it } from "vitest";
import { renderArticle } from "~/services/markdown.server";
import { type DrawFigure, figuresIn, MOST_FIGURES } from "~/services/markdown-article";
import { NO_LINKS } from "~/services/markdown-links";
import { EVASIONS, MARKDOWN_EVASIONS } from "../../fixtures/hostile/evasions.ts";

const drawn: DrawFigure = (subject, n) => ({
  label: `Figure ${n}`,
  drawing: `<svg>${subject}</svg>`,
  under: "",
});

function html(markdown: string, draw: DrawFigure = drawn): string {
  return renderArticle(markdown, NO_LINKS, draw).html;
}

describe("headings", () => {
  it("stand under the page's own, each with an address of its own", () => {
    const { html: text, headings } = renderArticle(
      "# Öl & *Wasser*\n\n## Öl & Wasser\n\n### ☃",
      NO_LINKS,
      drawn,
    );
    expect(text).toContain('<h2 id="s-ol-wasser">Öl &amp; <em>Wasser</em></h2>');
    expect(headings).toEqual([
      { id: "s-ol-wasser", depth: 1, words: "Öl & Wasser" },
      { id: "s-ol-wasser-2", depth: 2, words: "Öl & Wasser" },
      { id: "s-part", depth: 3, words: "☃" },
    ]);
  });
});

describe("footnotes", () => {
  it("are numbered in the order of the text and lead there and back", () => {
    const text = html("One[^z] two[^a] one[^z].\n\n[^a]: Second.\n[^z]: First.");
    expect(idsOf(text)).toEqual(["fnref-1", "fnref-2", "fnref-1-2", "fn-1", "fn-2"]);
    expect(targetsOf(text).filter((id) => !idsOf(text).includes(id))).toEqual([]);
    expect(text.indexOf("First.")).toBeLessThan(text.indexOf("Second."));
  });

  it("never let a label become part of the page", () => {
    const text = html('x[^" onload="alert(1)] y\n\n[^" onload="alert(1)]: words');
    expect(attributesOf(text)).not.toContain("onload");
    expect(idsOf(text)).toEqual(["fnref-1", "fn-1"]);
  });

  it("are forgotten with the text: the next one begins anew", () => {
    html("a[^1]\n\n[^1]: x");
    expect(html("no such[^1] note")).toContain("no such[^1] note");
    expect(idsOf(html("b[^q]\n\n[^q]: y"))).toEqual(["fnref-1", "fn-1"]);
  });
});

describe("figures", () => {
  it("stand where their line stands, numbered, with their caption", () => {
    const text = html("before\n![A *deep* dip](#dip:abc)\nafter\n\n![](#plate:k3f)");
    expect(text).toContain(
      '<figure class="article-figure" id="f-1"><svg>dip:abc</svg><figcaption><strong>Figure 1.</strong> A <em>deep</em> dip</figcaption></figure>',
    );
    expect(text).toContain(
      'id="f-2"><svg>plate:k3f</svg><figcaption><strong>Figure 2.</strong></figcaption>',
    );
    expect(text.indexOf("before")).toBeLessThan(text.indexOf("f-1"));
    expect(text.indexOf("f-1")).toBeLessThan(text.indexOf("after"));
  });

  it("say so where there is nothing to draw, and take no number then", () => {
    const draw: DrawFigure = (subject, n) => (subject === "dip:gone" ? null : drawn(subject, n));
    const text = html("![lost](#dip:gone)\n\n![found](#dip:here)", draw);
    expect(text).toContain('<p class="article-missing">lost: There is no such figure');
    expect(text).toContain("Figure 1.</strong> found");
  });

  it("end at a number that a page can hold", () => {
    const text = html("![a](#dip:abc)\n\n".repeat(MOST_FIGURES + 1));
    expect(text.match(/<svg>/g)).toHaveLength(MOST_FIGURES);
    expect(text).toContain(`at most ${MOST_FIGURES} figures`);
  });

  it("in a line, or as a link, are references", () => {
    expect(html("see ![this](#dip:abc) and [that](#sweep:def)")).toBe(
      '<p>see <span class="reference">this</span> and <span class="reference">that</span></p>\n',
    );
  });

  it("are found in a text, each once", () => {
    const text =
      "![a](#dip:abc)\n\n  ![b](#plate:k3f)\n\n![c](#dip:abc)\nx ![d](#dip:zzz)\n\n![e](https://x.example)";
    expect(figuresIn(text)).toEqual(["dip:abc", "plate:k3f"]);
  });
});

describe("whatever is written", () => {
  const texts = [...EVASIONS.map(([, text]) => text), ...MARKDOWN_EVASIONS];
  it.each(texts.map((text) => [text]))("runs nothing: %s", (text) => {
    for (const wrapped of [text, `# ${text}`, `a[^1]\n\n[^1]: ${text}`, `![${text}](#dip:abc)`]) {
      const out = html(wrapped).replaceAll("<svg>dip:abc</svg>", "");
      expect(tagsOf(out).filter((tag) => !TAGS.has(tag))).toEqual([]);
      expect(attributesOf(out).filter((name) => name.startsWith("on"))).toEqual([]);
      for (const address of hrefsOf(out)) expect(address).not.toMatch(/^\s*(javascript|data|vbscript):/i);
      for (const id of idsOf(out)) expect(id).toMatch(/^(s|fn|fnref|f)-[a-z0-9-]+$/);
      expect(new Set(idsOf(out)).size).toBe(idsOf(out).length);
    }
  });

  it.each([
    ["brackets", "[".repeat(40_000)],
    ["footnote signs", "[^".repeat(20_000)],
    ["quotes in quotes", "> ".repeat(20_000)],
    ["beginnings of figures", "\n![".repeat(13_000)],
    ["references", `[^a]: b\n\n${"[^a]".repeat(10_000)}`],
  ])("is drawn in a few seconds: %s", (_, text) => {
    const began = performance.now();
    html(text);
    // Seen: under a second on a busy machine.
    expect(performance.now() - began).toBeLessThan(15_000);
  });
});

const TAGS = new Set(
  "p br hr h2 h3 h4 h5 h6 ul ol li blockquote pre code em strong del a table thead tbody tr th td span sup section figure figcaption math semantics mrow mi mo mn msup msub mtext annotation mfrac mspace mstyle".split(
    " ",
  ),
);

/** Taken apart by a parser that is not the one that wrote it. */
function walk(text: string) {
  const found = { tags: [] as string[], attributes: [] as [string, string][] };
  const parser = new Parser({
    onopentag: (name, attributes) => {
      found.tags.push(name);
      found.attributes.push(...Object.entries(attributes));
    },
  });
  parser.write(text);
  parser.end();
  return found;
}
const tagsOf = (text: string) => walk(text).tags;
const attributesOf = (text: string) => walk(text).attributes.map(([name]) => name);
const valuesOf = (text: string, wanted: string) =>
  walk(text).attributes.flatMap(([name, value]) => (name === wanted ? [value] : []));
const idsOf = (text: string) => valuesOf(text, "id");
const hrefsOf = (text: string) => valuesOf(text, "href");
const targetsOf = (text: string) =>
  hrefsOf(text).flatMap((href) => (href.startsWith("#") ? [href.slice(1)] : []));
