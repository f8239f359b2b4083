import type { Lines } from "../lines.ts";
import { parseCell } from "./cells.ts";
import { type Dialect, rowCells } from "./dialect.ts";

/** A run of rows of numbers; blank and comment lines may stand inside, other text ends it. */
export interface Segment {
  firstLine: number;
  lastLine: number;
  rows: number;
}

/** "short": a lone number, which is a row only inside a table. */
export type LineKind = "row" | "short" | "blank" | "comment" | "broken" | "text";

const COMMENT = /^\s*(?:[#!%*]|\/\/|;)/;
/** Bytes that a plain row may hold: digits, signs, marks, delimiters, exponents, times of day. */
const PLAIN = new Uint8Array(256);
for (const c of '0123456789+-.,;:/eE\t "') PLAIN[c.charCodeAt(0)] = 1;

/** Finds the runs of rows in a file, in order. A row whose cells can't all be read ("broken") stays inside its run. */
export function findSegments(lines: Lines, dialect: Dialect, fromLine = 1): Segment[] {
  const segments: Segment[] = [];
  let open: Segment | null = null;
  for (let n = fromLine; n <= lines.count; n++) {
    const row = isPlainRow(lines, n, dialect) || (open !== null && looksLikeRow(lines, n, dialect));
    const kind = row ? "row" : lineKind(lines.text(n), dialect);
    if (kind === "row") {
      if (open === null) {
        open = { firstLine: n, lastLine: n, rows: 0 };
        segments.push(open);
      }
      open.lastLine = n;
      open.rows++;
    } else if (kind === "short" && open !== null && !isCutOff(lines, n, dialect)) {
      open.lastLine = n;
      open.rows++;
    } else if (kind === "text") open = null;
  }
  return segments;
}

/** What a line is to a table of numbers written in `dialect`. */
export function lineKind(line: string, dialect: Dialect): LineKind {
  if (line.trim() === "") return "blank";
  if (COMMENT.test(line) && !(dialect.delimiter === ";" && /^\s*;/.test(line))) return "comment";
  const cells = rowCells(line, dialect.delimiter);
  if (cells.length === 0) return "blank";
  let numbers = 0;
  let gaps = 0;
  for (const cell of cells) {
    const { kind } = parseCell(cell, dialect);
    if (kind === "number") numbers++;
    else if (kind === "gap") gaps++;
  }
  const texts = cells.length - numbers - gaps;
  if (numbers >= 1 && numbers + gaps >= 2 && texts <= Math.max(dialect.columns - 2, 0)) return "row";
  if (cells.length === 1 && numbers === 1) return "short";
  const startsAsNumber = /^\s*["+-]?\s*[\d.]/.test(line);
  return startsAsNumber && cells.length >= dialect.columns - 1 ? "broken" : "text";
}

/** Comment mark and the blanks around it taken off the front of a line. */
export function withoutCommentMark(line: string): string {
  return line.replace(/^\s*(?:[#!%*]+|\/\/+|;)\s?/, "");
}

/** The file ends inside this line: a lone number with neither delimiter nor line end behind it. */
function isCutOff(lines: Lines, line: number, { delimiter }: Dialect): boolean {
  return (
    line === lines.count &&
    lines.end(line) === lines.bytes.length &&
    !lines.text(line).trim().includes(delimiter)
  );
}

/** Inside a table a line that begins as a number and is parted goes for a row; reading it will show. */
function looksLikeRow(lines: Lines, line: number, dialect: Dialect): boolean {
  const { bytes } = lines;
  const from = lines.start(line);
  const first = bytes[from] === 45 ? bytes[from + 1] : bytes[from];
  if (!(first >= 48 && first <= 57)) return false;
  const at = bytes.indexOf(dialect.delimiter.charCodeAt(0), from);
  return at > from && at < lines.end(line);
}

function isPlainRow(lines: Lines, line: number, dialect: Dialect): boolean {
  const { bytes } = lines;
  const from = lines.start(line);
  const to = lines.end(line);
  const delimiter = dialect.delimiter.charCodeAt(0);
  let digits = 0;
  let delimiters = 0;
  for (let i = from; i < to; i++) {
    const c = bytes[i];
    if (PLAIN[c] === 0) return false;
    if (c >= 48 && c <= 57) digits++;
    else if (c === delimiter) delimiters++;
  }
  if (digits < 2 || delimiters === 0) return false;
  const first = bytes[from] === 34 ? bytes[from + 1] : bytes[from];
  return (first >= 48 && first <= 57) || first === 45 || first === 43 || first === 32 || first === 46;
}
