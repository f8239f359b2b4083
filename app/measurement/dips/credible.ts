import { noiseNear } from "../noise.ts";
import type { FoundDip } from "./find.ts";

/**
 * Leaves out minima that scatter makes; `everywhere` is the sweep's σ of abs Γ.
 *
 * The σ of a sweep in decibels is that of its flat parts. Where a receiver's scatter is even in abs Γ it is
 * many decibels at the bottom of a deep dip, and one dip falls apart into several. And the farthest of n
 * samples lie some 2·√(2 ln n) σ apart (extreme values of a normal sample, H. Cramér, Mathematical Methods
 * of Statistics, 28.6; from memory, not seen), more than 6 σ in long sweeps. So a dip must also stand out
 * by that much in abs Γ itself, σ being the sweep's, or that of the samples around it where that is clearly
 * less: an even scatter is the same in both, one that is even in decibels is small near a dip and asks for
 * little more.
 */
export function credibleDips(magnitude: Float64Array, found: FoundDip[], everywhere: number): FoundDip[] {
  if (everywhere === 0) return found;
  const sigmas = Math.max(FEWEST_SIGMAS, 2 * Math.sqrt(2 * Math.log(magnitude.length)));
  return found.filter(({ index, prominenceDb }) => {
    const lowest = magnitude[index];
    const rise = Number.isFinite(prominenceDb) ? lowest * (10 ** (prominenceDb / 20) - 1) : 1;
    if (rise >= sigmas * everywhere) return true;
    const near = noiseNear(magnitude, index).gamma;
    return near < CLEARLY_LESS * everywhere && rise >= sigmas * near;
  });
}

/** The scatter of 65 samples is known to 15 %: half of the sweep's is no chance. */
const CLEARLY_LESS = 0.5;
/** As for the prominence in return loss, MEASUREMENT section 2. */
const FEWEST_SIGMAS = 6;
