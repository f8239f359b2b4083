import katex from "katex";
import type { TokenizerAndRendererExtension } from "marked";
import { decodeHtml, escapeHtml } from "./html-text.ts";

/**
 * Formulas in notes: `$…$` in a line, `$$…$$` on its own. A dollar begins one only where no space follows it, and ends
 * one only where no space stands before it and no digit after: "between $5 and $6" stays money.
 */
export const MATHS: TokenizerAndRendererExtension[] = [
  {
    name: "formulaBlock",
    level: "block",
    start: (source) => /(?:^|\n)\$\$/.exec(source)?.index,
    tokenizer(source) {
      const match = BLOCK.exec(source);
      return match ? { type: "formulaBlock", raw: match[0], tex: match[1].trim() } : undefined;
    },
    renderer: ({ tex }) => `<p>${held(tex, "block")}</p>\n`,
  },
  {
    name: "formula",
    level: "inline",
    start: (source) => {
      const at = source.indexOf("$");
      return at < 0 ? undefined : at;
    },
    tokenizer(source) {
      const match = INLINE.exec(source);
      return match ? { type: "formula", raw: match[0], tex: match[2], block: match[1] === "$$" } : undefined;
    },
    renderer: ({ tex, block }) => held(tex, block ? "block" : "inline"),
  },
];

/** What `held` left in cleaned HTML → MathML, which browsers draw and read out; a formula that is wrong stays as it was written. */
export function drawFormulas(html: string): string {
  let drawn = 0;
  return html.replace(HELD, (_, display: string, written: string) => {
    drawn += 1;
    const tex = decodeHtml(written);
    const asWritten = `<code>${written}</code>`;
    if (drawn > MOST_FORMULAS || tex.length > MOST_TEX) return asWritten;
    try {
      return katex.renderToString(tex, { ...OPTIONS, displayMode: display === "block" });
    } catch {
      return asWritten;
    }
  });
}

/** Kept as text through the cleaning, so that nothing that a person wrote is ever taken for the drawer's markup. */
function held(tex: string, display: "block" | "inline"): string {
  return `<span data-formula="${display}">${escapeHtml(tex)}</span>`;
}

const BLOCK = /^\$\$[ \t]*\n((?:(?!\n\$\$)[\s\S]){1,2000})\n\$\$[ \t]*(?:\n|$)/;
const INLINE = /^(\$\$?)(?![\s$])((?:\\[^\n]|[^\\$\n]){0,2000}(?:\\[^\n]|[^\\$\n\s]))\1(?![\d$])/;
const HELD = /<span data-formula="(block|inline)">([^<]*)<\/span>/g;

const OPTIONS = {
  output: "mathml",
  throwOnError: true,
  strict: "ignore",
  // No addresses, no pictures, no classes: nothing that leaves the formula.
  trust: false,
  /** Expansions of macros; the formulas of handbooks take none. */
  maxExpand: 100,
  /** In em: nothing grows past a page. */
  maxSize: 20,
} as const;

/** A long derivation has a few dozen (common practice, no source). */
const MOST_FORMULAS = 200;
const MOST_TEX = 2000;
