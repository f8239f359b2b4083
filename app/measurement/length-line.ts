import type { ElementKind } from "./antenna.ts";
import { NORMAL_95, student95 } from "./uncertainty.ts";

/** A length as it was, and where the dip lay then. */
export interface LengthPair {
  lengthM: number;
  frequencyHz: number;
  /** Half-width of the 95 % interval, Hz; null where it is not known. */
  frequencyUncertaintyHz?: number | null;
}

/** log f = meanLogF + slope·(log L − meanLogL). */
export interface LengthLine {
  /** d log f / d log L: −1 where everything scales together, nearer 0 where other parts hold the rest. */
  slope: number;
  /** Half-width of the slope's 95 % interval; null where it is not known. */
  slopeHalf: number | null;
  meanLogL: number;
  meanLogF: number;
  /** Sum of squares of log L about its mean. */
  sxx: number;
  /** Half-width at 95 % of one logarithm of frequency about the line, t·s; null where it is not known. */
  scatter: number | null;
  count: number;
  /** Metres, the range of lengths seen. */
  shortestM: number;
  longestM: number;
}

export interface Estimate {
  value: number;
  /** Ends of the 95 % interval; null where they are not known. */
  low: number | null;
  high: number | null;
}

/**
 * The straight line through log frequency against log length by least squares. Null with fewer than two different
 * lengths (LEAST_SPREAD apart). Pairs that are not both positive and finite are left out.
 *
 * Three or more pairs: scatter from the residuals, Student's t with n − 2. Two pairs leave no residual: then from the uncertainties
 * of their frequencies, and null where these are not known. Source: N. R. Draper, H. Smith, Applied Regression Analysis, ch. 1
 * (from memory, not seen); checked against scipy.
 */
export function fitLengthLine(pairs: readonly LengthPair[]): LengthLine | null {
  const used = pairs.filter(({ lengthM, frequencyHz }) => isUsable(lengthM) && isUsable(frequencyHz));
  const lengths = used.map(({ lengthM }) => lengthM);
  const [shortestM, longestM] = [Math.min(...lengths), Math.max(...lengths)];
  if (used.length < 2 || !(longestM / shortestM > 1 + LEAST_SPREAD)) return null;
  const x = lengths.map(Math.log);
  const y = used.map(({ frequencyHz }) => Math.log(frequencyHz));
  const [meanLogL, meanLogF] = [mean(x), mean(y)];
  const sxx = x.reduce((sum, v) => sum + (v - meanLogL) ** 2, 0);
  const slope = x.reduce((sum, v, i) => sum + (v - meanLogL) * (y[i] - meanLogF), 0) / sxx;
  const residual = x.reduce((sum, v, i) => sum + (y[i] - meanLogF - slope * (v - meanLogL)) ** 2, 0);
  const free = used.length - 2;
  const scatter = free > 0 ? student95(free) * Math.sqrt(residual / free) : givenScatter(used);
  const slopeHalf = scatter === null ? null : scatter / Math.sqrt(sxx);
  return { slope, slopeHalf, meanLogL, meanLogF, sxx, scatter, count: used.length, shortestM, longestM };
}

/** Frequency, Hz, that a sweep at `lengthM` should show, with its 95 % interval for one new sweep. */
export function frequencyAt(line: LengthLine, lengthM: number): Estimate {
  const d = Math.log(lengthM) - line.meanLogL;
  const middle = line.meanLogF + line.slope * d;
  if (line.scatter === null) return { value: Math.exp(middle), low: null, high: null };
  const half = line.scatter * Math.sqrt(1 + 1 / line.count + (d * d) / line.sxx);
  return { value: Math.exp(middle), low: Math.exp(middle - half), high: Math.exp(middle + half) };
}

/**
 * Length, metres, at which a sweep should show `frequencyHz`. Its interval holds the lengths whose own interval of
 * `frequencyAt` reaches that frequency (Fieller's theorem: E. C. Fieller, J. R. Stat. Soc. B 16, 1954; from memory, not
 * seen). Ends null where the slope can't be told from 0.
 */
export function lengthFor(line: LengthLine, frequencyHz: number): Estimate {
  const { slope, scatter, sxx, count, meanLogL } = line;
  const y = Math.log(frequencyHz) - line.meanLogF;
  const value = Math.exp(meanLogL + y / slope);
  if (scatter === null) return { value, low: null, high: null };
  const g = scatter ** 2 / (slope ** 2 * sxx);
  if (!(g < 1)) return { value, low: null, high: null };
  const middle = y / slope / (1 - g);
  const half =
    (scatter / Math.abs(slope) / (1 - g)) * Math.sqrt((1 - g) * (1 + 1 / count) + (y / slope) ** 2 / sxx);
  return { value, low: Math.exp(meanLogL + middle - half), high: Math.exp(meanLogL + middle + half) };
}

/**
 * Least and most s of f ~ L^−s where only this part changes: 0.66 to 0.72 for a vertical whose radials stay, 0.27 for the radials
 * themselves, 0.97 to 1.17 for dipoles alone or beside other wires (tests/fixtures/nec/trims.json).
 */
export function followsOf(kind: ElementKind | null | undefined): readonly [number, number] {
  return kind === "radial" ? RADIAL_FOLLOWS : FOLLOWS;
}

/** The steepness that lengths of antennas can show; else the history is of something else. */
export function isCredible(line: LengthLine): boolean {
  return line.slope > SLOPES[0] && line.slope < SLOPES[1];
}

function givenScatter(pairs: readonly LengthPair[]): number | null {
  const shares = pairs.map(({ frequencyHz, frequencyUncertaintyHz: half }) =>
    half === null || half === undefined || !Number.isFinite(half) ? null : half / frequencyHz,
  );
  if (shares.some((share) => share === null)) return null;
  const known = shares as number[];
  return (
    NORMAL_95 * Math.sqrt(known.reduce((sum, share) => sum + (share / NORMAL_95) ** 2, 0) / known.length)
  );
}

function isUsable(value: number): boolean {
  return value > 0 && Number.isFinite(value);
}

function mean(values: readonly number[]): number {
  return values.reduce((sum, v) => sum + v, 0) / values.length;
}

/** Lengths nearer than this are one length: a millimetre in ten metres. */
const LEAST_SPREAD = 1e-4;
/** A line this steep or this flat is no length of an antenna: −1 and −0.6 usual, coupled wires −0.3. */
const SLOPES = [-1.5, -0.15] as const;
const FOLLOWS = [0.6, 1.2] as const;
const RADIAL_FOLLOWS = [0.2, 1.05] as const;
