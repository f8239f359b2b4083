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
  const { gaps, over, flat } = survey(sweep.magnitude);
  const n = sweep.magnitude.length;
  const warnings: Warning[] = [];
  const add = (code: string, message: string) => warnings.push({ code, message });
  if (n === 0) add("no-points", "The sweep has no points.");
  else if (gaps === n) add("only-gaps", "The sweep has no value at any frequency: every point is a gap.");
  else if (n - gaps < 3)
    add("too-few-points", `The sweep has ${n - gaps} usable points; a dip needs at least three.`);
  else if (flat) add("flat", "The sweep has the same value everywhere, so there is no dip in it.");
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
  for (let i = 0; i < magnitude.length; i++) {
    if (magnitude[i] <= 1) continue;
    if (Number.isNaN(magnitude[i])) gaps++;
    else over++;
  }
  return { gaps, over, flat: magnitude.every((value) => value === magnitude[0]) };
}
