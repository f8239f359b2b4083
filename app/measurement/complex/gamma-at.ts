import { type Complex, gammaToImpedance } from "../reflection.ts";
import type { Sweep } from "../sweep.ts";

/**
 * Γ at any frequency inside a sweep with phase; null without phase, outside the sweep (nothing is extrapolated), and beside a gap.
 *
 * `hz` in Hz. Real and imaginary part by the cubic through the four nearest samples (Lagrange), by a line where one of the outer
 * two is missing or a gap. A sample is returned as it is.
 */
export function gammaAt(sweep: Sweep, hz: number): Complex | null {
  const { frequencyHz: f, gammaRe, gammaIm } = sweep;
  const n = f.length;
  if (!gammaRe || !gammaIm || n === 0 || !(hz >= f[0] && hz <= f[n - 1])) return null;
  const right = firstAtOrAbove(f, hz);
  if (f[right] === hz) return finite({ re: gammaRe[right], im: gammaIm[right] });
  return between(sweep, right - 1, hz, true);
}

/** Z in Ω at any frequency inside a sweep with phase; null as `gammaAt`. */
export function impedanceAt(sweep: Sweep, hz: number): Complex | null {
  const gamma = gammaAt(sweep, hz);
  return gamma && gammaToImpedance(gamma, sweep.referenceOhm);
}

/** Γ between samples `i` and `i+1` at `hz`; `smooth` false asks for the line. Null beside a gap. */
export function between(sweep: Sweep, i: number, hz: number, smooth: boolean): Complex | null {
  const { frequencyHz: f, gammaRe, gammaIm } = sweep;
  if (!gammaRe || !gammaIm) return null;
  const known = (k: number) => !Number.isNaN((gammaRe[k] ?? Number.NaN) + (gammaIm[k] ?? Number.NaN));
  const wide = smooth && known(i - 1) && known(i + 2);
  const [first, last] = wide ? [i - 1, i + 2] : [i, i + 1];
  let re = 0;
  let im = 0;
  for (let k = first; k <= last; k++) {
    let weight = 1;
    for (let j = first; j <= last; j++) if (j !== k) weight *= (hz - f[j]) / (f[k] - f[j]);
    re += weight * gammaRe[k];
    im += weight * gammaIm[k];
  }
  return finite({ re, im });
}

/** Index of the first frequency that is not below `hz`. */
export function firstAtOrAbove(f: Float64Array, hz: number): number {
  let low = 0;
  let high = f.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (f[middle] < hz) low = middle + 1;
    else high = middle;
  }
  return low;
}

function finite(gamma: Complex): Complex | null {
  return Number.isFinite(gamma.re) && Number.isFinite(gamma.im) ? gamma : null;
}
