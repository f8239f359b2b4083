import type { Lowest } from "../dips/lowest.ts";
import { gammaToReturnLossDb, gammaToSwr, swrToGamma } from "../reflection.ts";
import type { Bandwidth, Dip, LimitSource, Sweep } from "../sweep.ts";
import type { Interval } from "../uncertainty.ts";
import { type Flanks, reachHz } from "./reach.ts";
import { remediesFor, sharesOf } from "./shares.ts";
import { errorsOver, shownLimits, trueLimits, unknownOf } from "./worst-case.ts";

export interface DipLimitsInput {
  sweep: Sweep;
  index: number;
  lowest: Lowest;
  /** 95 % interval of the lowest SWR, picture included. */
  swr: Interval | null;
  /** Half-width in abs Γ of what a picture adds; 0 for files of numbers. */
  pixelHalf: number;
  bandwidth: Bandwidth | null;
  /** σ of abs Γ. */
  sigma: number;
}

export type DipLimits = Pick<
  Dip,
  | "minimumSwrLow"
  | "minimumSwrHigh"
  | "returnLossLowDb"
  | "returnLossHighDb"
  | "benchFrequencyHalfHz"
  | "shares"
  | "unknown"
  | "bandwidth"
>;

/**
 * The limits of a dip's numbers with the bench's errors: worst case around the ends of the 95 % interval, so
 * to first order the worst-case limit and the statistical half-width added up. Where nothing is scattered
 * they hold always, else as often as the interval does.
 *
 * The lowest point may lie wherever the true trace may be as low as at the dip; an edge wherever the true
 * trace may pass the limit. Both hold whatever the phase of the bench's errors does, so they are wide. All
 * null without bench limits or where one of the errors is not known, with what would make it known.
 */
export function dipLimits(input: DipLimitsInput): DipLimits {
  const { sweep, index, lowest, swr, bandwidth } = input;
  const limits = sweep.benchLimits;
  const here = limits ? errorsOver(limits, index - 1, index + 1) : NOTHING_KNOWN;
  const missing: LimitSource[] = unknownOf(here);
  if (!swr) missing.push("step");
  const unknown = remediesFor(missing);
  if (!limits || !swr || missing.length > 0) return { ...NO_LIMITS, shares: [], unknown, bandwidth };
  const low = trueLimits(swrToGamma(swr.low), here).low;
  const high = trueLimits(swrToGamma(swr.high), here).high;
  const flanks: Flanks = { sweep, index, hz: lowest.frequencyHz, fit: lowest.fit, sigma: input.sigma };
  const mayBeLow = shownLimits(high, here).high;
  const [left, right] = ([-1, 1] as const).map((side) => reachHz(flanks, mayBeLow, side, "farthest"));
  return {
    minimumSwrLow: gammaToSwr(low),
    minimumSwrHigh: gammaToSwr(high),
    returnLossLowDb: returnLoss(high),
    returnLossHighDb: returnLoss(low),
    benchFrequencyHalfHz:
      left === null || right === null ? null : Math.max(right - flanks.hz, flanks.hz - left),
    shares: sharesFor(input, swr, here),
    unknown,
    bandwidth: bandwidth && { ...bandwidth, ...bandLimits(bandwidth, flanks) },
  };
}

function bandLimits({ limitSwr, open, lowHz, highHz }: Bandwidth, flanks: Flanks) {
  const { benchLimits, frequencyHz } = flanks.sweep;
  if (!benchLimits || open || lowHz === null || highHz === null) return null;
  const errors = errorsOver(benchLimits, indexOf(frequencyHz, lowHz), indexOf(frequencyHz, highHz) + 1);
  const shown = shownLimits(swrToGamma(limitSwr), errors);
  if (Number.isNaN(shown.low + shown.high)) return null;
  const nearest = ([-1, 1] as const).map((side) => reachHz(flanks, shown.low, side, "nearest") ?? flanks.hz);
  const [from, to] = ([-1, 1] as const).map((side) => reachHz(flanks, shown.high, side, "farthest"));
  return {
    widthLowHz: Math.max(0, nearest[1] - nearest[0]),
    widthHighHz: from === null || to === null ? null : to - from,
    lowEdge: from === null ? null : { low: from, high: nearest[0] },
    highEdge: to === null ? null : { low: nearest[1], high: to },
  };
}

function sharesFor(
  { sweep, index, lowest, pixelHalf }: DipLimitsInput,
  swr: Interval,
  errors: typeof NOTHING_KNOWN,
) {
  const gamma = lowest.magnitude;
  const half = (swrToGamma(swr.high) - swrToGamma(swr.low)) / 2;
  const line = Math.min(errors.tracking, sweep.benchLimits?.feedline?.[index] || 0);
  const own = Math.sqrt(Math.max(0, half * half - pixelHalf * pixelHalf));
  return sharesOf(
    {
      directivity: errors.directivity,
      tracking: (errors.tracking - line) * gamma,
      feedline: line * gamma,
      match: errors.match * gamma * gamma,
    },
    {
      noise: own * Math.sqrt(1 - lowest.otherShare),
      [lowest.method === "fit" ? "fit" : "step"]: own * Math.sqrt(lowest.otherShare),
      pixel: pixelHalf,
    },
  );
}

function returnLoss(gamma: number): number {
  return Math.max(-DEEPEST_DB, Math.min(DEEPEST_DB, gammaToReturnLossDb(gamma)));
}

/** The last sample at or below `hz`. */
function indexOf(frequencyHz: Float64Array, hz: number): number {
  let [low, high] = [0, frequencyHz.length - 1];
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    if (frequencyHz[middle] <= hz) low = middle;
    else high = middle - 1;
  }
  return low;
}

/** As for the return loss of a dip: no file holds an infinity. */
const DEEPEST_DB = 200;
const NOTHING_KNOWN = { directivity: Number.NaN, tracking: Number.NaN, match: Number.NaN };
const NO_LIMITS = {
  minimumSwrLow: null,
  minimumSwrHigh: null,
  returnLossLowDb: null,
  returnLossHighDb: null,
  benchFrequencyHalfHz: null,
};
