import { csvLine, textCell } from "../csv-cells.ts";
import type { BatchRow } from "./report.ts";
import { HEADINGS } from "./table-csv.ts";

/** The table that a batch takes, with what is known of its rows. Pure. */
export function batchTable(rows: readonly Pick<BatchRow, "name" | "wanted" | "leftOut">[]): string {
  const lines = rows
    .filter(({ leftOut }) => !leftOut)
    .map(({ name, wanted: { title, takenAt, bench, step } }) =>
      csvLine([name, title, takenAt, bench, step].map(textCell)),
    );
  return csvLine(HEADINGS) + lines.join("");
}
