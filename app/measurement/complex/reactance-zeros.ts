import { gammaToImpedance } from "../reflection.ts";
import type { Sweep } from "../sweep.ts";
import { combine, NORMAL_95 } from "../uncertainty.ts";
import { between } from "./gamma-at.ts";
import { complexNoise } from "./impedance.ts";

/** A frequency at which the reactance passes through zero. */
export interface ReactanceZero {
  frequencyHz: number;
  /** Half-width of the 95 % interval from noise and frequency step, Hz. */
  frequencyHalfHz: number;
  resistanceOhm: number;
  /** series: the reactance rises through zero with frequency; parallel: it falls. */
  kind: "series" | "parallel";
}

/**
 * All frequencies at which X passes through zero at the sweep's plane, ascending; empty for a scalar sweep.
 *
 * X has the sign of the imaginary part of Γ, and Γ is smooth where X jumps from +∞ to −∞ (which is no zero: there Γ is 1), so
 * the zeros are looked for in Γ: between two neighbours by the cubic through the four nearest samples and bisection, in noise by
 * a straight line through all samples of the crossing. A crossing counts once Im Γ stands clear of the noise (CLEAR σ) on both
 * sides of zero, so that scatter around zero makes one, not many. A gap ends a crossing. Rising and falling zeros as for one-ports
 * of loss: W. L. Everitt and G. E. Anner, Communication Engineering (from memory, not seen). `noise` is the sweep's own.
 */
export function reactanceZeros(sweep: Sweep, noise = complexNoise(sweep)): ReactanceZero[] {
  const { gammaIm } = sweep;
  if (!gammaIm || noise === null) return [];
  const clear = Math.max(CLEAR * noise, LEAST);
  const zeros: ReactanceZero[] = [];
  let from = -1;
  for (let i = 0; i < gammaIm.length; i++) {
    if (Number.isNaN(gammaIm[i])) from = -1;
    if (!(Math.abs(gammaIm[i]) > clear)) continue;
    if (from >= 0 && gammaIm[from] < 0 !== gammaIm[i] < 0) {
      const zero = crossing(sweep, from, i, noise);
      if (zero) zeros.push(zero);
    }
    from = i;
  }
  return zeros;
}

/** The zero nearest to `hz` on a scale of ratios; null where there is none. */
export function nearestZero(zeros: readonly ReactanceZero[], hz: number): ReactanceZero | null {
  const apart = (zero: ReactanceZero) => Math.abs(Math.log(zero.frequencyHz / hz));
  return zeros.reduce<ReactanceZero | null>(
    (best, zero) => (best && apart(best) <= apart(zero) ? best : zero),
    null,
  );
}

/** Γ at the crossing between the clear samples `from` and `to`; null where it is the one through Γ = 1. */
function crossing(sweep: Sweep, from: number, to: number, noise: number): ReactanceZero | null {
  const rising = (sweep.gammaIm as Float64Array)[to] > 0;
  const found = to === from + 1 ? adjacent(sweep, from, noise, rising) : byLine(sweep, from, to, noise);
  if (!found || found.re >= OPEN) return null;
  const z = gammaToImpedance({ re: found.re, im: 0 }, sweep.referenceOhm);
  return {
    frequencyHz: found.hz,
    frequencyHalfHz: found.halfHz,
    resistanceOhm: z.re,
    kind: rising ? "series" : "parallel",
  };
}

function adjacent(sweep: Sweep, i: number, noise: number, rising: boolean) {
  const { frequencyHz: f } = sweep;
  const im = sweep.gammaIm as Float64Array;
  const at = (smooth: boolean) => {
    let [low, high] = [f[i], f[i + 1]];
    for (let step = 0; step < BISECTIONS; step++) {
      const middle = low + (high - low) / 2;
      const gamma = between(sweep, i, middle, smooth);
      if (gamma && gamma.im > 0 === rising) high = middle;
      else low = middle;
    }
    return low + (high - low) / 2;
  };
  const hz = at(true);
  const gamma = between(sweep, i, hz, true);
  const slope = Math.abs(im[i + 1] - im[i]) / (f[i + 1] - f[i]);
  const halfHz = combine((NORMAL_95 * noise) / slope, hz - at(false)) ?? 0;
  return gamma && { hz, re: gamma.re, halfHz };
}

/** The straight lines of Im Γ and Re Γ over the samples of the crossing. */
function byLine({ frequencyHz: f, gammaRe, gammaIm }: Sweep, from: number, to: number, noise: number) {
  const [re, im] = [gammaRe as Float64Array, gammaIm as Float64Array];
  const count = to - from + 1;
  let [hz, meanRe, meanIm] = [0, 0, 0];
  for (let i = from; i <= to; i++) {
    hz += f[i] / count;
    meanRe += re[i] / count;
    meanIm += im[i] / count;
  }
  let [square, slopeRe, slopeIm] = [0, 0, 0];
  for (let i = from; i <= to; i++) square += (f[i] - hz) ** 2;
  for (let i = from; i <= to; i++) {
    slopeRe += ((f[i] - hz) * re[i]) / square;
    slopeIm += ((f[i] - hz) * im[i]) / square;
  }
  const away = -meanIm / slopeIm;
  const root = Math.min(f[to], Math.max(f[from], hz + away));
  const scatter = (noise / Math.abs(slopeIm)) * Math.sqrt(1 / count + away ** 2 / square);
  return {
    hz: root,
    re: meanRe + slopeRe * (root - hz),
    halfHz: Math.min((f[to] - f[from]) / 2, NORMAL_95 * scatter),
  };
}

/** In σ of Im Γ: 1 in 15,000 scattered samples lies this far out. */
const CLEAR = 4;
/** Im Γ that files with five printed digits do not resolve. */
const LEAST = 1e-9;
/** Re Γ from which R is over 200,000 times the reference: the turn through the open end, no zero of X. */
const OPEN = 0.99999;
const BISECTIONS = 52;
