import { whereMhz } from "./words.ts";

/** Neighbouring points of which something is true, as indices, both included. */
export interface Stretch {
  first: number;
  last: number;
}

/**
 * Stretches of ascending frequencies (Hz) for which `is` holds. With `bridge` > 1, those whose gap is narrower than
 * that factor count as one (for a ripple that crosses its limit again and again).
 */
export function stretchesOf(frequencyHz: Float64Array, is: (i: number) => boolean, bridge = 1): Stretch[] {
  const found: Stretch[] = [];
  for (let i = 0; i < frequencyHz.length; i++) {
    if (!is(i)) continue;
    const open = found[found.length - 1];
    if (open && (open.last === i - 1 || frequencyHz[i] <= frequencyHz[open.last] * bridge)) open.last = i;
    else found.push({ first: i, last: i });
  }
  return found;
}

/** "Above 210 MHz", for the beginning of a sentence. */
export function sentenceStart(frequencyHz: Float64Array, { first, last }: Stretch): string {
  const where = whereMhz(frequencyHz, first, last);
  return where.charAt(0).toUpperCase() + where.slice(1);
}

/** The middle of the values that are numbers; NaN where there is none. */
export function median(values: Float64Array): number {
  const sorted = values.filter((value) => !Number.isNaN(value)).sort();
  const half = sorted.length >> 1;
  if (sorted.length === 0) return Number.NaN;
  return sorted.length % 2 === 1 ? sorted[half] : (sorted[half - 1] + sorted[half]) / 2;
}
