import type { Noise } from "../noise.ts";
import { leastSquares, type Prior, type Solution } from "./least-squares.ts";
import type { Points } from "./points.ts";
import { DB_PER_POWER, type Residuals, residualsOf, type Scatter, unbiased } from "./residuals.ts";
import { CURVE, resonatorPower, TILT } from "./resonator.ts";

/** A fit and what it leaves over. */
export interface Candidate {
  solution: Solution;
  residuals: Residuals;
}

/** The larger σ of the sweep's and of the samples near the dip, and that of the sweep alone. */
export interface FitNoise extends Noise {
  sweepDb: number;
}

/** What fits of one dip share. */
export interface FitTask {
  /** How many parameters move. */
  free: number;
  /** abs Γ comes from a complex Γ. */
  complex: boolean;
  noise: FitNoise;
}

/**
 * The resonator fitted to `data` under each kind of scatter, from `start`; the one whose scatter explains
 * the residuals better. Null when neither gives finite numbers.
 */
export function likelier(data: Points, start: Float64Array, task: FitTask): Candidate | null {
  const even = reweigh(data, start, task, "even");
  const decibel = reweigh(data, start, task, "decibel");
  if (!even || !decibel) return even ?? decibel;
  const n = data.x.length;
  const clearly = decibel.residuals.score < even.residuals.score - (CLEARLY * n) / Math.max(1, n - task.free);
  return clearly && decibel.residuals.sigma <= SAME_EVERYWHERE * task.noise.sweepDb ? decibel : even;
}

/**
 * Last fit on the means of `size` samples each; their bias is that of single samples, as the selection told
 * it.
 */
export function fitMeans(data: Points, before: Candidate, task: FitTask, size: number): Candidate | null {
  const { free, complex } = task;
  const { scatter, floor } = before.residuals;
  const start = before.solution.p;
  const y = unbiased(data.y, before.residuals, complex);
  const weighed = residualsOf(data.x, y, start, free, scatter, floor);
  if (!weighed) return null;
  const priors = priorsOf(start, task.noise, scatter, size);
  const { weight } = weighed;
  const solution = leastSquares({
    model: resonatorPower,
    x: data.x,
    y,
    weight,
    start,
    free,
    priors,
    enough: ENOUGH,
  });
  const residuals = residualsOf(data.x, y, solution.p, free, scatter, floor);
  return residuals && { solution, residuals };
}

/** Fits again with the weights of the scatter until they and the parameters agree. */
function reweigh(data: Points, start: Float64Array, task: FitTask, scatter: Scatter): Candidate | null {
  const { free, complex } = task;
  const priors = priorsOf(start, task.noise, scatter, 1);
  let solution: Solution | null = null;
  let residuals = residualsOf(data.x, data.y, start, free, scatter);
  for (let round = 0; round < ROUNDS && residuals; round++) {
    const y = unbiased(data.y, residuals, complex);
    solution = leastSquares({
      model: resonatorPower,
      x: data.x,
      y,
      weight: residuals.weight,
      start: solution?.p ?? start,
      free,
      priors,
      enough: ENOUGH,
    });
    residuals = residualsOf(data.x, y, solution.p, free, scatter);
  }
  return solution && residuals ? { solution, residuals } : null;
}

/**
 * Tilt and curve are near 0; without this they run away with κ and A where scatter hides them all. `size`:
 * samples in one mean.
 */
export function priorsOf(p: Float64Array, noise: Noise, scatter: Scatter, size: number): Prior[] {
  if (p.length <= TILT + 1) return [];
  const variance = scatter === "even" ? 4 * noise.gamma ** 2 : (noise.db / DB_PER_POWER) ** 2;
  const tilt = { at: TILT, weight: variance / size / USUAL_TILT ** 2 };
  return p.length <= CURVE + 1 ? [tilt] : [tilt, { at: CURVE, weight: variance / size / USUAL_CURVE ** 2 }];
}

/** Of abs Γ² per unit of w: 30 dB of directivity behind a metre of line give 0.06, see the coverage table. */
const USUAL_TILT = 0.1;
/**
 * The same per unit of w²: half of the tilt's size times the turn in radians over one unit of w, which is
 * under one behind a few metres of line.
 */
const USUAL_CURVE = 0.03;
const ROUNDS = 3;
/** Of the cost of some hundred scattered samples: a ten-thousandth of a σ. */
const ENOUGH = 1e-9;
/**
 * In −2 log likelihood, where samples are many: of few the fit itself takes up part of what would tell, and
 * n/(n − free) times as much is asked. Taking an even scatter for one in dB makes intervals too narrow, the other way
 * round a little too wide.
 */
const CLEARLY = 4;
/**
 * A scatter that is even in decibels is so in the whole sweep: more of it in a dip than outside is another
 * kind.
 */
const SAME_EVERYWHERE = 1.5;
