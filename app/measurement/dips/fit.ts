import type { Noise } from "../noise.ts";
import { student95 } from "../uncertainty.ts";
import { leastSquares, type Solution } from "./least-squares.ts";
import { meanPoints, type Points, selectPoints } from "./points.ts";
import { blockSquare, ROUNDING, residualsOf, smallEnough, successive, whiteEnough } from "./residuals.ts";
import { DEPTH, lowestHz, lowestPower, type Resonator, resonatorOf, resonatorPower } from "./resonator.ts";
import { type Candidate, fitMeans, likelier } from "./weighing.ts";
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
  /** Of the squares of the half-widths: what the shape leaves over beyond scatter. */
  shapeShare: number;
  /** True when the far power was fitted too: then the closed form holds at the edges and for Q. */
  whole: boolean;
  /** Half-width of any number that follows from the resonator; null where that is not finite nearby. */
  halfOf(number: (resonator: Resonator) => number): number | null;
}

/** The larger σ of the sweep's and of the samples near the dip, and that of the sweep alone. */
export interface FitNoise extends Noise {
  sweepDb: number;
}

/**
 * Fits the resonator to abs Γ² over the window, and when the shape leaves more than noise there, over ever
 * smaller inner windows with the far power held, down to FEWEST_POINTS. Null when no window will do: the
 * caller then takes a parabola.
 *
 * `frequencyHz` ascending Hz, `magnitude` abs Γ without NaN inside the window, `index` the lowest sample,
 * `noise` the larger σ of the sweep's and of the samples near the dip, `complex` whether abs Γ comes from a
 * complex Γ. Whether the scatter is even in abs Γ (a receiver's) or in decibels (a detector's) is decided
 * by the likelihood of the residuals; the bias of abs Γ² that goes with it is taken off. Long windows are
 * fitted on a selection of samples, and in noise then on means of all of them.
 */
export function fitDip(
  frequencyHz: Float64Array,
  magnitude: Float64Array,
  index: number,
  window: Window,
  noise: FitNoise,
  complex: boolean,
): Fit | null {
  let { from, to } = window;
  const farPower = Math.min(1, Math.max(magnitude[from], magnitude[to]) ** 2);
  for (let whole = true; to - from + 1 >= FEWEST_POINTS; whole = false) {
    const fit = fitInside(
      frequencyHz,
      magnitude,
      index,
      { from, to },
      noise,
      complex,
      whole ? null : farPower,
    );
    if (typeof fit !== "number") return fit;
    const shrink = Math.max(SHRINK, fit ** (1 / SHAPE_POWER));
    from = Math.ceil(index - (index - from) / shrink);
    to = Math.floor(index + (to - index) / shrink);
    if (to - from + 1 < FEWEST_HELD) break;
  }
  return null;
}

/** The fit, or by how many times what it left was too much (1 where only its order told). */
function fitInside(
  frequencyHz: Float64Array,
  magnitude: Float64Array,
  index: number,
  window: Window,
  noise: FitNoise,
  complex: boolean,
  heldPower: number | null,
): Fit | number {
  const referenceHz = frequencyHz[index];
  const some = selectPoints(frequencyHz, magnitude, window, referenceHz, SELECTION);
  const guess = firstGuess(frequencyHz, magnitude, index, window, heldPower);
  const first = growing(some, guess, window.to - window.from + 1, heldPower !== null);
  if (!first) return 1;
  const { solution, residuals: flat, free } = first;
  const task = { free, complex, noise };
  if (successive(flat.standard) < HOPELESS) return flat.sigma / noise.gamma;
  let best: Candidate | null = first;
  if (flat.relative >= ROUNDING) best = likelier(some, solution.p, task);
  if (!best || !smallEnough(best.residuals, noise)) return flat.sigma / noise.gamma;
  if (flat.relative >= ROUNDING && window.to - window.from + 1 > some.x.length) {
    const means = meanPoints(frequencyHz, magnitude, window, referenceHz, MEANS, best.solution.p);
    best = fitMeans(means, best, task, Math.floor((window.to - window.from + 1) / means.x.length));
  }
  if (!best || !whiteEnough(best.residuals, free)) return 1;
  const freedom = best.residuals.standard.length - free;
  if (freedom < 1 || !usable(best.solution)) return 1;
  return describe(best, window, referenceHz, frequencyHz, freedom, free) ?? 1;
}

