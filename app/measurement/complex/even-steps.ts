import type { Sweep } from "../sweep.ts";

/**
 * Indices from `first` to `last` (both included where they are no gaps) at about even steps along the line that Γ draws in its plane,
 * about `most` of them; ascending. The line's length is the sum of abs ΔΓ between neighbours; a gap adds none and is left out.
 * Empty for a scalar sweep.
 */
export function evenSteps({ gammaRe, gammaIm }: Sweep, first: number, last: number, most: number): number[] {
  if (!gammaRe || !gammaIm) return [];
  const moved = (i: number) => Math.hypot(gammaRe[i] - gammaRe[i - 1], gammaIm[i] - gammaIm[i - 1]) || 0;
  let length = 0;
  for (let i = first + 1; i <= last; i++) length += moved(i);
  const step = length / Math.max(1, most - 1);
  const kept: number[] = [];
  let since = Number.POSITIVE_INFINITY;
  for (let i = first; i <= last; i++) {
    if (i > first) since += moved(i);
    const known = !Number.isNaN(gammaRe[i] + gammaIm[i]);
    if (!known || (since < step && i !== last)) continue;
    kept.push(i);
    since = 0;
  }
  return kept;
}
