import * as plates from "~/db/plates.server";
import { ANALYSIS_VERSION } from "~/measurement/analyse";
import { type Difference, differencesOf } from "./differences.ts";
import { figureOf } from "./figure.ts";
import { type Recomputed, recompute } from "./recompute.server.ts";
import { parseRecord } from "./record.ts";
import { tablesOf } from "./tables.ts";

export type { Difference } from "./differences.ts";
export type CheckOutcome = { same: true } | { same: false; differences: Difference[] };

/**
 * Computes a plate again from its stored originals and their recipes alone, by the method of now, and holds every number of
 * its figure and tables against what was frozen. Changes nothing.
 */
export async function checkAgain(
  plate: Pick<plates.PlateRow, "id" | "record">,
  /** Of the method of now; another one in tests. */
  method: { version: string; analyse?: Recomputed["analyse"] } = { version: ANALYSIS_VERSION },
): Promise<CheckOutcome> {
  const record = parseRecord(plate.record);
  const done = await recompute(record, await plates.findSources(plate.id), method.analyse);
  if ("missing" in done) return { same: false, differences: done.missing };
  const figure = figureOf(done.material);
  const now = { figure, tables: tablesOf(record.kind, figure) };
  const differences = differencesOf(record, now, method.version);
  return differences.length === 0 ? { same: true } : { same: false, differences };
}
