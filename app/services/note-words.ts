import { completeDip, type StoredDip } from "~/measurement/dips/complete";
import { formatFrequency, formatSwr } from "~/measurement/units";
import { numberWords } from "./plates/number-words.ts";

/** How what a note refers to reads, in one line: at the time of writing in the text, now on hover. */

export function dipWords(dip: { numbers: StoredDip; present: boolean; sweepTitle: string }): string {
  const numbers = completeDip(dip.numbers);
  const at = formatFrequency(numbers.frequencyHz, numbers.frequencyUncertaintyHz);
  const swr = formatSwr(numbers.minimumSwr, numbers.minimumSwrLow, numbers.minimumSwrHigh);
  return `${at}, SWR ${swr}, ${dip.sweepTitle}${dip.present ? "" : " (not found any more)"}`;
}

export function sweepWords({ title, dipCount }: { title: string; dipCount: number }): string {
  return `${title} (${dipCount === 1 ? "1 dip" : `${dipCount} dips`})`;
}

export function stepWords({ title, state }: { title: string; state: string }): string {
  return state === "done" ? title : `${title} (${state})`;
}

export function plateWords(plate: {
  number: number;
  version: number;
  title: string;
  withdrawnAt: Date | null;
}): string {
  return `${numberWords(plate)}: ${plate.title}${plate.withdrawnAt ? " (withdrawn)" : ""}`;
}

/** `812 bytes`, `14 kB`, `2.3 MB`. */
export function sizeWords(bytes: number): string {
  if (bytes < 1000) return `${bytes} bytes`;
  return bytes < 1_000_000 ? `${Math.round(bytes / 1000)} kB` : `${(bytes / 1_000_000).toFixed(1)} MB`;
}

/** As the label of a link in Markdown: on one line, no longer than a reference may be, its brackets kept from ending it. */
export function asLabel(words: string): string {
  const line = words.replace(/[\\`\s]+/g, " ").trim();
  return Array.from(line).slice(0, MOST_LABEL).join("").replace(/[[\]]/g, "\\$&");
}

/** Less than the 300 that a stored reference has: brackets take two. */
const MOST_LABEL = 200;
