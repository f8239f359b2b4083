import type { LimitSource, Share, Unknown } from "../sweep.ts";

/**
 * How much each source adds to the limits of a number: bench errors add up as they stand (worst case), the
 * others, independent of each other, share their common half-width by their squares. Largest first, sum 1.
 * Empty where nothing adds anything.
 */
export function sharesOf(
  worstCase: Partial<Record<LimitSource, number>>,
  independent: Partial<Record<LimitSource, number>>,
): Share[] {
  const own = Object.entries(independent) as [LimitSource, number][];
  const half = Math.hypot(...own.map(([, part]) => part));
  const parts: Share[] = (Object.entries(worstCase) as [LimitSource, number][]).map(([source, share]) => ({
    source,
    share,
  }));
  for (const [source, part] of own) if (half > 0) parts.push({ source, share: (part * part) / half });
  const total = parts.reduce((sum, { share }) => sum + share, 0);
  if (!(total > 0) || !Number.isFinite(total)) return [];
  return parts
    .filter(({ share }) => share > 0)
    .map(({ source, share }) => ({ source, share: share / total }))
    .sort((a, b) => b.share - a.share);
}

/** "directivity 71 %, noise 20 %, step 9 %": whole per cents that add up to 100, what is under 1 % left out. */
export function shareWords(shares: readonly Share[]): string {
  const seen = shares.filter(({ share }) => share >= SMALLEST_SHOWN);
  const total = seen.reduce((sum, { share }) => sum + share, 0);
  const exact = seen.map(({ share }) => (100 * share) / total);
  const whole = exact.map(Math.floor);
  const missing = 100 - whole.reduce((sum, value) => sum + value, 0);
  const byRest = exact.map((value, i) => ({ i, rest: value - whole[i] })).sort((a, b) => b.rest - a.rest);
  for (const { i } of byRest.slice(0, missing)) whole[i]++;
  return seen.map(({ source }, i) => `${source} ${whole[i]} %`).join(", ");
}

/** What is not known and what would make it known. */
export function remediesFor(sources: readonly LimitSource[]): Unknown[] {
  return sources.map((source) => ({ source, remedy: REMEDIES[source] }));
}

const SMALLEST_SHOWN = 0.005;
const OPEN_AND_SHORT = "an open and a short sweep of the bench would make it known";
const REMEDIES: Record<LimitSource, string> = {
  directivity: "a load sweep of the bench would make it known",
  tracking: OPEN_AND_SHORT,
  match: OPEN_AND_SHORT,
  noise: "a second sweep of the same thing would make it known",
  fit: "a sweep with more points over the dip would make it known",
  step: "a sweep with more points over the dip would make it known",
  pixel: "the sweep's file in place of its picture would make it known",
  feedline: "the feedline's length and cable would make it known",
};
