import { findDips } from "./dips/find.ts";
import type { Sweep } from "./sweep.ts";

/**
 * Which points of a sweep to draw so that nothing that matters is lost.
 *
 * Returns ascending indices into the sweep, at most `maxPoints` of them: the first and the last point of
 * the range, the lowest sample of every dip of 3 dB and more (the most prominent where they would fill over
 * a quarter) and, for each of the buckets of equal width (in frequency, or in its logarithm) that the rest
 * allows, its lowest and its highest abs Γ. A bucket with a gap keeps one NaN in place of its highest
 * point. A range takes in its ends, plus the neighbour outside on each side, so that a line runs to the
 * border. Empty sweep or range: empty result. `maxPoints` under 4 counts as 4. The method is the min/max
 * envelope of common practice, no source.
 */
export function decimate(
  sweep: Pick<Sweep, "frequencyHz" | "magnitude">,
  maxPoints: number,
  range?: { fromHz: number; toHz: number },
  log = false,
): Uint32Array {
  const { frequencyHz, magnitude } = sweep;
  const n = frequencyHz.length;
  if (range && range.fromHz > range.toHz) return new Uint32Array(0);
  const first = range ? Math.max(0, firstAtLeast(frequencyHz, range.fromHz) - 1) : 0;
  const last = range ? Math.min(n - 1, firstAtLeast(frequencyHz, range.toHz, true)) : n - 1;
  const count = last - first + 1;
  if (count <= 0) return new Uint32Array(0);
  const limit = Math.max(4, Math.floor(maxPoints));
  if (count <= limit) return Uint32Array.from({ length: count }, (_, i) => first + i);

  const dips = dipsToKeep(magnitude.subarray(first, last + 1), Math.floor(limit / 4), first);
  const kept = new Uint32Array(limit);
  kept.set(dips);
  let size = dips.length;
  kept[size++] = first;
  kept[size++] = last;
  const buckets = Math.max(0, Math.floor((limit - size) / 2));
  let start = first + 1;
  for (let bucket = 1; bucket <= buckets && start < last; bucket++) {
    const edgeHz = bucketEdge(frequencyHz[first], frequencyHz[last], bucket / buckets, log);
    const end = bucket === buckets ? last : Math.min(last, firstAtLeast(frequencyHz, edgeHz));
    if (end <= start) continue;
    size = keepEnds(magnitude, start, end, kept, size);
    start = end;
  }
  const sorted = kept.subarray(0, size).sort();
  return sorted.filter((index, k) => k === 0 || index > sorted[k - 1]);
}

/**
 * Adds the indices of the lowest and the highest value (or of a gap) of `start`..`end`−1; returns the new
 * size.
 */
function keepEnds(
  magnitude: Float64Array,
  start: number,
  end: number,
  kept: Uint32Array,
  size: number,
): number {
  let low = -1;
  let high = start;
  let lowest = Number.POSITIVE_INFINITY;
  let highest = Number.NEGATIVE_INFINITY;
  let gap = -1;
  for (let i = start; i < end; i++) {
    const value = magnitude[i];
    if (value < lowest) {
      lowest = value;
      low = i;
    }
    if (value > highest) {
      highest = value;
      high = i;
    }
    if (Number.isNaN(value)) gap = i;
  }
  kept[size] = gap >= 0 ? gap : high;
  if (low < 0) return size + 1;
  kept[size + 1] = low;
  return size + 2;
}

function dipsToKeep(magnitude: Float64Array, most: number, first: number): number[] {
  const found = findDips(magnitude, KEPT_DB);
  if (found.length > most) found.sort((a, b) => b.prominenceDb - a.prominenceDb).length = most;
  return found.map(({ index }) => first + index);
}

function bucketEdge(fromHz: number, toHz: number, share: number, log: boolean): number {
  return log && fromHz > 0 ? fromHz * (toHz / fromHz) ** share : fromHz + (toHz - fromHz) * share;
}

/** First index whose frequency is at least (or, `beyond`, over) `hz`; the length where there is none. */
function firstAtLeast(frequencyHz: Float64Array, hz: number, beyond = false): number {
  let low = 0;
  let high = frequencyHz.length;
  while (low < high) {
    const middle = (low + high) >>> 1;
    if (frequencyHz[middle] < hz || (beyond && frequencyHz[middle] === hz)) low = middle + 1;
    else high = middle;
  }
  return low;
}

/** The usual smallest prominence of a dip. */
const KEPT_DB = 3;
