import type { Sweep } from "./sweep.ts";

/**
 * The same sweep seen from another real reference impedance, Ω: Γ → Z → Γ at every point, the SWR in one reference being no
 * multiple of that in another. A scalar sweep has no phase to convert with and comes back as it is, as does one that
 * already has this reference. NaN stays NaN. With k = (new − old)/(new + old): Γ' = (Γ − k)/(1 − kΓ), from Γ = (Z − Z0)/(Z + Z0).
 */
export function renormalise(sweep: Sweep, referenceOhm: number): Sweep {
  const { gammaRe, gammaIm } = sweep;
  if (!gammaRe || !gammaIm || referenceOhm === sweep.referenceOhm) return sweep;
  const k = (referenceOhm - sweep.referenceOhm) / (referenceOhm + sweep.referenceOhm);
  const n = gammaRe.length;
  const re = new Float64Array(n);
  const im = new Float64Array(n);
  const magnitude = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    const a = gammaRe[i];
    const b = gammaIm[i];
    const below = (1 - k * a) ** 2 + (k * b) ** 2;
    re[i] = ((a - k) * (1 - k * a) - k * b * b) / below;
    im[i] = (b * (1 - k * k)) / below;
    magnitude[i] = Math.hypot(re[i], im[i]);
  }
  return { ...sweep, gammaRe: re, gammaIm: im, magnitude, referenceOhm };
}
