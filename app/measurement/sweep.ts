/**
 * The shapes that flow through Swale: a sweep, a dip, an analysis.
 *
 * SI units inside: hertz, ohm, metre. A sweep is always ascending in frequency with no repeated
 * frequency; NaN marks a gap and never takes part in a dip.
 */

/** What the numbers of a file stand for, as other programs see it. */
export type Quantity = "s11-db" | "return-loss" | "swr" | "level" | "gamma" | "impedance";

export const FREQUENCY_UNITS = ["Hz", "kHz", "MHz", "GHz"] as const;
export type FrequencyUnit = (typeof FREQUENCY_UNITS)[number];

/** Where the reflection coefficient is referred to. */
export type Plane = "instrument" | "port" | "antenna";

export interface Sweep {
  /** Hz, strictly ascending, length n. */
  frequencyHz: Float64Array;
  /** abs Γ, length n; NaN is a gap; values over 1 are kept as they are. */
  magnitude: Float64Array;
  /** Real part of Γ, length n; present together with `gammaIm` in complex sweeps only. */
  gammaRe?: Float64Array;
  /** Imaginary part of Γ, length n. */
  gammaIm?: Float64Array;
  /** Ω, real and positive. */
  referenceOhm: number;
  plane: Plane;
  /** What a picture's pixels allow: half-widths per point. Absent for files of numbers. */
  pictureLimits?: PictureLimits;
  /** What the bench's errors allow, referred to this sweep's plane. Absent while there is no bench. */
  benchLimits?: BenchLimits;
}

/**
 * Worst-case residual errors of the bench at each point, linear, length n; NaN where one is not known. abs Γ lies
 * within abs Γ ± (directivity + tracking·abs Γ + match·abs Γ²) (MEASUREMENT section 3).
 */
export interface BenchLimits {
  directivity: Float64Array;
  tracking: Float64Array;
  match: Float64Array;
  /**
   * Of the tracking: what the loss of the feedline that was taken away adds, as it is known no better. Absent
   * where none was or its loss counts as exact.
   */
  feedline?: Float64Array;
}

/** What was done to a sweep before its dips were found. */
export interface Correction {
  kind: "none" | "scalar" | "three-term";
  plane: Plane;
  /** Hz; the range in which the correction holds; null where nothing was corrected. */
  fromHz: number | null;
  toHz: number | null;
}

export interface PictureLimits {
  /** Hz, half a pixel column, length n. */
  frequencyHz: Float64Array;
  /** abs Γ at the lower and upper end of the trace's uncertainty, length n each. */
  magnitudeLow: Float64Array;
  magnitudeHigh: Float64Array;
}

export interface AnalysisSettings {
  /** SWR limit of the bandwidth, over 1. */
  swrLimit: number;
  /** Smallest prominence in return loss that makes a dip, dB. */
  minimumProminenceDb: number;
}

export const DEFAULT_SETTINGS: AnalysisSettings = { swrLimit: 2, minimumProminenceDb: 3 };

export type DipMethod = "fit" | "parabola" | "sample";

export interface Dip {
  frequencyHz: number;
  /** Half-width of the 95 % interval, Hz; null where it is not known. */
  frequencyUncertaintyHz: number | null;
  /** Lowest SWR; Infinity where abs Γ reaches 1. */
  minimumSwr: number;
  /** Worst-case limits of the bench and the 95 % interval together; null while the bench is unknown. */
  minimumSwrLow: number | null;
  minimumSwrHigh: number | null;
  /** 95 % interval from noise, fit and frequency step alone; null where it is not known. */
  minimumSwrNoiseLow: number | null;
  minimumSwrNoiseHigh: number | null;
  returnLossDb: number;
  /** The same limits as of the SWR, dB; null while the bench is unknown. */
  returnLossLowDb: number | null;
  returnLossHighDb: number | null;
  /** Hz; how far the bench's errors may have moved the lowest point, worst case; null while unknown. */
  benchFrequencyHalfHz: number | null;
  /** Depth below the lower of the two neighbouring crests, dB of return loss. */
  prominenceDb: number;
  bandwidth: Bandwidth | null;
  /** Loaded quality factor; null where it can't be had. `qLow`..`qHigh` is its range. */
  q: number | null;
  qLow: number | null;
  qHigh: number | null;
  /** `qLow`..`qHigh` widened by the limits of the width and of the lowest SWR; null where one is unknown. */
  qLimits: Limits | null;
  /** What the limits of the lowest SWR come from, the largest first, sum 1; empty while they are unknown. */
  shares: Share[];
  /** What is not known about the limits, and what would make it known. */
  unknown: Unknown[];
  method: DipMethod;
  /** True when the lowest point is the first or the last of the sweep. */
  edge: boolean;
  /** Index of the lowest sample in the sweep. */
  sampleIndex: number;
  advice: SweepAgain | null;
}

export interface Bandwidth {
  limitSwr: number;
  /** Hz; null where the sweep ends inside. */
  lowHz: number | null;
  highHz: number | null;
  /** Hz; "at least" when `open`. */
  widthHz: number;
  /** Half-width of the width's 95 % interval, Hz; null where it is not known. */
  widthUncertaintyHz: number | null;
  /** Hz; worst-case limits of the bench and the 95 % interval together; null where unknown or open. */
  widthLowHz: number | null;
  widthHighHz: number | null;
  /** The same for the edges themselves, Hz; null where unknown or open. */
  lowEdge: Limits | null;
  highEdge: Limits | null;
  open: boolean;
  /** Another dip lies in the same stretch. */
  shared: boolean;
  /** Width over the geometric mean of the edges; null when open. */
  fractional: number | null;
}

/** A number lies between these. */
export interface Limits {
  low: number;
  high: number;
}

export const LIMIT_SOURCES = [
  "directivity",
  "tracking",
  "match",
  "noise",
  "fit",
  "step",
  "pixel",
  "feedline",
] as const;
/** Where doubt about a number comes from. */
export type LimitSource = (typeof LIMIT_SOURCES)[number];

export interface Share {
  source: LimitSource;
  /** 0 to 1. */
  share: number;
}

export interface Unknown {
  source: LimitSource;
  /** A plain sentence: which sweep or number would make it known. */
  remedy: string;
}

/** "Too few points: sweep again over …" */
export interface SweepAgain {
  startHz: number;
  stopHz: number;
  points: number;
}

export interface Warning {
  code: string;
  message: string;
}

export interface Analysis {
  /** Version of the method, raised whenever a number can come out differently. */
  version: string;
  settings: AnalysisSettings;
  /** Standard deviation of the sweep's noise, dB of return loss. */
  noiseDb: number;
  dips: Dip[];
  warnings: Warning[];
}
