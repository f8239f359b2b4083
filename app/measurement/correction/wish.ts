import { gammaToSwr, swrToGamma } from "../reflection.ts";
import type { BenchLimits } from "../sweep.ts";

/** An SWR that is to be known to plus or minus a tolerance. */
export interface Wish {
  swr: number;
  tolerance: number;
}

/** SWR limits of a measured SWR at point `i` of the bench's limits; NaN where one of them is not known. */
export function swrLimits(swr: number, limits: BenchLimits, i: number): { low: number; high: number } {
  const m = swrToGamma(swr);
  const half = limits.directivity[i] + limits.tracking[i] * m + limits.match[i] * m * m;
  return { low: gammaToSwr(Math.max(0, m - half)), high: gammaToSwr(m + half) };
}

/** Whether the wish is met at point `i`; not where a limit is not known. */
export function isKnown({ swr, tolerance }: Wish, limits: BenchLimits, i: number): boolean {
  const { low, high } = swrLimits(swr, limits, i);
  return high - swr <= tolerance && swr - low <= tolerance;
}

/**
 * The error of abs Γ, linear, that the wish allows: the smaller of the ways to SWR ± tolerance. With nothing but
 * directivity it is the directivity that is needed. NaN for an SWR under 1 or a tolerance that is not over 0.
 */
export function allowedError({ swr, tolerance }: Wish): number {
  if (!(tolerance > 0)) return Number.NaN;
  const m = swrToGamma(swr);
  const up = swrToGamma(swr + tolerance) - m;
  return swr - tolerance <= 1 ? up : Math.min(up, m - swrToGamma(swr - tolerance));
}
