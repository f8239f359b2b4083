import type { BenchLimits } from "../sweep.ts";
import type { Missing } from "./missing.ts";
import type { Wish } from "./wish.ts";

export interface BenchQuality {
  /** What this bench does to a sweep that has phase; one without is never corrected by more than "scalar". */
  correction: "none" | "scalar" | "three-term";
  /** Hz, ascending, length n: where open and short overlap. Arrays below have the same length; NaN is "not known". */
  frequencyHz: Float64Array;
  /** dB from a through sweep down to the 0 dB line. */
  insertionLossDb: Float64Array;
  /** dB, the 0 dB line over its own median. */
  flatnessDb: Float64Array;
  /** dB, open over short, with its sign. */
  openShortDisagreementDb: Float64Array;
  /** dB, positive, of the bench itself before a three-term correction: 40 is better than 30. */
  directivityDb: Float64Array;
  /** dB, worst case, error of the 0 dB line. */
  trackingDb: Float64Array;
  /** dB, positive, return loss of the test port itself. */
  testPortMatchDb: Float64Array;
  /** What is left in a corrected sweep: the limits behind `ranges`. */
  left: BenchLimits;
  wish: Wish;
  /** Hz; stretches in which the wished SWR is known to plus or minus its tolerance. */
  ranges: { fromHz: number; toHz: number }[];
  /** What limits the bench, and where, in plain words. */
  limits: BenchLimit[];
  /** What is not known, and which sweep or figure would make it known. */
  missing: Missing[];
}

/** A stretch of frequencies in which something limits the bench, in plain words. */
export interface BenchLimit {
  code: string;
  message: string;
  fromHz: number;
  toHz: number;
}
