import type { BenchLimits } from "../sweep.ts";
import type { BenchLimit, BenchQuality } from "./bench-quality.ts";
import { type Stretch, sentenceStart, stretchesOf } from "./stretches.ts";
import { termFaults } from "./term-faults.ts";
import type { ErrorTerms } from "./three-term.ts";
import { allowedError, isKnown, type Wish } from "./wish.ts";

type Measures = Pick<
  BenchQuality,
  | "frequencyHz"
  | "flatnessDb"
  | "openShortDisagreementDb"
  | "directivityDb"
  | "testPortMatchDb"
  | "trackingDb"
>;

/** What limits a bench and where, from its measures and what is left after its correction; ascending by weight. */
export function limitsOf(measures: Measures, left: BenchLimits, wish: Wish): BenchLimit[] {
  const at = measures.frequencyHz;
  const needed = allowedError(wish);
  const worst = (values: Float64Array, { first, last }: Stretch, pick: (a: number, b: number) => number) =>
    values
      .subarray(first, last + 1)
      .reduce((most, value) => (Number.isNaN(value) ? most : pick(most, value)), values[first]);
  const all = (code: string, is: (i: number) => boolean, say: (stretch: Stretch) => string): BenchLimit[] =>
    stretchesOf(at, is, BRIDGE).map((stretch) => ({
      code,
      message: `${sentenceStart(at, stretch)} ${say(stretch)}`,
      fromHz: at[stretch.first],
      toHz: at[stretch.last],
    }));
  const wished = `an SWR of ${wish.swr} ± ${wish.tolerance}`;
  const size = measures.openShortDisagreementDb.map(Math.abs);
  return [
    ...all(
      "load-not-a-load",
      (i) => measures.directivityDb[i] < NO_LOAD_DB,
      (s) =>
        `the load returns ${least(worst(measures.directivityDb, s, Math.min))} open and short: it is no load, was not connected, or the files were exchanged.`,
    ),
    ...all(
      "open-short-disagree",
      (i) => size[i] > DISAGREE_DB,
      (s) =>
        `the open and the short disagree by more than 1 dB (${over(worst(size, s, Math.max))} dB at most).`,
    ),
    ...all(
      "zero-line-falls",
      (i) => measures.flatnessDb[i] < FALLEN_DB,
      (s) =>
        `the 0 dB line lies more than 10 dB under its middle (${(-worst(measures.flatnessDb, s, Math.min)).toFixed(0)} dB at most): noise and leakage come closer to what is measured.`,
    ),
    ...all(
      "directivity",
      // Where the load is none, nothing is known of the directivity.
      (i) => left.directivity[i] > needed && !(measures.directivityDb[i] < NO_LOAD_DB),
      (s) =>
        `the directivity is down to ${decibels(worst(left.directivity, s, Math.max))} dB; ${wished} needs ${decibels(needed)} dB.`,
    ),
    ...all(
      "match-and-line",
      (i) =>
        left.directivity[i] <= needed &&
        !Number.isNaN(left.match[i] + left.tracking[i]) &&
        !isKnown(wish, left, i),
      (s) =>
        `directivity alone would do, but with the test port's match (down to ${decibels(worst(left.match, s, Math.max))} dB) and the error of the 0 dB line (up to ${(20 * Math.log10(1 + worst(left.tracking, s, Math.max))).toFixed(2)} dB) ${wished} is not reached.`,
    ),
  ];
}

/** What only the phase of open, short and load shows, of the bench as a whole; none without phase. */
export function phaseLimitsOf(at: Float64Array, terms: readonly (ErrorTerms | null)[] | null): BenchLimit[] {
  return termFaults(at, terms ?? []).map((fault) => ({ ...fault, fromHz: at[0], toHz: at[at.length - 1] }));
}

function least(db: number): string {
  return db < 0.05 ? "as much as" : `only ${db.toFixed(1)} dB less than`;
}

/** A decibel and a hair is not told as "1.0". */
function over(db: number): string {
  return db.toFixed(db < 1.1 ? 2 : 1);
}

function decibels(linear: number): string {
  return (-20 * Math.log10(linear)).toFixed(1);
}

/** Stretches are told as one where less than a tenth of the frequency lies between them. */
const BRIDGE = 1.1;
/** A load of 30 or 90 Ω still leaves 12 dB; open-circuited leads leave 0 to 3 dB. */
const NO_LOAD_DB = 10;
/** Good bridges stay under 0.5 dB; 1 dB is the usual limit of use (common practice, no source). */
const DISAGREE_DB = 1;
const FALLEN_DB = -10;
