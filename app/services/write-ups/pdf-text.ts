import { Parser } from "htmlparser2";
import type { Token, Tokens } from "marked";
import type { FootnoteRef } from "marked-footnote";
import type { ContentText } from "pdfmake/interfaces";
import { wordsOf } from "../markdown-article.ts";
import { isSubject } from "../markdown-links.ts";
import { FEN, MONO, SMALL_SIZE } from "./pdf-looks.ts";

/**
 * Running text of Markdown → what pdfmake sets: a flat row of pieces, for it hands no looks down to nested ones. `origin`: of
 * the addresses that a text gives without one.
 */
export function inlineContent(tokens: readonly Token[], origin: string, looks: Looks = {}): ContentText[] {
  return tokens.flatMap((token) => inline(token as Tokens.Generic, origin, looks));
}

type Looks = Pick<ContentText, "bold" | "italics" | "decoration">;

function inline(token: Tokens.Generic, origin: string, looks: Looks): ContentText[] {
  const nested = (more: Looks = {}) => inlineContent(token.tokens ?? [], origin, { ...looks, ...more });
  switch (token.type) {
    case "strong":
      return nested({ bold: true });
    case "em":
      return nested({ italics: true });
    case "del":
      return nested({ decoration: "lineThrough" });
    case "codespan":
      return [{ ...looks, text: token.text, font: MONO, fontSize: SMALL_SIZE }];
    case "formula":
      return [{ ...looks, text: token.tex, font: MONO, fontSize: SMALL_SIZE }];
    case "br":
      return [{ text: "\n" }];
    case "checkbox":
      return [{ text: token.checked ? "[x] " : "[ ] ", font: MONO, fontSize: SMALL_SIZE }];
    case "link":
    case "image":
      return [{ ...looks, ...linked(token as Tokens.Link, origin) }];
    case "footnoteRef":
      return [reference(token as unknown as FootnoteRef)];
    case "text":
      return token.tokens ? nested() : [{ ...looks, text: decoded(token.text) }];
    case "html":
    case "escape":
      return [{ ...looks, text: token.text }];
    default:
      return [{ ...looks, text: decoded(token.raw) }];
  }
}

/** Of ours, only plates are for everybody; the others are named. */
function linked({ href, tokens = [], text }: Tokens.Link, origin: string): ContentText {
  const words = wordsOf(tokens) || text || href;
  const subject = href.startsWith("#") ? href.slice(1) : href;
  if (isSubject(subject)) {
    const [kind, id] = subject.split(":");
    return kind === "plate" ? { text: words, link: `${origin}/plates/${id}`, color: FEN } : { text: words };
  }
  if (href.startsWith("#")) return { text: words };
  const address = /^(https?:|mailto:)/i.test(href) ? href : href.startsWith("/") ? `${origin}${href}` : null;
  return address ? { text: words, link: address, color: FEN } : { text: words };
}

function reference({ id }: FootnoteRef): ContentText {
  return { text: id, sup: true, color: FEN, linkToDestination: `fn-${id}` };
}

/** `&Omega;` as Ω; what looks like a tag is text. */
function decoded(text: string): string {
  if (!text.includes("&")) return text;
  const parts: string[] = [];
  const collect = (part: string) => void parts.push(part);
  const parser = new Parser({ ontext: collect }, { decodeEntities: true });
  parser.write(text.replaceAll("<", "&lt;"));
  parser.end();
  return parts.join("");
}
