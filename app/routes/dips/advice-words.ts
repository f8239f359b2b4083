import { formatLength, formatLengthChange, type LengthUnit } from "~/measurement/lengths";
import { formatFrequency } from "~/measurement/units";
import { lengthInField } from "~/routes/antenna/sizes";
import type { TrimAdvice } from "~/services/advice.server";

export interface TrimWords {
  /** "Reed pole: 10.21 m → 10.04 m (−17 cm)". */
  change: string;
  /** "to bring the dip to 7.1 MHz, the middle of 40 m". */
  aim: string;
  limits: string;
  how: string;
  /** What to mind; empty where that is nothing. */
  mind: string;
}

export function trimWords(
  { name, lengthM, trim, lengthsSeen }: TrimAdvice,
  band: string,
  targetHz: number,
  unit: LengthUnit,
): TrimWords {
  const { lowM, highM, changeM, method, farOut } = trim;
  const known = lowM !== null && highM !== null;
  const interval = known ? `${formatLength(lowM, unit)} and ${formatLength(highM, unit)}` : "";
  const limits =
    method === "line"
      ? known
        ? `Between ${interval} (95 %), by the line through the ${lengthsSeen} lengths that its trail has seen.`
        : "Limits unknown: the lengths seen so far do not tell them."
      : known
        ? `Usually between ${interval}: one length alone does not say how closely the dip follows it.`
        : "Limits unknown.";
  return {
    change: `${name}: ${formatLength(lengthM, unit)} → ${formatLength(trim.lengthM, unit)} (${formatLengthChange(changeM, unit)})`,
    aim: `to bring the dip to ${formatFrequency(targetHz)}, the middle of ${band}`,
    limits,
    how: trim.how,
    mind: farOut ? FAR : "",
  };
}

/** The form of a new step, filled in with a planned length. */
export function planHref(
  projectId: string,
  { part, name, toM, how }: { part: string; name: string; toM: number; how: string },
  unit: LengthUnit,
): string {
  const to = lengthInField(toM, unit);
  const query = new URLSearchParams({
    state: "planned",
    title: `${capital(name)} to ${to}`,
    body: `Reckoned: ${how}`,
    target: `${part}.lengthM`,
    to,
  });
  return `/projects/${projectId}/steps/new?${query}`;
}

export function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}

const FAR = "That is far from any length tried: go half the way first, and sweep again.";
