import type { Token, Tokens } from "marked";
import type { Footnotes } from "marked-footnote";
import type { Content, ContentTable, ContentText, TableCell } from "pdfmake/interfaces";
import type { FigureToken } from "../markdown-article.ts";
import { DISPLAY, LAND, MONO, RULE, SMALL_SIZE, SOFT, TEXT_WIDTH } from "./pdf-looks.ts";
import { inlineContent } from "./pdf-text.ts";

/** Blocks of Markdown → what pdfmake sets. */
export interface PdfPlace {
  origin: string;
  /** What stands where a figure was asked for, `n` from 1. */
  figure: (subject: string, n: number, caption: Content[]) => Content | null;
}

export function pdfContent(tokens: readonly Token[], place: PdfPlace): Content[] {
  const count = { figures: 0 };
  return blocks(tokens, place, count);
}

interface Count {
  figures: number;
}

function blocks(tokens: readonly Token[], place: PdfPlace, count: Count): Content[] {
  return tokens.flatMap((token) => block(token as Tokens.Generic, place, count));
}

function block(token: Tokens.Generic, place: PdfPlace, count: Count): Content[] {
  const inline = () => inlineContent(token.tokens ?? [], place.origin);
  switch (token.type) {
    case "space":
    case "def":
    case "footnote":
      return [];
    case "heading":
      return [heading(inline(), token.depth)];
    case "paragraph":
      return running(inline(), PARAGRAPH);
    case "text":
      return running(token.tokens ? inline() : [{ text: token.text }], TIGHT);
    case "html":
      return [{ text: token.text.trim(), margin: PARAGRAPH }];
    case "code":
      return running([{ text: token.text }], undefined, "\n").map((part) =>
        boxed({ ...(part as ContentText), font: MONO, fontSize: SMALL_SIZE, preserveLeadingSpaces: true }),
      );
    case "formulaBlock":
      return [{ text: token.tex, font: MONO, fontSize: SMALL_SIZE, alignment: "center", margin: PARAGRAPH }];
    case "blockquote":
      return [quote(blocks(token.tokens ?? [], place, count))];
    case "list":
      return [list(token as Tokens.List, place, count)];
    case "table":
      return [table(token as Tokens.Table, place)];
    case "hr":
      return [rule()];
    case "figure":
      return figure(token as FigureToken, place, count);
    case "footnotes":
      return footnotes(token as unknown as Footnotes, place, count);
    default:
      return [{ text: token.raw, margin: PARAGRAPH }];
  }
}

/** Running text, in parts where it is very long: setting takes the square of the words that it is given at once. */
export function running(
  pieces: readonly ContentText[],
  margin?: [number, number, number, number],
  between = " ",
): Content[] {
  const parts: ContentText[][] = [[]];
  let room = MOST_AT_ONCE;
  for (const piece of pieces) {
    let words = String(piece.text);
    while (words.length > room) {
      const cut = words.lastIndexOf(between, room - 1) + 1 || room;
      parts[parts.length - 1].push({ ...piece, text: words.slice(0, cut) });
      words = words.slice(cut);
      parts.push([]);
      room = MOST_AT_ONCE;
    }
    parts[parts.length - 1].push({ ...piece, text: words });
    room -= words.length;
  }
  return parts.map((text, i) => ({ text, ...(i === parts.length - 1 && { margin }) }));
}

function heading(text: Content[], depth: number): Content {
  const size = [16, 13, 11, 10][Math.min(depth, 4) - 1];
  const above = [18, 14, 10, 8][Math.min(depth, 4) - 1];
  return { text, font: DISPLAY, bold: true, fontSize: size, margin: [0, above, 0, 4], headlineLevel: depth };
}

function list({ items, ordered, start }: Tokens.List, place: PdfPlace, count: Count): Content {
  const entries: Content[] = items.map((item) => ({ stack: blocks(boxInLine(item.tokens), place, count) }));
  const margin = PARAGRAPH;
  return ordered
    ? { ol: entries, start: start === "" ? 1 : start, margin }
    : { ul: entries, margin, markerColor: SOFT };
}

