import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { plainText, renderNote } from "~/services/markdown.server";
import { MAX_NOTE_CHARACTERS } from "~/services/note-limits";
import { EVASIONS, MARKDOWN_EVASIONS } from "../fixtures/hostile/evasions.ts";

describe("renderNote", () => {
  it.each([
    ["plain paragraph", "one\n\ntwo", "<p>one</p>\n<p>two</p>\n"],
    ["emphasis", "*a* **b** ~~c~~ `d`", "<p><em>a</em> <strong>b</strong> <del>c</del> <code>d</code></p>\n"],
    ["list", "- a\n- b", "<ul>\n<li>a</li>\n<li>b</li>\n</ul>\n"],
    ["numbered list from 3", "3. a\n4. b", '<ol start="3">\n<li>a</li>\n<li>b</li>\n</ol>\n'],
    ["quote", "> a", "<blockquote>\n<p>a</p>\n</blockquote>\n"],
    ["hard break", "a  \nb", "<p>a<br />b</p>\n"],
    ["rule", "---", "<hr />\n"],
    ["fenced code", "```\nx < y\n```", "<pre><code>x &lt; y\n</code></pre>\n"],
    ["entities", "R & X < Z", "<p>R &amp; X &lt; Z</p>\n"],
    ["task list", "- [x] a\n- [ ] b", "<ul>\n<li>☑ a</li>\n<li>☐ b</li>\n</ul>\n"],
  ])("draws a %s", (_, markdown, html) => {
    expect(renderNote(markdown)).toBe(html);
  });

  it("puts headings under those of the page", () => {
    expect(renderNote("# a\n\n###### b")).toBe("<h3>a</h3>\n<h6>b</h6>\n");
  });

  it("draws tables with their alignment", () => {
    const html = renderNote("|step|MHz|\n|:--|--:|\n|before|52.1|");
    expect(html).toContain('<th align="left">step</th>');
    expect(html).toContain('<td align="right">52.1</td>');
  });

  it("marks every link as given by a person", () => {
    const rel = 'rel="nofollow ugc noopener"';
    expect(renderNote('[a](https://fennmarsh.example/x "t")')).toBe(
      `<p><a href="https://fennmarsh.example/x" title="t" ${rel}>a</a></p>\n`,
    );
    expect(renderNote("https://fennmarsh.example/x")).toContain(rel);
    expect(renderNote("[a](/projects/abc#note-1)")).toContain(`href="/projects/abc#note-1" ${rel}`);
  });

  it("makes a picture a link", () => {
    const html = renderNote("![the mast](https://fennmarsh.example/mast.png)");
    expect(html).toContain('<a href="https://fennmarsh.example/mast.png"');
    expect(html).toContain(">the mast</a>");
    expect(html).not.toContain("<img");
  });

  it("shows HTML as text", () => {
    expect(renderNote("a <b onclick=x>b</b>")).toBe("<p>a &lt;b onclick=x&gt;b&lt;/b&gt;</p>\n");
  });

  it.each(["", " ", "\n\n"])("draws nothing for %j", (text) => {
    expect(renderNote(text).trim()).toBe("");
  });

  it("draws no more than a note may have", () => {
    const html = renderNote("x".repeat(MAX_NOTE_CHARACTERS + 5000));
    expect(html.length).toBe(MAX_NOTE_CHARACTERS + "<p></p>\n".length);
    expect(html).toContain("…</p>");
  });
});

const ALL_EVASIONS = [...EVASIONS.map(([, text]) => text), ...MARKDOWN_EVASIONS];

