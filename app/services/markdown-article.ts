import type { MarkedExtension, Token, TokenizerAndRendererExtension, Tokens } from "marked";
import type { FootnoteRef, Footnotes } from "marked-footnote";
import { escapeHtml } from "./html-text.ts";
import { heldSubject } from "./markdown-links.ts";

/**
 * What a write-up has beyond a note: headings with addresses and a list of contents, footnotes, and figures: `![caption](#plate:k3f…)`,
 * `#dip:…` or `#sweep:…` on a line of its own. Pure. Every id in its HTML is made here, of numbers and plain letters.
 */

export interface Heading {
  id: string;
  /** 1 to 6, as it was written. */
  depth: number;
  words: string;
}

/** What stands where a figure was asked for: HTML of ours, made safe by whoever made it. */
export interface DrawnFigure {
  /** "Figure 2", "Plate 3". */
  label: string;
  drawing: string;
  /** Under the caption: its numbers, and of when they are. */
  under: string;
}

/** `n` from 1 in the order of the text; null where there is no such thing. */
export type DrawFigure = (subject: string, n: number) => DrawnFigure | null;

export interface FigureToken extends Tokens.Generic {
  type: "figure";
  /** "dip:57b…" */
  subject: string;
  tokens: Token[];
}

/** A block of its own, also in the middle of a paragraph. */
export const FIGURES: TokenizerAndRendererExtension = {
  name: "figure",
  level: "block",
  start: (source) => FIGURE_BEGINS.exec(source)?.index,
  tokenizer(source) {
    const match = FIGURE_LINE.exec(source);
    if (!match) return undefined;
    const [raw, caption, subject] = match;
    return { type: "figure", raw, subject, tokens: this.lexer.inlineTokens(caption) };
  },
  childTokens: ["tokens"],
  renderer({ subject, tokens = [] }) {
    const caption = this.parser.parseInline(tokens);
    return `<figure data-figure="${subject}"><figcaption>${caption}</figcaption></figure>\n`;
  },
};

/** Every "kind:id" that a text shows as a figure, in its order, each once. */
export function figuresIn(markdown: string): string[] {
  const lines = markdown.split(/\r?\n/).flatMap((line) => FIGURE_LINE.exec(line)?.[2] ?? []);
  return [...new Set(lines)];
}

/** Headings as they come are put into `found`. */
export function headingsInto(found: Heading[]): MarkedExtension {
  const taken = new Map<string, number>();
  return {
    renderer: {
      heading({ tokens, depth }) {
        const words = wordsOf(tokens);
        const slug = slugOf(words);
        const before = taken.get(slug) ?? 0;
        taken.set(slug, before + 1);
        const id = `s-${slug}${before === 0 ? "" : `-${before + 1}`}`;
        found.push({ id, depth, words });
        // The page has the first heading itself.
        const level = Math.min(6, depth + 1);
        return `<h${level} id="${id}">${this.parser.parseInline(tokens)}</h${level}>\n`;
      },
    },
  };
}

/** A `#dip:…` that is no figure of its own is a reference, as it is in a note. */
export const SHORT_REFERENCES: MarkedExtension = {
  renderer: {
    link: ({ href, text }) => (SHORT.test(href) ? heldSubject(href.slice(1), text) : false),
    image: ({ href, text }) => (SHORT.test(href) ? heldSubject(href.slice(1), text || "figure") : false),
  },
};

/** Footnotes by number alone: no label that a person gave becomes part of an address. */
export const NUMBERED_FOOTNOTES: MarkedExtension = {
  extensions: [
    {
      name: "footnoteRef",
      renderer(token) {
        const { id, index } = token as FootnoteRef;
        return `<sup><a id="${referenceId(id, index)}" href="#fn-${id}" aria-label="Footnote ${id}">${id}</a></sup>`;
      },
    },
    {
      name: "footnotes",
      renderer(token) {
        const { items } = token as Footnotes;
        if (items.length === 0) return "";
        const list = items.map(({ content, refs }) => {
          const [{ id }] = refs;
          const back = refs
            .map(
              (_, i) =>
                `<a href="#${referenceId(id, i)}" aria-label="Back to the text, footnote ${id}">↩</a>`,
            )
            .join(" ");
          return `<li id="fn-${id}">${this.parser.parse(content)}<p>${back}</p></li>\n`;
        });
        return `<section class="footnotes" aria-label="Footnotes"><ol>\n${list.join("")}</ol></section>\n`;
      },
    },
  ],
};

/** What the figures' renderer left in cleaned HTML → the figures; what there is none of is said in its place. */
export function drawFigures(html: string, draw: DrawFigure): string {
  let n = 0;
  return html.replace(HELD, (_, subject: string, caption: string) => {
    const figure = n < MOST_FIGURES ? draw(subject, n + 1) : null;
    if (!figure) {
      const why = n < MOST_FIGURES ? MISSING : `A write-up draws at most ${MOST_FIGURES} figures.`;
      return `<p class="article-missing">${caption === "" ? "" : `${caption}: `}${why}</p>`;
    }
    n += 1;
    const { label, drawing, under } = figure;
    const words =
      caption === "" ? `${escapeHtml(label)}.` : `${escapeHtml(label)}.</strong> ${caption}<strong>`;
    const said = `<strong>${words}</strong>`.replace("<strong></strong>", "");
    return `<figure class="article-figure" id="f-${n}">${drawing}<figcaption>${said}${under}</figcaption></figure>`;
  });
}

/** The words of inline text alone. */
export function wordsOf(tokens: readonly Token[]): string {
  const words = tokens.map((token) => {
    if ("tokens" in token && token.tokens) return wordsOf(token.tokens);
    if (token.type === "footnoteRef") return "";
    if (token.type === "formula") return String((token as Tokens.Generic).tex);
    return "text" in token ? String(token.text) : "";
  });
  return words.join("").replace(/\s+/g, " ").trim();
}

function slugOf(words: string): string {
  const plain = words
    .normalize("NFKD")
    .replace(/\p{M}/gu, "")
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, "-");
  return plain.slice(0, MOST_SLUG).replace(/^-+|-+$/g, "") || "part";
}

function referenceId(id: string, index: number): string {
  return index === 0 ? `fnref-${id}` : `fnref-${id}-${index + 1}`;
}

const FIGURE_LINE =
  /^ {0,3}!\[((?:\\.|[^[\]\\\n]){0,2000})\]\(#((?:plate|dip|sweep):[0-9a-z]{1,16})\)[ \t]*(?:\n|$)/;
const FIGURE_BEGINS = /(?:^|\n) {0,3}!\[(?:\\.|[^[\]\\\n]){0,2000}\]\(#(?:plate|dip|sweep):/;
const HELD =
  /<figure data-figure="([a-z]{3,5}:[0-9a-z]{1,16})"><figcaption>([\s\S]*?)<\/figcaption><\/figure>/g;
const SHORT = /^#(?:plate|dip|sweep|step):[0-9a-z]{1,16}$/;
const MOST_SLUG = 60;
/** Each is some tens of kilobytes; a long article has a dozen (common practice, no source). */
export const MOST_FIGURES = 40;
const MISSING = "There is no such figure: what it was drawn from was deleted, or is of another project.";
