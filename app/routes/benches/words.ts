import { formatFrequency } from "~/measurement/units";
import type { Wish } from "./benches.schema";

/** "an open, a short and a load" */
export function listOf(words: readonly string[]): string {
  if (words.length < 2) return words.join("");
  return `${words.slice(0, -1).join(", ")} and ${words[words.length - 1]}`;
}

/** "An SWR of 1.5 is known to ±0.1 from 1.8 MHz to 30 MHz and from 40 MHz to 60 MHz." */
export function knownWords({ swr, tolerance }: Wish, ranges: readonly { fromHz: number; toHz: number }[]) {
  const what = `An SWR of ${swr} is known to ±${tolerance}`;
  if (ranges.length === 0) return `${what} nowhere yet.`;
  const told = ranges.slice(0, MOST_RANGES).map((range) => `from ${spanWords(range)}`);
  if (ranges.length > MOST_RANGES) told.push(`in ${ranges.length - MOST_RANGES} shorter stretches`);
  return `${what} ${listOf(told)}.`;
}

/** "1.8 MHz to 30 MHz", rounded inwards: no more is said than is known. */
export function spanWords({ fromHz, toHz }: { fromHz: number; toHz: number }): string {
  return `${formatFrequency(inwards(fromHz, Math.ceil), null)} to ${formatFrequency(inwards(toHz, Math.floor), null)}`;
}

/** To four digits. */
function inwards(hz: number, round: (value: number) => number): number {
  if (!(hz > 0)) return hz;
  const unit = 10 ** (Math.floor(Math.log10(hz)) - 3);
  return Number((round(Number((hz / unit).toPrecision(12))) * unit).toPrecision(12));
}

/** As a date field wants it. */
export function dayOf(at: Date): string {
  return at.toISOString().slice(0, 10);
}

export const REFERENCE_WORDS = {
  open: "Open",
  short: "Short",
  load: "Load",
  through: "Through",
} as const;

export const REFERENCE_HINTS = {
  open: "Nothing on the test port.",
  short: "The test port short-circuited at its end.",
  load: "The best load at hand; it shows the directivity.",
  through: "Source straight to the detector, without the bridge; it shows the insertion loss.",
} as const;

/** A ripple crosses its limit again and again; nobody reads more than a few stretches. */
const MOST_RANGES = 4;
