/**
 * Reflection coefficient, return loss, SWR, mismatch loss and impedance.
 *
 * All scalar, linear inside: abs Γ without unit, return loss and mismatch loss in dB (positive for a passive
 * load), impedance in Ω against a real, positive reference. NaN in gives NaN out and never an exception; a
 * value that has no meaning (a negative magnitude, an SWR under 1) gives NaN too.
 * Sources: T. S. Bird, IEEE Antennas Propag. Mag. 51(2), 166-167, 2009 (sign of return loss);
 * D. M. Pozar, Microwave Engineering, ch. 2 (from memory, not seen).
 */

/** A complex number: real and imaginary part. */
export interface Complex {
  re: number;
  im: number;
}

/** abs Γ ≥ 0 → SWR ≥ 1. Infinity where abs Γ ≥ 1: the wave returns whole, and no number stands for it. */
export function gammaToSwr(magnitude: number): number {
  if (!(magnitude >= 0)) return Number.NaN;
  return magnitude < 1 ? (1 + magnitude) / (1 - magnitude) : Number.POSITIVE_INFINITY;
}

/** SWR ≥ 1 → abs Γ in 0..1; Infinity gives 1, less than 1 gives NaN. */
export function swrToGamma(swr: number): number {
  if (!(swr >= 1)) return Number.NaN;
  return swr === Number.POSITIVE_INFINITY ? 1 : (swr - 1) / (swr + 1);
}

/** abs Γ ≥ 0 → return loss in dB; 0 gives Infinity, over 1 gives a negative number. */
export function gammaToReturnLossDb(magnitude: number): number {
  if (!(magnitude >= 0)) return Number.NaN;
  return magnitude === 1 ? 0 : -20 * Math.log10(magnitude);
}

/** Return loss in dB → abs Γ. Infinity gives 0. */
export function returnLossDbToGamma(returnLossDb: number): number {
  return 10 ** (-returnLossDb / 20);
}

/** SWR ≥ 1 → return loss in dB. */
export function swrToReturnLossDb(swr: number): number {
  return gammaToReturnLossDb(swrToGamma(swr));
}

/** Return loss in dB → SWR; 0 dB and less give Infinity. */
export function returnLossDbToSwr(returnLossDb: number): number {
  return gammaToSwr(returnLossDbToGamma(returnLossDb));
}

/** abs Γ ≥ 0 → mismatch loss −10 log10(1 − abs Γ²), dB; Infinity where abs Γ ≥ 1. */
export function gammaToMismatchLossDb(magnitude: number): number {
  if (!(magnitude >= 0)) return Number.NaN;
  if (magnitude >= 1) return Number.POSITIVE_INFINITY;
  return magnitude === 0 ? 0 : -10 * Math.log10(1 - magnitude * magnitude);
}

/** abs Γ ≥ 0 → share of the incident power that returns, abs Γ². Over 1 stays over 1. */
export function gammaToReflectedPower(magnitude: number): number {
  return magnitude >= 0 ? magnitude * magnitude : Number.NaN;
}

/** A level and the level of full reflection, both dB → abs Γ = 10^((L−L0)/20). */
export function levelDbToGamma(levelDb: number, zeroDb: number): number {
  return 10 ** ((levelDb - zeroDb) / 20);
}

/**
 * Z in Ω → Γ = (Z−Z0)/(Z+Z0). An infinite Z gives 1; Z = −Z0 and a reference that is not positive give NaN.
 */
export function impedanceToGamma({ re, im }: Complex, referenceOhm: number): Complex {
  if (!(referenceOhm > 0) || Number.isNaN(re) || Number.isNaN(im)) return NOT_A_NUMBER;
  if (!Number.isFinite(re) || !Number.isFinite(im)) return { re: 1, im: 0 };
  return divide({ re: re - referenceOhm, im }, { re: re + referenceOhm, im });
}

/** Γ → Z = Z0(1+Γ)/(1−Γ) in Ω. Γ = 1 gives an infinite resistance. */
export function gammaToImpedance({ re, im }: Complex, referenceOhm: number): Complex {
  if (!(referenceOhm > 0) || Number.isNaN(re) || Number.isNaN(im)) return NOT_A_NUMBER;
  if (re === 1 && im === 0) return { re: Number.POSITIVE_INFINITY, im: 0 };
  const ratio = divide({ re: 1 + re, im }, { re: 1 - re, im: -im });
  return { re: referenceOhm * ratio.re, im: referenceOhm * ratio.im };
}

function divide(a: Complex, b: Complex): Complex {
  const power = b.re * b.re + b.im * b.im;
  if (power === 0) return NOT_A_NUMBER;
  return { re: (a.re * b.re + a.im * b.im) / power, im: (a.im * b.re - a.re * b.im) / power };
}

const NOT_A_NUMBER: Complex = { re: Number.NaN, im: Number.NaN };
