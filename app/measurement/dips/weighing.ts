import { leastSquares, type Solution } from "./least-squares.ts";
import type { Points } from "./points.ts";
import { type Residuals, residualsOf, type Scatter, unbiased } from "./residuals.ts";
import { resonatorPower } from "./resonator.ts";

/** A fit and what it leaves over. */
export interface Candidate {
  solution: Solution;
  residuals: Residuals;
}

/**
 * The resonator fitted to `data` under each kind of scatter, from `start`; the one whose scatter explains
 * the residuals better. `free` parameters move; `complex` says that abs Γ comes from a complex Γ, `noiseDb`
 * is the sweep's σ. Null when neither gives finite numbers.
 */
export function likelier(
  data: Points,
  start: Float64Array,
  free: number,
  complex: boolean,
  noiseDb: number,
): Candidate | null {
  const even = reweigh(data, start, free, "even", complex);
  const decibel = reweigh(data, start, free, "decibel", complex);
  if (!even || !decibel) return even ?? decibel;
  const clearly = decibel.residuals.score < even.residuals.score - CLEARLY;
  return clearly && decibel.residuals.sigma <= SAME_EVERYWHERE * noiseDb ? decibel : even;
}

/** Last fit on the means of all samples; their bias is that of single samples, as the selection told it. */
export function fitMeans(data: Points, before: Candidate, free: number, complex: boolean): Candidate | null {
  const { scatter, floor } = before.residuals;
  const start = before.solution.p;
  const y = unbiased(data.y, before.residuals, complex);
  const weighed = residualsOf(data.x, y, start, free, scatter, floor);
  if (!weighed) return null;
  const solution = leastSquares({ model: resonatorPower, x: data.x, y, weight: weighed.weight, start, free });
  const residuals = residualsOf(data.x, y, solution.p, free, scatter, floor);
  return residuals && { solution, residuals };
}

/** Fits again with the weights of the scatter until they and the parameters agree. */
function reweigh(
  data: Points,
  start: Float64Array,
  free: number,
  scatter: Scatter,
  complex: boolean,
): Candidate | null {
  let solution: Solution | null = null;
  let residuals = residualsOf(data.x, data.y, start, free, scatter);
  for (let round = 0; round < ROUNDS && residuals; round++) {
    const y = unbiased(data.y, residuals, complex);
    const { weight } = residuals;
    solution = leastSquares({
      model: resonatorPower,
      x: data.x,
      y,
      weight,
      start: solution?.p ?? start,
      free,
    });
    residuals = residualsOf(data.x, y, solution.p, free, scatter);
  }
  return solution && residuals ? { solution, residuals } : null;
}

const ROUNDS = 3;
/**
 * In −2 log likelihood. Taking an even scatter for one in dB makes intervals too narrow, the other way
 * round a little too wide.
 */
const CLEARLY = 4;
/**
 * A scatter that is even in decibels is so in the whole sweep: more of it in a dip than outside is another
 * kind.
 */
const SAME_EVERYWHERE = 1.5;
