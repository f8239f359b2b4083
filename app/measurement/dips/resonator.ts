import type { Model } from "./least-squares.ts";

/**
 * A series resonator behind a constant loss, as the power abs Γ² that returns from it.
 *
 * MEASUREMENT's form abs Γ² = a²·((r−1)²+u²)/((r+1)²+u²), u = r·Q·(f/f0 − f0/f), is the same for r and Q as
 * for 1/r and r·Q. Written with what can be told apart it is A − D/(1+w²), w = κ·(f/f0 − f0/f): A = a² far
 * off resonance, D = A·(1−ρ²) the depth with ρ = abs(r−1)/(r+1), κ = r·Q/(r+1). Parameters here: D, ln f0,
 * ln κ, A. Frequencies enter as x = ln(f/reference), so that f/f0 − f0/f = 2 sinh(x − x0).
 */
export interface Resonator {
  f0Hz: number;
  /** A. */
  farPower: number;
  /** D. */
  depth: number;
  /** κ. */
  kappa: number;
}

export const DEPTH = 0;
export const LOG_F0 = 1;
export const LOG_KAPPA = 2;
export const FAR_POWER = 3;

export const resonatorPower: Model = (p, x, gradient) => {
  const up = Math.exp(x - p[LOG_F0]);
  const kappa = Math.exp(p[LOG_KAPPA]);
  const w = kappa * (up - 1 / up);
  const share = 1 / (1 + w * w);
  const slope = 2 * p[DEPTH] * share * share * w;
  gradient[DEPTH] = -share;
  gradient[LOG_F0] = -slope * kappa * (up + 1 / up);
  gradient[LOG_KAPPA] = slope * w;
  gradient[FAR_POWER] = 1;
  return p[FAR_POWER] - p[DEPTH] * share;
};

/** The lowest abs Γ² of the resonator, never below 0. */
export function lowestPower({ farPower, depth }: Resonator): number {
  return Math.max(0, farPower - depth);
}

/**
 * w at which abs Γ² = `power`: the edge of a band. Null where the resonator never gets there (its lowest is
 * above) or never leaves (its far power is below). The edges are f0·e^±asinh(w/2κ), their geometric mean is
 * f0, their distance f0·w/κ.
 */
export function edgeAt({ farPower, depth }: Resonator, power: number): number | null {
  const square = depth / (farPower - power) - 1;
  return farPower > power && square >= 0 ? Math.sqrt(square) : null;
}

/** R/Z0 at the dip, taken as at least 1: without phase it may as well be the inverse. */
export function ratioOf(resonator: Resonator): number {
  const rho = Math.sqrt(lowestPower(resonator) / resonator.farPower);
  return (1 + rho) / (1 - rho);
}
