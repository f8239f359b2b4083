/**
 * Least squares with the Levenberg–Marquardt method for models of a few parameters.
 *
 * Own code, because what is needed beside the best values is their covariance, a step that is refused when
 * it makes the fit worse, scaling that does not depend on units, and convergence to the last bits without
 * noise. Source: D. W. Marquardt, J. SIAM 11(2), 431-441, 1963; scaling by the diagonal as J. J. Moré,
 * Lecture Notes in Mathematics 630, 105-116, 1978 (both from memory, not seen).
 */

/**
 * Model with parameters `p`, made ready for many x: what hangs on `p` alone is computed once. Its value at `x`; writes
 * ∂/∂p to `gradient`.
 */
export type Model = (p: Float64Array) => (x: number, gradient: Float64Array) => number;

export interface Problem {
  model: Model;
  /** Length n, finite. */
  x: Float64Array;
  y: Float64Array;
  /** 1/variance up to a common factor, length n. */
  weight: Float64Array;
  /** First guess; parameters after the first `free` are held. */
  start: Float64Array;
  free: number;
  /** What is known beforehand of one parameter: it is near 0, with this weight. */
  priors?: readonly Prior[];
  /** Relative gain of the cost that is not worth another step; the last bits where it is left out. */
  enough?: number;
}

export interface Prior {
  at: number;
  /** 1/variance up to the same factor. */
  weight: number;
}

export interface Solution {
  p: Float64Array;
  /** Σ weight·residual². */
  cost: number;
  /**
   * Inverse of JᵀWJ over the free parameters, row by row; times the variance it is the covariance. Null
   * when singular.
   */
  inverse: Float64Array | null;
  converged: boolean;
}

/** Never throws: a model value that is not finite counts as a step that was no good. */
export function leastSquares(problem: Problem, maxIterations = MOST_ITERATIONS): Solution {
  const { start, free, enough = SMALLEST_GAIN } = problem;
  let p = Float64Array.from(start);
  let next = Float64Array.from(start);
  const normal = new Float64Array(free * free);
  const slope = new Float64Array(free);
  const damped = new Float64Array(free * free);
  const step = new Float64Array(free);
  const trial = { normal: new Float64Array(free * free), slope: new Float64Array(free) };
  let cost = accumulate(problem, p, normal, slope);
  let damping = FIRST_DAMPING;
  let converged = false;
  for (let iteration = 0; iteration < maxIterations && Number.isFinite(cost) && !converged; iteration++) {
    damped.set(normal);
    for (let i = 0; i < free; i++) damped[i * free + i] *= 1 + damping;
    if (!factor(damped, free)) {
      damping = Math.max(damping, FIRST_DAMPING) * 10;
      if (damping > LARGEST_DAMPING) break;
      continue;
    }
    solve(damped, slope, step, free);
    next.set(p);
    let gain = 0;
    for (let i = 0; i < free; i++) {
      next[i] += step[i];
      gain += step[i] * slope[i];
    }
    const nextCost = accumulate(problem, next, trial.normal, trial.slope);
    if (nextCost < cost) {
      converged = cost - nextCost <= enough * cost || nextCost === 0;
      [p, next] = [next, p];
      cost = nextCost;
      normal.set(trial.normal);
      slope.set(trial.slope);
      damping = Math.max(damping / 10, SMALLEST_DAMPING);
    } else {
      converged = gain <= enough * cost || damping > LARGEST_DAMPING;
      damping *= 10;
    }
  }
  return { p, cost, inverse: invert(normal, free), converged };
}

/** JᵀWJ and JᵀWr at `p`; returns the cost. */
function accumulate(
  { model, x, y, weight, start, free, priors = [] }: Problem,
  p: Float64Array,
  normal: Float64Array,
  slope: Float64Array,
): number {
  const gradient = new Float64Array(start.length);
  normal.fill(0);
  slope.fill(0);
  const at = model(p);
  let cost = 0;
  for (let k = 0; k < x.length; k++) {
    const residual = y[k] - at(x[k], gradient);
    const w = weight[k];
    cost += w * residual * residual;
    for (let i = 0; i < free; i++) {
      const wi = w * gradient[i];
      slope[i] += wi * residual;
      for (let j = 0; j <= i; j++) normal[i * free + j] += wi * gradient[j];
    }
  }
  for (const prior of priors) {
    cost += prior.weight * p[prior.at] ** 2;
    slope[prior.at] -= prior.weight * p[prior.at];
    normal[prior.at * free + prior.at] += prior.weight;
  }
  for (let i = 0; i < free; i++) for (let j = 0; j < i; j++) normal[j * free + i] = normal[i * free + j];
  return cost;
}

/** Cholesky factor of a symmetric matrix in place (lower part); false when it is not positive definite. */
function factor(a: Float64Array, n: number): boolean {
  for (let j = 0; j < n; j++) {
    for (let i = j; i < n; i++) {
      let sum = a[i * n + j];
      for (let k = 0; k < j; k++) sum -= a[i * n + k] * a[j * n + k];
      if (i > j) a[i * n + j] = sum / a[j * n + j];
      else if (sum > 0 && Number.isFinite(sum)) a[j * n + j] = Math.sqrt(sum);
      else return false;
    }
  }
  return true;
}

function solve(lower: Float64Array, right: Float64Array, out: Float64Array, n: number): void {
  for (let i = 0; i < n; i++) {
    let sum = right[i];
    for (let k = 0; k < i; k++) sum -= lower[i * n + k] * out[k];
    out[i] = sum / lower[i * n + i];
  }
  for (let i = n - 1; i >= 0; i--) {
    let sum = out[i];
    for (let k = i + 1; k < n; k++) sum -= lower[k * n + i] * out[k];
    out[i] = sum / lower[i * n + i];
  }
}

function invert(normal: Float64Array, n: number): Float64Array | null {
  const scale = Float64Array.from({ length: n }, (_, i) => 1 / Math.sqrt(normal[i * n + i]));
  const scaled = normal.map((value, at) => value * scale[Math.floor(at / n)] * scale[at % n]);
  if (!factor(scaled, n)) return null;
  const inverse = new Float64Array(n * n);
  const unit = new Float64Array(n);
  const column = new Float64Array(n);
  for (let j = 0; j < n; j++) {
    unit.fill(0);
    unit[j] = 1;
    solve(scaled, unit, column, n);
    for (let i = 0; i < n; i++) inverse[i * n + j] = column[i] * scale[i] * scale[j];
  }
  return inverse.every(Number.isFinite) ? inverse : null;
}

const MOST_ITERATIONS = 60;
const FIRST_DAMPING = 1e-3;
const SMALLEST_DAMPING = 1e-12;
const LARGEST_DAMPING = 1e12;
/** Relative to the cost; the last bits of double precision. */
const SMALLEST_GAIN = 1e-15;
