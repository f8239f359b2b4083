/** Hz as MHz, five significant digits at most. */
export function mhz(hz: number): string {
  return String(Number((hz / 1e6).toPrecision(5)));
}

/**
 * Where these points of ascending frequencies lie: "above 210 MHz", "below 3 MHz", "from 5 to 7 MHz (with gaps)",
 * "everywhere".
 */
export function allMhz(at: Float64Array, indices: readonly number[]): string {
  const [first, last] = [indices[0], indices[indices.length - 1]];
  return whereMhz(at, first, last) + (last - first + 1 > indices.length ? " (not at every point)" : "");
}

/** The stretch from one point to another, in words; one that reaches an end is told from the next point outside it. */
export function whereMhz(at: Float64Array, first: number, last: number): string {
  const end = at.length - 1;
  if (first === 0 && last === end) return "everywhere";
  if (first === 0) return `below ${mhz(at[last + 1])} MHz`;
  if (last === end) return `above ${mhz(at[first - 1])} MHz`;
  return first === last ? `at ${mhz(at[first])} MHz` : `from ${mhz(at[first])} to ${mhz(at[last])} MHz`;
}
