import type { BenchLimits, LimitSource } from "../sweep.ts";

/** Worst-case errors of a bench at one place, linear. */
export interface BenchErrors {
  directivity: number;
  tracking: number;
  match: number;
}

/**
 * What an imperfect bench shows as abs Γ = `measured` lies between these in truth; Infinity where nothing
 * bounds it.
 *
 * From the model Γm = D + (1+T)·Γ/(1−M·Γ) with abs D ≤ d, abs T ≤ t, abs M ≤ m: abs Γm lies within
 * (1−t)g/(1+mg) − d and (1+t)g/(1−mg) + d, solved for g. To first order that is the published
 * abs Γ ± (d + t·abs Γ + m·abs Γ²) (MEASUREMENT section 3; application notes of scalar reflectometers: from
 * memory, not seen); solved whole it holds to the last bit, also where the errors are large. With d alone it
 * is abs Γ ± d, as in directivity tables.
 */
export function trueLimits(measured: number, { directivity, tracking, match }: BenchErrors) {
  const [below, above] = [Math.max(0, measured - directivity), measured + directivity];
  const left = 1 - tracking - match * above;
  return {
    low: below / (1 + tracking + match * below),
    high: left > 0 ? above / left : Number.POSITIVE_INFINITY,
  };
}

/** The other way round: what the bench may show of a true abs Γ. */
export function shownLimits(gamma: number, { directivity, tracking, match }: BenchErrors) {
  const left = 1 - match * gamma;
  return {
    low: Math.max(0, ((1 - tracking) * gamma) / (1 + match * gamma) - directivity),
    high: left > 0 ? ((1 + tracking) * gamma) / left + directivity : Number.POSITIVE_INFINITY,
  };
}

/** The largest errors over the samples `from`..`to` (NaN where one is not known at any of them). */
export function errorsOver(limits: BenchLimits, from: number, to: number): BenchErrors {
  const largest = (values: Float64Array) => {
    let most = 0;
    for (let i = Math.max(0, from); i <= Math.min(values.length - 1, to); i++)
      most = Math.max(most, values[i]);
    return most;
  };
  return {
    directivity: largest(limits.directivity),
    tracking: largest(limits.tracking),
    match: largest(limits.match),
  };
}

/** Which of the errors are not known. */
export function unknownOf(errors: BenchErrors): LimitSource[] {
  return BENCH_SOURCES.filter((source) => Number.isNaN(errors[source]));
}

const BENCH_SOURCES = ["directivity", "tracking", "match"] as const;
