import { gammaToImpedance } from "../reflection.ts";
import type { Bandwidth, Dip, Limits, Sweep } from "../sweep.ts";
import type { Fit } from "./fit.ts";

/**
 * The loaded quality factor of a dip: one number where it can be told, else its range; all null where it
 * can't be had.
 */
export interface Quality {
  q: number | null;
  qLow: number | null;
  qHigh: number | null;
  /** True when the loss or the line before the resonator makes it the Q of all that hangs on the port. */
  notOfAntenna: boolean;
}

export interface QualityInput {
  sweep: Sweep;
  index: number;
  frequencyHz: number;
  minimumSwr: number;
  bandwidth: Bandwidth | null;
  fit: Fit | null;
}

/**
 * Q by A. D. Yaghjian & S. R. Best, "Impedance, bandwidth, and Q of antennas", IEEE Trans. Antennas Propag.
 * 53(4), 1298-1324, 2005, for a single resonance: Q·FBW = √((s−r)(rs−1)/s)/r with r = R/Z0 at the dip, s
 * the SWR limit and FBW the width over the geometric mean of the edges.
 *
 * Without phase r and 1/r look the same, and their Qs differ by the factor r: then `qLow` and `qHigh` are
 * the two, and `q` is told only where they are within SAME of each other. With phase R at the dip decides,
 * and the slope Q ≈ f0/(2R)·√(R'² + (X' + abs(X)/f0)²) must agree with it within AGREE; else both make the
 * range. All null on an open or shared stretch, where the lowest SWR is above the limit, or where the dip
 * is a sample only.
 */
export function qualityOf(input: QualityInput): Quality {
  const { bandwidth, fit, sweep, index } = input;
  if (!bandwidth || bandwidth.open || bandwidth.shared || bandwidth.fractional === null) return NONE;
  const pair = fromBand(bandwidth, input.minimumSwr);
  if (!pair) return NONE;
  const lossy = fit?.whole === true && fit.resonator.farPower < LOSSY_POWER;
  const slope = slopeQ(sweep, index);
  if (!slope) {
    const one = pair.overOne / pair.underOne > 1 / SAME && pair.overOne / pair.underOne < SAME;
    const middle = Math.sqrt(pair.overOne * pair.underOne);
    return { q: one ? middle : null, ...range(pair.overOne, pair.underOne), notOfAntenna: lossy };
  }
  const chosen = slope.ratio >= 1 ? pair.overOne : pair.underOne;
  const agrees = Math.abs(slope.q / chosen - 1) < AGREE;
  return { q: agrees ? chosen : null, ...range(chosen, slope.q), notOfAntenna: lossy || !agrees };
}

/**
 * The range of Q over all widths and lowest SWRs within their limits; null where these are not known, or
 * reach to where there is no band. With one Q told, its own side of the reference alone.
 */
export function qLimitsOf(
  { minimumSwrLow, minimumSwrHigh, bandwidth }: Pick<Dip, "minimumSwrLow" | "minimumSwrHigh" | "bandwidth">,
  { q, qLow, qHigh }: Pick<Quality, "q" | "qLow" | "qHigh">,
  minimumSwr: number,
): Limits | null {
  if (!bandwidth || minimumSwrLow === null || minimumSwrHigh === null || qLow === null || qHigh === null)
    return null;
  const { widthLowHz, widthHighHz, widthHz, fractional, limitSwr } = bandwidth;
  if (!widthLowHz || widthHighHz === null || fractional === null || minimumSwrHigh >= limitSwr) return null;
  const told = fromBand(bandwidth, minimumSwr);
  const over = told !== null && q !== null && Math.abs(q - told.overOne) <= Math.abs(q - told.underOne);
  let [low, high] = [qLow, qHigh];
  for (let k = 0; k <= LOOKS; k++) {
    const swr = minimumSwrLow + (k / LOOKS) * (minimumSwrHigh - minimumSwrLow);
    const pair = fromBand(bandwidth, swr);
    if (!pair) return null;
    const sides = q === null ? [pair.overOne, pair.underOne] : [over ? pair.overOne : pair.underOne];
    low = Math.min(low, ...sides.map((one) => (one * widthHz) / widthHighHz));
    high = Math.max(high, ...sides.map((one) => (one * widthHz) / widthLowHz));
  }
  return { low, high };
}

interface Pair {
  /** Q if r is over 1, and if it is under 1. */
  overOne: number;
  underOne: number;
}

function fromBand({ limitSwr: s, fractional }: Bandwidth, minimumSwr: number): Pair | null {
  const q = (r: number) => Math.sqrt(((s - r) * (r * s - 1)) / s) / r / (fractional as number);
  if (!(minimumSwr < s) || !(minimumSwr >= 1)) return null;
  return { overOne: q(minimumSwr), underOne: q(1 / minimumSwr) };
}

/** Q from the slope of impedance at the dip, by the parabola through three samples; null without phase. */
function slopeQ({ frequencyHz: f, gammaRe, gammaIm, referenceOhm }: Sweep, i: number) {
  if (!gammaRe || !gammaIm || i < 1 || i + 1 >= f.length) return null;
  const z = [i - 1, i, i + 1].map((k) => gammaToImpedance({ re: gammaRe[k], im: gammaIm[k] }, referenceOhm));
  const [left, right] = [f[i] - f[i - 1], f[i + 1] - f[i]];
  const slope = (a: number, b: number, c: number) =>
    (((b - a) / left) * right + ((c - b) / right) * left) / (left + right);
  const { re: resistance, im: reactance } = z[1];
  const dR = slope(z[0].re, resistance, z[2].re);
  const dX = slope(z[0].im, reactance, z[2].im);
  const q = (f[i] / (2 * resistance)) * Math.hypot(dR, dX + Math.abs(reactance) / f[i]);
  return Number.isFinite(q) && resistance > 0 ? { q, ratio: resistance / referenceOhm } : null;
}

function range(a: number, b: number) {
  return { qLow: Math.min(a, b), qHigh: Math.max(a, b) };
}

/** Q falls and rises once over the range of r. */
const LOOKS = 16;
const NONE: Quality = { q: null, qLow: null, qHigh: null, notOfAntenna: false };
/** The two Qs print alike to two digits. */
const SAME = 1.02;
/**
 * Slope and band agreed within 4 % on antennas of one resonance; a length of line before them makes it
 * tens.
 */
const AGREE = 0.15;
/** a² of a quarter decibel of loss there and back. */
const LOSSY_POWER = 0.94;
