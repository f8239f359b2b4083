import { parseCell, splitCells } from "./cells.ts";
import type { Dialect } from "./dialect.ts";
import { type Heading, readHeading } from "./headings.ts";

/** What a sample of rows shows of one column. */
export interface Column {
  index: number;
  heading: Heading;
  /** Numbers of the sample in order of the file; gaps left out. */
  values: number[];
  minimum: number;
  maximum: number;
  median: number;
  /** Share of the sample's cells that are numbers. */
  filled: number;
  /** 1 ascending, -1 descending, 0 neither; repeats allowed. */
  direction: number;
  /** Unit glued to the numbers, in lower case. */
  unit: string | null;
  integers: boolean;
}

const ORDERED_SHARE = 0.9;

/** Describes every column from sampled rows, with the heading where there is one. */
export function describeColumns(rows: string[], dialect: Dialect, headings: string[]): Column[] {
  const cells = rows.map((row) => splitCells(row, dialect.delimiter));
  return Array.from({ length: dialect.columns }, (_, index) => {
    const values: number[] = [];
    let unit: string | null = null;
    for (const row of cells) {
      const cell = parseCell(row[index] ?? "", dialect);
      if (cell.kind !== "number") continue;
      if (Number.isFinite(cell.value)) values.push(cell.value);
      unit ??= cell.unit;
    }
    const heading = readHeading(headings[index] ?? "");
    return { index, heading, unit, filled: values.length / Math.max(rows.length, 1), ...shapeOf(values) };
  });
}

function shapeOf(values: number[]) {
  const sorted = Float64Array.from(values).sort();
  let up = 0;
  let down = 0;
  for (let i = 1; i < values.length; i++) {
    if (values[i] > values[i - 1]) up++;
    else if (values[i] < values[i - 1]) down++;
  }
  const steps = Math.max(values.length - 1, 1);
  return {
    values,
    minimum: sorted[0] ?? Number.NaN,
    maximum: sorted[sorted.length - 1] ?? Number.NaN,
    median: sorted[sorted.length >> 1] ?? Number.NaN,
    direction: up >= ORDERED_SHARE * steps ? 1 : down >= ORDERED_SHARE * steps ? -1 : 0,
    integers: values.every(Number.isInteger),
  };
}
