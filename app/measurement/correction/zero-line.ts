import type { Sweep } from "../sweep.ts";
import { type BenchReferences, gammaAt, magnitudeAt } from "./references.ts";

/** The amplitude of full reflection, in the scale of the sweeps, at each frequency; NaN where it is not known. */
export interface ZeroLine {
  amplitude: Float64Array;
  /** Half the difference of open and short over their mean; NaN with only one of them. */
  ripple: Float64Array;
  from: "open-and-short" | "open" | "short";
}

/**
 * The 0 dB line: the mean of the amplitudes of open and short, in which their first-order errors from directivity and
 * source match cancel (Keysight N9000B Spectrum Analyzer Mode reference, p. 547: point-by-point linear average of the
 * two traces), or the one there is. The same sweep given as both counts once. Null without either. Which of the two is
 * which makes no difference here.
 */
export function zeroLine({ open, short }: BenchReferences, atHz: Float64Array): ZeroLine | null {
  const opened = open && magnitudeAt(open, atHz);
  const shorted = short && !(open && sameSweep(open, short)) ? magnitudeAt(short, atHz) : undefined;
  const ripple = new Float64Array(atHz.length).fill(Number.NaN);
  if (opened && shorted) {
    const amplitude = new Float64Array(atHz.length);
    for (let i = 0; i < amplitude.length; i++) {
      amplitude[i] = (opened[i] + shorted[i]) / 2;
      ripple[i] = Math.abs(opened[i] - shorted[i]) / (opened[i] + shorted[i]);
    }
    return { amplitude, ripple, from: "open-and-short" };
  }
  const amplitude = opened ?? shorted;
  return amplitude ? { amplitude, ripple, from: opened ? "open" : "short" } : null;
}

/** Whether two references hold the same numbers: one file given twice. */
export function sameSweep(a: Sweep, b: Sweep): boolean {
  const same = (x: Float64Array | undefined, y: Float64Array | undefined) =>
    x?.length === y?.length && (x ?? []).every((value, i) => Object.is(value, y?.[i]));
  return (
    same(a.frequencyHz, b.frequencyHz) &&
    same(a.magnitude, b.magnitude) &&
    same(a.gammaRe, b.gammaRe) &&
    same(a.gammaIm, b.gammaIm)
  );
}

/**
 * The phase, as a unit vector, that full reflection of +1 has in these references: of open − short, in which
 * directivity cancels, or of the one there is. Null where they have no phase.
 */
export function zeroPhase(
  { open, short }: BenchReferences,
  atHz: Float64Array,
): { re: Float64Array; im: Float64Array } | null {
  const opened = open && gammaAt(open, atHz);
  const shorted = short && !(open && sameSweep(open, short)) ? gammaAt(short, atHz) : undefined;
  if ((open && !opened) || shorted === null || (!opened && !shorted)) return null;
  const re = new Float64Array(atHz.length);
  const im = new Float64Array(atHz.length);
  for (let i = 0; i < atHz.length; i++) {
    const x = (opened?.re[i] ?? 0) - (shorted?.re[i] ?? 0);
    const y = (opened?.im[i] ?? 0) - (shorted?.im[i] ?? 0);
    const size = Math.hypot(x, y);
    re[i] = x / size;
    im[i] = y / size;
  }
  return { re, im };
}
