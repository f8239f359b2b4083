import { noiseGamma } from "../noise.ts";
import { gammaToImpedance } from "../reflection.ts";
import type { Sweep } from "../sweep.ts";

/** R and X of each point in Ω, length n; NaN in gaps, an infinite R where Γ is exactly 1. */
export interface ImpedanceColumns {
  resistanceOhm: Float64Array;
  reactanceOhm: Float64Array;
}

/** Z = Z0(1+Γ)/(1−Γ) at every point of a sweep with phase, seen at the sweep's plane; null for a scalar sweep. */
export function impedanceColumns({ gammaRe, gammaIm, referenceOhm }: Sweep): ImpedanceColumns | null {
  if (!gammaRe || !gammaIm) return null;
  const resistanceOhm = new Float64Array(gammaRe.length);
  const reactanceOhm = new Float64Array(gammaRe.length);
  for (let i = 0; i < gammaRe.length; i++) {
    const z = gammaToImpedance({ re: gammaRe[i], im: gammaIm[i] }, referenceOhm);
    resistanceOhm[i] = z.re;
    reactanceOhm[i] = z.im;
  }
  return { resistanceOhm, reactanceOhm };
}

/**
 * Standard deviation of the real and of the imaginary part of Γ, linear: the larger of the two, each by the scatter of its
 * differences (`noiseGamma`). 0 where none can be told; null for a scalar sweep.
 */
export function complexNoise({ gammaRe, gammaIm }: Sweep): number | null {
  return gammaRe && gammaIm ? Math.max(noiseGamma(gammaRe), noiseGamma(gammaIm)) : null;
}
