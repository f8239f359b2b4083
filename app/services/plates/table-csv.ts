import { csvLine } from "../csv-line.ts";
import type { PlateRecord } from "./record.ts";

/** The tables of a plate, one under the other; RFC 4180, and no cell is a formula. What is unknown is an empty cell. Pure. */
export function tablesCsv({ tables }: Pick<PlateRecord, "tables">): string {
  const parts = tables.map(({ columns, rows }) => [
    csvLine(columns.map(({ label, unit }) => (unit ? `${label} (${unit})` : label))),
    ...rows.map((row) => csvLine(columns.map(({ key }) => cell(row[key])))),
  ]);
  return parts.map((lines) => `${lines.join("\r\n")}\r\n`).join("\r\n");
}

function cell(value: string | number | boolean | null | undefined): string | number {
  if (value === null || value === undefined) return "";
  return typeof value === "boolean" ? String(value) : value;
}
