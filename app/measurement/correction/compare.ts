import type { BenchQuality } from "./bench-quality.ts";
import { commonSpan, interpolate } from "./references.ts";
import { median, stretchesOf } from "./stretches.ts";
import { mhz, whereMhz } from "./words.ts";

export interface BenchComparison {
  /** Hz, ascending, length n: the second bench's frequencies that both cover. */
  frequencyHz: Float64Array;
  /** dB, second less first; NaN where one of them is not known. Positive is better for directivity and match. */
  directivityDb: Float64Array;
  testPortMatchDb: Float64Array;
  /** dB, change of the size of the disagreement; positive is worse. */
  openShortDisagreementDb: Float64Array;
  insertionLossDb: Float64Array;
  trackingDb: Float64Array;
  /** Plain sentences. */
  words: string[];
}

/**
 * Two benches, or one before and after it was rebuilt: differences at the second one's frequencies, and what they mean.
 */
export function compareBenches(before: BenchQuality, after: BenchQuality): BenchComparison {
  const { fromHz, toHz } = commonSpan([before, after]);
  const at = after.frequencyHz.filter((hz) => hz >= fromHz && hz <= toHz);
  const difference = (pick: (quality: BenchQuality) => Float64Array) => {
    const was = interpolate(before.frequencyHz, pick(before), at);
    return interpolate(after.frequencyHz, pick(after), at).map((value, i) => value - was[i]);
  };
  const found = {
    frequencyHz: at,
    directivityDb: difference((q) => q.directivityDb),
    testPortMatchDb: difference((q) => q.testPortMatchDb),
    openShortDisagreementDb: difference((q) => q.openShortDisagreementDb.map(Math.abs)),
    insertionLossDb: difference((q) => q.insertionLossDb),
    trackingDb: difference((q) => q.trackingDb),
  };
  if (at.length === 0)
    return { ...found, words: ["The two have no frequency in common, so nothing can be compared."] };
  return {
    ...found,
    words: [
      ...inWords(at, found.directivityDb, "The directivity", "better", "worse"),
      ...inWords(at, found.testPortMatchDb, "The test port's match", "better", "worse"),
      ...inWords(
        at,
        found.openShortDisagreementDb,
        "The disagreement of open and short",
        "larger",
        "smaller",
      ),
      ...inWords(at, found.insertionLossDb, "The insertion loss", "larger", "smaller"),
      known(before, after),
    ],
  };
}

function inWords(
  at: Float64Array,
  difference: Float64Array,
  what: string,
  more: string,
  less: string,
): string[] {
  const middle = median(difference);
  if (Number.isNaN(middle)) return [`${what} can't be compared: it is not known on both sides.`];
  if (difference.every((value) => Number.isNaN(value) || Math.abs(value) < SAME_DB))
    return [`${what} is the same within ${SAME_DB} dB.`];
  const parts = [`${what} is ${Math.abs(middle).toFixed(1)} dB ${middle < 0 ? less : more} in the middle`];
  const against = stretchesOf(at, (i) => difference[i] * Math.sign(middle || 1) < -SAME_DB, BRIDGE);
  const widest = against.sort((a, b) => b.last - b.first - (a.last - a.first))[0];
  if (widest) parts.push(`but ${middle < 0 ? more : less} ${whereMhz(at, widest.first, widest.last)}`);
  return [`${parts.join(", ")}.`];
}

function known(before: BenchQuality, after: BenchQuality): string {
  const told = ({ ranges }: BenchQuality) =>
    ranges.length === 0
      ? "nowhere"
      : ranges.map(({ fromHz, toHz }) => `from ${mhz(fromHz)} to ${mhz(toHz)} MHz`).join(", ");
  return `An SWR of ${after.wish.swr} is known to ± ${after.wish.tolerance} ${told(after)}; before ${told(before)}.`;
}

/**
 * Two sweeps of one reference differ by the repeatability of a connector, 0.1 to 0.5 dB at 40 dB (common practice, no
 * source).
 */
const SAME_DB = 0.5;
const BRIDGE = 1.1;
