import type { SweepAgain } from "../sweep.ts";

/**
 * What to sweep again where a dip is narrower than four frequency steps; null where its points suffice.
 *
 * `index` the lowest sample, `widthHz` the best known width of the dip. Asks for SPAN widths around
 * `centreHz` (never narrower than four of the old steps, as the dip may sit anywhere between them) with at
 * least POINTS_PER_WIDTH points in the width, as an odd count so that one lies in the middle. Frequencies
 * are rounded outwards to a tenth of the width.
 */
export function sweepAgain(
  frequencyHz: Float64Array,
  index: number,
  centreHz: number,
  widthHz: number,
): SweepAgain | null {
  const n = frequencyHz.length;
  const stepHz = (frequencyHz[Math.min(n - 1, index + 1)] - frequencyHz[Math.max(0, index - 1)]) / 2;
  if (!(widthHz < FEWEST_STEPS * stepHz)) return null;
  const span = Math.max(SPAN * widthHz, FEWEST_STEPS * stepHz);
  const grid = 10 ** Math.floor(Math.log10(span / 100));
  const startHz = Math.max(grid, Math.floor((centreHz - span / 2) / grid) * grid);
  const stopHz = Math.ceil((centreHz + span / 2) / grid) * grid;
  const wanted = Math.ceil(((stopHz - startHz) / widthHz) * POINTS_PER_WIDTH) + 1;
  const points = Math.min(MOST_POINTS, Math.max(FEWEST_POINTS, wanted + ((wanted + 1) % 2)));
  return { startHz, stopHz, points };
}

/** Width at half the depth (dB) between the samples around a dip: where no band is known, Hz. */
export function halfDepthWidthHz(
  frequencyHz: Float64Array,
  magnitude: Float64Array,
  index: number,
  prominenceDb: number,
): number {
  const half = magnitude[index] * 10 ** (prominenceDb / 40) || 10 ** (-prominenceDb / 40);
  let from = index;
  let to = index;
  while (from > 0 && magnitude[from - 1] <= half) from--;
  while (to < magnitude.length - 1 && magnitude[to + 1] <= half) to++;
  const at = (inside: number, outside: number) => {
    const [a, b] = [magnitude[inside], magnitude[outside]];
    if (b === undefined || Number.isNaN(b)) return frequencyHz[inside];
    const share = Math.min(1, Math.max(0, (half - a) / (b - a)));
    return frequencyHz[inside] + share * (frequencyHz[outside] - frequencyHz[inside]);
  };
  return at(to, to + 1) - at(from, from - 1);
}

/** MEASUREMENT section 2. */
const FEWEST_STEPS = 4;
const SPAN = 6;
const POINTS_PER_WIDTH = 20;
const FEWEST_POINTS = 101;
/** More than most instruments take in one sweep. */
const MOST_POINTS = 10_001;
