import { completeDip } from "~/measurement/dips/complete";
import type { analyses } from "./schema/index.ts";

/** A row whose analysis has its dips in the current method's shape, whichever version stored them. */
export function withWholeDips<Row extends { analysis: typeof analyses.$inferSelect | null }>(row: Row): Row {
  if (!row.analysis) return row;
  return { ...row, analysis: { ...row.analysis, dips: row.analysis.dips.map(completeDip) } };
}
