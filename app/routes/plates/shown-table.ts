import type { PlateTable } from "~/services/plates/record";

export interface ShownTable {
  title: string;
  columns: { key: string; label: string; numeric: boolean }[];
  rows: Record<string, string>[];
}

type Cell = PlateTable["rows"][number][string];
type Column = PlateTable["columns"][number];

/**
 * A table of a record as people read it: a number with its limits in one cell, `1.21 (1.12–1.31)`, or with its
 * half-width, `7.0812 MHz ± 0.9 kHz`. Columns that say nothing in any row are left out; what is not known is said. Pure.
 */
export function shownTable({ title, columns, rows }: PlateTable): ShownTable {
  const byKey = new Map(columns.map((column) => [column.key, column]));
  const folded = (key: string) =>
    SUFFIXES.some((suffix) => key.endsWith(suffix) && byKey.has(key.slice(0, -suffix.length)));
  // A width that is none everywhere says something; a remark that is none everywhere does not.
  const silent = (key: string) =>
    rows.length === 0 || (!byKey.has(`${key}Low`) && rows.every((row) => isNothing(row[key])));
  const kept = columns.filter(({ key }) => !folded(key) && !silent(key));
  return {
    title,
    columns: kept.map(({ key, label }) => ({
      key,
      label: headOf(label, byKey.get(key), rows),
      numeric: rows.some((row) => typeof row[key] === "number"),
    })),
    rows: rows.map((row) =>
      Object.fromEntries(kept.map((column) => [column.key, cellOf(row, column, byKey)])),
    ),
  };
}

function cellOf(
  row: Record<string, Cell>,
  { key, unit }: Column,
  byKey: ReadonlyMap<string, Column>,
): string {
  const value = row[key];
  if (value === null || value === undefined) return "unknown";
  if (typeof value !== "number") return value === "" ? "-" : String(value);
  const half = byKey.get(`${key}Half`);
  if (half) {
    const by = row[half.key];
    if (typeof by !== "number") return withUnit(value, unit);
    const shown = value.toFixed(decimalsFor(value, unit, by, half.unit));
    return `${withUnit(shown, unit)} ±\u00a0${withUnit(by, half.unit)}`;
  }
  const figures = (one: number) => number(withZeros(one, decimalsOf(key, unit, one)));
  if (!byKey.has(`${key}Low`) || !byKey.has(`${key}High`)) return figures(value);
  const [low, high] = [row[`${key}Low`], row[`${key}High`]];
  if (low === null && high === null) return `${figures(value)} (limits unknown)`;
  const end = (cell: Cell | undefined) =>
    typeof cell === "number" ? figures(cell) : (cell?.toString() ?? "unknown");
  return `${figures(value)} (${end(low)}–${end(high)})`;
}

/** The unit stands in the head, except where the cells name it themselves. */
function headOf(label: string, column: Column | undefined, rows: PlateTable["rows"]): string {
  if (!column?.unit || rows.some((row) => `${column.key}Half` in row)) return label;
  return `${label}, ${column.unit}`;
}

function isNothing(cell: Cell | undefined): boolean {
  return typeof cell === "string" && NOTHING.includes(cell);
}

/** A record has no zeros at the end of a number: so many decimals are known all the same. */
function decimalsOf(key: string, unit: string, value: number): number {
  if (unit === "dB") return 1;
  if (key === "swr") return value < 10 ? 2 : 1;
  return 0;
}

function withZeros(value: number, decimals: number): string {
  return ownDecimals(value) < decimals ? value.toFixed(decimals) : String(value);
}

function ownDecimals(value: number): number {
  return String(value).split(".")[1]?.length ?? 0;
}

/** So many decimals that the last is of the half-width's size, and none that the record has is lost. */
function decimalsFor(value: number, unit: string, half: number, halfUnit: string): number {
  const own = ownDecimals(value);
  const halfInUnit = (half * (IN_HZ[halfUnit] ?? 1)) / (IN_HZ[unit] ?? 1);
  return halfInUnit > 0 ? Math.min(MOST_DECIMALS, Math.max(own, -Math.floor(Math.log10(halfInUnit)))) : own;
}

function withUnit(value: number | string, unit: string): string {
  return unit ? `${number(value)}\u2009${unit}` : number(value);
}

function number(value: number | string): string {
  return String(value).replace("-", "−");
}

const SUFFIXES = ["Half", "Low", "High"];
const NOTHING = ["", "-", "none"];
const IN_HZ: Record<string, number> = { Hz: 1, kHz: 1e3, MHz: 1e6, GHz: 1e9 };
/** A tenth of a hertz of a megahertz. */
const MOST_DECIMALS = 7;
