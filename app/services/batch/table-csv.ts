import { plainText } from "../../readers/decode.ts";
import type { Wanted } from "./report.ts";

/** The table that comes with a batch: CSV with a line of headings. Pure. */

export interface TableRow {
  /** Counts from 1, as editors show it. */
  line: number;
  file: string;
  wanted: Wanted;
}

export interface ReadTable {
  rows: TableRow[];
  /** What stands in the way of the whole table; null where nothing does. */
  problem: string | null;
  remarks: string[];
}

export function readTable(bytes: Uint8Array): ReadTable {
  const plain = plainText(bytes);
  const lines = cellsOf(plain.text(0, plain.bytes.length));
  const head = lines.findIndex(({ cells }) => cells.some((cell) => cell.trim() !== ""));
  if (head < 0) return fault("The table is empty: expected a line of headings that begins with “file”.");
  const headings = lines[head].cells.map((cell) => headingOf(cell));
  const fileColumn = headings.indexOf("file");
  if (fileColumn < 0) {
    const found = lines[head].cells.map((cell) => `“${cell.trim()}”`).join(", ");
    return fault(
      `Line ${lines[head].line} of the table has no column “file”: found ${found}. The template has the headings.`,
    );
  }
  const twice = HEADINGS.find((name) => headings.filter((heading) => heading === name).length > 1);
  if (twice) return fault(`The table has two columns “${twice}”: leave one of them.`);
  const rows = lines.slice(head + 1).flatMap(({ line, cells }) => {
    if (cells.every((cell) => cell.trim() === "")) return [];
    const of = (name: (typeof HEADINGS)[number]) => unguarded(cells[headings.indexOf(name)] ?? "");
    const wanted = { title: of("title"), takenAt: of("taken at"), bench: of("bench"), step: of("step") };
    return [{ line, file: of("file"), wanted }];
  });
  const unused = lines[head].cells.filter((cell, i) => headings[i] === null && cell.trim() !== "");
  const remarks = unused.map((cell) => `The column “${cell.trim()}” of the table is not used.`);
  if (rows.length > MOST_ROWS)
    return fault(`The table has ${rows.length} rows; at most ${MOST_ROWS} go at once.`);
  return { rows, problem: null, remarks };
}

/** Whether a file among the sweeps is the table: its first line names the files and something about them. */
export function isTable(name: string, bytes: Uint8Array): boolean {
  if (!/\.(csv|tsv|txt)$/i.test(name) || bytes.length > LARGEST_TABLE) return false;
  const plain = plainText(bytes.subarray(0, 2000));
  const first = cellsOf(plain.text(0, plain.bytes.length))[0]?.cells.map(headingOf) ?? [];
  return first.includes("file") && first.some((heading) => heading !== null && heading !== "file");
}

/** Cells with the lines they begin on; quotes as in RFC 4180, parted by the sign that parts the headings. */
function cellsOf(text: string): { line: number; cells: string[] }[] {
  const parting = partingOf(text);
  const lines: { line: number; cells: string[] }[] = [];
  let [cells, cell, quoted, line, begun]: [string[], string, boolean, number, number] = [[], "", false, 1, 1];
  const endLine = () => {
    lines.push({ line: begun, cells: [...cells, cell] });
    [cells, cell, begun] = [[], "", line + 1];
  };
  for (let i = 0; i < text.length; i++) {
    const sign = text[i];
    if (quoted && sign === '"' && text[i + 1] === '"') cell += text[i++];
    else if (sign === '"' && (quoted || cell === "")) quoted = !quoted;
    else if (sign === parting && !quoted) {
      cells.push(cell);
      cell = "";
    } else if (sign === "\n" || sign === "\r") {
      if (sign === "\r" && text[i + 1] === "\n") i++;
      if (quoted) cell += "\n";
      else endLine();
      line++;
    } else cell += sign;
  }
  if (cell !== "" || cells.length > 0) endLine();
  return lines;
}

function partingOf(text: string): string {
  const first = firstLine(text);
  const counts = [",", ";", "\t"].map((sign) => first.split(sign).length);
  return [",", ";", "\t"][counts.indexOf(Math.max(...counts))];
}

/** The first line that is not empty. */
function firstLine(text: string): string {
  for (const [line] of text.matchAll(/[^\r\n]+/g)) if (/\S/.test(line)) return line;
  return "";
}

function headingOf(cell: string): (typeof HEADINGS)[number] | null {
  const word = cell.trim().toLowerCase().replace(/[_-]+/g, " ");
  if (word === "taken" || word === "date") return "taken at";
  return HEADINGS.find((name) => name === word) ?? null;
}

/** Without the apostrophe that keeps programs of tables from taking a text for a formula. */
function unguarded(cell: string): string {
  const text = cell.trim();
  return /^'[=+\-@]/.test(text) ? text.slice(1) : text;
}

function fault(problem: string): ReadTable {
  return { rows: [], problem, remarks: [] };
}

export const HEADINGS = ["file", "title", "taken at", "bench", "step"] as const;
const MOST_ROWS = 1000;
const LARGEST_TABLE = 1024 * 1024;