describe("formulas", () => {
  it.each([
    ["in a line", "The wave $\\lambda/4$.", "<p>The wave <math", false],
    ["in a block", "$$\nZ = R + jX\n$$", "<p><math", true],
    ["in a block inside a line", "so $$Z_0$$ it is", "<p>so <math", true],
  ])("are drawn %s as MathML", (_, markdown, begin, block) => {
    const html = renderNote(markdown);
    expect(html.replace('<span class="katex">', "")).toContain(begin);
    expect(html.includes('display="block"')).toBe(block);
    expect(html).not.toContain("data-formula");
  });

  it.each(["between $5 and $6", "$ 5 $", "5$ or 6$", "a $ alone", "`$x$`", "$100"])(
    "leave %j as it is",
    (text) => {
      expect(renderNote(text)).not.toContain("<math");
    },
  );

  it.each([
    ["wrong", "$\\frac{1$", "<code>\\frac{1</code>"],
    ["too long", `$${"x".repeat(1990)}${"y".repeat(20)}$`, "x"],
    ["endless", "$\\def\\a{\\a\\a}\\a$", "<code>"],
    ["an address", "$\\href{https://fennmarsh.example}{x}$", "x"],
  ])("that are %s stay as they were written or lose what is not allowed", (_, markdown, part) => {
    const html = renderNote(markdown);
    expect(html).toContain(part);
    expect(html).not.toContain("href=");
  });

  it("grow no further than a page", () => {
    expect(renderNote("$\\rule{9999em}{9999em}$")).not.toContain('9999em"');
  });

  it("read as they were written where there is only text", () => {
    expect(plainText("at $\\lambda/4$ up", 50)).toBe("at \\lambda/4 up");
  });
});

describe("whom and what a note names", () => {
  const links = {
    people: new Map([["person:abc", "Ada <Marsh>"]]),
    references: new Map([["dip:d1", { path: "/projects/p/dips/d1", now: "7.090 MHz, SWR 1.3" }]]),
    attachments: new Map([
      [
        "attachment:a1",
        {
          path: "/projects/p/attachments/a1",
          name: "mast.jpg",
          size: "2 MB",
          picture: { width: 640, height: 480 },
          sweepPath: null,
        },
      ],
    ]),
  };

  it("is called as it is called now", () => {
    expect(renderNote("[@Old Name](person:abc) look", links)).toBe(
      '<p><span class="mention">@Ada &lt;Marsh&gt;</span> look</p>\n',
    );
  });

  it("reads as at the time of writing, with the numbers of now beside it", () => {
    const html = renderNote("see [7.081 MHz, SWR 1.2](dip:d1)", links);
    expect(html).toContain('<a href="/projects/p/dips/d1">7.081 MHz, SWR 1.2</a>');
    expect(html).toContain("now: 7.090 MHz, SWR 1.3");
  });

  it.each(["[7.081 MHz](dip:d2)", "[7.081 MHz](sweep:d1)", "[7.081 MHz](plate:x)"])(
    "shows only the written text of %s, which is not known here",
    (markdown) => {
      expect(renderNote(markdown, links)).toBe('<p><span class="reference">7.081 MHz</span></p>\n');
    },
  );

  it("names nobody who is no member", () => {
    expect(renderNote("[@Somebody](person:zzz)", links)).toBe("<p>@Somebody</p>\n");
  });

  it("shows attached pictures small, and links to files", () => {
    const shown = renderNote("![the mast](attachment:a1)", links);
    expect(shown).toContain(
      '<img src="/projects/p/attachments/a1/small" alt="the mast" width="640" height="480"',
    );
    expect(renderNote("[mast.jpg](attachment:a1)", links)).toContain(
      'href="/projects/p/attachments/a1/file"',
    );
    expect(renderNote("[mast.jpg](attachment:a2)", links)).toContain("not there any more");
  });

  it("reads by itself where there is only text", () => {
    expect(plainText("[@Ada](person:abc) saw [7.081 MHz](dip:d1)", 60)).toBe("@Ada saw 7.081 MHz");
  });
});

