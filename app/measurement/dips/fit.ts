import type { Noise } from "../noise.ts";
import { student95 } from "../uncertainty.ts";
import { leastSquares, type Solution } from "./least-squares.ts";
import { meanPoints, selectPoints } from "./points.ts";
import { ROUNDING, residualsOf, smallEnough, successive, whiteEnough } from "./residuals.ts";
import {
  DEPTH,
  edgeAt,
  FAR_POWER,
  LOG_F0,
  LOG_KAPPA,
  lowestPower,
  type Resonator,
  resonatorPower,
} from "./resonator.ts";
import { type Candidate, fitMeans, likelier } from "./weighing.ts";
import type { Window } from "./window.ts";

/** A resonator that the samples of a window support, with 95 % half-widths from its covariance. */
export interface Fit {
  resonator: Resonator;
  window: Window;
  /** Lowest abs Γ², 0 or more. */
  power: number;
  frequencyHalfHz: number;
  powerHalf: number;
  /** True when the far power was fitted too: then the closed form holds at the edges and for Q. */
  whole: boolean;
  /**
   * Half-width of the distance f0·w/κ between the edges at abs Γ² = `power`, Hz; null where there are none.
   */
  widthHalfHz(power: number): number | null;
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
  const free = heldPower === null ? 4 : 3;
  const some = selectPoints(frequencyHz, magnitude, window, referenceHz, SELECTION);
  const start = firstGuess(frequencyHz, magnitude, index, window, heldPower);
  const first = leastSquares({ model: resonatorPower, ...some, start, free });
  const flat = residualsOf(some.x, some.y, first.p, free, "even");
  if (!flat) return 1;
  if (successive(flat.standard) < HOPELESS) return flat.sigma / noise.gamma;
  let best: Candidate | null = { solution: first, residuals: flat };
  if (flat.relative >= ROUNDING) best = likelier(some, first.p, free, complex, noise.sweepDb);
  if (!best || !smallEnough(best.residuals, noise)) return flat.sigma / noise.gamma;
  if (flat.relative >= ROUNDING && window.to - window.from + 1 > some.x.length) {
    const means = meanPoints(frequencyHz, magnitude, window, referenceHz, MEANS, best.solution.p);
    best = fitMeans(means, best, free, complex);
  }
  if (!best || !whiteEnough(best.residuals, free)) return 1;
  const freedom = best.residuals.standard.length - free;
  if (freedom < 1 || !usable(best.solution)) return 1;
  return describe(best.solution, window, referenceHz, frequencyHz, freedom, free) ?? 1;
}

function describe(
  { p, cost, inverse }: Solution,
  window: Window,
  referenceHz: number,
  frequencyHz: Float64Array,
  freedom: number,
  free: number,
): Fit | null {
  if (!inverse) return null;
  const f0Hz = referenceHz * Math.exp(p[LOG_F0]);
  if (!(f0Hz >= frequencyHz[window.from] && f0Hz <= frequencyHz[window.to])) return null;
  const resonator = { f0Hz, farPower: p[FAR_POWER], depth: p[DEPTH], kappa: Math.exp(p[LOG_KAPPA]) };
  const scale = student95(freedom) * Math.sqrt(cost / freedom);
  const half = (gradient: number[]) => {
    let sum = 0;
    for (let i = 0; i < free; i++)
      for (let j = 0; j < free; j++) sum += gradient[i] * gradient[j] * inverse[i * free + j];
    return scale * Math.sqrt(Math.max(0, sum));
  };
  const frequencyHalfHz = half([0, f0Hz, 0, 0]);
  if (frequencyHalfHz > (frequencyHz[window.to] - frequencyHz[window.from]) / 2) return null;
  return {
    resonator,
    window,
    power: lowestPower(resonator),
    frequencyHalfHz,
    powerHalf: half([-1, 0, 0, 1]),
    whole: free === 4,
    widthHalfHz(power) {
      const w = edgeAt(resonator, power);
      if (w === null || w === 0) return null;
      const width = (f0Hz * w) / resonator.kappa;
      const over = resonator.farPower - power;
      const perW = width / w;
      return half([perW / (2 * w * over), width, -width, (-perW * resonator.depth) / (2 * w * over * over)]);
    },
  };
}

function usable({ p, converged, inverse }: Solution): boolean {
  return converged && inverse !== null && p[DEPTH] > 0 && p[FAR_POWER] > 0;
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
