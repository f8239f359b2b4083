import { student95 } from "../uncertainty.ts";
import { blockSquare, ROUNDING, type Scatter } from "./residuals.ts";
import { lowestHz, lowestPower, type Resonator, resonatorOf } from "./resonator.ts";
import type { Candidate } from "./weighing.ts";
import type { Window } from "./window.ts";

/** A resonator that the samples of a window support, with 95 % half-widths from its covariance. */
export interface Fit {
  resonator: Resonator;
  window: Window;
  /** Where it is lowest. */
  frequencyHz: number;
  /** Lowest abs Γ², 0 or more. */
  power: number;
  frequencyHalfHz: number;
  powerHalf: number;
  /** The same upwards, where a higher power scatters more. */
  powerUp: number;
  /** By which the residuals were weighed. */
  scatter: Scatter;
  /** Of the squares of the half-widths: what the shape leaves over beyond scatter. */
  shapeShare: number;
  /** True when the far power was fitted too: then the closed form holds at the edges and for Q. */
  whole: boolean;
  /** Half-width of any number that follows from the resonator; null where that is not finite nearby. */
  halfOf(number: (resonator: Resonator) => number): number | null;
}

/**
 * What a fit says, with the half-widths that its covariance and its residuals give; null where it has no
 * lowest point inside the window or knows its place no better than the window does. `free` parameters moved.
 */
export function knownFit(
  { solution, residuals }: Candidate,
  window: Window,
  frequencyHz: Float64Array,
  referenceHz: number,
  free: number,
): Fit | null {
  const { p, cost, inverse } = solution;
  if (!inverse) return null;
  const resonator = resonatorOf(p, referenceHz);
  const hz = lowestHz(resonator);
  if (!(hz >= frequencyHz[window.from] && hz <= frequencyHz[window.to])) return null;
  const freedom = residuals.standard.length - free;
  const square = cost / freedom;
  const inBlocks = residuals.relative < ROUNDING ? null : blockSquare(residuals.standard, free);
  const used = Math.max(square, CALM * (inBlocks ?? 0));
  const scale = student95(freedom) * Math.sqrt(used);
  const halfOf = (number: (resonator: Resonator) => number) => {
    const gradient = slopesOf((moved) => number(resonatorOf(moved, referenceHz)), p, free);
    let sum = 0;
    for (let i = 0; i < free; i++)
      for (let j = 0; j < free; j++) sum += gradient[i] * gradient[j] * inverse[i * free + j];
    return Number.isFinite(sum) ? scale * Math.sqrt(Math.max(0, sum)) : null;
  };
  const frequencyHalfHz = halfOf(lowestHz);
  const powerHalf = halfOf(lowestPower);
  if (frequencyHalfHz === null || powerHalf === null) return null;
  if (frequencyHalfHz > (frequencyHz[window.to] - frequencyHz[window.from]) / 2) return null;
  const power = Math.max(0, lowestPower(resonator));
  return {
    resonator,
    window,
    frequencyHz: hz,
    power,
    frequencyHalfHz,
    powerHalf,
    powerUp: residuals.scatter === "even" ? upwards(powerHalf, power + residuals.floor) : powerHalf,
    scatter: residuals.scatter,
    shapeShare: used > 0 ? 1 - square / used : 0,
    whole: free === p.length,
    halfOf,
  };
}

/**
 * The half-width h upwards from that at the estimate: the variance of abs Γ² grows in proportion to it
 * (`power`, floor included), so h² = half²·(1 + h/power), as in a score interval (E. B. Wilson, J. Am. Stat.
 * Assoc. 22, 209-212, 1927; from memory, not seen). An estimate that scatter brought down would else tell
 * too narrow an interval.
 */
function upwards(half: number, power: number): number {
  if (half === 0 || !(power > 0)) return half;
  const square = (half * half) / power;
  return (square + Math.sqrt(square * square + 4 * half * half)) / 2;
}

/** ∂/∂p by central differences. */
function slopesOf(number: (p: Float64Array) => number, p: Float64Array, free: number): Float64Array {
  const moved = Float64Array.from(p);
  return Float64Array.from({ length: free }, (_, i) => {
    const step = DIFFERENCE * Math.max(1e-3, Math.abs(p[i]));
    moved[i] = p[i] + step;
    const above = number(moved);
    moved[i] = p[i] - step;
    const below = number(moved);
    moved[i] = p[i];
    return (above - below) / (2 * step);
  });
}

/** Relative step of a parameter: rounding and bend of the functions are both far below its effect. */
const DIFFERENCE = 1e-6;
/** The square of 20 sums scatters by 35 % itself: only what is clearly more widens the intervals. */
const CALM = 0.8;