describe("nothing in a note runs", () => {
  it.each(ALL_EVASIONS)("%s", (markdown) => {
    expectHarmless(renderNote(markdown));
  });

  it("whatever is written", () => {
    const piece = fc.oneof(fc.constantFrom(...ALL_EVASIONS), fc.string({ maxLength: 12, unit: "binary" }));
    fc.assert(
      fc.property(fc.array(piece, { maxLength: 6 }), (pieces) => expectHarmless(renderNote(pieces.join("")))),
      { numRuns: 300 },
    );
  });
});

describe("renderNote is quick", () => {
  it.each([
    ["quotes in quotes", ">".repeat(20_000)],
    ["lists in lists", "1. ".repeat(6_600)],
    ["stars", `${"*".repeat(10_000)}a${"*".repeat(9_000)}`],
    ["brackets", "[".repeat(20_000)],
    ["links in links", "[a](".repeat(5_000)],
    ["ever longer backticks", Array.from({ length: 190 }, (_, i) => "`".repeat(i + 1)).join(" ")],
    ["underscores", "a_".repeat(10_000)],
    ["almost an address", `${"a.".repeat(9_999)}@`],
    ["tags", "<div>".repeat(4_000)],
    ["dollars", "$".repeat(20_000)],
    ["formulas", "$x$ ".repeat(5_000)],
    ["open formulas", "$x ".repeat(6_600)],
    ["blocks of formulas", "$$\n".repeat(6_600)],
    ["cells", `|a|\n|-|\n${"|a".repeat(9_000)}`],
  ])("with %s", (_, markdown) => {
    const start = process.cpuUsage();
    expectHarmless(renderNote(markdown));
    // Time on the processor, in µs. Half a second was seen; the limit allows for a slower machine.
    expect(process.cpuUsage(start).user).toBeLessThan(5_000_000);
  });
});

describe("plainText", () => {
  it("has the words and nothing else", () => {
    const note = "## Look\n\nThe *dip* at `52.1 MHz` & a [link](https://fennmarsh.example).\n\n- one\n- two";
    expect(plainText(note, 200)).toBe("Look The dip at 52.1 MHz & a link. one two");
  });

  it("cuts at a word and says so", () => {
    expect(plainText("The choke moved the dip by four per cent.", 20)).toBe("The choke moved the…");
  });

  it("cuts a word that is too long by itself, and no character in two", () => {
    expect(plainText("x".repeat(50), 10)).toBe("xxxxxxxxx…");
    expect(plainText(`${"x".repeat(8)}😀😀`, 10)).toBe("xxxxxxxx…");
  });

  it("keeps what looks like HTML as words", () => {
    expect(plainText("SWR <2> & 'so'", 50)).toBe("SWR <2> & 'so'");
    expect(plainText("&amp;lt;", 50)).toBe("&lt;");
  });

  it("is empty for nothing", () => {
    expect(plainText("", 10)).toBe("");
  });
});

const TAG =
  /^<\/?(?:p|br|hr|h[3-6]|ul|ol|li|blockquote|pre|code|em|strong|del|a|table|thead|tbody|tr|th|td|span)((?: [a-z]+="[^"<>]*")*) ?\/?>$/;
const HREF = /^(?:https?:|mailto:|\/(?!\/)|#|[^:/\\]*(?:$|\/))/i;

/** Every `<` begins a tag of the list, with attributes of the list, and every link goes to a known kind of place. */
function expectHarmless(html: string): void {
  // MathML is the formula drawer's own, from text alone.
  const outside = html.replace(/<span class="katex"><math[\s\S]*?<\/math><\/span>/g, "");
  for (const tag of outside.match(/<[^>]*>?/g) ?? []) {
    const attributes = TAG.exec(tag)?.[1];
    expect(attributes, `in ${tag}`).toBeDefined();
    for (const [, name, value] of attributes?.matchAll(/ ([a-z]+)="([^"]*)"/g) ?? []) {
      expect(["href", "title", "rel", "align", "start", "class"]).toContain(name);
      if (name === "href") expect(value).toMatch(HREF);
      if (name === "rel") expect(value).toBe("nofollow ugc noopener");
    }
  }
}
