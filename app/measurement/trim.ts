import type { ElementKind } from "./antenna.ts";
import {
  fitLengthLine,
  followsOf,
  isCredible,
  type LengthLine,
  type LengthPair,
  lengthFor,
} from "./length-line.ts";
import { formatLength, formatLengthChange, type LengthUnit } from "./lengths.ts";
import { formatFrequency } from "./units.ts";

export { expectedPlaces, type TrailAtStep } from "./expected-places.ts";
export type { LengthPair } from "./length-line.ts";

export interface TrimOptions {
  /** How lengths are written. */
  unit?: LengthUnit;
  /** Of the part that is cut. */
  kind?: ElementKind | null;
}

/** What to make of a length so that its dip comes to the wanted frequency. */
export interface Trim {
  method: "proportion" | "line";
  lengthM: number;
  /** The 95 % interval, or for the proportion what it is usually off by; null where it is not known. */
  lowM: number | null;
  highM: number | null;
  /** New minus present length. */
  changeM: number;
  /** True where the line is asked further out than it was seen, or the proportion for a large change. */
  farOut: boolean;
  /** The arithmetic in one line. */
  how: string;
}

/**
 * Advice from the history of one length, oldest first: the line through log f against log L where it shows two different lengths
 * and a fall of frequency with length that can be (SLOPES), else the proportion from the last pair. Null where there is no usable
 * pair or `wantedHz` is none.
 */
export function trimTo(
  pairs: readonly LengthPair[],
  wantedHz: number,
  options: TrimOptions = {},
): Trim | null {
  const last = pairs.at(-1);
  if (!last || !(wantedHz > 0) || !Number.isFinite(wantedHz)) return null;
  const line = fitLengthLine(pairs);
  return line && isCredible(line)
    ? byLine(line, last, wantedHz, options.unit)
    : trimByProportion(last, wantedHz, options);
}

/**
 * L_new = L·f_measured/f_wanted, exact where everything scales together. Other parts that share the current make the
 * frequency follow the length less, f ~ L^−s; the limits are those for s of `followsOf`, joined with the uncertainty of the
 * frequency. Null where a number is not positive. Source: REFERENCE 8, after the handbooks' lengths in inverse
 * proportion to frequency.
 */
export function trimByProportion(pair: LengthPair, wantedHz: number, options: TrimOptions = {}): Trim | null {
  const { lengthM, frequencyHz, frequencyUncertaintyHz: half } = pair;
  if (![lengthM, frequencyHz, wantedHz].every((v) => v > 0 && Number.isFinite(v))) return null;
  const { unit } = options;
  const ratio = frequencyHz / wantedHz;
  const newM = lengthM * ratio;
  const ends = followsOf(options.kind).map((s) => lengthM * ratio ** (1 / s));
  const spread = half === null || half === undefined ? null : newM * (half / frequencyHz);
  const how = `${formatLength(lengthM, unit)} × ${formatFrequency(frequencyHz, half ?? null)} / ${formatFrequency(wantedHz)} = ${formatLength(newM, unit)}`;
  return {
    method: "proportion",
    lengthM: newM,
    lowM: spread === null ? null : newM - Math.hypot(newM - Math.min(...ends), spread),
    highM: spread === null ? null : newM + Math.hypot(Math.max(...ends) - newM, spread),
    changeM: newM - lengthM,
    farOut: Math.abs(Math.log(ratio)) > FAR,
    how: `${how} (${formatLengthChange(newM - lengthM, unit)}), as if all of the antenna changed in proportion`,
  };
}

function byLine(line: LengthLine, last: LengthPair, wantedHz: number, unit?: LengthUnit): Trim {
  const { value, low, high } = lengthFor(line, wantedHz);
  const margin = 1 + (line.longestM / line.shortestM - 1) * BEYOND;
  const steepness = `${line.slope < 0 ? "−" : ""}${Math.abs(line.slope).toFixed(2)}`;
  return {
    method: "line",
    lengthM: value,
    lowM: low,
    highM: high,
    changeM: value - last.lengthM,
    farOut: value < line.shortestM / margin || value > line.longestM * margin,
    how: `line through ${line.count} lengths, f ~ L^${steepness}: ${formatFrequency(wantedHz)} at ${formatLength(value, unit)} (${formatLengthChange(value - last.lengthM, unit)})`,
  };
}

/** A line is asked at most this share of its own span beyond its ends. */
const BEYOND = 1;
/** ln 1.1: past a tenth the rest of the antenna no longer goes along. */
const FAR = 0.0953;
