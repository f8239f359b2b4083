/**
 * The noise of a sweep: standard deviation σ of its return loss, dB.
 *
 * Reads abs Γ (linear, any length, NaN for gaps); differences never reach across a gap. Fewer than five finite points
 * in a row anywhere give 0: no noise can be told. Sweeps over SAMPLE points are sampled in blocks spread over the whole.
 *
 * σ is the median absolute deviation of second differences over √6 and Φ⁻¹(3/4), as for signal-to-noise of spectra
 * (F. Stoehr et al., "DER_SNR", ADASS XVII, ASP Conf. Ser. 394, 2008; from memory, not seen). Second differences also hold the curvature of
 * coarsely sampled dips, which fourth and sixth differences hold less of while white noise weighs alike in all three
 * (variance factors 6, 70, 924), so the least of the three counts. A reading that is
 * rounded has many equal neighbours and a median of 0: then σ is at least that of its rounding, step/√12.
 */
export function noiseDb(magnitude: Float64Array): number {
  const values = new Float64Array(Math.min(magnitude.length, SAMPLE));
  const absolute = new Float64Array(values.length);
  let sigma = Number.POSITIVE_INFINITY;
  let count = 0;
  for (const { weights, scale } of DIFFERENCES) {
    count = differences(magnitude, weights, values);
    if (count < 3) continue;
    const centre = medianInPlace(values, count);
    for (let i = 0; i < count; i++) absolute[i] = Math.abs(values[i] - centre);
    sigma = Math.min(sigma, medianInPlace(absolute, count) / (NORMAL_QUARTILE * scale));
  }
  if (sigma === Number.POSITIVE_INFINITY) return 0;
  return Math.max(sigma, roundingDb(magnitude, values));
}

/** σ of the rounding step, dB; 0 where neighbours are seldom equal. */
function roundingDb(magnitude: Float64Array, values: Float64Array): number {
  const count = differences(magnitude, [1, -1], values);
  let equal = 0;
  let step = Number.POSITIVE_INFINITY;
  for (let i = 0; i < count; i++) {
    const size = Math.abs(values[i]);
    if (size < SAME_DB) equal++;
    else if (size < step) step = size;
  }
  return equal >= EQUAL_SHARE * count && step < COARSEST_STEP_DB ? step / Math.sqrt(12) : 0;
}

/** Weighted sums of neighbouring return losses in dB, written to `out`; returns how many. */
function differences(magnitude: Float64Array, weights: number[], out: Float64Array): number {
  const n = magnitude.length - weights.length + 1;
  const blocks = n > out.length ? Math.ceil(out.length / BLOCK) : 1;
  const length = n > out.length ? Math.floor(out.length / blocks) : n;
  const window = new Float64Array(weights.length);
  let count = 0;
  for (let block = 0; block < blocks; block++) {
    const start = blocks === 1 ? 0 : Math.floor((block * (n - length)) / (blocks - 1));
    for (let j = 0; j < weights.length - 1; j++) window[j + 1] = decibels(magnitude[start + j]);
    for (let i = start; i < start + length; i++) {
      window.copyWithin(0, 1);
      window[weights.length - 1] = decibels(magnitude[i + weights.length - 1]);
      let sum = 0;
      for (let j = 0; j < weights.length; j++) sum += weights[j] * window[j];
      if (sum - sum === 0) out[count++] = sum;
    }
  }
  return count;
}

function decibels(magnitude: number): number {
  return DB_PER_NEPER * Math.log(magnitude);
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
/** The median of this many differences is good to about 1 %. */
const SAMPLE = 16_384;
const BLOCK = 256;
const DIFFERENCES = [
  { weights: [1, -2, 1], scale: Math.sqrt(6) },
  { weights: [1, -4, 6, -4, 1], scale: Math.sqrt(70) },
  { weights: [1, -6, 15, -20, 15, -6, 1], scale: Math.sqrt(924) },
];
/** Return losses that differ by less were the same printed number. */
const SAME_DB = 1e-9;
/** 10 % of equal neighbours was never seen in unrounded data; 0.1 dB steps on a flat trace give over half. */
const EQUAL_SHARE = 0.1;
/** Instruments round to 0.001 to 0.5 dB; larger steps belong to the trace itself. */
const COARSEST_STEP_DB = 1;
