/**
 * The noise of a sweep: standard deviation σ of its return loss, dB.
 *
 * Reads abs Γ (linear, any length, NaN for gaps); differences never reach across a gap. Too few of them
 * give 0: no noise can be told. Sweeps over SAMPLE points are sampled in blocks spread over the whole.
 *
 * σ is the median absolute deviation of second differences over √6 and Φ⁻¹(3/4), as for signal-to-noise of
 * spectra (F. Stoehr et al., "DER_SNR", ADASS XVII, ASP Conf. Ser. 394, 2008; from memory, not seen).
 * Second differences also hold the curvature of coarsely sampled dips, which fourth and sixth differences
 * hold less of while white noise weighs alike in all three (variance factors 6, 70, 924), so the least of
 * the three counts. A reading that is rounded has many equal neighbours and a median of 0: then σ is at
 * least that of its rounding, step/√12.
 */
export function noiseDb(magnitude: Float64Array): number {
  const values = sample(magnitude);
  for (let i = 0; i < values.length; i++) values[i] = DB_PER_NEPER * Math.log(values[i]);
  return Math.max(scatterOf(values), roundingOf(values, COARSEST_DB));
}

/** The same in abs Γ itself. */
export function noiseGamma(magnitude: Float64Array): number {
  const values = sample(magnitude);
  return Math.max(scatterOf(values), roundingOf(values, COARSEST_GAMMA));
}

/** σ in both: of decibels and of abs Γ. */
export interface Noise {
  db: number;
  gamma: number;
}

export function noiseOf(magnitude: Float64Array): Noise {
  return { db: noiseDb(magnitude), gamma: noiseGamma(magnitude) };
}

/**
 * σ from the samples around one: as far as 32 on each side, enough for 15 %, few enough to stay near a dip.
 */
export function noiseNear(magnitude: Float64Array, index: number): Noise {
  return noiseOf(magnitude.subarray(Math.max(0, index - NEAR), index + NEAR + 1));
}

/** All values, or blocks spread over the whole with a gap between them. */
function sample(magnitude: Float64Array): Float64Array {
  const n = magnitude.length;
  if (n <= SAMPLE) return Float64Array.from(magnitude);
  const blocks = SAMPLE / BLOCK;
  const values = new Float64Array(blocks * (BLOCK + 1)).fill(Number.NaN);
  for (let block = 0; block < blocks; block++) {
    const start = Math.floor((block * (n - BLOCK)) / (blocks - 1));
    values.set(magnitude.subarray(start, start + BLOCK), block * (BLOCK + 1));
  }
  return values;
}

function scatterOf(values: Float64Array): number {
  const sums = new Float64Array(values.length);
  let sigma = Number.POSITIVE_INFINITY;
  for (const { weights, factor } of DIFFERENCES) {
    const count = differences(values, weights, sums);
    if (count < FEWEST) continue;
    const centre = medianInPlace(sums, count);
    for (let i = 0; i < count; i++) sums[i] = Math.abs(sums[i] - centre);
    sigma = Math.min(sigma, medianInPlace(sums, count) / (NORMAL_QUARTILE * factor));
  }
  return sigma === Number.POSITIVE_INFINITY ? 0 : sigma;
}

/** σ of the rounding step; 0 where neighbours are seldom equal. */
function roundingOf(values: Float64Array, coarsest: number): number {
  let count = 0;
  let equal = 0;
  let step = Number.POSITIVE_INFINITY;
  for (let i = 1; i < values.length; i++) {
    const size = Math.abs(values[i] - values[i - 1]);
    if (!Number.isFinite(size)) continue;
    count++;
    if (size < SAME) equal++;
    else if (size < step) step = size;
  }
  return equal >= EQUAL_SHARE * count && step < coarsest ? step / Math.sqrt(12) : 0;
}

/** Weighted sums of neighbours, written to `out`; those that touch a gap are left out. Returns how many. */
function differences(values: Float64Array, weights: number[], out: Float64Array): number {
  let count = 0;
  for (let i = weights.length - 1; i < values.length; i++) {
    let sum = 0;
    for (let j = 0; j < weights.length; j++) sum += weights[j] * values[i - j];
    if (sum - sum === 0) out[count++] = sum;
  }
  return count;
}

/** Median by selection (Hoare's quickselect); reorders the first `count` values. */
function medianInPlace(values: Float64Array, count: number): number {
  const upper = select(values, count, count >> 1);
  if (count % 2 === 1) return upper;
  let lower = values[0];
  for (let i = 1; i < count >> 1; i++) if (values[i] > lower) lower = values[i];
  return (lower + upper) / 2;
}

function select(values: Float64Array, count: number, rank: number): number {
  let left = 0;
  let right = count - 1;
  while (left < right) {
    const pivot = values[(left + right) >>> 1];
    let i = left;
    let j = right;
    while (i <= j) {
      while (values[i] < pivot) i++;
      while (values[j] > pivot) j--;
      if (i > j) break;
      const swap = values[i];
      values[i++] = values[j];
      values[j--] = swap;
    }
    if (rank <= j) right = j;
    else if (rank >= i) left = i;
    else break;
  }
  return values[rank];
}

const DB_PER_NEPER = 20 / Math.LN10;
const NORMAL_QUARTILE = 0.674489750196082;
/** The median of this many differences is good to about 1.5 %. */
const SAMPLE = 8192;
const BLOCK = 256;
const NEAR = 32;
/** With fewer differences the dip itself is the median. */
const FEWEST = 10;
const DIFFERENCES = [
  { weights: [1, -2, 1], factor: Math.sqrt(6) },
  { weights: [1, -4, 6, -4, 1], factor: Math.sqrt(70) },
  { weights: [1, -6, 15, -20, 15, -6, 1], factor: Math.sqrt(924) },
];
/** Values that differ by less were the same printed number. */
const SAME = 1e-9;
/** 10 % of equal neighbours was never seen in unrounded data; 0.1 dB steps on a flat trace give over half. */
const EQUAL_SHARE = 0.1;
/**
 * Instruments round to 0.001 to 0.5 dB, or to 0.001 to 0.02 of abs Γ; larger steps belong to the trace
 * itself.
 */
const COARSEST_DB = 1;
const COARSEST_GAMMA = 0.03;
