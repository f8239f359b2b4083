import type { TableRow } from "../../db/dip-table.server.ts";
import { csvLine, numberCell, textCell } from "../csv-cells.ts";
import { type BandOfDip, bandOf, type ProjectBands } from "./bands.ts";

/** The table of dips as CSV: units in the names, unknown cells empty, nothing rounded. Pure. */

export const DIPS_CSV_HEAD = csvLine([
  "dip",
  "sweep",
  "sweep_title",
  "taken_at_utc",
  "came_in_at_utc",
  "band",
  "in_design_band",
  "frequency_hz",
  "frequency_uncertainty_hz",
  "swr",
  "swr_low",
  "swr_high",
  "swr_noise_low",
  "swr_noise_high",
  "return_loss_db",
  "return_loss_low_db",
  "return_loss_high_db",
  "bandwidth_swr_limit",
  "bandwidth_low_hz",
  "bandwidth_high_hz",
  "bandwidth_width_hz",
  "bandwidth_is_at_least",
  "q",
  "q_low",
  "q_high",
  "at_edge_of_sweep",
  "verdict",
  "verdict_text",
  "trail",
  "trail_name",
  "notes",
]);

export function dipCsvLine(row: TableRow, bands: ProjectBands): string {
  const { numbers: dip } = row;
  const width = dip.bandwidth;
  return csvLine([
    textCell(row.publicId),
    textCell(row.sweepPublicId),
    textCell(row.sweepTitle),
    row.takenAt?.toISOString() ?? "",
    row.createdAt.toISOString(),
    ...bandCells(bandOf(dip.frequencyHz, bands)),
    numberCell(dip.frequencyHz),
    numberCell(dip.frequencyUncertaintyHz),
    numberCell(dip.minimumSwr),
    numberCell(dip.minimumSwrLow),
    numberCell(dip.minimumSwrHigh),
    numberCell(dip.minimumSwrNoiseLow),
    numberCell(dip.minimumSwrNoiseHigh),
    numberCell(dip.returnLossDb),
    numberCell(dip.returnLossLowDb),
    numberCell(dip.returnLossHighDb),
    numberCell(width?.limitSwr ?? null),
    numberCell(width?.lowHz ?? null),
    numberCell(width?.highHz ?? null),
    numberCell(width?.widthHz ?? null),
    width ? yesNo(width.open) : "",
    numberCell(dip.q),
    numberCell(dip.qLimits?.low ?? dip.qLow),
    numberCell(dip.qLimits?.high ?? dip.qHigh),
    yesNo(dip.edge),
    row.verdict,
    textCell(row.verdictText),
    textCell(row.trailPublicId),
    textCell(row.trailName),
    numberCell(row.noteCount),
  ]);
}

function bandCells({ name, design }: BandOfDip): string[] {
  return [textCell(name ?? "outside"), yesNo(design)];
}

function yesNo(value: boolean): string {
  return value ? "yes" : "no";
}
