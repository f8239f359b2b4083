/**
 * Pairs the dips of an earlier analysis of a sweep with those of a later one, so that a dip keeps its
 * identity.
 *
 * `oldHz` and `newHz` in Hz, any order; `gateHz(hz)` is the farthest a dip at `hz` may have moved. Returns
 * for each old dip the index of its new one or null; no new dip is used twice. As many pairs as the gate
 * allows, and among these the least total distance. Both lists are walked in order of frequency: on a line
 * the best pairing never crosses, so an alignment by dynamic programming is exact (the same argument as for
 * sequence alignment, Needleman & Wunsch 1970, J. Mol. Biol. 48, 443-453; from memory, not seen). NaN never
 * pairs. Time and memory n·m.
 */
export function pairDips(
  oldHz: readonly number[],
  newHz: readonly number[],
  gateHz: (hz: number) => number,
): (number | null)[] {
  const from = ascending(oldHz);
  const to = ascending(newHz);
  const width = to.length + 1;
  const pairs = new Int32Array((from.length + 1) * width);
  const distance = new Float64Array((from.length + 1) * width);
  const better = (i: number, j: number, p: number, d: number) =>
    p > pairs[i * width + j] || (p === pairs[i * width + j] && d < distance[i * width + j]);
  const set = (i: number, j: number, p: number, d: number) => {
    pairs[i * width + j] = p;
    distance[i * width + j] = d;
  };
  for (let i = 1; i <= from.length; i++) {
    const gate = gateHz(oldHz[from[i - 1]]);
    for (let j = 1; j <= to.length; j++) {
      const above = (i - 1) * width + j;
      set(i, j, pairs[above], distance[above]);
      if (better(i, j, pairs[above + width - 1], distance[above + width - 1]))
        set(i, j, pairs[above + width - 1], distance[above + width - 1]);
      const apart = Math.abs(oldHz[from[i - 1]] - newHz[to[j - 1]]);
      if (apart <= gate && better(i, j, pairs[above - 1] + 1, distance[above - 1] + apart))
        set(i, j, pairs[above - 1] + 1, distance[above - 1] + apart);
    }
  }
  return walkBack(from, to, pairs, distance, oldHz.length);
}

function walkBack(from: number[], to: number[], pairs: Int32Array, distance: Float64Array, count: number) {
  const result: (number | null)[] = new Array(count).fill(null);
  const width = to.length + 1;
  const same = (a: number, b: number) => pairs[a] === pairs[b] && distance[a] === distance[b];
  let i = from.length;
  let j = to.length;
  while (i > 0 && j > 0) {
    const here = i * width + j;
    if (same(here, here - width)) i--;
    else if (same(here, here - 1)) j--;
    else result[from[--i]] = to[--j];
  }
  return result;
}

function ascending(hz: readonly number[]): number[] {
  return hz
    .map((_, i) => i)
    .filter((i) => !Number.isNaN(hz[i]))
    .sort((a, b) => hz[a] - hz[b]);
}
