import { gammaToSwr } from "./reflection.ts";

/**
 * How well a number is known: 95 % intervals and how independent contributions combine.
 *
 * Half-widths in the unit of the number; null is "not known" and stays null, it never counts as zero.
 */

/**
 * Root of the sum of squares of independent half-widths (JCGM 100:2008, "Guide to the expression of
 * uncertainty in measurement", 5.1.2; from memory, not seen). One that is not known makes the whole not
 * known.
 */
export function combine(...halfWidths: (number | null)[]): number | null {
  let sum = 0;
  for (const half of halfWidths) {
    if (half === null || Number.isNaN(half)) return null;
    sum += half * half;
  }
  return Math.sqrt(sum);
}

/**
 * Two-sided 95 % quantile of Student's t. `freedom` ≥ 1, NaN below. Table values for 1 and 2, else the
 * expansion of Fisher and Cornish (Abramowitz & Stegun 26.7.5; from memory, not seen), right to 0.3 % at 3
 * and 0.01 % from 8 on.
 */
export function student95(freedom: number): number {
  if (!(freedom >= 1)) return Number.NaN;
  if (freedom < 3) return freedom < 2 ? 12.7062 : 4.3027;
  const z = NORMAL_95;
  const z2 = z * z;
  return (
    z +
    (z * (z2 + 1)) / (4 * freedom) +
    (z * (5 * z2 * z2 + 16 * z2 + 3)) / (96 * freedom ** 2) +
    (z * (3 * z2 ** 3 + 19 * z2 * z2 + 17 * z2 - 15)) / (384 * freedom ** 3) +
    (z * (79 * z2 ** 4 + 776 * z2 ** 3 + 1482 * z2 * z2 - 1920 * z2 - 945)) / (92160 * freedom ** 4)
  );
}

export interface Interval {
  low: number;
  high: number;
}

/**
 * The 95 % interval of SWR from that of abs Γ² (the reflected power, in which the fit is close to normal).
 * SWR rises steadily with it, so the limits carry over; below nothing reflected SWR is 1, from all
 * reflected on Infinity.
 */
export function swrInterval(power: number, halfWidth: number | null, upwards = halfWidth): Interval | null {
  if (halfWidth === null || upwards === null) return null;
  if (Number.isNaN(halfWidth + upwards + power)) return null;
  const swr = (p: number) => gammaToSwr(Math.sqrt(Math.max(0, p)));
  return { low: swr(power - halfWidth), high: swr(power + upwards) };
}

/** Φ⁻¹(0.975). */
export const NORMAL_95 = 1.959963984540054;
