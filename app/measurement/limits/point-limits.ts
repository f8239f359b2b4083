import type { Noise } from "../noise.ts";
import type { Sweep } from "../sweep.ts";
import { NORMAL_95 } from "../uncertainty.ts";
import { trueLimits } from "./worst-case.ts";

/** Limits of abs Γ at each point, for the band on a chart. */
export interface PointLimits {
  /** Length n; NaN where the value or the bench's errors are not known. `high` may be Infinity. */
  low: Float64Array;
  high: Float64Array;
  /** False where no point has limits. */
  known: boolean;
}

/**
 * Limits of abs Γ at each point of a sweep: the 95 % interval of the noise and what a picture's pixels allow
 * (combined as independent parts), and around them the bench's worst case.
 *
 * `noise`: σ of the sweep, of which that of abs Γ counts: right where a receiver's scatter is even, and on
 * the wide side in a dip where a detector's is even in decibels. Without a bench, or where one of its errors is not known, the limits are NaN: unknown, not none.
 */
export function pointLimits({ magnitude, benchLimits, pictureLimits }: Sweep, noise: Noise): PointLimits {
  const n = magnitude.length;
  const low = new Float64Array(n).fill(Number.NaN);
  const high = new Float64Array(n).fill(Number.NaN);
  let known = false;
  const scatter = NORMAL_95 * noise.gamma;
  for (let i = 0; i < n && benchLimits; i++) {
    const errors = {
      directivity: benchLimits.directivity[i],
      tracking: benchLimits.tracking[i],
      match: benchLimits.match[i],
    };
    const value = magnitude[i];
    if (Number.isNaN(value + errors.directivity + errors.tracking + errors.match)) continue;
    const down = Math.hypot(scatter, pictureLimits ? value - pictureLimits.magnitudeLow[i] : 0);
    const up = Math.hypot(scatter, pictureLimits ? pictureLimits.magnitudeHigh[i] - value : 0);
    low[i] = trueLimits(Math.max(0, value - down), errors).low;
    high[i] = trueLimits(value + up, errors).high;
    known = true;
  }
  return { low, high, known };
}