/**
 * With four parameters and then with as many as `count` samples bear, each starting where the last ended;
 * where one leaves nothing over, it is the whole truth.
 */
function growing(data: Points, guess: Float64Array, count: number, held: boolean) {
  const most = count < FEWEST_SKEW ? 4 : count < FEWEST_TILT || held ? 5 : 6;
  let start = guess;
  for (let size = 4; ; size = most) {
    const free = held ? size - 1 : size;
    const solution = leastSquares({ model: resonatorPower, ...data, start, free });
    const residuals = residualsOf(data.x, data.y, solution.p, free, "even");
    if (!residuals) return null;
    if (size === most || residuals.relative < ROUNDING) return { solution, residuals, free };
    const { p } = solution;
    start = Float64Array.from([...p.slice(0, 3), ...new Array(most - 4).fill(0), p[3]]);
  }
}

function describe(
  { solution, residuals }: Candidate,
  window: Window,
  referenceHz: number,
  frequencyHz: Float64Array,
  freedom: number,
  free: number,
): Fit | null {
  const { p, cost, inverse } = solution;
  if (!inverse) return null;
  const resonator = resonatorOf(p, referenceHz);
  const hz = lowestHz(resonator);
  if (!(hz >= frequencyHz[window.from] && hz <= frequencyHz[window.to])) return null;
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
  return {
    resonator,
    window,
    frequencyHz: hz,
    power: Math.max(0, lowestPower(resonator)),
    frequencyHalfHz,
    powerHalf,
    shapeShare: used > 0 ? 1 - square / used : 0,
    whole: free === p.length,
    halfOf,
  };
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

function usable({ p, converged, inverse }: Solution): boolean {
  return converged && inverse !== null && p[DEPTH] > 0 && p[p.length - 1] > 0;
}

function firstGuess(
  f: Float64Array,
  g: Float64Array,
  index: number,
  { from, to }: Window,
  heldPower: number | null,
) {
  const lowest = g[index] ** 2;
  const border = g[from] > g[to] ? from : to;
  const borderPower = g[border] ** 2;
  const farPower = heldPower ?? Math.max(1, borderPower * 1.02);
  const depth = Math.max(farPower - lowest, 1e-9);
  const w = Math.sqrt(Math.max(1e-3, depth / Math.max(1e-6, farPower - borderPower) - 1));
  const reach = Math.abs(f[border] / f[index] - f[index] / f[border]) || 1e-9;
  return Float64Array.of(depth, 0, Math.log(w / reach), farPower);
}

/** Five points leave one degree of freedom for four parameters. */
const FEWEST_POINTS = 5;
/** From here on the skew is fitted too, with two degrees of freedom left. */
const FEWEST_SKEW = 7;
const FEWEST_TILT = 10;
/** Relative step of a parameter: rounding and bend of the functions are both far below its effect. */
const DIFFERENCE = 1e-6;
/** The square of 20 sums scatters by 35 % itself: only what is clearly more widens the intervals. */
const CALM = 0.8;
/** An inner window needs enough points to tell shape from scatter. */
const FEWEST_HELD = 9;
const SHRINK = 1.8;
/**
 * The error of the shape goes with this power of the window's width, so each step leaves about a tenth of
 * it.
 */
const SHAPE_POWER = 4;
/** Samples that find the shape; in noise the means of all samples then sharpen it. */
const SELECTION = 240;
const MEANS = 400;
/** Von Neumann's ratio; scatter gives 2 ± 0.3 over that many samples, a shape that does not fit under 0.1. */
const HOPELESS = 0.2;
