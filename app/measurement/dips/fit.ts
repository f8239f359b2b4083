import { type Fit, knownFit } from "./fit-limits.ts";
import { growing } from "./growing.ts";
import type { Solution } from "./least-squares.ts";
import { meanPoints, selectPoints } from "./points.ts";
import { ROUNDING, smallEnough, successive, whiteEnough } from "./residuals.ts";
import { DEPTH } from "./resonator.ts";
import { type Candidate, type FitNoise, fitMeans, likelier } from "./weighing.ts";
import type { Window } from "./window.ts";

export type { Fit } from "./fit-limits.ts";

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
  const first = growing(some, frequencyHz, magnitude, index, window, heldPower, noise);
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
  return knownFit(best, window, frequencyHz, referenceHz, free) ?? 1;
}

function usable({ p, converged, inverse }: Solution): boolean {
  return converged && inverse !== null && p[DEPTH] > 0 && p[p.length - 1] > 0;
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
