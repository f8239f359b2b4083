import { type Noise, noiseNear } from "../noise.ts";
import type { Dip, Sweep } from "../sweep.ts";
import { type Interval, swrInterval } from "../uncertainty.ts";
import type { Stretch } from "./bandwidth.ts";
import type { FoundDip } from "./find.ts";
import { type Fit, fitDip } from "./fit.ts";
import { parabolaDip } from "./parabola.ts";
import { fitWindow } from "./window.ts";

/** The lowest point of a dip by one of the three methods; half-widths of 95 %, null where not known. */
export interface Lowest {
  method: Dip["method"];
  frequencyHz: number;
  frequencyHalfHz: number | null;
  magnitude: number;
  swr: Interval | null;
  /** Of the square of the interval's half-width: what is not noise, but the fit's shape or the step. */
  otherShare: number;
  fit: Fit | null;
}

/**
 * A resonator's fit, else a parabola through three samples of return loss, else (fewer than three samples
 * in the dip, or its bend lost in noise) the lowest sample. `between`: the dips on both sides or the ends
 * of the sweep, which a fit may not cross. `noise`: σ of the sweep.
 */
export function lowestOf(
  sweep: Sweep,
  found: FoundDip,
  between: Stretch,
  noise: Noise,
  mayFit: boolean,
): Lowest {
  const { frequencyHz, magnitude } = sweep;
  const { index, prominenceDb } = found;
  const near = noiseNear(magnitude, index);
  if (mayFit) {
    const allowed = {
      db: Math.max(noise.db, near.db),
      gamma: Math.max(noise.gamma, near.gamma),
      sweepDb: noise.db,
    };
    const window = fitWindow(magnitude, index, prominenceDb, between.from, between.to, noise.gamma);
    const fit = fitDip(frequencyHz, magnitude, index, window, allowed, sweep.gammaRe !== undefined);
    if (fit) {
      return {
        method: "fit",
        frequencyHz: fit.frequencyHz,
        frequencyHalfHz: fit.frequencyHalfHz,
        magnitude: Math.sqrt(fit.power),
        swr: swrInterval(fit.power, fit.powerHalf, fit.powerUp),
        otherShare: fit.shapeShare,
        fit,
      };
    }
  }
  const lowest = Math.max(magnitude[index], SMALLEST);
  const nearby = Math.max(noise.db, (DB_PER_NEPER * near.gamma) / lowest);
  const few = pointsOf(magnitude, index, prominenceDb) < FEWEST_FOR_PARABOLA;
  const top = few ? null : parabolaDip(frequencyHz, magnitude, index, nearby);
  if (!top) return sampleOnly(sweep, index, nearby);
  const gamma = 10 ** (-top.returnLossDb / 20);
  return {
    method: "parabola",
    frequencyHz: top.frequencyHz,
    frequencyHalfHz: top.frequencyHalfHz,
    magnitude: gamma,
    swr: top.swr,
    otherShare: top.stepShare,
    fit: null,
  };
}

/**
 * The lowest sample, or the middle of its plateau. Between it and the first samples that stand clear of it
 * by the noise, the dip may be anywhere.
 */
export function sampleOnly({ frequencyHz, magnitude }: Sweep, index: number, noise: number): Lowest {
  const value = magnitude[index];
  const plateau = reachOf(magnitude, index, value);
  const vague = reachOf(magnitude, index, value * 10 ** ((CLEAR_SIGMAS * noise) / 20));
  const inside = vague.from > 0 && vague.to < magnitude.length - 1;
  const centre = (frequencyHz[plateau.from] + frequencyHz[plateau.to]) / 2;
  const halfHz = inside
    ? Math.max(frequencyHz[vague.to + 1] - centre, centre - frequencyHz[vague.from - 1])
    : null;
  return {
    method: "sample",
    frequencyHz: inside ? centre : frequencyHz[index],
    frequencyHalfHz: halfHz,
    magnitude: value,
    swr: null,
    otherShare: 0,
    fit: null,
  };
}

function reachOf(magnitude: Float64Array, index: number, level: number): Stretch {
  let from = index;
  let to = index;
  while (from > 0 && magnitude[from - 1] <= level) from--;
  while (to < magnitude.length - 1 && magnitude[to + 1] <= level) to++;
  return { from, to };
}

/** Samples below half of the dip's depth in dB. */
function pointsOf(magnitude: Float64Array, index: number, prominenceDb: number): number {
  const half = magnitude[index] * 10 ** (prominenceDb / 40);
  let count = 1;
  for (let i = index - 1; magnitude[i] <= half && count < FEWEST_FOR_PARABOLA; i--) count++;
  for (let i = index + 1; magnitude[i] <= half && count < FEWEST_FOR_PARABOLA; i++) count++;
  return count;
}

/** abs Γ that no instrument sees; keeps a computed 0 from dividing. */
const SMALLEST = 1e-10;
const DB_PER_NEPER = 20 / Math.LN10;
/** A sample this far over the lowest one is higher in truth. */
const CLEAR_SIGMAS = 4;
/** Three points make a parabola. */
const FEWEST_FOR_PARABOLA = 3;
