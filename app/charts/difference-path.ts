import type { FrequencyScale } from "./axis.ts";
import type { ValueTick } from "./value-axis.ts";

/** A scale around zero that holds every value: at least ±3 dB, whole dB at its ends. */
export function differenceTicks(
  db: ArrayLike<number>,
  heightPx: number,
): { ticks: ValueTick[]; yOf: (db: number) => number } {
  let most = LEAST_DB;
  for (let i = 0; i < db.length; i++) most = Math.max(most, Math.abs(db[i]) || 0);
  const step = STEPS_DB.find((size) => size * 2 >= most) ?? Math.ceil(most / 20) * 10;
  const top = step * Math.ceil(Math.min(most, MOST_DB) / step);
  const yOf = (value: number) => (heightPx / 2) * (1 - Math.max(-1, Math.min(1, value / top)));
  const values = [top, top / 2, 0, -top / 2, -top];
  const ticks = values.map((value) => ({ y: yOf(value), label: labelOf(value, value === top) }));
  return { ticks, yOf };
}

/** The line and the area between it and zero; in each column the lowest and the highest value are kept. */
export function differencePath(
  frequencyHz: ArrayLike<number>,
  db: ArrayLike<number>,
  scale: FrequencyScale,
  width: number,
  yOf: (db: number) => number,
): { line: string; area: string } {
  let line = "";
  let area = "";
  for (const run of runsOf(frequencyHz, db, scale)) {
    const points = run.map(({ fraction, value }) => `${round(fraction * width)} ${round(yOf(value))}`);
    if (points.length === 0) continue;
    const [first, last] = [run[0].fraction * width, run[run.length - 1].fraction * width];
    line += `M${points.join("L")}`;
    area += `M${round(first)} ${round(yOf(0))}L${points.join("L")}L${round(last)} ${round(yOf(0))}Z`;
  }
  return { line, area };
}

interface Point {
  fraction: number;
  value: number;
}

function runsOf(frequencyHz: ArrayLike<number>, db: ArrayLike<number>, scale: FrequencyScale): Point[][] {
  const runs: Point[][] = [[]];
  let column: Point[] = [];
  const flush = () => {
    if (column.length === 0) return;
    const sorted = [...column].sort((a, b) => a.value - b.value);
    const kept = new Set([column[0], sorted[0], sorted[sorted.length - 1], column[column.length - 1]]);
    runs[runs.length - 1].push(...column.filter((point) => kept.has(point)));
    column = [];
  };
  for (let i = 0; i < frequencyHz.length; i++) {
    if (frequencyHz[i] < scale.fromHz || frequencyHz[i] > scale.toHz) continue;
    if (!Number.isFinite(db[i])) {
      flush();
      runs.push([]);
      continue;
    }
    const fraction = scale.fractionOf(frequencyHz[i]);
    if (column.length > 0 && Math.floor(column[0].fraction * COLUMNS) !== Math.floor(fraction * COLUMNS))
      flush();
    column.push({ fraction, value: db[i] });
  }
  flush();
  return runs;
}

function labelOf(value: number, withUnit: boolean): string {
  const text = value === 0 ? "0" : `${value > 0 ? "+" : "−"}${Math.abs(value)}`;
  return withUnit ? `${text} dB` : text;
}

function round(value: number): number {
  return Math.round(value * 100) / 100;
}

const COLUMNS = 400;
const LEAST_DB = 3;
/** Deeper differences are of a dip that one sweep has and the other has not: their depth says little. */
const MOST_DB = 40;
const STEPS_DB = [2, 4, 6, 10, 20];
