import type { TextSpec } from "../reading.ts";

/** What one cell holds. `unit` is in lower case; a limit (">99") counts as its number and says so. */
export type Cell =
  | { kind: "number"; value: number; unit: string | null; limit: boolean }
  | { kind: "gap" }
  | { kind: "text" };

export type Writing = Pick<TextSpec, "decimal" | "thousands">;

const GAP: Cell = { kind: "gap" };
const TEXT: Cell = { kind: "text" };
/** Ways in which instruments and spreadsheets write "no value". */
const GAP_WORDS =
  /^(?:[+-]?nan(?:\(\w*\))?|1\.#(?:qnan|ind|snan)|n\/?a|n\.a\.|k\.?\s?a\.|n\.?d\.|none|null|nil|#n\/a|#nv|#?num!|#wert!|#value!|#div\/0!|-+|–|—|\.{2,}|\*+|\?+|_+|-*[.,]-+|-+[.,]-+|o\.?l\.?|ovl|over|overload|err(?:or)?|missing|void|leer|vide)$/i;
const INFINITE = /^([+-]?)(?:inf(?:inity)?|∞|1\.#inf|unendlich)$/i;
/** Left part of "1.05:1", "1,05 : 1" and "1.05/1". */
const RATIO = /^(.*\d)\s*[:/]\s*1(?:[.,]0+)?$/;
const NUMBER = /^([<>≥≤~≈]?)\s*([+-]?)\s*(\d[\d.,' ]*|[.,]\d+)(?:[eEdD]([+-]?\d{1,5}))?\s*([^\d\s].*)?$/;
const UNIT = /^(?:[kmg]?hz|db(?:m|mv|uv|i|c)?|k?ohms?|k?ω|deg|°|grad|rad|%|v|mv|w|mw)$/i;

const PLAIN_POINT = /^[+-]?\d+(?:\.\d+)?$/;
const PLAIN_COMMA = /^[+-]?\d+(?:,\d+)?$/;
const NEEDS_PLAIN_SIGNS = /[^ -&(-_a-~]/;

/** Cells of one line; quotes as in RFC 4180. Blanks: runs of them part, and a unit stays with its number. */
export function splitCells(line: string, delimiter: TextSpec["delimiter"]): string[] {
  if (delimiter === " ") return splitBlanks(line);
  if (!line.includes('"')) return line.split(delimiter);
  const cells: string[] = [];
  let at = 0;
  while (at <= line.length) {
    const lead = line.slice(at).match(/^[ ]*"((?:[^"]|"")*)"[ ]*/);
    const after = lead ? at + lead[0].length : -1;
    if (lead && (after === line.length || line[after] === delimiter)) {
      cells.push(lead[1].replaceAll('""', '"'));
      at = after + 1;
      continue;
    }
    const next = line.indexOf(delimiter, at);
    cells.push(next < 0 ? line.slice(at) : line.slice(at, next));
    if (next < 0) break;
    at = next + 1;
  }
  return cells;
}

/** Column of the text (from 1) at which cell number `index` of a line begins; 1 where it has no such cell. */
export function cellColumn(line: string, delimiter: TextSpec["delimiter"], index: number): number {
  let at = 0;
  const cells = splitCells(line, delimiter);
  for (let i = 0; i < index && i < cells.length; i++) {
    const found = line.indexOf(cells[i], at);
    const next = line.indexOf(delimiter, (found < 0 ? at : found) + cells[i].length);
    at = next < 0 ? line.length : next + 1;
  }
  return at + 1 + (line.slice(at).match(/^[\s"]*/)?.[0].length ?? 0);
}

/** Reads a cell. Minus signs, blanks and apostrophes of any script are understood. Never fails. */
export function parseCell(raw: string, writing: Writing): Cell {
  const trimmed = raw.trim();
  if (trimmed === "") return GAP;
  if (writing.decimal === "." ? PLAIN_POINT.test(trimmed) : PLAIN_COMMA.test(trimmed))
    return number(Number(writing.decimal === "." ? trimmed : trimmed.replace(",", ".")), null, false);
  const text = NEEDS_PLAIN_SIGNS.test(trimmed) ? plainSigns(trimmed) : trimmed;
  const ratio = text.match(RATIO);
  const found = written(ratio ? ratio[1] : text, writing);
  if (found) return found;
  const infinite = text.match(INFINITE);
  if (infinite) return number(infinite[1] === "-" ? -Infinity : Infinity, null, false);
  return GAP_WORDS.test(text) ? GAP : TEXT;
}

/** A number with sign, thousands, exponent and unit; null where the text is none. */
function written(text: string, writing: Writing): Cell | null {
  const match = text.match(NUMBER);
  if (!match) return null;
  const [, limit, sign, body, exponent, tail] = match;
  const unit = tail ? plainUnit(tail) : null;
  if (unit !== null && !UNIT.test(unit)) return null;
  const digits = plainDigits(body.trimEnd(), writing);
  if (digits === null) return null;
  const size = Number(exponent === undefined ? digits : `${digits}e${exponent}`);
  const value = (sign === "-" ? -size : size) * (unit === "%" ? 0.01 : 1);
  return number(value, unit, limit !== "");
}

/** Brings Unicode minus signs, blanks and apostrophes to their plain forms. */
export function plainSigns(text: string): string {
  return text
    .replace(/[\u2212\u2010-\u2013\ufe63\uff0d]/g, (c) => (text.length === 1 ? c : "-"))
    .replace(/[\u00a0\u2002-\u200a\u202f\u205f]/g, " ")
    .replace(/[\u2018\u2019\u02bc\u00b4`]/g, "'")
    .replace(/[\u200b\u200e\u200f\ufeff]/g, "");
}

function plainUnit(text: string): string {
  return text
    .trim()
    .replace(/^[([]\s*|\s*[)\]]$/g, "")
    .replace(/\u2126/g, "ω")
    .replace(/[\u00b5\u03bc]/g, "u")
    .replace(/\.$/, "")
    .toLowerCase();
}

function plainDigits(body: string, { decimal, thousands }: Writing): string | null {
  if (/^\d+$/.test(body)) return body;
  const at = body.lastIndexOf(decimal);
  const whole = at < 0 ? body : body.slice(0, at);
  const fraction = at < 0 ? "" : body.slice(at + 1);
  if (!/^\d*$/.test(fraction) || (decimal === "," && at >= 0 && fraction === "")) return null;
  if (/^\d*$/.test(whole))
    return whole === "" && fraction === "" ? null : `${whole || "0"}.${fraction || "0"}`;
  if (thousands === "" || thousands === decimal) return null;
  const groups = whole.split(thousands);
  if (!/^\d{1,3}$/.test(groups[0]) || !groups.slice(1).every((g) => /^\d{3}$/.test(g))) return null;
  return `${groups.join("")}.${fraction || "0"}`;
}

function number(value: number, unit: string | null, limit: boolean): Cell {
  return { kind: "number", value, unit, limit };
}

function splitBlanks(line: string): string[] {
  const cells: string[] = [];
  for (const token of line.match(/"[^"]*"|\S+/g) ?? []) {
    const last = cells.length - 1;
    if (last >= 0 && UNIT.test(plainUnit(token)) && /\d$/.test(cells[last])) cells[last] += ` ${token}`;
    else cells.push(token.replace(/^"(.*)"$/, "$1"));
  }
  return cells;
}
