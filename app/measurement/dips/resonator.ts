import type { Model } from "./least-squares.ts";

/**
 * A series resonator behind a constant loss, seen through a bench, as the power abs Γ² that returns from it.
 *
 * MEASUREMENT's form abs Γ² = a²·((r−1)²+u²)/((r+1)²+u²), u = r·Q·(f/f0 − f0/f), is the same for r and Q as
 * for 1/r and r·Q. Written with what can be told apart it is A − D/(1+w²), w = κ·(f/f0 − f0/f): A = a² far
 * off resonance, D = A·(1−ρ²) the depth with ρ = abs(r−1)/(r+1), κ = r·Q/(r+1). A bench adds a constant to Γ
 * (directivity) and turns it about (tracking, match): Γ stays a ratio of two linear functions of w, and abs Γ²
 * becomes A − (D + B·w)/(1+w²), which is skew; where the phase of those errors turns with frequency there is
 * also, to first order, C·w, the tilt, and to second order E·w², the curve. B, C and E are 0 on a perfect
 * bench (own derivation). Parameters here: D, ln f0, ln κ, B, C, E, A; few samples bear no E, no C or not even
 * B, and the list is as much shorter.
 * Frequencies enter as x = ln(f/reference), so that f/f0 − f0/f = 2 sinh(x − x0).
 */
export interface Resonator {
  f0Hz: number;
  /** A. */
  farPower: number;
  /** D. */
  depth: number;
  /** κ. */
  kappa: number;
  /** B. */
  skew: number;
  /** C. */
  tilt: number;
  /** E. */
  curve: number;
}

export const DEPTH = 0;
const LOG_F0 = 1;
const LOG_KAPPA = 2;
/** In a list of five or more; A is always the last. */
const SKEW = 3;
/** In a list of six or seven. */
export const TILT = 4;
/** In a list of seven. */
export const CURVE = 5;

export const resonatorPower: Model = (p) => {
  const last = p.length - 1;
  const [depth, logF0, far] = [p[DEPTH], p[LOG_F0], p[last]];
  const kappa = Math.exp(p[LOG_KAPPA]);
  const skew = last > SKEW ? p[SKEW] : 0;
  const tilt = last > TILT ? p[TILT] : 0;
  const curve = last > CURVE ? p[CURVE] : 0;
  return (x, gradient) => {
    const up = Math.exp(x - logF0);
    const w = kappa * (up - 1 / up);
    const share = 1 / (1 + w * w);
    const slope = (2 * (depth + skew * w) * w * share - skew) * share;
    const rise = slope + tilt + 2 * curve * w;
    gradient[DEPTH] = -share;
    gradient[LOG_F0] = -rise * kappa * (up + 1 / up);
    gradient[LOG_KAPPA] = rise * w;
    if (last > CURVE) gradient[CURVE] = w * w;
    if (last > TILT) gradient[TILT] = w;
    if (last > SKEW) gradient[SKEW] = -w * share;
    gradient[last] = 1;
    return far - (depth + skew * w) * share + (tilt + curve * w) * w;
  };
};

/** Parameters to the resonator; `referenceHz` is where x is 0. */
export function resonatorOf(p: Float64Array, referenceHz: number): Resonator {
  return {
    f0Hz: referenceHz * Math.exp(p[LOG_F0]),
    farPower: p[p.length - 1],
    depth: p[DEPTH],
    kappa: Math.exp(p[LOG_KAPPA]),
    skew: p.length - 1 > SKEW ? p[SKEW] : 0,
    tilt: p.length - 1 > TILT ? p[TILT] : 0,
    curve: p.length - 1 > CURVE ? p[CURVE] : 0,
  };
}

/** The lowest abs Γ² of the resonator; scatter may bring it under 0. */
export function lowestPower(resonator: Resonator): number {
  return powerAt(resonator, lowestAt(resonator));
}

/** Where it is lowest, Hz: f0 without skew. */
export function lowestHz(resonator: Resonator): number {
  return hzAt(resonator, lowestAt(resonator));
}

/** The frequency of w, Hz. */
export function hzAt({ f0Hz, kappa }: Resonator, w: number): number {
  return f0Hz * Math.exp(Math.asinh(w / (2 * kappa)));
}

/**
 * The two w, ascending, at which abs Γ² = `power`: the edges of a band. Null where the resonator never gets
 * there (its lowest is above) or never leaves (its far power is below). Newton's method from the edges
 * without tilt.
 */
export function edgesAt(resonator: Resonator, power: number): [number, number] | null {
  const { farPower, depth, skew, tilt, curve } = resonator;
  const over = farPower - power;
  const square = skew * skew - 4 * over * (over - depth);
  if (!(over > 0) || !(square >= 0)) return null;
  const root = Math.sqrt(square);
  const edges: [number, number] = [(skew - root) / (2 * over), (skew + root) / (2 * over)];
  if (tilt === 0 && curve === 0) return edges;
  for (const k of [0, 1] as const)
    for (let i = 0; i < NEWTON_STEPS; i++) {
      const step = (powerAt(resonator, edges[k]) - power) / slopeAt(resonator, edges[k]);
      edges[k] -= step;
      if (Math.abs(step) < SMALLEST_STEP) break;
    }
  const low = lowestAt(resonator);
  return edges[0] <= low && edges[1] >= low ? edges : null;
}

/** The w of the lowest abs Γ²: without tilt in closed form, else Newton's method from there. */
function lowestAt(r: Resonator): number {
  let w = r.skew / (r.depth + Math.hypot(r.depth, r.skew));
  for (let i = 0; i < NEWTON_STEPS && (r.tilt !== 0 || r.curve !== 0); i++) {
    const bend = bendAt(r, w);
    if (!(bend > 0)) return Number.NaN;
    const step = slopeAt(r, w) / bend;
    w -= step;
    if (Math.abs(step) < SMALLEST_STEP) break;
  }
  return w;
}

function powerAt({ farPower, depth, skew, tilt, curve }: Resonator, w: number): number {
  return farPower - (depth + skew * w) / (1 + w * w) + (tilt + curve * w) * w;
}

function slopeAt({ depth, skew, tilt, curve }: Resonator, w: number): number {
  const share = 1 / (1 + w * w);
  return (2 * (depth + skew * w) * w * share - skew) * share + tilt + 2 * curve * w;
}

/** By differences: only the speed of Newton's steps hangs on it. */
function bendAt(r: Resonator, w: number): number {
  return (slopeAt(r, w + DIFFERENCE) - slopeAt(r, w - DIFFERENCE)) / (2 * DIFFERENCE);
}

const NEWTON_STEPS = 30;
const DIFFERENCE = 1e-5;
const SMALLEST_STEP = 1e-13;
