import type { Noise } from "../noise.ts";
import { swrToGamma } from "../reflection.ts";
import type { Bandwidth, Sweep } from "../sweep.ts";
import { combine, NORMAL_95 } from "../uncertainty.ts";
import { crossingHz } from "./crossing.ts";
import type { Fit } from "./fit.ts";
import { edgesAt, hzAt, type Resonator } from "./resonator.ts";

/** The contiguous samples around a dip with SWR at or under the limit: `from`..`to`, both included. */
export interface Stretch {
  from: number;
  to: number;
}

/** Null where the dip's own sample is above the limit. Ends at gaps. `level` is abs Γ of the limit. */
export function stretchAround(magnitude: Float64Array, index: number, level: number): Stretch | null {
  if (!(magnitude[index] <= level)) return null;
  let from = index;
  let to = index;
  while (from > 0 && magnitude[from - 1] <= level) from--;
  while (to < magnitude.length - 1 && magnitude[to + 1] <= level) to++;
  return { from, to };
}

export interface BandwidthInput {
  sweep: Sweep;
  index: number;
  /** Lowest abs Γ as it is told of this dip. */
  lowest: number;
  swrLimit: number;
  stretch: Stretch | null;
  /** Another dip lies in the stretch. */
  shared: boolean;
  fit: Fit | null;
  /** σ of the sweep. */
  noise: Noise;
}

/**
 * The bandwidth at an SWR limit over 1. Null, never 0, where the dip's lowest SWR is above the limit.
 *
 * Where a whole resonator fits and the dip does not share its stretch, the edges are the fit's closed form
 * f0·e^±asinh(w/2κ), which averages the noise of all samples and is exact for a resonator; else they are
 * interpolated between the two samples on each side of the limit (`crossingHz`). An edge beyond the sweep
 * or in a gap is open: null, and the width "at least" up to the last sample. The fractional bandwidth is
 * the width over the geometric mean of the edges.
 */
export function bandwidthOf(input: BandwidthInput): Bandwidth | null {
  const level = swrToGamma(input.swrLimit);
  if (!(input.lowest <= level)) return null;
  const edges = fromFit(input, level) ?? fromSamples(input, level);
  if (!edges) return null;
  const { lowHz, highHz, ends, halfHz } = edges;
  const open = lowHz === null || highHz === null;
  const widthHz = (highHz ?? ends.highHz) - (lowHz ?? ends.lowHz);
  return {
    limitSwr: input.swrLimit,
    lowHz,
    highHz,
    widthHz,
    widthUncertaintyHz: halfHz,
    widthLowHz: null,
    widthHighHz: null,
    lowEdge: null,
    highEdge: null,
    open,
    shared: input.shared,
    fractional: lowHz === null || highHz === null ? null : widthHz / Math.sqrt(lowHz * highHz),
  };
}

interface Edges {
  lowHz: number | null;
  highHz: number | null;
  /** The last samples, for an open edge. */
  ends: { lowHz: number; highHz: number };
  halfHz: number | null;
}

function fromFit({ sweep, index, fit, shared, stretch }: BandwidthInput, level: number): Edges | null {
  if (!fit?.whole || shared) return null;
  const { frequencyHz, magnitude } = sweep;
  const edges = edgesAt(fit.resonator, level * level);
  if (!edges) return null;
  const [low, high] = edges.map((w) => hzAt(fit.resonator, w));
  const first = Math.max(0, Math.min(fit.window.from, stretch?.from ?? index) - 1);
  const last = Math.min(frequencyHz.length - 1, Math.max(fit.window.to, stretch?.to ?? index) + 1);
  const lowEnds = edgeLies(magnitude, fit.window.from, -1);
  const highEnds = edgeLies(magnitude, fit.window.to, 1);
  if ((low < frequencyHz[first] && !lowEnds) || (high > frequencyHz[last] && !highEnds)) return null;
  const ends = { lowHz: frequencyHz[fit.window.from], highHz: frequencyHz[fit.window.to] };
  const openLow = low < ends.lowHz && lowEnds;
  const openHigh = high > ends.highHz && highEnds;
  return {
    lowHz: openLow ? null : low,
    highHz: openHigh ? null : high,
    ends,
    halfHz: openLow || openHigh ? null : fit.halfOf((resonator) => widthAt(resonator, level * level)),
  };
}

