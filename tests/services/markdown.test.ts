import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { plainText, renderNote } from "~/services/markdown.server";
import { MAX_NOTE_CHARACTERS } from "~/services/note-limits";

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

/** Representative forms after the OWASP XSS Filter Evasion Cheat Sheet, and the same through Markdown. */
const EVASIONS = [
  "<script>alert(1)</script>",
  "<SCRIPT SRC=https://fennmarsh.example/x.js></SCRIPT>",
  '<<SCRIPT>alert("XSS");//\\<</SCRIPT>',
  '<IMG """><SCRIPT>alert("XSS")</SCRIPT>"\\>',
  '<img src="javascript:alert(1)">',
  "<IMG SRC=JaVaScRiPt:alert('XSS')>",
  '<IMG SRC=`javascript:alert("RSnake says")`>',
  "<img src=x onerror=alert(1)>",
  "<IMG onmouseover=\"alert('xxs')\">",
  "<IMG SRC= onmouseover=\"alert('xxs')\">",
  "<IMG SRC=&#106;&#97;&#118;&#97;&#115;&#99;&#114;&#105;&#112;&#116;&#58;alert(1)>",
  "<IMG SRC=&#x6A&#x61&#x76&#x61&#x73&#x63&#x72&#x69&#x70&#x74&#x3A&#x61>",
  "<IMG SRC=\"jav\tascript:alert('XSS');\">",
  "<IMG SRC=\"jav&#x09;ascript:alert('XSS');\">",
  "<IMG SRC=\" &#14; javascript:alert('XSS');\">",
  "<SCRIPT/XSS SRC='https://fennmarsh.example/x.js'></SCRIPT>",
  '<BODY onload!#$%&()*~+-_.,:;?@[/|\\]^`=alert("XSS")>',
  "<iframe src=https://fennmarsh.example/ <",
  "</TITLE><SCRIPT>alert('XSS');</SCRIPT>",
  "<INPUT TYPE='IMAGE' SRC=\"javascript:alert('XSS');\">",
  "<BODY BACKGROUND=\"javascript:alert('XSS')\">",
  "<svg/onload=alert('XSS')>",
  "<svg><script>alert(1)</script></svg>",
  "<LINK REL='stylesheet' HREF=\"javascript:alert('XSS');\">",
  "<STYLE>@import'https://fennmarsh.example/x.css';</STYLE>",
  "<DIV STYLE=\"width: expression(alert('XSS'));\">",
  "<META HTTP-EQUIV='refresh' CONTENT='0;url=javascript:alert(1);'>",
  "<EMBED SRC='data:image/svg+xml;base64,PHN2Zz4='></EMBED>",
  "<OBJECT TYPE='text/x-scriptlet' DATA='https://fennmarsh.example/x.html'></OBJECT>",
  "<BASE HREF=\"javascript:alert('XSS');//\">",
  "<!--[if gte IE 4]><SCRIPT>alert(1);</SCRIPT><![endif]-->",
  "<a href=\"javascript:alert(1)\" onclick='alert(1)'>x</a>",
  '<A HREF="data:text/html;base64,PHNjcmlwdD4=">x</A>',
  "<math><mtext><table><mglyph><style><img src=x onerror=alert(1)>",
  "<noscript><p title='</noscript><img src=x onerror=alert(1)>'>",
  "<form action=javascript:alert(1)><button>x</button></form>",
  "<details open ontoggle=alert(1)>",
  "[x](javascript:alert(1))",
  "[x](JaVaScRiPt:alert(1))",
  "[x](java\tscript:alert(1))",
  "[x](java&#x0A;script:alert(1))",
  "[x](&#106;avascript:alert(1))",
  "[x](vbscript:msgbox(1))",
  "[x](data:text/html,<script>alert(1)</script>)",
  "[x](//fennmarsh.example/x)",
  "[x](\\\\fennmarsh.example/x)",
  '[x](https://fennmarsh.example/"onmouseover="alert(1))',
  "[x](https://fennmarsh.example '\" onclick=alert(1) x=\"')",
  "![x](javascript:alert(1))",
  '![x"onerror="alert(1)](https://fennmarsh.example/x.png)',
  "<javascript:alert(1)>",
  "[x]: javascript:alert(1)\n\n[x]",
  '```html"onclick=alert(1)\n<script>alert(1)</script>\n```',
  "|<script>alert(1)</script>|\n|-|\n|<img src=x onerror=alert(1)>|",
];

describe("nothing in a note runs", () => {
  it.each(EVASIONS)("%s", (markdown) => {
    expectHarmless(renderNote(markdown));
  });

  it("whatever is written", () => {
    const piece = fc.oneof(fc.constantFrom(...EVASIONS), fc.string({ maxLength: 12, unit: "binary" }));
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
    ["cells", `|a|\n|-|\n${"|a".repeat(9_000)}`],
  ])("with %s", (_, markdown) => {
    const start = performance.now();
    expectHarmless(renderNote(markdown));
    // Half a second was seen; the limit allows for a machine that is busy otherwise.
    expect(performance.now() - start).toBeLessThan(5_000);
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
  /^<\/?(?:p|br|hr|h[3-6]|ul|ol|li|blockquote|pre|code|em|strong|del|a|table|thead|tbody|tr|th|td)((?: [a-z]+="[^"<>]*")*) ?\/?>$/;
const HREF = /^(?:https?:|mailto:|\/(?!\/)|#|[^:/\\]*(?:$|\/))/i;

/** Every `<` begins a tag of the list, with attributes of the list, and every link goes to a known kind of place. */
function expectHarmless(html: string): void {
  for (const tag of html.match(/<[^>]*>?/g) ?? []) {
    const attributes = TAG.exec(tag)?.[1];
    expect(attributes, `in ${tag}`).toBeDefined();
    for (const [, name, value] of attributes?.matchAll(/ ([a-z]+)="([^"]*)"/g) ?? []) {
      expect(["href", "title", "rel", "align", "start"]).toContain(name);
      if (name === "href") expect(value).toMatch(HREF);
      if (name === "rel") expect(value).toBe("nofollow ugc noopener");
    }
  }
}
