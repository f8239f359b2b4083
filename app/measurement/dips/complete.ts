import type { Bandwidth, Dip } from "../sweep.ts";

/** A dip as it comes back from storage: what later versions of the method added may be absent. */
export type StoredDip = Omit<Dip, keyof typeof NOTHING_KNOWN | "bandwidth" | "minimumSwr"> &
  Partial<Pick<Dip, keyof typeof NOTHING_KNOWN>> & {
    minimumSwr: number | null;
    bandwidth: (Omit<Bandwidth, keyof typeof NO_LIMITS> & Partial<typeof NO_LIMITS>) | null;
  };

/**
 * A stored dip with every field there: what its version of the method did not know is null or empty, never
 * guessed, and what else hangs on the object (a public id) stays. JSON has no Infinity: an SWR, or the upper
 * limit of one whose lower limit is known, comes back as null and means infinite.
 */
export function completeDip<D extends StoredDip>(stored: D): D & Dip {
  const whole = { ...NOTHING_KNOWN, ...stored };
  const upper = (low: number | null, high: number | null) =>
    low === null ? high : (high ?? Number.POSITIVE_INFINITY);
  return {
    ...whole,
    minimumSwr: stored.minimumSwr ?? Number.POSITIVE_INFINITY,
    minimumSwrHigh: upper(stored.minimumSwrLow, stored.minimumSwrHigh),
    minimumSwrNoiseHigh: upper(stored.minimumSwrNoiseLow, stored.minimumSwrNoiseHigh),
    bandwidth: stored.bandwidth && { ...NO_LIMITS, ...stored.bandwidth },
  };
}

const NOTHING_KNOWN = {
  returnLossLowDb: null,
  returnLossHighDb: null,
  benchFrequencyHalfHz: null,
  qLimits: null,
  shares: [],
  unknown: [],
} satisfies Partial<Dip>;
const NO_LIMITS: Pick<Bandwidth, "widthLowHz" | "widthHighHz" | "lowEdge" | "highEdge"> = {
  widthLowHz: null,
  widthHighHz: null,
  lowEdge: null,
  highEdge: null,
};
