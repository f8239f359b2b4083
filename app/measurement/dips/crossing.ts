import type { Sweep } from "../sweep.ts";

/**
 * The frequency between samples `i` and `i+1` at which abs Γ equals `level`; one of the two lies at or
 * below it, the other above.
 *
 * Complex sweeps are interpolated on Γ's real and imaginary part, others on abs Γ², both with the cubic
 * through the four nearest samples (a line where a sample is missing, a gap, or in noise), whose error
 * falls with the fourth power of the step. The root is bracketed by bisection, so that it never leaves the
 * step. `smooth` false asks for the line.
 */
export function crossingHz(sweep: Sweep, i: number, level: number, smooth: boolean): number {
  const { frequencyHz, magnitude, gammaRe, gammaIm } = sweep;
  const wide =
    smooth && !Number.isNaN(magnitude[i - 1] ?? Number.NaN) && !Number.isNaN(magnitude[i + 2] ?? Number.NaN);
  const start = wide ? i - 1 : i;
  const last = wide ? i + 2 : i + 1;
  const target = level * level;
  const complex = gammaRe !== undefined && gammaIm !== undefined;
  const powerAt = (hz: number) => {
    if (complex)
      return (
        lagrange(frequencyHz, gammaRe, start, last, hz) ** 2 +
        lagrange(frequencyHz, gammaIm, start, last, hz) ** 2
      );
    if (last === i + 1) return lagrange(frequencyHz, magnitude, start, last, hz) ** 2;
    let sum = 0;
    for (let k = start; k <= last; k++) sum += magnitude[k] ** 2 * weight(frequencyHz, k, start, last, hz);
    return sum;
  };
  if (Math.abs(magnitude[i] - level) < SAME * level) return frequencyHz[i];
  if (Math.abs(magnitude[i + 1] - level) < SAME * level) return frequencyHz[i + 1];
  let low = frequencyHz[i];
  let high = frequencyHz[i + 1];
  const rising = magnitude[i + 1] > magnitude[i];
  for (let step = 0; step < BISECTIONS; step++) {
    const middle = low + (high - low) / 2;
    if (powerAt(middle) > target === rising) high = middle;
    else low = middle;
  }
  return low + (high - low) / 2;
}

function lagrange(x: Float64Array, y: Float64Array, start: number, last: number, at: number): number {
  let sum = 0;
  for (let k = start; k <= last; k++) sum += y[k] * weight(x, k, start, last, at);
  return sum;
}

function weight(x: Float64Array, k: number, start: number, last: number, at: number): number {
  let product = 1;
  for (let j = start; j <= last; j++) if (j !== k) product *= (at - x[j]) / (x[k] - x[j]);
  return product;
}

/** Halvings until a step of any size is below the last bit. */
const BISECTIONS = 52;
/** A sample on the level is the crossing. */
const SAME = 1e-12;
