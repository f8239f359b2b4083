import type { TextSpec } from "../reading.ts";
import { parseCell, splitCells } from "./cells.ts";

export interface Dialect {
  delimiter: TextSpec["delimiter"];
  decimal: TextSpec["decimal"];
  thousands: TextSpec["thousands"];
  /** Cells of a row of numbers, trailing empty ones left out. */
  columns: number;
}

const DELIMITERS: TextSpec["delimiter"][] = ["\t", ";", ",", " "];
const DECIMALS: TextSpec["decimal"][] = [".", ","];
const THOUSANDS: TextSpec["thousands"][] = ["", ",", ".", " ", "'"];
/** A writing with thousands separators must read this many times more than one without to be preferred. */
const PLAIN_ADVANTAGE = 1.02;

/**
 * Finds how rows of numbers are written from a sample of lines: the delimiter, decimal and thousands mark
 * that make most lines rows of at least two numbers with one common count of cells. What is given is kept.
 * Null where no line is such a row.
 */
export function findDialect(sample: string[], given: Partial<TextSpec> = {}): Dialect | null {
  let best: { score: number; dialect: Dialect } | null = null;
  const marks = sample.some((line) => /['\u2018\u2019\u02bc\u00b4`]/.test(line));
  for (const thousands of THOUSANDS) {
    if (given.thousands !== undefined && given.thousands !== thousands) continue;
    if (thousands === "'" && !marks) continue;
    for (const delimiter of DELIMITERS) {
      if (given.delimiter !== undefined && given.delimiter !== delimiter) continue;
      if (thousands === " " && delimiter === " ") continue;
      for (const decimal of DECIMALS) {
        if (given.decimal !== undefined && given.decimal !== decimal) continue;
        if (thousands === decimal) continue;
        const found = score(sample, { delimiter, decimal, thousands, columns: 0 });
        if (found.score > (best?.score ?? 0) * PLAIN_ADVANTAGE) best = found;
      }
    }
  }
  return best?.dialect ?? null;
}

/** Cells of a line without the empty ones at its end. */
export function rowCells(line: string, delimiter: TextSpec["delimiter"]): string[] {
  const cells = splitCells(line, delimiter);
  while (cells.length > 0 && cells[cells.length - 1].trim() === "") cells.pop();
  return cells;
}

function score(sample: string[], dialect: Dialect): { score: number; dialect: Dialect } {
  const byCount = new Map<number, number>();
  for (const line of sample) {
    const cells = rowCells(line, dialect.delimiter);
    if (cells.length < 2) continue;
    const worth = rowWorth(cells, dialect);
    if (worth > 0) byCount.set(cells.length, (byCount.get(cells.length) ?? 0) + worth);
  }
  let columns = 0;
  let total = 0;
  for (const [count, worth] of byCount) {
    total += worth;
    if (worth > (byCount.get(columns) ?? 0)) columns = count;
  }
  const common = byCount.get(columns) ?? 0;
  return { score: common + (total - common) * 0.25, dialect: { ...dialect, columns } };
}

/** 0 for a line that is no row; else 1 where every filled cell is a number, less with text among them. */
function rowWorth(cells: string[], dialect: Dialect): number {
  let numbers = 0;
  let texts = 0;
  for (const cell of cells) {
    const { kind } = parseCell(cell, dialect);
    if (kind === "number") numbers++;
    else if (kind === "text") texts++;
    if (texts > 2 && texts > numbers) return 0;
  }
  if (numbers < 2) return 0;
  return (numbers / (numbers + texts)) ** 2;
}
