import { gammaToSwr, swrToGamma } from "./reflection.ts";
import type { Dip, Sweep } from "./sweep.ts";

/** What figures are asked for: an allocation or a design band. */
export interface AskedBand {
  name: string;
  lowHz: number;
  highHz: number;
  /** SWR limit, over 1; null or absent: the sweep's setting. */
  swrLimit?: number | null;
}

/** A band as a sweep shows it. Null is "the sweep does not say". */
export interface BandFigures {
  name: string;
  lowHz: number;
  highHz: number;
  limitSwr: number;
  /** SWR at the edges and the middle; null outside the sweep and in a gap. */
  swrLow: number | null;
  swrMiddle: number | null;
  swrHigh: number | null;
  /** Share of the band that the sweep covers, 0 to 1. */
  covered: number;
  /** Share of what is covered with SWR at or under the limit; null where nothing is covered. */
  shareUnder: number | null;
  /** Lowest SWR in what is covered, and where. */
  bestHz: number | null;
  bestSwr: number | null;
}

/**
 * Figures of each band over a sweep, in the order given. Between samples abs Γ is taken along a straight line of Γ where there is
 * phase, of abs Γ where not; a gap (NaN) on either side is no cover. The best is the lowest sample or edge, or a dip's fitted lowest
 * where one lies in the band. `swrLimit` stands in for bands without their own. Bands that the sweep does not touch come back
 * with nulls; impossible ones (no width, NaN) too.
 */
export function bandFigures(
  sweep: Sweep,
  bands: readonly AskedBand[],
  dips: readonly Pick<Dip, "frequencyHz" | "minimumSwr" | "edge">[] = [],
  swrLimit = 2,
): BandFigures[] {
  return bands.map((band) => figuresOf(sweep, band, dips, band.swrLimit ?? swrLimit));
}

/** SWR at `hz` between samples; null outside the sweep and in a gap. */
export function swrAt(sweep: Sweep, hz: number): number | null {
  const gamma = gammaAt(sweep, hz);
  return Number.isNaN(gamma) ? null : gammaToSwr(gamma);
}

function figuresOf(
  sweep: Sweep,
  { name, lowHz, highHz }: AskedBand,
  dips: readonly Pick<Dip, "frequencyHz" | "minimumSwr" | "edge">[],
  limitSwr: number,
): BandFigures {
  const width = highHz - lowHz;
  const { coveredHz, underHz, best } = walk(sweep, lowHz, highHz, swrToGamma(limitSwr));
  const fitted = dips
    .filter((dip) => !dip.edge && dip.frequencyHz >= lowHz && dip.frequencyHz <= highHz)
    .toSorted((a, b) => a.minimumSwr - b.minimumSwr)[0];
  const sampleSwr = best === null ? null : gammaToSwr(best.gamma);
  const fromDip = fitted !== undefined && (sampleSwr === null || fitted.minimumSwr <= sampleSwr * SLACK);
  return {
    name,
    lowHz,
    highHz,
    limitSwr,
    swrLow: swrAt(sweep, lowHz),
    swrMiddle: swrAt(sweep, (lowHz + highHz) / 2),
    swrHigh: swrAt(sweep, highHz),
    covered: width > 0 ? Math.min(1, coveredHz / width) : 0,
    shareUnder: coveredHz > 0 ? Math.min(1, underHz / coveredHz) : null,
    bestHz: fromDip ? fitted.frequencyHz : (best?.hz ?? null),
    bestSwr: fromDip ? fitted.minimumSwr : sampleSwr,
  };
}

/** Steps through the samples of a band, its edges among them. */
function walk(sweep: Sweep, lowHz: number, highHz: number, level: number) {
  const { frequencyHz, magnitude } = sweep;
  let coveredHz = 0;
  let underHz = 0;
  let best: { hz: number; gamma: number } | null = null;
  const see = (hz: number, gamma: number) => {
    if (!Number.isNaN(gamma) && (best === null || gamma < best.gamma)) best = { hz, gamma };
  };
  let i = firstAfter(frequencyHz, lowHz);
  let hz = lowHz;
  let gamma = gammaAt(sweep, lowHz);
  see(hz, gamma);
  while (hz < highHz) {
    const inside = i < frequencyHz.length && frequencyHz[i] < highHz;
    const nextHz = inside ? frequencyHz[i] : highHz;
    const next = inside ? magnitude[i] : gammaAt(sweep, highHz);
    if (!Number.isNaN(gamma) && !Number.isNaN(next)) {
      coveredHz += nextHz - hz;
      underHz += (nextHz - hz) * shareBelow(gamma, next, level);
    }
    see(nextHz, next);
    [hz, gamma] = [nextHz, next];
    i++;
  }
  return { coveredHz, underHz, best: best as { hz: number; gamma: number } | null };
}

/** Share of a straight line from `a` to `b` at or under `level`. */
function shareBelow(a: number, b: number, level: number): number {
  if (a <= level && b <= level) return 1;
  if (a > level && b > level) return 0;
  const t = (level - a) / (b - a);
  return a <= level ? t : 1 - t;
}

function gammaAt({ frequencyHz, magnitude, gammaRe, gammaIm }: Sweep, hz: number): number {
  const i = firstAfter(frequencyHz, hz);
  if (i > 0 && frequencyHz[i - 1] === hz) return magnitude[i - 1];
  if (i === 0 || i >= frequencyHz.length) return Number.NaN;
  const t = (hz - frequencyHz[i - 1]) / (frequencyHz[i] - frequencyHz[i - 1]);
  const between = (values: Float64Array) => values[i - 1] + t * (values[i] - values[i - 1]);
  return gammaRe && gammaIm ? Math.hypot(between(gammaRe), between(gammaIm)) : between(magnitude);
}

/** Index of the first sample above `hz`; the length where none is. */
function firstAfter(frequencyHz: Float64Array, hz: number): number {
  let low = 0;
  let high = frequencyHz.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (frequencyHz[middle] > hz) high = middle;
    else low = middle + 1;
  }
  return low;
}

/** A fitted lowest may lie a little above the lowest sample, as noise makes samples low. */
const SLACK = 1.05;
