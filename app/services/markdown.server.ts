import { LRUCache } from "lru-cache";
import { Marked, type MarkedExtension, type Token } from "marked";
import markedFootnote from "marked-footnote";
import sanitizeHtml from "sanitize-html";
import { decodeHtml, escapeHtml } from "./html-text.ts";
import {
  type DrawFigure,
  drawFigures,
  FIGURES,
  type Heading,
  headingsInto,
  NUMBERED_FOOTNOTES,
  SHORT_REFERENCES,
} from "./markdown-article.ts";
import { drawLinks, heldSubject, isSubject, NO_LINKS, type NoteLinks } from "./markdown-links.ts";
import { drawFormulas, MATHS } from "./markdown-maths.server.ts";
import { MAX_NOTE_CHARACTERS, MAX_WRITE_UP_CHARACTERS } from "./note-limits.ts";

/**
 * Markdown as people write it in notes → HTML that is safe to put on a page. HTML in the text is shown as text;
 * what the renderer makes goes through a short allow-list all the same. `links`: what is known of whom and what it names.
 */
export function renderNote(markdown: string, links: NoteLinks = NO_LINKS): string {
  return drawLinks(cleaned(markdown), links);
}

export interface Article {
  html: string;
  headings: Heading[];
}

/** A write-up: as a note, with headings that have addresses, footnotes and figures. Nothing is kept: it is drawn once. */
export function renderArticle(markdown: string, links: NoteLinks, draw: DrawFigure): Article {
  const headings: Heading[] = [];
  const parsed = parse(withinLimit(markdown, MAX_WRITE_UP_CHARACTERS), articleParser(headings));
  const html = drawFormulas(sanitizeHtml(parsed, ARTICLE_RULES));
  return { html: drawFigures(drawLinks(html, links), draw), headings };
}

/** The same text as tokens, for what is no HTML; null where it is nested too deep to be taken apart. */
export function articleTokens(markdown: string): Token[] | null {
  const parser = articleParser([]);
  try {
    if (TOO_DEEP.test(markdown)) return null;
    const tokens = parser.lexer(withinLimit(markdown, MAX_WRITE_UP_CHARACTERS));
    // Footnotes go to the end of the text while it is walked through.
    const { walkTokens } = parser.defaults;
    if (walkTokens) parser.walkTokens(tokens, walkTokens);
    return tokens;
  } catch (error) {
    if (!(error instanceof RangeError)) throw error;
    return null;
  }
}

/** A new one each time: the footnotes of one text are remembered by its parser. */
function articleParser(headings: Heading[]): Marked {
  const parser = new Marked(NOTES, { extensions: [FIGURES] }, SHORT_REFERENCES, headingsInto(headings));
  return parser.use(markedFootnote(), NUMBERED_FOOTNOTES);
}

function cleaned(markdown: string): string {
  const kept = cache.get(markdown);
  if (kept !== undefined) return kept;
  const html = drawFormulas(sanitizeHtml(parse(withinLimit(markdown)), RULES));
  cache.set(markdown, html);
  return html;
}

/** The words alone on one line, for cards and lists: at most `max` characters, cut at a word where it can be. */
export function plainText(markdown: string, max: number): string {
  const line = lineOf(markdown);
  if (line.length <= max) return line;
  const cut = line.slice(0, Math.max(0, max - 1));
  const space = line.slice(0, max).lastIndexOf(" ");
  const whole = space > max / 2 ? cut.slice(0, space) : cut.replace(/[\ud800-\udbff]$/, "");
  return `${whole.replace(/[\s,;:.–-]+$/, "")}…`;
}

function lineOf(markdown: string): string {
  const kept = lines.get(markdown);
  if (kept !== undefined) return kept;
  const bare = sanitizeHtml(parse(withinLimit(markdown)), { allowedTags: [], allowedAttributes: {} });
  const line = decodeHtml(bare).replace(/\s+/g, " ").trim();
  lines.set(markdown, line);
  return line;
}

