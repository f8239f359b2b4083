import type { Lines } from "../lines.ts";
import { parseCell, splitCells } from "./cells.ts";
import { type Dialect, rowCells } from "./dialect.ts";
import { readHeading } from "./headings.ts";
import { withoutCommentMark } from "./segments.ts";

export interface FoundHeadings {
  /** Line of the names; 0 where there are none. */
  headerLine: number;
  /** One text a column, units from a line under the names included; empty where there are none. */
  texts: string[];
}

/** Lines above the first row that can belong to the headings: names, names of groups, units. */
const LINES_ABOVE = 4;
const UNIT_CELL =
  /^[[({<]?\s*(?:[kmg]?hz|db(?:m|uv|µv)?|ohms?|Ω|Ω|k?ohms?|deg(?:rees?)?|°|grad|rad|%|:1|-+|s|lin|u|units?|re\.?|im\.?|mg\.?|ph\.?|)\s*[\])}>]?$/i;

/**
 * Finds the headings above a segment's first row: the nearest lines that split into one text a column,
 * commented out or not. `given` fixes the line (0: none).
 */
export function findHeadings(
  lines: Lines,
  firstRow: number,
  dialect: Dialect,
  given?: number,
): FoundHeadings {
  if (given === 0) return { headerLine: 0, texts: [] };
  const rows: { line: number; cells: string[] }[] = [];
  let seen = 0;
  for (let n = firstRow - 1; n >= 1 && seen < LINES_ABOVE; n--) {
    const text = withoutCommentMark(lines.text(n));
    if (text.trim() === "") {
      if (rows.length > 0) break;
      continue;
    }
    seen++;
    const cells = headingCells(text, dialect);
    if (cells === null) {
      if (rows.length > 0) break;
      continue;
    }
    rows.unshift({ line: n, cells });
    if (n === given) break;
  }
  if (given !== undefined && !rows.some((row) => row.line === given)) {
    const cells = splitCells(withoutCommentMark(lines.text(given)), dialect.delimiter);
    return { headerLine: given, texts: cells.map((c) => c.trim()) };
  }
  return joined(rows, dialect.columns);
}

function joined(rows: { line: number; cells: string[] }[], columns: number): FoundHeadings {
  if (rows.length === 0) return { headerLine: 0, texts: [] };
  const last = rows.length - 1;
  const units = rows[last].cells.every((cell) => UNIT_CELL.test(cell.trim()));
  let names = units && last > 0 ? last - 1 : last;
  const texts: string[] = [];
  const group = rows[names - 1];
  const grouped = group !== undefined && isGroupLine(group.cells, rows[names].cells);
  let over = "";
  for (let c = 0; c < columns; c++) {
    if (grouped && group.cells[c]?.trim()) over = group.cells[c].trim();
    const parts = [grouped ? over : "", rows[names].cells[c] ?? "", names < last ? rows[last].cells[c] : ""];
    texts.push(
      parts
        .map((p) => (p ?? "").trim())
        .filter((p) => p !== "")
        .join(" "),
    );
  }
  if (grouped) names--;
  return { headerLine: rows[names].line, texts };
}

/** A line over the names that has gaps which its names reach across ("S11,,S22,"). */
function isGroupLine(group: string[], names: string[]): boolean {
  const filled = group.filter((cell) => cell.trim() !== "");
  if (filled.length === 0 || filled.length === group.length) return false;
  return names.some((name) =>
    ["real", "imaginary", "angle", "magnitude", "decibel"].includes(readHeading(name).role),
  );
}

/** The line's cells, one a column, or null where it is no line of headings. */
function headingCells(text: string, dialect: Dialect): string[] | null {
  for (const { cells, sure } of splits(text, dialect)) {
    while (cells.length > dialect.columns && cells[cells.length - 1].trim() === "") cells.pop();
    if (cells.length !== dialect.columns) continue;
    if (cells.some((cell) => parseCell(cell, dialect).kind === "number")) continue;
    if (cells.every((cell) => cell.trim() === "")) continue;
    const roles = sure ? [] : cells.map((cell) => readHeading(cell).role);
    const telling = roles.includes("frequency") && roles.some((r) => r !== "frequency" && r !== "unknown");
    if (sure || telling) return cells;
  }
  return null;
}

/** Ways to part a line into headings; those that are not the table's own must name a frequency and something else. */
function* splits(text: string, dialect: Dialect): Generator<{ cells: string[]; sure: boolean }> {
  const line = text.trim();
  yield { cells: splitCells(text, dialect.delimiter), sure: true };
  const short = rowCells(text, dialect.delimiter);
  if (dialect.delimiter !== " " && short.length > 1 && short.length < dialect.columns)
    yield { cells: [...short, ...Array(dialect.columns - short.length).fill("")], sure: true };
  const bracketed = /"[^"]*"|[^\s([]+(?:\s*[([][^)\]]*[)\]])?|[([][^)\]]*[)\]]/g;
  for (const cells of [
    line.split("\t"),
    line.split(/\s{2,}|\t/),
    line.split(/[;|]/),
    line.split(","),
    line.match(bracketed) ?? [],
    line.split(/\s+/),
  ])
    yield { cells, sure: false };
}