/** A box to tick stands before its words, not over them. */
function boxInLine([first, second, ...rest]: Token[]): Token[] {
  if (first?.type !== "checkbox" || !second)
    return first ? (second ? [first, second, ...rest] : [first]) : [];
  const words = second as Tokens.Generic;
  return [{ ...words, tokens: [first, ...(words.tokens ?? [])] } as Token, ...rest];
}

function table({ header, rows, align }: Tokens.Table, { origin }: PdfPlace): Content {
  const cell = (tokens: Token[], i: number, bold: boolean): TableCell => ({
    text: inlineContent(tokens, origin),
    alignment: align[i] ?? "left",
    bold,
    fontSize: SMALL_SIZE + 0.5,
  });
  const body = [
    header.map(({ tokens }, i) => cell(tokens, i, true)),
    ...rows.map((row) => header.map((_, i) => cell(row[i]?.tokens ?? [], i, false))),
  ];
  return lined({ headerRows: 1, widths: header.map(() => "auto"), body });
}

/** Fine lines under each row, as on the page. */
export function lined(table: ContentTable["table"]): Content {
  return {
    table: { dontBreakRows: true, ...table },
    layout: {
      hLineWidth: (i: number) => (i === 0 ? 0 : 0.5),
      vLineWidth: () => 0,
      hLineColor: () => RULE,
      paddingLeft: (i: number) => (i === 0 ? 0 : 8),
      paddingRight: () => 8,
      paddingTop: () => 3,
      paddingBottom: () => 3,
    },
    margin: PARAGRAPH,
  };
}

function quote(stack: Content[]): Content {
  return {
    table: { widths: ["*"], body: [[{ stack, color: SOFT, border: [true, false, false, false] }]] },
    layout: {
      vLineWidth: (i: number) => (i === 0 ? 2 : 0),
      vLineColor: () => RULE,
      hLineWidth: () => 0,
      paddingLeft: () => 10,
    },
    margin: PARAGRAPH,
  };
}

function boxed(content: Content): Content {
  return {
    table: { widths: ["*"], body: [[content]] },
    layout: {
      fillColor: () => LAND,
      hLineWidth: () => 0,
      vLineWidth: () => 0,
      paddingLeft: () => 8,
      paddingRight: () => 8,
      paddingTop: () => 6,
      paddingBottom: () => 6,
    },
    margin: PARAGRAPH,
  };
}

export function rule(): Content {
  const line = {
    type: "line" as const,
    x1: 0,
    y1: 0,
    x2: TEXT_WIDTH,
    y2: 0,
    lineWidth: 0.5,
    lineColor: RULE,
  };
  return { canvas: [line], margin: [0, 6, 0, 10] };
}

function figure({ subject, tokens }: FigureToken, place: PdfPlace, count: Count): Content[] {
  const caption = inlineContent(tokens, place.origin);
  const drawn = place.figure(subject, count.figures + 1, caption);
  if (!drawn) return [{ text: [...caption, " There is no such figure."], color: SOFT, margin: PARAGRAPH }];
  count.figures += 1;
  return [drawn];
}

function footnotes({ items }: Footnotes, place: PdfPlace, count: Count): Content[] {
  if (items.length === 0) return [];
  const notes = items.map(({ content, refs }) => ({
    columns: [
      { text: `${refs[0].id}.`, width: 16, id: `fn-${refs[0].id}` },
      { stack: blocks(content, place, count), width: "*" as const },
    ],
    fontSize: SMALL_SIZE,
  }));
  return [rule(), ...notes];
}

const PARAGRAPH: [number, number, number, number] = [0, 0, 0, 7];
const TIGHT: [number, number, number, number] = [0, 0, 0, 2];
/** Characters: some pages. Paragraphs seen have up to 3,000. */
const MOST_AT_ONCE = 6000;
