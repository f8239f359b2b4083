import type { BenchForCorrection } from "./correct.ts";

/** A stretch of frequencies in which something limits the bench, in plain words. */
export interface BenchLimit {
  code: string;
  message: string;
  fromHz: number;
  toHz: number;
}

export interface BenchQuality {
  /** Hz, ascending, length n: where the references that there are overlap. Arrays below have the same length; NaN is "not known". */
  frequencyHz: Float64Array;
  /** dB from a through sweep down to the 0 dB line. */
  insertionLossDb: Float64Array;
  /** dB, the 0 dB line against its own median. */
  flatnessDb: Float64Array;
  /** dB, open over short; the sign is kept. */
  openShortDisagreementDb: Float64Array;
  /** dB, positive: 40 is better than 30. */
  directivityDb: Float64Array;
  /** dB, worst case either way. */
  trackingDb: Float64Array;
  /** dB, positive, as a return loss. */
  testPortMatchDb: Float64Array;
  wish: { swr: number; tolerance: number };
  /** Hz; stretches in which the wished SWR is known to ± its tolerance. */
  ranges: { fromHz: number; toHz: number }[];
  limits: BenchLimit[];
  /** What is not known, and what would make it known, a plain sentence each. */
  missing: { code: string; message: string }[];
}

export function qualifyBench(
  _bench: BenchForCorrection,
  wish: { swr: number; tolerance: number },
): BenchQuality {
  const none = new Float64Array(0);
  return {
    frequencyHz: none,
    insertionLossDb: none,
    flatnessDb: none,
    openShortDisagreementDb: none,
    directivityDb: none,
    trackingDb: none,
    testPortMatchDb: none,
    wish,
    ranges: [],
    limits: [],
    missing: [],
  };
}
