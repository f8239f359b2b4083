import type { AskedBand } from "./band-figures.ts";
import type { LengthPair } from "./length-line.ts";
import { type Trim, type TrimOptions, trimTo } from "./trim.ts";

/** How far a dip lies from the design band that is nearest. */
export interface DipOffset {
  band: AskedBand;
  /** Middle of the band, what the dip is measured against. */
  targetHz: number;
  /** Dip minus target, Hz. */
  offsetHz: number;
  /** Offset over target. */
  share: number;
  inside: boolean;
  /** What to make of the length that the dip follows; null where that is not known. */
  trim: Trim | null;
}

/**
 * The nearest design band by ratio of frequencies to the band's middle (inside comes first), and the way there. `pairs` is the
 * history of the length that the dip follows, oldest first, the present one last; empty where it is not known. Null without
 * bands or without a frequency.
 */
export function dipOffset(
  frequencyHz: number,
  bands: readonly AskedBand[],
  pairs: readonly LengthPair[] = [],
  options: TrimOptions = {},
): DipOffset | null {
  if (!(frequencyHz > 0) || !Number.isFinite(frequencyHz)) return null;
  const near = bands
    .filter(({ lowHz, highHz }) => lowHz > 0 && highHz >= lowHz)
    .map((band) => ({ band, targetHz: (band.lowHz + band.highHz) / 2, inside: holds(band, frequencyHz) }))
    .toSorted((a, b) => Number(b.inside) - Number(a.inside) || away(a.targetHz) - away(b.targetHz))[0];
  if (!near) return null;
  const offsetHz = frequencyHz - near.targetHz;
  return { ...near, offsetHz, share: offsetHz / near.targetHz, trim: trimTo(pairs, near.targetHz, options) };

  function away(targetHz: number): number {
    return Math.abs(Math.log(frequencyHz / targetHz));
  }
}

function holds({ lowHz, highHz }: AskedBand, hz: number): boolean {
  return hz >= lowHz && hz <= highHz;
}
