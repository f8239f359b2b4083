import type { Noise } from "../noise.ts";
import { leastSquares, type Prior, type Solution } from "./least-squares.ts";
import type { Points } from "./points.ts";
import { type Residuals, ROUNDING, residualsOf } from "./residuals.ts";
import { resonatorPower, TILT } from "./resonator.ts";
import { priorsOf } from "./weighing.ts";
import type { Window } from "./window.ts";

/** A first fit with even weights, and how many parameters move. */
export interface Grown {
  solution: Solution;
  residuals: Residuals;
  free: number;
}

/**
 * The resonator with four parameters and then with as many as the window's samples bear, each starting where
 * the last ended; where one leaves nothing over, it is the whole truth. `data` are samples of the window,
 * `heldPower` the far power where it is held (then there is no tilt). The curve comes last and with what is
 * known of it and of the tilt beforehand: κ, A and both are hard to tell apart over a window that ends at
 * the flanks. Null when the model gives no finite numbers.
 */
export function growing(
  data: Points,
  frequencyHz: Float64Array,
  magnitude: Float64Array,
  index: number,
  window: Window,
  heldPower: number | null,
  noise: Noise,
): Grown | null {
  const count = window.to - window.from + 1;
  const most = count < FEWEST_SKEW ? 4 : count < FEWEST_TILT || heldPower !== null ? 5 : 6;
  const bare = fitWith(data, firstGuess(frequencyHz, magnitude, index, window, heldPower), 4, heldPower);
  if (!bare || bare.residuals.relative < ROUNDING || most === 4) return bare;
  const { p } = bare.solution;
  const start = Float64Array.from([...p.slice(0, 3), ...new Array(most - 4).fill(0), p[3]]);
  const grown = fitWith(data, start, most, heldPower);
  if (!grown || grown.residuals.relative < ROUNDING || most < 6 || count < FEWEST_CURVE) return grown;
  const six = grown.solution.p;
  const curved = Float64Array.from([...six.slice(0, TILT + 1), 0, six[TILT + 1]]);
  return fitWith(data, curved, 7, null, priorsOf(curved, noise, "even", 1)) ?? grown;
}

function fitWith(
  data: Points,
  start: Float64Array,
  size: number,
  heldPower: number | null,
  priors: readonly Prior[] = [],
): Grown | null {
  const free = heldPower === null ? size : size - 1;
  const solution = leastSquares({ model: resonatorPower, ...data, start, free, priors });
  const residuals = residualsOf(data.x, data.y, solution.p, free, "even");
  return residuals && { solution, residuals, free };
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

/** From here on the skew is fitted too, with two degrees of freedom left. */
const FEWEST_SKEW = 7;
const FEWEST_TILT = 10;
/** Twice as many samples as parameters. */
const FEWEST_CURVE = 14;
