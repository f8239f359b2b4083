import type { Dip } from "../../app/measurement/sweep.ts";
import type { AnalysedFile } from "./rows.ts";

const HEAD = ["dip MHz", "±", "lowest SWR", "return loss dB", "band MHz", "width MHz", "Q", "from"];

/** A file's findings for a person to read. */
export function table({ file, reading, sweep, analysis, warnings, done }: AnalysedFile): string {
  const n = sweep.frequencyHz.length;
  const lines = [
    file,
    `  ${reading.format}, ${reading.quantity}: ${n} points from ${mhz(sweep.frequencyHz[0])} to ${mhz(sweep.frequencyHz[n - 1])} MHz, ${sweep.referenceOhm} Ω`,
  ];
  if (done) lines.push(`  ${done.told}`);
  const rows = analysis.dips.map(cells);
  if (rows.length === 0) lines.push("  no dip");
  else {
    const widths = HEAD.map((head, c) => Math.max(head.length, ...rows.map((row) => row[c].length)));
    for (const row of [HEAD, ...rows])
      lines.push(`  ${row.map((text, c) => text.padStart(widths[c])).join("  ")}`);
  }
  for (const sentence of reading.assumed) lines.push(`  assumed: ${sentence}`);
  const open = done ? reading.questions.filter(({ id }) => id !== "zero-db") : reading.questions;
  for (const question of open) lines.push(`  open: ${question.text} Used: ${chosen(question)}`);
  for (const warning of warnings) lines.push(`  warning: ${warning.message}`);
  return lines.join("\n");
}

function cells(dip: Dip): string[] {
  const { bandwidth: b } = dip;
  const end = (hz: number | null) => (hz === null ? "…" : mhz(hz));
  return [
    mhz(dip.frequencyHz),
    dip.frequencyUncertaintyHz === null ? "?" : mhz(dip.frequencyUncertaintyHz),
    Number.isFinite(dip.minimumSwr) ? dip.minimumSwr.toFixed(2) : "∞",
    dip.returnLossDb.toFixed(1),
    b ? `${end(b.lowHz)}–${end(b.highHz)}` : "none",
    b ? `${b.open ? "at least " : ""}${mhz(b.widthHz)}` : "–",
    dip.q === null ? "–" : dip.q.toFixed(1),
    dip.edge ? "edge: the sweep ends here" : dip.method,
  ];
}

function mhz(hz: number): string {
  return String(Number((hz / 1e6).toFixed(6)));
}

function chosen({
  choices,
  proposed,
}: {
  choices: { value: string; label: string }[];
  proposed: string | null;
}): string {
  return choices.find((choice) => choice.value === proposed)?.label ?? proposed ?? "nothing yet";
}
