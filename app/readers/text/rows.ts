import type { FrequencyUnit } from "../../measurement/sweep.ts";
import type { Lines } from "../lines.ts";
import { scan, scanNumber } from "../number-bytes.ts";
import { fail } from "../problem.ts";
import { MAX_POINTS } from "../reading.ts";
import { UNIT_HZ } from "../units.ts";
import { type Cell, cellColumn, parseCell, splitCells } from "./cells.ts";
import type { Dialect } from "./dialect.ts";
import { lineKind, type Segment } from "./segments.ts";

export interface Wanted {
  frequencyColumn: number;
  frequencyUnit: FrequencyUnit;
  valueColumn: number;
  secondColumn: number | null;
}

/** The wanted columns of a table, in the order of the file. NaN in a value is a gap. */
export interface Rows {
  count: number;
  /** In the file's unit. */
  frequency: Float64Array;
  value: Float64Array;
  second: Float64Array;
  line: Uint32Array;
  gaps: number;
  /** Values written as a limit (">99"). */
  limits: number;
  /** Lines of the table without a frequency, which were left out. */
  withoutFrequency: number[];
  skipped: number[];
}

const QUOTE = 34;
const row = { frequency: Number.NaN, value: Number.NaN, second: Number.NaN };

/**
 * Reads the rows of segments. Plain rows are read from their bytes; any other row is read cell by cell.
 * Fails with "bad-number" (line, column) and "too-many-points".
 */
export function readRows(lines: Lines, segments: Segment[], dialect: Dialect, wanted: Wanted): Rows {
  const most = segments.reduce((sum, s) => sum + s.lastLine - s.firstLine + 1, 0);
  const size = Math.min(most, MAX_POINTS + 1);
  const rows: Rows = {
    count: 0,
    frequency: new Float64Array(size),
    value: new Float64Array(size),
    second: new Float64Array(wanted.secondColumn === null ? 0 : size),
    line: new Uint32Array(size),
    gaps: 0,
    limits: 0,
    withoutFrequency: [],
    skipped: [],
  };
  const scanRow = rowScanner(dialect, wanted);
  for (const segment of segments) {
    for (let n = segment.firstLine; n <= segment.lastLine; n++) {
      if (
        !scanRow(lines.bytes, lines.start(n), lines.end(n)) &&
        !readCarefully(lines.text(n), n, dialect, wanted, rows)
      )
        continue;
      if (rows.count === MAX_POINTS) tooMany(n);
      const i = rows.count++;
      rows.frequency[i] = row.frequency;
      rows.value[i] = row.value;
      if (wanted.secondColumn !== null) rows.second[i] = row.second;
      rows.line[i] = n;
      if (Number.isNaN(row.value) || (wanted.secondColumn !== null && Number.isNaN(row.second))) rows.gaps++;
    }
  }
  return rows;
}

/** Makes the reader of plain rows, quoted or not: true and `row` filled, or false where a line needs care. */
function rowScanner(dialect: Dialect, wanted: Wanted) {
  const blank = dialect.delimiter === " ";
  const delimiter = dialect.delimiter.charCodeAt(0);
  const decimal = dialect.decimal.charCodeAt(0);
  const bareDecimal = delimiter === decimal ? -1 : decimal;
  const { frequencyColumn, valueColumn } = wanted;
  const secondColumn = wanted.secondColumn ?? -1;
  const last = Math.max(frequencyColumn, valueColumn, secondColumn);
  return (bytes: Uint8Array, from: number, to: number): boolean => {
    let i = from;
    for (let column = 0; column <= last; column++) {
      while (i < to && (bytes[i] === 32 || (blank && bytes[i] === 9))) i++;
      if (i >= to) return false;
      const quoted = bytes[i] === QUOTE && !blank;
      if (quoted) i++;
      if (column === frequencyColumn || column === valueColumn || column === secondColumn) {
        scanNumber(bytes, i, to, quoted ? decimal : bareDecimal);
        if (!scan.ok) return false;
        i = scan.at;
        if (column === frequencyColumn) row.frequency = scan.value;
        else if (column === valueColumn) row.value = scan.value;
        else row.second = scan.value;
      } else {
        for (; i < to; i++) {
          const c = bytes[i];
          if (quoted ? c === QUOTE : c === delimiter || (blank && c === 9)) break;
          if (c === QUOTE || (c > 58 && c !== 69 && c !== 101)) return false;
        }
      }
      if (quoted && bytes[i++] !== QUOTE) return false;
      if (blank) {
        if (i < to && bytes[i] !== 32 && bytes[i] !== 9) return false;
      } else {
        while (i < to && bytes[i] === 32) i++;
        if (i < to && bytes[i] !== delimiter) return false;
        i++;
      }
    }
    if (!blank) return true;
    while (i < to && (bytes[i] === 32 || bytes[i] === 9)) i++;
    return i >= to || bytes[i] <= 57;
  };
}

/** Reads a row cell by cell into `row`; false where the line is no row, or has no frequency. */
function readCarefully(line: string, n: number, dialect: Dialect, wanted: Wanted, rows: Rows): boolean {
  const cells = splitCells(line, dialect.delimiter);
  const cell = (index: number) => parseCell(cells[index] ?? "", dialect);
  const frequency = cell(wanted.frequencyColumn);
  const value = cell(wanted.valueColumn);
  const second = wanted.secondColumn === null ? null : cell(wanted.secondColumn);
  if (frequency.kind !== "number" || value.kind === "text" || second?.kind === "text") {
    const kind = lineKind(line, dialect);
    if (kind === "text") rows.skipped.push(n);
    if (kind === "text" || kind === "blank" || kind === "comment") return false;
    if (frequency.kind === "text") badNumber(line, n, dialect, wanted.frequencyColumn, "a frequency");
    if (value.kind === "text") badNumber(line, n, dialect, wanted.valueColumn, "a number");
    if (second?.kind === "text") badNumber(line, n, dialect, wanted.secondColumn ?? 0, "a number");
  }
  if (frequency.kind !== "number") {
    rows.withoutFrequency.push(n);
    return false;
  }
  row.frequency = frequency.value * frequencyFactor(frequency.unit, wanted.frequencyUnit);
  row.value = numberIn(value, rows);
  if (second !== null) row.second = numberIn(second, rows);
  return true;
}

function numberIn(cell: Cell, rows: Rows): number {
  if (cell.kind !== "number") return Number.NaN;
  if (cell.limit) rows.limits++;
  return cell.unit !== null && /^k(?:ohms?|ω)$/.test(cell.unit) ? cell.value * 1000 : cell.value;
}

function frequencyFactor(unit: string | null, column: FrequencyUnit): number {
  if (unit === null) return 1;
  const own = (Object.keys(UNIT_HZ) as FrequencyUnit[]).find((u) => u.toLowerCase() === unit);
  return own === undefined ? 1 : UNIT_HZ[own] / UNIT_HZ[column];
}

function badNumber(line: string, n: number, dialect: Dialect, index: number, what: string): never {
  const found = splitCells(line, dialect.delimiter)[index] ?? "";
  const mark = dialect.decimal === "," ? "decimal comma" : "decimal point";
  return fail(
    "bad-number",
    `Line ${n}: expected ${what} (with a ${mark}) in column ${index + 1} of the table, found "${found.trim().slice(0, 40)}".`,
    n,
    cellColumn(line, dialect.delimiter, index),
  );
}

function tooMany(line: number): never {
  return fail(
    "too-many-points",
    `The file has more than ${MAX_POINTS} points: the limit is reached at line ${line}. Export the sweep with fewer points.`,
    line,
  );
}
