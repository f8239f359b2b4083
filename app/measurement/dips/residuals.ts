import { resonatorPower } from "./resonator.ts";

/** What a fit leaves over, weighed by the scatter that explains it best. */
export interface Residuals {
  /** Residual of abs Γ² over its standard deviation up to a common factor, length n. */
  standard: Float64Array;
  /** 1/variance of abs Γ² up to a common factor. */
  weight: Float64Array;
  /** True: scatter even in abs Γ; false: even in decibels. */
  even: boolean;
  /** Scatter as σ of abs Γ and as σ in dB, whichever `even` tells; root mean square. */
  sigma: number;
  /** Largest residual over the far power: what rounding alone leaves is near 1e-16. */
  relative: number;
  /** Takes the bias of the scatter off a measured abs Γ². */
  unbiased: (power: number) => number;
}

/**
 * Residuals of abs Γ² against the resonator `p` at x. Two kinds of scatter are tried: even in abs Γ (variance 4σ²(Γ² + σ²))
 * and even in decibels (variance in proportion to Γ⁴); the likelier one counts unless `even` says which. Null when
 * the model gives no finite numbers.
 */
export function residualsOf(
  x: Float64Array,
  y: Float64Array,
  p: Float64Array,
  free: number,
  even?: boolean,
): Residuals | null {
  const n = x.length;
  const gradient = new Float64Array(p.length);
  const model = new Float64Array(n);
  const rest = new Float64Array(n);
  let squares = 0;
  let total = 0;
  let worst = 0;
  for (let i = 0; i < n; i++) {
    model[i] = Math.max(0, resonatorPower(p, x[i], gradient));
    rest[i] = y[i] - model[i];
    squares += rest[i] * rest[i];
    total += model[i];
    worst = Math.max(worst, Math.abs(rest[i]));
  }
  if (!Number.isFinite(squares) || !(total > 0)) return null;
  const evenFloor = Math.max(squares / (4 * total), total * 1e-12);
  const dbFloor = (DB_FLOOR * total) / n;
  const linear = weigh(rest, model, free, (m) => m + evenFloor);
  const decibel = weigh(rest, model, free, (m) => m * m + dbFloor * dbFloor);
  const isEven = even ?? linear.score < decibel.score;
  const chosen = isEven ? linear : decibel;
  const variance = isEven ? chosen.mean / 4 : chosen.mean;
  const factor = Math.exp(-variance / 2);
  return {
    standard: chosen.standard,
    weight: chosen.weight,
    even: isEven,
    sigma: isEven ? Math.sqrt(variance) : (10 / Math.LN10) * Math.sqrt(variance),
    relative: worst / p[p.length - 1],
    unbiased: isEven ? (power) => power - 2 * variance : (power) => power * factor,
  };
}

/**
 * True when what is left looks like scatter and no more of it than the sweep's noise allows. With enough points by the ratio of
 * J. von Neumann (Ann. Math. Stat. 12, 367-395, 1941; from memory, not seen): mean squared successive difference over variance,
 * 2 for scatter without order, near 0 for a shape that does not fit. With few points by the size against `noise` (dB).
 */
export function whiteEnough(residuals: Residuals, noise: number, free: number): boolean {
  const { standard, sigma, even, relative } = residuals;
  if (relative < ROUNDING) return true;
  const n = standard.length;
  const allowed = NOISE_FACTOR * (even ? (noise * Math.LN10) / 20 : noise);
  if (n < FEW) return sigma <= allowed;
  let squares = standard[0] ** 2;
  let steps = 0;
  for (let i = 1; i < n; i++) {
    squares += standard[i] ** 2;
    steps += (standard[i] - standard[i - 1]) ** 2;
  }
  const lag = 1 - ORDER_LIMIT / Math.sqrt(Math.max(1, n - free));
  return steps / squares >= 2 * lag;
}

function weigh(rest: Float64Array, model: Float64Array, free: number, variance: (m: number) => number) {
  const n = rest.length;
  const weight = new Float64Array(n);
  const standard = new Float64Array(n);
  let logs = 0;
  let sum = 0;
  for (let i = 0; i < n; i++) {
    const v = variance(model[i]);
    weight[i] = 1 / v;
    standard[i] = rest[i] / Math.sqrt(v);
    logs += Math.log(v);
    sum += standard[i] * standard[i];
  }
  return {
    weight,
    standard,
    mean: sum / Math.max(1, n - free),
    score: n * Math.log(sum / n || Number.MIN_VALUE) + logs,
  };
}

/** Decibels mean nothing 40 dB under the mean power: no detector there follows them. */
const DB_FLOOR = 1e-4;
/** abs Γ² over the far power; resonators without noise leave less than 1e-13. */
const ROUNDING = 1e-9;
/** σ of few points scatters by half of itself. */
const NOISE_FACTOR = 2;
/** Under this the von Neumann ratio tells nothing. */
const FEW = 10;
/** In standard deviations of the ratio (1/√n): scatter without order stays above with 99.9 %. */
const ORDER_LIMIT = 3;
