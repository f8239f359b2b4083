import type { Lines } from "../lines.ts";
import { fail } from "../problem.ts";
import type { TextSpec } from "../reading.ts";
import { type Candidate, findCandidates } from "./candidates.ts";
import { type Column, describeColumns } from "./columns.ts";
import { type Dialect, findDialect } from "./dialect.ts";
import { frequencyColumns } from "./frequency.ts";
import { findHeadings } from "./heading-lines.ts";
import { findSegments, lineKind, type Segment } from "./segments.ts";

/** What is known of a table before its rows are read. */
export interface Table {
  dialect: Dialect;
  /** The tables of the file that are large enough to be a sweep. */
  blocks: Segment[];
  block: Segment;
  headerLine: number;
  headings: string[];
  columns: Column[];
  frequencies: Column[];
  candidates: Candidate[];
  /** Lines above the table, comment marks kept. */
  preamble: string[];
}

/** Lines that the search for the delimiter looks at. */
const SAMPLE_LINES = 300;
const SAMPLE_CHUNKS = 10;
const SAMPLE_ROWS = 200;
const PREAMBLE_LINES = 400;
/** Rows that a table without a heading for its frequencies must have, so that no two lines of prose pass for a sweep. */
const LEAST_BARE_ROWS = 3;
/** A table with fewer rows than this share of the largest is a list beside the sweep, not a sweep. */
const LEAST_BLOCK_SHARE = 0.2;

/** Finds the table of a text file and what its columns hold. Fails with "not-a-sweep" and "no-frequency-column". */
export function findTable(lines: Lines, given: Partial<TextSpec>): Table {
  const fromLine = given.firstDataLine ?? 1;
  const dialect = findDialect(
    sample(lines, fromLine, lines.count, SAMPLE_LINES),
    withSeparatorLine(lines, given),
  );
  if (dialect === null || dialect.columns < 2) return notASweep(lines);
  const segments = findSegments(lines, dialect);
  const largest = segments.reduce((most, s) => Math.max(most, s.rows), 0);
  if (largest < 2) return notASweep(lines);
  const blocks = segments.filter((s) => s.rows >= Math.max(2, largest * LEAST_BLOCK_SHARE));
  const block =
    given.firstDataLine === undefined ? blocks[0] : startingAt(segments, given.firstDataLine, lines);
  const { headerLine, texts: headings } = findHeadings(lines, block.firstLine, dialect, given.headerLine);
  const rows = sample(lines, block.firstLine, block.lastLine, SAMPLE_ROWS).filter(
    (l) => lineKind(l, dialect) === "row",
  );
  if (commaTwice(rows, dialect)) ambiguousComma(block);
  const columns = describeColumns(rows, dialect, headings);
  const asked = given.frequencyColumn;
  if (asked !== undefined && columns[asked] === undefined)
    fail("no-such-column", `The table has ${columns.length} columns; column ${asked + 1} was asked for.`);
  const preamble = preambleOf(lines, block.firstLine);
  const frequencies =
    given.frequencyColumn === undefined ? frequencyColumns(columns) : [columns[given.frequencyColumn]];
  const named = frequencies[0]?.heading.role === "frequency" || given.frequencyColumn !== undefined;
  if (!named && block.rows < LEAST_BARE_ROWS) return notASweep(lines);
  if (frequencies.length === 0 || frequencies[0] === undefined) return noFrequency(block, columns);
  const candidates = findCandidates(
    columns,
    frequencies.map((c) => c.index),
    {
      levels: [...preamble, ...headings].some((text) => /\bdb(?:m|uv|µv|μv)\b/i.test(text)),
      zeroDbGiven: typeof given.zeroDb === "number",
    },
  );
  return { dialect, blocks, block, headerLine, headings, columns, frequencies, candidates, preamble };
}

/** Up to `most` lines of a stretch that are not blank, in runs spread over it. */
export function sample(lines: Lines, first: number, last: number, most: number): string[] {
  const taken: string[] = [];
  const add = (n: number) => {
    const text = lines.text(n);
    if (text.trim() !== "") taken.push(text);
  };
  const total = last - first + 1;
  if (total <= most) for (let n = first; n <= last; n++) add(n);
  else {
    const run = Math.floor(most / SAMPLE_CHUNKS);
    for (let k = 0; k < SAMPLE_CHUNKS; k++) {
      const start = first + Math.floor(((total - run) * k) / (SAMPLE_CHUNKS - 1));
      for (let n = start; n < start + run; n++) add(n);
    }
  }
  return taken;
}

/** Spreadsheets may name the delimiter on the first line: "sep=;". */
function withSeparatorLine(lines: Lines, given: Partial<TextSpec>): Partial<TextSpec> {
  const named = lines.text(1).match(/^\s*"?sep=([;,\t|])"?\s*$/i);
  return named && named[1] !== "|" ? { delimiter: named[1] as TextSpec["delimiter"], ...given } : given;
}

function startingAt(segments: Segment[], line: number, lines: Lines): Segment {
  const inside = segments.find((s) => s.lastLine >= line);
  if (!inside)
    return fail(
      "not-a-sweep",
      `No rows of numbers begin at line ${line} or after it.`,
      Math.min(line, lines.count),
    );
  return { ...inside, firstLine: Math.max(inside.firstLine, line) };
}

function preambleOf(lines: Lines, firstRow: number): string[] {
  const taken: string[] = [];
  for (let n = 1; n < firstRow && taken.length < PREAMBLE_LINES; n++) taken.push(lines.text(n));
  return taken;
}

function notASweep(lines: Lines): never {
  let line = 1;
  while (line < lines.count && lines.text(line).trim() === "") line++;
  return fail(
    "not-a-sweep",
    "No rows of numbers were found: expected one line a point, with a frequency and at least one value parted by comma, semicolon, tab or blanks.",
    line,
    1,
  );
}

/** "140,20,-5,123": whole numbers in pairs, the second of them with leading zeros, are decimal commas between commas. */
function commaTwice(rows: string[], { delimiter, decimal, columns }: Dialect): boolean {
  if (delimiter !== "," || decimal !== "." || columns < 4 || columns % 2 === 1) return false;
  const cells = rows.map((row) => row.split(",").map((cell) => cell.trim()));
  if (!cells.every((row) => row.every((cell, i) => (i % 2 === 0 ? /^-?\d+$/ : /^\d+$/).test(cell))))
    return false;
  return cells.some((row) => row.some((cell, i) => i % 2 === 1 && /^0\d/.test(cell)));
}

function ambiguousComma(block: Segment): never {
  return fail(
    "ambiguous-comma",
    `Line ${block.firstLine}: the comma parts the cells and marks the decimals at once; expected another delimiter, or quotes. Export the file with semicolons or tabs.`,
    block.firstLine,
    1,
  );
}

function noFrequency(block: Segment, columns: Column[]): never {
  return fail(
    "no-frequency-column",
    `None of the ${columns.length} columns of the table that begins at line ${block.firstLine} can be a frequency: expected one that only rises or only falls.`,
    block.firstLine,
    1,
  );
}
