import type { Sweep } from "./sweep.ts";

/**
 * Which points of a sweep to draw so that nothing that matters is lost.
 *
 * Returns ascending indices into the sweep, at most `maxPoints` of them: the first and the last point of the range and, for
 * each of `maxPoints`/2 buckets of equal width (in frequency, or in its logarithm), its lowest and its highest abs Γ. So
 * every minimum that is the lowest of its bucket is kept as it is: the deepest points are never rounded away.
 * A bucket that holds a gap keeps one NaN in place of its highest point when it can. A range takes in its ends, plus
 * the neighbour outside on each side, so that a line runs to the border. Empty sweep or range: empty result.
 * `maxPoints` under 4 counts as 4. The method is the min/max envelope of common practice, no source.
 */
export function decimate(
  sweep: Pick<Sweep, "frequencyHz" | "magnitude">,
  maxPoints: number,
  range?: { fromHz: number; toHz: number },
  log = false,
): Uint32Array {
  const { frequencyHz, magnitude } = sweep;
  const n = frequencyHz.length;
  const first = range ? Math.max(0, firstAtLeast(frequencyHz, range.fromHz) - 1) : 0;
  const last = range ? Math.min(n - 1, firstAtLeast(frequencyHz, range.toHz, true)) : n - 1;
  const count = last - first + 1;
  if (count <= 0) return new Uint32Array(0);
  const limit = Math.max(4, Math.floor(maxPoints));
  if (count <= limit) return Uint32Array.from({ length: count }, (_, i) => first + i);

  const kept = new Uint32Array(limit);
  let size = 0;
  const keep = (index: number) => {
    if (size === 0 || kept[size - 1] < index) kept[size++] = index;
  };
  keep(first);
  const buckets = Math.floor((limit - 2) / 2);
  let start = first + 1;
  for (let bucket = 1; bucket <= buckets && start < last; bucket++) {
    const edgeHz = bucketEdge(frequencyHz[first], frequencyHz[last], bucket / buckets, log);
    const end = bucket === buckets ? last : Math.min(last, firstAtLeast(frequencyHz, edgeHz));
    if (end <= start) continue;
    let low = -1;
    let high = -1;
    let gap = -1;
    for (let i = start; i < end; i++) {
      const value = magnitude[i];
      if (value < magnitude[low] || low < 0) {
        if (!Number.isNaN(value)) low = i;
        else gap = i;
      }
      if (value > magnitude[high] || high < 0) {
        if (!Number.isNaN(value)) high = i;
      } else if (Number.isNaN(value)) gap = i;
    }
    if (gap >= 0) high = gap;
    if (low < 0) low = high;
    keep(Math.min(low, high));
    keep(Math.max(low, high));
    start = end;
  }
  keep(last);
  return kept.slice(0, size);
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
