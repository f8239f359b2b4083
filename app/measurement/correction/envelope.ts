/**
 * The largest value in the neighbourhood of each point: from f/below to f·above, both factors ≥ 1, Infinity for "all
 * there is". Frequencies ascending, Hz; NaN takes no part, and where all are NaN, or the point itself is, the answer is
 * NaN. Running maximum in linear time (a queue of candidates that only falls).
 */
export function envelope(
  frequencyHz: Float64Array,
  values: Float64Array,
  below: number,
  above: number,
): Float64Array {
  const n = values.length;
  const out = new Float64Array(n).fill(Number.NaN);
  const queue: number[] = [];
  let head = 0;
  let next = 0;
  for (let i = 0; i < n; i++) {
    for (; next < n && frequencyHz[next] <= frequencyHz[i] * above; next++) {
      if (Number.isNaN(values[next])) continue;
      while (queue.length > head && values[queue[queue.length - 1]] <= values[next]) queue.pop();
      queue.push(next);
    }
    while (head < queue.length && frequencyHz[queue[head]] < frequencyHz[i] / below) head++;
    if (head < queue.length && !Number.isNaN(values[i])) out[i] = values[queue[head]];
  }
  return out;
}