function widthAt(resonator: Resonator, power: number): number {
  const edges = edgesAt(resonator, power);
  return edges ? hzAt(resonator, edges[1]) - hzAt(resonator, edges[0]) : Number.NaN;
}

/** True when the samples end next to `i`: the sweep's border or a gap. */
function edgeLies(magnitude: Float64Array, i: number, step: 1 | -1): boolean {
  const next = magnitude[i + step];
  return next === undefined || Number.isNaN(next);
}

function fromSamples(
  { sweep, index, stretch, noise: all, fit }: BandwidthInput,
  level: number,
): Edges | null {
  if (!stretch) return null;
  const noise = sigmaAt(level, all, fit);
  const { frequencyHz } = sweep;
  const low = vagueEdge(sweep, index, -1, level, noise) ?? sampleEdge(sweep, stretch.from - 1, level, noise);
  const high = vagueEdge(sweep, index, 1, level, noise) ?? sampleEdge(sweep, stretch.to, level, noise);
  return {
    lowHz: low?.hz ?? null,
    highHz: high?.hz ?? null,
    ends: { lowHz: frequencyHz[stretch.from], highHz: frequencyHz[stretch.to] },
    halfHz: combine(low?.halfHz ?? null, high?.halfHz ?? null),
  };
}

/**
 * The edge in scatter: in the middle of the samples that lie within VAGUE_SIGMAS of the level, and no better
 * known than they reach; null where they are so few that interpolation does better, or the samples end.
 */
function vagueEdge(
  { frequencyHz, magnitude }: Sweep,
  index: number,
  side: -1 | 1,
  level: number,
  noise: number,
) {
  const factor = 10 ** ((VAGUE_SIGMAS * noise) / 20);
  let near = index;
  while (magnitude[near] <= level / factor) near += side;
  let far = near;
  while (magnitude[far] <= level * factor) far += side;
  if (Number.isNaN(magnitude[far] ?? Number.NaN) || Math.abs(far - near) < FEWEST_VAGUE) return null;
  const hz = (frequencyHz[near] + frequencyHz[far]) / 2;
  return { hz, halfHz: Math.abs(frequencyHz[far] - frequencyHz[near]) / 2 };
}

/** The edge between samples i and i+1; null where one of them is missing or a gap. */
function sampleEdge(sweep: Sweep, i: number, level: number, noise: number) {
  const { frequencyHz, magnitude } = sweep;
  const [a, b] = [magnitude[i], magnitude[i + 1]];
  if (a === undefined || b === undefined || Number.isNaN(a) || Number.isNaN(b)) return null;
  const hz = crossingHz(sweep, i, level, noise < SMOOTH_DB);
  const straight = crossingHz(sweep, i, level, false);
  const stepHz = frequencyHz[i + 1] - frequencyHz[i];
  const slope = Math.abs(b - a) / stepHz;
  const scatter = (NORMAL_95 * level * noise * Math.LN10) / 20 / slope;
  return { hz, halfHz: combine(scatter, noise < SMOOTH_DB ? hz - straight : stepHz / 4) };
}

/**
 * σ in dB at the limit. A receiver's scatter is even in abs Γ and so is larger there in dB than where most
 * comes back; without a fit that tells which it is, the larger.
 */
function sigmaAt(level: number, noise: Noise, fit: Fit | null): number {
  const even = (DB_PER_NEPER * noise.gamma) / level;
  if (fit) return fit.scatter === "even" ? even : noise.db;
  return Math.max(even, noise.db);
}

const DB_PER_NEPER = 20 / Math.LN10;
/** In σ of the sweep. */
const VAGUE_SIGMAS = 2;
const FEWEST_VAGUE = 3;
/** Over this σ the cubic would follow the scatter of its outer samples. */
const SMOOTH_DB = 0.05;
