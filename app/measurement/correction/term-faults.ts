import type { Warning } from "../sweep.ts";
import type { ErrorTerms } from "./three-term.ts";

/**
 * Faults that only the phase shows. Open and short exchanged turn the tracking term by half a turn and every result
 * with it: its phase is a delay that starts at 0 for f → 0 (a bridge and its cables turn nothing at direct current), so
 * a straight line through the unwrapped phase that starts near π says so. Looked for only where the sweep starts low
 * enough for that line to be drawn (START of its end) and the line fits. A detector with its leads exchanged looks the
 * same, and the sentence says that too.
 */
export function termFaults(frequencyHz: Float64Array, terms: readonly (ErrorTerms | null)[]): Warning[] {
  const line = phaseLine(frequencyHz, terms);
  if (!line || line.scatter > STRAIGHT) return [];
  const turns = line.start / (2 * Math.PI);
  if (Math.abs(turns - Math.floor(turns) - 0.5) > NEAR) return [];
  return [
    {
      code: "open-short-swapped",
      message:
        "Open and short seem to be exchanged: full reflection comes out turned by half a turn down to the lowest frequency, so an open would be taken for a short and R and X of every sweep be wrong (size and SWR are not). Nothing was exchanged back. If the bridge itself turns the phase, this is its doing.",
    },
  ];
}

/** Straight line through the unwrapped phase of the tracking term: radians at 0 Hz, and the root mean square left. */
function phaseLine(frequencyHz: Float64Array, terms: readonly (ErrorTerms | null)[]) {
  const f: number[] = [];
  const phase: number[] = [];
  terms.forEach((term, i) => {
    if (!term) return;
    const angle = Math.atan2(term.tracking.im, term.tracking.re);
    const before = phase[phase.length - 1] ?? angle;
    f.push(frequencyHz[i]);
    phase.push(angle - 2 * Math.PI * Math.round((angle - before) / (2 * Math.PI)));
  });
  const n = f.length;
  if (n < FEWEST || !(f[0] < START * f[n - 1])) return null;
  const meanF = f.reduce((sum, x) => sum + x, 0) / n;
  const meanP = phase.reduce((sum, x) => sum + x, 0) / n;
  let sxx = 0;
  let sxy = 0;
  f.forEach((x, i) => {
    sxx += (x - meanF) ** 2;
    sxy += (x - meanF) * (phase[i] - meanP);
  });
  const slope = sxy / sxx;
  const left = f.reduce((sum, x, i) => sum + (phase[i] - meanP - slope * (x - meanF)) ** 2, 0);
  return { start: meanP - slope * meanF, scatter: Math.sqrt(left / n) };
}

const FEWEST = 5;
/** The line is drawn over at most a third of its own length beyond the sweep. */
const START = 0.25;
/** Radians; ripple of source match and directivity on real bridges stays under 0.2 (common practice, no source). */
const STRAIGHT = 0.35;
/** Turns either side of the half. */
const NEAR = 0.12;
