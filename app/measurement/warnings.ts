import type { AnalysisSettings, Dip, Sweep, Warning } from "./sweep.ts";

export interface WarningContext {
  /** Prominence that was asked of a dip, dB. */
  threshold: number;
  settings: AnalysisSettings;
  /** σ, dB of return loss. */
  noise: number;
  /** More dips than were fitted. */
  unfitted: boolean;
}

/** What a reader of the numbers must know, a code and a plain sentence each, in order of weight. */
export function warningsOf(sweep: Sweep, dips: Dip[], context: WarningContext, notes: Warning[]): Warning[] {
  const { gaps, over, lowest, highest } = survey(sweep.magnitude);
  const n = sweep.magnitude.length;
  const warnings: Warning[] = [];
  const add = (code: string, message: string) => warnings.push({ code, message });
  if (n === 0) add("no-points", "The sweep has no points.");
  else if (gaps === n) add("only-gaps", "The sweep has no value at any frequency: every point is a gap.");
  else if (n - gaps < 3)
    add("too-few-points", `The sweep has ${n - gaps} usable points; a dip needs at least three.`);
  else if (highest === lowest)
    add("flat", "The sweep has the same value everywhere, so there is no dip in it.");
  if (gaps > 0 && gaps < n)
    add("gaps", `${gaps} of ${n} points are gaps; no dip or band reaches across one.`);
  if (over > 0)
    add(
      "over-unity",
      `${over} of ${n} points return more than was sent (reflection over 1): noise or calibration. They are kept, marked, and have no SWR.`,
    );
  if (context.threshold > context.settings.minimumProminenceDb)
    add(
      "noisy",
      `The noise is ${context.noise.toFixed(2)} dB, so a dip must stand out by ${context.threshold.toFixed(1)} dB, more than the ${context.settings.minimumProminenceDb} dB of the settings.`,
    );
  if (dips.some((dip) => dip.edge)) add("edge-dip", "The sweep ends here: its lowest point may lie outside.");
  if (dips.some((dip) => dip.bandwidth?.shared))
    add(
      "shared-band",
      "Two or more dips lie in one stretch under the limit; its width belongs to none of them alone.",
    );
  if (dips.some((dip) => !dip.edge && dip.bandwidth?.open))
    add("open-band", "The sweep or its values end inside a band: that width is at least what is told.");
  if (dips.some((dip) => dip.advice))
    add("few-points-in-dip", "A dip is narrower than four frequency steps: sweep it again as advised.");
  if (context.unfitted)
    add("many-dips", `${dips.length} dips were found; only the most prominent were fitted.`);
  return [...warnings, ...notes];
}

function survey(magnitude: Float64Array) {
  let gaps = 0;
  let over = 0;
  let lowest = Number.POSITIVE_INFINITY;
  let highest = Number.NEGATIVE_INFINITY;
  for (let i = 0; i < magnitude.length; i++) {
    const value = magnitude[i];
    if (Number.isNaN(value)) gaps++;
    else {
      if (value > 1) over++;
      if (value < lowest) lowest = value;
      if (value > highest) highest = value;
    }
  }
  return { gaps, over, lowest, highest };
}
