import type { Noise } from "../noise.ts";
import { resonatorPower } from "./resonator.ts";

/**
 * How the scatter of a sweep goes with its value: even in abs Γ, as a receiver's, or even in decibels, as a
 * detector's.
 */
export type Scatter = "even" | "decibel";

/** What a fit leaves over. */
export interface Residuals {
  /** Residual of abs Γ² over its standard deviation up to a common factor, length n. */
  standard: Float64Array;
  /** 1/variance of abs Γ² up to a common factor, length n. */
  weight: Float64Array;
  scatter: Scatter;
  /** What keeps the variance over 0 where nothing returns; σ² of single samples where the scatter is even. */
  floor: number;
  /** σ of abs Γ, or σ in dB. */
  sigma: number;
  /**
   * −2 log likelihood up to a constant; the scatter with the smaller one explains the residuals better.
   * Deep samples are left out.
   */
  score: number;
  /** Largest residual over the far power: what rounding alone leaves is near 1e-16. */
  relative: number;
}

/**
 * Residuals of abs Γ² (`y`) against the resonator `p` at x, weighed as the scatter says: variance in
 * proportion to Γ² + σ² when even in abs Γ, to Γ⁴ when even in decibels. Null when the model gives no
 * finite numbers.
 */
export function residualsOf(
  x: Float64Array,
  y: Float64Array,
  p: Float64Array,
  free: number,
  scatter: Scatter,
  heldFloor?: number,
): Residuals | null {
  const n = x.length;
  const gradient = new Float64Array(p.length);
  const standard = new Float64Array(n);
  const weight = new Float64Array(n);
  const power = resonatorPower(p);
  let squares = 0;
  let total = 0;
  let worst = 0;
  for (let i = 0; i < n; i++) {
    weight[i] = Math.max(0, power(x[i], gradient));
    standard[i] = y[i] - weight[i];
    squares += standard[i] * standard[i];
    total += weight[i];
    worst = Math.max(worst, Math.abs(standard[i]));
  }
  if (!Number.isFinite(squares) || !(total > 0)) return null;
  const even = scatter === "even";
  const floor =
    heldFloor ?? (even ? Math.max(squares / (4 * total), total * 1e-12) : ((DB_FLOOR * total) / n) ** 2);
  const scored = (SCORED * total) / n;
  let logs = 0;
  let scoredSum = 0;
  let scoredCount = 0;
  let sum = 0;
  for (let i = 0; i < n; i++) {
    const variance = (even ? weight[i] : weight[i] * weight[i]) + floor;
    weight[i] = 1 / variance;
    standard[i] /= Math.sqrt(variance);
    const square = standard[i] * standard[i];
    sum += square;
    if (y[i] < scored) continue;
    logs += Math.log(variance);
    scoredSum += square;
    scoredCount++;
  }
  const sigma = Math.sqrt(sum / Math.max(1, n - free));
  return {
    standard,
    weight,
    scatter,
    floor,
    sigma: even ? sigma / 2 : DB_PER_POWER * sigma,
    score: scoredCount * Math.log(scoredSum / scoredCount || Number.MIN_VALUE) + logs,
    relative: worst / p[p.length - 1],
  };
}

/**
 * abs Γ² less the bias that scatter gives its mean. Even in abs Γ: 2σ² of a complex Γ (S. O. Rice, Bell
 * Syst. Tech. J. 24, 1945), σ² of a normal abs Γ; a scalar trace cannot tell these and takes the middle.
 * Even in dB: the mean of a log-normal. (All from memory, not seen.)
 */
export function unbiased(power: Float64Array, { scatter, sigma }: Residuals, complex: boolean): Float64Array {
  const factor = scatter === "even" ? 1 : Math.exp(-((sigma / DB_PER_POWER) ** 2) / 2);
  const shift = scatter === "even" ? (complex ? 2 : 1.5) * sigma * sigma : 0;
  return power.map((value) => value * factor - shift);
}

/** True when what single samples leave is no larger than the noise allows, or no more than rounding. */
export function smallEnough({ sigma, scatter, relative }: Residuals, noise: Noise): boolean {
  return relative < ROUNDING || sigma <= NOISE_FACTOR * (scatter === "even" ? noise.gamma : noise.db);
}

/**
 * True when what is left looks like scatter: the ratio of J. von Neumann (Ann. Math. Stat. 12, 367-395,
 * 1941; from memory, not seen) shows a shape that does not fit even where it is smaller than the noise of
 * one sample. Few points tell nothing.
 */
export function whiteEnough({ standard, relative }: Residuals, free: number): boolean {
  const n = standard.length;
  if (relative < ROUNDING || n < FEW) return true;
  return successive(standard) >= 2 * (1 - ORDER_LIMIT / Math.sqrt(n - free));
}

/**
 * Mean square of the residuals' sums over BLOCKS stretches, each over the root of its length: 1 for scatter
 * of σ 1. A shape that does not fit stays in the sums while the scatter averages out. Null with fewer than
 * three samples in a stretch.
 */
export function blockSquare(standard: Float64Array, free: number): number | null {
  const n = standard.length;
  if (n < FEWEST_IN_BLOCK * BLOCKS) return null;
  let squares = 0;
  for (let k = 0; k < BLOCKS; k++) {
    const [from, to] = [Math.floor((k * n) / BLOCKS), Math.floor(((k + 1) * n) / BLOCKS)];
    let sum = 0;
    for (let i = from; i < to; i++) sum += standard[i];
    squares += (sum * sum) / (to - from);
  }
  return squares / (BLOCKS - free);
}

/**
 * Von Neumann's ratio: mean squared successive difference over mean square; 2 for scatter, near 0 for a
 * smooth shape. Exact fits give 2.
 */
export function successive(standard: Float64Array): number {
  let squares = standard[0] ** 2;
  let steps = 0;
  for (let i = 1; i < standard.length; i++) {
    squares += standard[i] ** 2;
    steps += (standard[i] - standard[i - 1]) ** 2;
  }
  return squares > 0 ? steps / squares : 2;
}

/**
 * Of the mean power. Deeper samples tell nothing of the scatter: one that happens to be near 0 would decide
 * alone.
 */
const SCORED = 0.1;
/** abs Γ² over the far power; resonators without noise leave less than 1e-13. */
export const ROUNDING = 1e-9;
/** Both are estimates: σ of few points scatters by half of itself. */
const NOISE_FACTOR = 2;
const BLOCKS = 20;
const FEWEST_IN_BLOCK = 3;
/** Under this the von Neumann ratio tells nothing. */
const FEW = 12;
/** In standard deviations of the ratio (1/√n): scatter without order stays above with 99.9 %. */
const ORDER_LIMIT = 3;
/** Decibels mean nothing 40 dB under the mean power: no detector there follows them. */
const DB_FLOOR = 1e-4;
/** dB of power in one neper of power. */
export const DB_PER_POWER = 10 / Math.LN10;
