/** The samples around a dip that a fit may use: indices `from`..`to`, both included. */
export interface Window {
  from: number;
  to: number;
}

/**
 * From the dip outwards to about SWR 5, or half of the way (in power) to the lower crest where the dip is
 * shallower than that, or the crest towards a neighbour (the index of the next dip, or of the end of the
 * stretch). `index` is the dip's lowest sample, `prominenceDb` its depth. Stops before gaps.
 */
export function fitWindow(
  magnitude: Float64Array,
  index: number,
  prominenceDb: number,
  before: number,
  after: number,
  sigma = 0,
): Window {
  const lowest = magnitude[index] ** 2;
  const crest = Math.min(1, lowest * 10 ** (prominenceDb / 10) || 1);
  const level = Math.sqrt(Math.max(WINDOW_GAMMA ** 2, lowest + CREST_SHARE * (crest - lowest)));
  const clear = level + CLEAR_SIGMAS * sigma;
  const end = (step: 1 | -1, stop: number) => reach(magnitude, index, step, stop, level, clear);
  return { from: end(-1, before), to: end(1, after) };
}

function reach(
  magnitude: Float64Array,
  index: number,
  step: 1 | -1,
  stop: number,
  level: number,
  clear: number,
): number {
  let i = index;
  let crest = index;
  while (i !== stop) {
    const value = magnitude[i + step];
    if (Number.isNaN(value)) break;
    i += step;
    if (value > magnitude[crest]) crest = i;
    if (value > level) return middle(magnitude, i, step, stop, level, clear);
  }
  return crest;
}

/**
 * Between the first sample over the level and the last one under it before they are clear of it: scatter
 * that ended the window would lean on the shape there.
 */
function middle(
  magnitude: Float64Array,
  first: number,
  step: 1 | -1,
  stop: number,
  level: number,
  clear: number,
): number {
  let last = first;
  for (let i = first; i !== stop && magnitude[i] <= clear; i += step) if (magnitude[i] <= level) last = i;
  return (first + last) >> 1;
}

/** abs Γ of SWR 5. */
const WINDOW_GAMMA = 2 / 3;
/** In σ of abs Γ. */
const CLEAR_SIGMAS = 4;
/** Of the power between dip and crest: a resonator's flank is still steep there. */
const CREST_SHARE = 0.5;
