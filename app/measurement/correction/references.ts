import type { BenchGiven, BenchStandards } from "../bench.ts";
import type { Sweep } from "../sweep.ts";

/** The sweeps of a bench's standards; levels or complex, as the files are. */
export interface BenchReferences {
  open?: Sweep;
  short?: Sweep;
  load?: Sweep;
  /** Source straight to the detector, without the bridge. */
  through?: Sweep;
}

/** A bench as a correction needs it. */
export interface BenchForCorrection {
  references: BenchReferences;
  standards: BenchStandards;
  given: BenchGiven;
}

export type ReferenceRole = keyof BenchReferences;

export interface Span {
  /** Hz; the range that all of the sweeps cover. `fromHz` over `toHz`: none. */
  fromHz: number;
  toHz: number;
}

/** The range that all of these sweeps cover. No sweep at all covers everything; one without points nothing. */
export function commonSpan(sweeps: readonly (Pick<Sweep, "frequencyHz"> | undefined)[]): Span {
  let fromHz = Number.NEGATIVE_INFINITY;
  let toHz = Number.POSITIVE_INFINITY;
  for (const sweep of sweeps) {
    if (!sweep) continue;
    const n = sweep.frequencyHz.length;
    fromHz = Math.max(fromHz, n > 0 ? sweep.frequencyHz[0] : Number.POSITIVE_INFINITY);
    toHz = Math.min(toHz, n > 0 ? sweep.frequencyHz[n - 1] : Number.NEGATIVE_INFINITY);
  }
  return { fromHz, toHz };
}

/**
 * Values given at ascending frequencies (Hz, length n), read at other ascending frequencies by straight lines between
 * neighbours. NaN outside the range, where a neighbour that is needed is a gap, and nowhere else: nothing is
 * extrapolated. A frequency that both have keeps its value to the last bit.
 */
export function interpolate(fromHz: Float64Array, values: Float64Array, atHz: Float64Array): Float64Array {
  const out = new Float64Array(atHz.length).fill(Number.NaN);
  const last = fromHz.length - 1;
  let k = 0;
  for (let i = 0; i < atHz.length; i++) {
    const f = atHz[i];
    if (last < 0 || !(f >= fromHz[0] && f <= fromHz[last])) continue;
    while (k < last && fromHz[k + 1] <= f) k++;
    if (fromHz[k] === f) out[i] = values[k];
    else out[i] = values[k] + ((values[k + 1] - values[k]) * (f - fromHz[k])) / (fromHz[k + 1] - fromHz[k]);
  }
  return out;
}

/** abs Γ of a sweep at other frequencies: linear in amplitude. */
export function magnitudeAt(sweep: Sweep, atHz: Float64Array): Float64Array {
  return interpolate(sweep.frequencyHz, sweep.magnitude, atHz);
}

/** Γ of a complex sweep at other frequencies: linear in real and imaginary part; null for a scalar sweep. */
export function gammaAt(sweep: Sweep, atHz: Float64Array): { re: Float64Array; im: Float64Array } | null {
  if (!sweep.gammaRe || !sweep.gammaIm) return null;
  return {
    re: interpolate(sweep.frequencyHz, sweep.gammaRe, atHz),
    im: interpolate(sweep.frequencyHz, sweep.gammaIm, atHz),
  };
}
