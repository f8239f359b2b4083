import type { Sweep, Warning } from "./sweep.ts";
import { student95 } from "./uncertainty.ts";

/** The mean of several sweeps of the same thing. */
export interface Repeats {
  sweep: Sweep;
  /** Standard deviation of single sweeps in abs Γ per point, length n; NaN with fewer than two. */
  spread: Float64Array;
  /** Half-width of the 95 % interval of the mean by Student's t, abs Γ, length n; NaN with fewer than two. */
  halfWidth: Float64Array;
  /** How many sweeps have a value at each point, length n. */
  count: Uint16Array;
  warnings: Warning[];
}

/**
 * The mean over sweeps of one thing, on the first sweep's frequencies inside the span that all share.
 *
 * Where all have phase Γ is averaged as real and imaginary part, so that what is not the same each time
 * averages away; else the reflected power abs Γ² (its mean is that of a detector; the mean of decibels would
 * lean to the dips) and the phase is left out. Others are brought to the grid by straight lines, complex or
 * in power, never beyond their ends or over a gap. Mean, standard deviation and t interval: JCGM 100:2008,
 * 4.2 and G.3 (from memory, not seen). Null without a sweep, or without a common span or reference.
 */
export function averageRepeats(sweeps: readonly Sweep[]): Repeats | null {
  const first = sweeps.at(0);
  if (!first || sweeps.some((sweep) => sweep.referenceOhm !== first.referenceOhm)) return null;
  const from = Math.max(...sweeps.map(({ frequencyHz: f }) => f.at(0) ?? Number.POSITIVE_INFINITY));
  const to = Math.min(...sweeps.map(({ frequencyHz: f }) => f.at(-1) ?? Number.NEGATIVE_INFINITY));
  const frequencyHz = first.frequencyHz.filter((hz) => hz >= from && hz <= to);
  if (frequencyHz.length === 0) return null;
  const complex = sweeps.every(({ gammaRe, gammaIm }) => gammaRe && gammaIm);
  const parts = sweeps.map((sweep) => partsOn(sweep, frequencyHz, complex));
  const n = frequencyHz.length;
  const [gammaRe, gammaIm, magnitude, spread, halfWidth] = [0, 1, 2, 3, 4].map(() =>
    new Float64Array(n).fill(Number.NaN),
  );
  const count = new Uint16Array(n);
  for (let i = 0; i < n; i++) {
    const there = parts.filter(([a]) => !Number.isNaN(a[i]));
    const k = there.length;
    count[i] = k;
    if (k === 0) continue;
    const [re, im] = [0, 1].map((part) => there.reduce((sum, one) => sum + one[part][i], 0) / k);
    [gammaRe[i], gammaIm[i]] = [re, im];
    magnitude[i] = complex ? Math.hypot(re, im) : Math.sqrt(re);
    if (k < 2) continue;
    const sizes = there.map(([a, b]) => (complex ? Math.hypot(a[i], b[i]) : Math.sqrt(a[i])));
    const mean = sizes.reduce((sum, value) => sum + value, 0) / k;
    spread[i] = Math.sqrt(sizes.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (k - 1));
    halfWidth[i] = (student95(k - 1) * spread[i]) / Math.sqrt(k);
  }
  const base: Sweep = { frequencyHz, magnitude, referenceOhm: first.referenceOhm, plane: first.plane };
  const sweep = complex ? { ...base, gammaRe, gammaIm } : base;
  return { sweep, spread, halfWidth, count, warnings: warningsFor(sweeps, n) };
}

/** Real and imaginary part on the grid, or power twice; NaN where the sweep has none. */
function partsOn(sweep: Sweep, grid: Float64Array, complex: boolean): [Float64Array, Float64Array] {
  const power = sweep.magnitude.map((value) => value * value);
  const [a, b] = complex && sweep.gammaRe && sweep.gammaIm ? [sweep.gammaRe, sweep.gammaIm] : [power, power];
  const f = sweep.frequencyHz;
  const out: [Float64Array, Float64Array] = [new Float64Array(grid.length), new Float64Array(grid.length)];
  let i = 0;
  for (const [k, hz] of grid.entries()) {
    while (i + 1 < f.length && f[i + 1] <= hz) i++;
    const share = f[i] === hz ? 0 : (hz - f[i]) / (f[i + 1] - f[i]);
    out[0][k] = share === 0 ? a[i] : a[i] + share * (a[i + 1] - a[i]);
    out[1][k] = share === 0 ? b[i] : b[i] + share * (b[i + 1] - b[i]);
  }
  return out;
}

function warningsFor(sweeps: readonly Sweep[], n: number): Warning[] {
  const warnings: Warning[] = [];
  if (sweeps.length === 1)
    warnings.push({
      code: "one-repeat",
      message: "There is one sweep: a second of the same thing would tell the spread.",
    });
  const left = sweeps[0].frequencyHz.length - n;
  if (left > 0)
    warnings.push({
      code: "repeats-span",
      message: `${left} points of the first sweep lie outside another one and are left out: nothing is extrapolated.`,
    });
  if (sweeps.some((sweep) => sweep.plane !== sweeps[0].plane))
    warnings.push({
      code: "repeats-plane",
      message: "Not all of these sweeps are referred to the same plane, so they are not of the same thing.",
    });
  return warnings;
}