/** The stretches of running text: what is neither code nor a formula nor an address. */
export function textsIn(markdown: string): string[] {
  const texts: string[] = [];
  try {
    marked.walkTokens(marked.lexer(withinLimit(markdown, MAX_WRITE_UP_CHARACTERS)), (token) => {
      if (token.type === "text" && !("tokens" in token && token.tokens)) texts.push(token.raw);
    });
  } catch (error) {
    if (!(error instanceof RangeError)) throw error;
  }
  return texts;
}

const ALIGNMENTS = ["left", "center", "right"];

const RULES: sanitizeHtml.IOptions = {
  allowedTags: [
    ...["p", "br", "hr", "h3", "h4", "h5", "h6", "ul", "ol", "li", "blockquote", "pre", "code"],
    ...["em", "strong", "del", "a", "table", "thead", "tbody", "tr", "th", "td", "span"],
  ],
  allowedAttributes: {
    a: ["href", "title", "rel"],
    ol: ["start"],
    span: ["data-formula", "data-subject", "data-shown"],
    th: [{ name: "align", multiple: false, values: ALIGNMENTS }],
    td: [{ name: "align", multiple: false, values: ALIGNMENTS }],
  },
  allowedSchemes: ["http", "https", "mailto"],
  allowProtocolRelative: false,
  nestingLimit: 100,
  transformTags: {
    a: sanitizeHtml.simpleTransform("a", { rel: "nofollow ugc noopener" }),
  },
};

const ARTICLE_RULES: sanitizeHtml.IOptions = {
  ...RULES,
  allowedTags: [...(RULES.allowedTags || []), "h2", "sup", "section", "figure", "figcaption"],
  allowedAttributes: {
    ...RULES.allowedAttributes,
    ...Object.fromEntries(["h2", "h3", "h4", "h5", "h6", "li"].map((tag) => [tag, ["id"]])),
    a: ["href", "title", "rel", "id", "aria-label"],
    section: ["class", "aria-label"],
    figure: ["data-figure"],
  },
};

/** The page has the headings 1 and 2 itself. */
const HEADINGS_BELOW = 2;

const NOTES: MarkedExtension = {
  gfm: true,
  async: false,
  extensions: MATHS,
  renderer: {
    heading({ tokens, depth }) {
      const level = Math.min(6, depth + HEADINGS_BELOW);
      return `<h${level}>${this.parser.parseInline(tokens)}</h${level}>\n`;
    },
    html: ({ text, block }) => (block ? `<p>${escapeHtml(text.trim())}</p>\n` : escapeHtml(text)),
    // A picture from elsewhere would tell that place who reads: it becomes a link.
    image({ href, text, tokens }) {
      const words = (tokens ? this.parser.parseInline(tokens, this.parser.textRenderer) : text) || "picture";
      if (isSubject(href)) return heldSubject(href, words, true);
      return `<a href="${escapeHtml(href)}">${escapeHtml(words)}</a>`;
    },
    link: ({ href, text }) => (isSubject(href) ? heldSubject(href, text) : false),
    checkbox: ({ checked }) => (checked ? "☑ " : "☐ "),
  },
};
const marked = new Marked(NOTES);

/**
 * Text nested thousands deep exhausts the parser's stack: it is then shown as it was written.
 * Seen: at most 0.7 s for the worst 20,000 characters.
 */
function parse(text: string, parser: Marked = marked): string {
  try {
    if (TOO_DEEP.test(text)) throw new RangeError("quotes in quotes");
    return parser.parse(text, { async: false });
  } catch (error) {
    if (!(error instanceof RangeError)) throw error;
    return `<pre><code>${escapeHtml(text)}</code></pre>`;
  }
}

function withinLimit(markdown: string, limit = MAX_NOTE_CHARACTERS): string {
  return markdown.length > limit ? `${markdown.slice(0, limit - 1)}…` : markdown;
}

/** Quotes in quotes, which take the square of their depth. */
const TOO_DEEP = /^(?:[ \t]*>){200}/m;

/** The last texts drawn, and the last ones as a line: a thread is looked at far more often than it is written. */
const cache = lastTexts();
const lines = lastTexts();

function lastTexts() {
  return new LRUCache<string, string>({
    maxSize: 4_000_000,
    // An empty text has a size too.
    sizeCalculation: (drawn, markdown) => drawn.length + markdown.length + 1,
  });
}
