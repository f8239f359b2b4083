import {
  type BenchGiven,
  type BenchStandards,
  IDEAL_STANDARDS,
  NOTHING_GIVEN,
} from "../../../app/measurement/bench.ts";
import type { BenchForCorrection, BenchReferences } from "../../../app/measurement/correction/references.ts";
import type { Complex } from "../../../app/measurement/reflection.ts";
import type { Sweep } from "../../../app/measurement/sweep.ts";

/** Sweeps and benches as numbers for the tests; invented. */

export function scalarSweep(frequencyHz: ArrayLike<number>, magnitude: ArrayLike<number>): Sweep {
  return {
    frequencyHz: Float64Array.from(frequencyHz),
    magnitude: Float64Array.from(magnitude),
    referenceOhm: 50,
    plane: "instrument",
  };
}

export function complexSweep(
  frequencyHz: ArrayLike<number>,
  re: ArrayLike<number>,
  im: ArrayLike<number>,
): Sweep {
  return {
    ...scalarSweep(
      frequencyHz,
      Array.from(re, (value, i) => Math.hypot(value, im[i])),
    ),
    gammaRe: Float64Array.from(re),
    gammaIm: Float64Array.from(im),
  };
}

export function bench(
  references: BenchReferences,
  standards: Partial<BenchStandards> = {},
  given: Partial<BenchGiven> = {},
): BenchForCorrection {
  return {
    references,
    standards: { ...IDEAL_STANDARDS, ...standards },
    given: { ...NOTHING_GIVEN, ...given },
  };
}

export interface Terms {
  d: Complex;
  m: Complex;
  t: Complex;
}

/** Γm = D + T·Γ/(1 − M·Γ), written out. */
export function measured({ d, m, t }: Terms, gamma: Complex): Complex {
  const below = { re: 1 - (m.re * gamma.re - m.im * gamma.im), im: -(m.re * gamma.im + m.im * gamma.re) };
  const above = { re: t.re * gamma.re - t.im * gamma.im, im: t.re * gamma.im + t.im * gamma.re };
  const power = below.re ** 2 + below.im ** 2;
  return {
    re: d.re + (above.re * below.re + above.im * below.im) / power,
    im: d.im + (above.im * below.re - above.re * below.im) / power,
  };
}

export function polar(size: number, degrees: number): Complex {
  return { re: size * Math.cos((degrees * Math.PI) / 180), im: size * Math.sin((degrees * Math.PI) / 180) };
}

export const codes = (warnings: { code: string }[]): string[] => warnings.map(({ code }) => code);
