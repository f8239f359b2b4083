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

/** Makes the reader of plain rows: true and `row` filled, or false where a line needs care. */
function rowScanner(dialect: Dialect, wanted: Wanted) {
  const blank = dialect.delimiter === " ";
  const delimiter = dialect.delimiter.charCodeAt(0);
  const decimal = dialect.decimal.charCodeAt(0);
  const { frequencyColumn, valueColumn } = wanted;
  const secondColumn = wanted.secondColumn ?? -1;
  const last = Math.max(frequencyColumn, valueColumn, secondColumn);
  if (delimiter === decimal) return () => false;
  return (bytes: Uint8Array, from: number, to: number): boolean => {
    let i = from;
    for (let column = 0; column <= last; column++) {
      while (i < to && (bytes[i] === 32 || (blank && bytes[i] === 9))) i++;
      if (i >= to) return false;
      if (column === frequencyColumn || column === valueColumn || column === secondColumn) {
        scanNumber(bytes, i, to, decimal);
        if (!scan.ok) return false;
        i = scan.at;
        if (column === frequencyColumn) row.frequency = scan.value;
        else if (column === valueColumn) row.value = scan.value;
        else row.second = scan.value;
      } else {
        while (i < to) {
          const c = bytes[i];
          if (c === delimiter || (blank && c === 9)) break;
          if (c > 57 && c !== 69 && c !== 101) return false;
          if (c === 34) return false;
          i++;
        }
      }
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

function readCarefully(line: string, n: number, dialect: Dialect, wanted: Wanted, rows: Rows): boolean {
  const kind = lineKind(line, dialect);
  if (kind === "blank" || kind === "comment") return false;
  if (kind === "text") {
    rows.skipped.push(n);
    return false;
  }
  const cells = splitCells(line, dialect.delimiter);
  const cell = (index: number, what: string): Cell => {
    const parsed = parseCell(cells[index] ?? "", dialect);
    if (parsed.kind === "text") badNumber(line, n, dialect, index, what, cells[index]);
    return parsed;
  };
  const frequency = cell(wanted.frequencyColumn, "a frequency");
  if (frequency.kind !== "number") {
    rows.withoutFrequency.push(n);
    return false;
  }
  row.frequency = frequency.value * frequencyFactor(frequency.unit, wanted.frequencyUnit);
  row.value = numberIn(cell(wanted.valueColumn, "a number"), rows);
  if (wanted.secondColumn !== null) row.second = numberIn(cell(wanted.secondColumn, "a number"), rows);
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

function badNumber(
  line: string,
  n: number,
  dialect: Dialect,
  index: number,
  what: string,
  found: string,
): never {
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
