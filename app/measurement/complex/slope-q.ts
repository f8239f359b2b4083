import { type Complex, gammaToImpedance } from "../reflection.ts";
import type { Sweep } from "../sweep.ts";
import { NORMAL_95 } from "../uncertainty.ts";
import { firstAtOrAbove, gammaAt } from "./gamma-at.ts";
import { complexNoise } from "./impedance.ts";
import { localParabola, type Parabola } from "./local-parabola.ts";

/** Q by the slope of impedance, and what it was made from. */
export interface SlopeQ {
  q: number;
  /** Half-width of the 95 % interval from noise, and from the window where that is more. */
  halfWidth: number;
  resistanceOhm: number;
  reactanceOhm: number;
  /** R' and X', Ω per hertz. */
  resistanceSlope: number;
  reactanceSlope: number;
  /** Samples that were used. */
  points: number;
}

/**
 * Q ≈ f0/(2R)·√(R'² + (X' + abs(X)/f0)²) at `hz`, derivatives to frequency: A. D. Yaghjian & S. R. Best, "Impedance, bandwidth,
 * and Q of antennas", IEEE Trans. Antennas Propag. 53(4), 1298-1324, 2005, for an antenna that a series element would tune there.
 *
 * R, X and their slopes are those of the parabolas by least squares through the samples within SHARE of f0/Q on each side (at
 * least the FEWEST nearest ones), each sample weighed by what the noise of Γ makes of its Z: σ(Z) = σ(Γ)·2·Z0/abs(1−Γ)². The
 * interval carries that noise on, and the difference to half the window as the error of the shape. Null for a scalar sweep,
 * outside it, beside a gap, where R is not positive, or with fewer than three samples. It is the antenna's Q only at the antenna
 * and for a single resonance: a length of line or a matching network adds its own slope. `noise` is the sweep's own, for many dips at once.
 */
export function slopeQ(sweep: Sweep, hz: number, noise = complexNoise(sweep)): SlopeQ | null {
  if (noise === null || !gammaAt(sweep, hz)) return null;
  let q = FIRST_Q;
  let fit: SlopeQ | null = null;
  for (let round = 0; round < ROUNDS; round++) {
    const next = within(sweep, hz, (SHARE * hz) / q, noise);
    if (!next) return null;
    fit = next;
    if (Math.abs(next.q / q - 1) < AGREED) break;
    q = Math.min(MOST_Q, Math.max(LEAST_Q, next.q));
  }
  if (!fit) return null;
  const inner = within(sweep, hz, (SHARE * hz) / fit.q / 2, noise);
  const shape = inner && inner.points < fit.points ? Math.abs(inner.q - fit.q) : 0;
  return { ...fit, halfWidth: Math.max(fit.halfWidth, shape - (inner?.halfWidth ?? 0)) };
}

function within(sweep: Sweep, hz: number, reachHz: number, noise: number): SlopeQ | null {
  const window = windowOf(sweep, hz, reachHz);
  if (!window) return null;
  const { frequencyHz: f, gammaRe, gammaIm, referenceOhm } = sweep;
  const count = window.to - window.from;
  const x = new Float64Array(count);
  const [r, reactance, sigma] = [new Float64Array(count), new Float64Array(count), new Float64Array(count)];
  for (let k = 0; k < count; k++) {
    const i = window.from + k;
    const gamma: Complex = { re: (gammaRe as Float64Array)[i], im: (gammaIm as Float64Array)[i] };
    const z = gammaToImpedance(gamma, referenceOhm);
    x[k] = (f[i] - hz) / hz;
    [r[k], reactance[k]] = [z.re, z.im];
    sigma[k] = (2 * referenceOhm) / ((1 - gamma.re) ** 2 + gamma.im ** 2);
  }
  const resistance = localParabola(x, r, sigma);
  const slope = localParabola(x, reactance, sigma);
  if (!resistance || !slope || !(resistance.value > 0)) return null;
  return combined(resistance, slope, hz, noise, count);
}

/** Q and its interval from the two parabolas, whose abscissa is (f − f0)/f0. */
function combined(r: Parabola, x: Parabola, hz: number, noise: number, points: number): SlopeQ | null {
  const qOf = (R: number, dR: number, X: number, dX: number) => Math.hypot(dR, dX + Math.abs(X)) / (2 * R);
  const q = qOf(r.value, r.slope, x.value, x.slope);
  if (!Number.isFinite(q) || q === 0) return null;
  const rise = x.slope + Math.abs(x.value);
  const [byR, bySlopeR] = [-q / r.value, r.slope / (4 * r.value ** 2 * q)];
  const bySlopeX = rise / (4 * r.value ** 2 * q);
  const byX = bySlopeX * Math.sign(x.value);
  const variance =
    byR ** 2 * r.valueVariance +
    bySlopeR ** 2 * r.slopeVariance +
    2 * byR * bySlopeR * r.covariance +
    byX ** 2 * x.valueVariance +
    bySlopeX ** 2 * x.slopeVariance +
    2 * byX * bySlopeX * x.covariance;
  return {
    q,
    halfWidth: NORMAL_95 * noise * Math.sqrt(Math.max(0, variance)),
    resistanceOhm: r.value,
    reactanceOhm: x.value,
    resistanceSlope: r.slope / hz,
    reactanceSlope: x.slope / hz,
    points,
  };
}

/** The samples within `reachHz`, from..to (excluded), or the FEWEST nearest ones; null beside a gap or with too few. */
function windowOf({ frequencyHz: f, gammaRe }: Sweep, hz: number, reachHz: number) {
  const known = (i: number) => i >= 0 && i < f.length && !Number.isNaN((gammaRe as Float64Array)[i]);
  let to = firstAtOrAbove(f, hz);
  let from = to;
  const nearer = () => {
    const [low, high] = [known(from - 1), known(to)];
    if (!low && !high) return null;
    return low && (!high || hz - f[from - 1] < f[to] - hz) ? -1 : 1;
  };
  for (let side = nearer(); side !== null; side = nearer()) {
    const at = side < 0 ? f[from - 1] : f[to];
    if (to - from >= FEWEST && Math.abs(at - hz) > reachHz) break;
    if (side < 0) from--;
    else to++;
  }
  return to - from >= 3 ? { from, to } : null;
}

/**
 * Of f0/Q to each side. A series resonator's reactance is no parabola: over this reach Q comes out 0.2 % high at Q 3, 0.01 % at Q 12.
 * NEC-2 antennas of Q 6 to 29 agreed with their splines within 0.1 %.
 */
const SHARE = 0.25;
/** Two over what a parabola needs. */
const FEWEST = 5;
const FIRST_Q = 10;
const LEAST_Q = 0.5;
const MOST_Q = 1e5;
const ROUNDS = 6;
const AGREED = 0.05;
