import type { Sweep } from "../sweep.ts";

/**
 * Angle of Γ in degrees, without jumps: each point within half a turn of the last one that was known. Length n, NaN in gaps and
 * where Γ is 0; the first known point lies in −180…180. Null for a scalar sweep.
 *
 * Two samples more than half a turn apart can't be told from the nearer way round: a sweep with too few points for its line's
 * length comes out with too few turns (the sampling theorem; common practice, no source).
 */
export function unwrappedPhaseDeg({ gammaRe, gammaIm }: Sweep): Float64Array | null {
  if (!gammaRe || !gammaIm) return null;
  const phase = new Float64Array(gammaRe.length);
  let last = 0;
  for (let i = 0; i < phase.length; i++) {
    const angle = (Math.atan2(gammaIm[i], gammaRe[i]) * 180) / Math.PI;
    if (Number.isNaN(angle) || (gammaRe[i] === 0 && gammaIm[i] === 0)) {
      phase[i] = Number.NaN;
      continue;
    }
    last = angle + 360 * Math.round((last - angle) / 360);
    phase[i] = last;
  }
  return phase;
}
