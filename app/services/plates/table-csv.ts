import { csvLine, numberCell, textCell } from "../csv-cells.ts";
import type { PlateRecord } from "./record.ts";

/** The tables of a plate, one under the other; RFC 4180, and no cell is a formula. What is unknown is an empty cell. Pure. */
export function tablesCsv({ tables }: Pick<PlateRecord, "tables">): string {
  return tables
    .map(({ columns, rows }) => {
      const head = columns.map(({ label, unit }) => textCell(unit ? `${label} (${unit})` : label));
      return [head, ...rows.map((row) => columns.map(({ key }) => cell(row[key])))].map(csvLine).join("");
    })
    .join("\r\n");
}

function cell(value: string | number | boolean | null | undefined): string {
  if (typeof value === "number") return numberCell(value);
  return value === null || value === undefined ? "" : textCell(String(value));
}
