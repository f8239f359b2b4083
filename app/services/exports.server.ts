import { gammaToReturnLossDb, gammaToSwr } from "../measurement/reflection.ts";
import type { Sweep } from "../measurement/sweep.ts";

/** A sweep as other programs read it. */

/**
 * CSV with a header line; a gap is an empty cell, an SWR without a number too. RFC 4180 line ends. With `limits` of abs Γ the
 * low and high of return loss and SWR that they allow; empty where they are not known.
 */
export function toCsv(sweep: Sweep, limits?: { low: Float64Array; high: Float64Array }): string {
  const complex = sweep.gammaRe !== undefined && sweep.gammaIm !== undefined;
  const head = ["frequency_hz", "gamma_magnitude", "return_loss_db", "swr"];
  if (complex) head.push("gamma_real", "gamma_imaginary");
  if (limits) head.push("return_loss_low_db", "return_loss_high_db", "swr_low", "swr_high");
  const lines = [head.join(",")];
  for (let i = 0; i < sweep.frequencyHz.length; i++) {
    const magnitude = sweep.magnitude[i];
    const cells = [
      sweep.frequencyHz[i],
      cell(magnitude),
      cell(gammaToReturnLossDb(magnitude)),
      cell(gammaToSwr(magnitude)),
    ];
    if (complex) cells.push(cell(sweep.gammaRe?.[i] ?? Number.NaN), cell(sweep.gammaIm?.[i] ?? Number.NaN));
    if (limits) cells.push(...limitCells(limits.low[i], limits.high[i]));
    lines.push(cells.join(","));
  }
  return `${lines.join("\r\n")}\r\n`;
}

/**
 * Touchstone 1.1, one port, real and imaginary, in hertz; gaps are left out, as the format has none.
 * Source: IBIS Open Forum, Touchstone File Format Specification, Rev 1.1.
 */
export function toTouchstone(sweep: Sweep, comments: string[]): string {
  if (!sweep.gammaRe || !sweep.gammaIm) throw new Error("Touchstone needs phase, and this sweep has none.");
  const lines = [...comments.map((comment) => `! ${plain(comment)}`), `# Hz S RI R ${sweep.referenceOhm}`];
  for (let i = 0; i < sweep.frequencyHz.length; i++) {
    if (Number.isNaN(sweep.gammaRe[i]) || Number.isNaN(sweep.gammaIm[i])) continue;
    lines.push(`${sweep.frequencyHz[i]} ${sweep.gammaRe[i]} ${sweep.gammaIm[i]}`);
  }
  return `${lines.join("\r\n")}\r\n`;
}

/** The format's own characters only. */
function plain(text: string): string {
  return text
    .replace(/\u2009/g, " ")
    .replace(/[“”]/g, '"')
    .replace(/–/g, "-")
    .replace(/[^\x20-\x7e]/g, "?");
}

/** The larger abs Γ gives the lower return loss and the higher SWR. */
function limitCells(low: number, high: number): (number | string)[] {
  return [
    cell(gammaToReturnLossDb(high)),
    cell(gammaToReturnLossDb(low)),
    cell(gammaToSwr(low)),
    cell(gammaToSwr(high)),
  ];
}

function cell(value: number): number | string {
  return Number.isFinite(value) ? value : "";
}
