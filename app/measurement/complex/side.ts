import { gammaToImpedance } from "../reflection.ts";
import type { Sweep } from "../sweep.ts";
import { NORMAL_95 } from "../uncertainty.ts";
import { firstAtOrAbove, gammaAt } from "./gamma-at.ts";
import { complexNoise } from "./impedance.ts";

/** On which side of the reference a dip lies: what a scalar sweep can't tell. */
export interface Side {
  resistanceOhm: number;
  reactanceOhm: number;
  /** under: R below the reference, so that SWR is about Z0/R; over: about R/Z0; null where the limits hold both. */
  side: "under" | "over" | null;
  /** R/Z0. */
  ratio: number;
  /** How far abs Γ may be off by noise (95 %) and, where the bench is known, its directivity; linear. */
  limitGamma: number;
  /** True where the bench's directivity is not part of the limit because it is not known. */
  benchUnknown: boolean;
}

/**
 * The side of the reference at `hz`: the sign of Re Γ, which is that of abs(Z)² − Z0² and, at a dip, that of R − Z0. Told only
 * where abs(Re Γ) exceeds its limit: 95 % of the noise plus the bench's directivity there, when known (worst case; an unknown one
 * is said, not taken for zero). Null for a scalar sweep, outside it and beside a gap. `noise` is the sweep's own, for many dips at once.
 */
export function sideAt(sweep: Sweep, hz: number, noise = complexNoise(sweep)): Side | null {
  const gamma = gammaAt(sweep, hz);
  if (!gamma || noise === null) return null;
  const z = gammaToImpedance(gamma, sweep.referenceOhm);
  const at = Math.min(sweep.frequencyHz.length - 1, firstAtOrAbove(sweep.frequencyHz, hz));
  const directivity = sweep.benchLimits?.directivity[at] ?? Number.NaN;
  const benchUnknown = Number.isNaN(directivity);
  const limitGamma = NORMAL_95 * noise + (benchUnknown ? 0 : directivity);
  const told = Math.abs(gamma.re) > Math.max(limitGamma, SAME);
  return {
    resistanceOhm: z.re,
    reactanceOhm: z.im,
    side: told ? (gamma.re < 0 ? "under" : "over") : null,
    ratio: z.re / sweep.referenceOhm,
    limitGamma,
    benchUnknown,
  };
}

/** Re Γ that is rounding: the reference itself. */
const SAME = 1e-9;
