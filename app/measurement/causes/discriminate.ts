import type { Cause } from "../causes.ts";
import { FEEDLINE } from "../elements.ts";
import { formatLength, type LengthUnit } from "../lengths.ts";
import { shiftWords } from "./words.ts";

/** One change to try, and what each cause says will happen to the dip. */
export interface Discrimination {
  /** "Add 1 m of feedline". */
  change: string;
  /** In the order of the causes: the predicted shift, Hz; null where the cause does not say. */
  shiftHz: (number | null)[];
  /** "Move the feedline 1 m: …" in one sentence. */
  words: string;
}

/**
 * Changes that tell the causes of one dip apart, the one that sets the most of them apart first; of one cause or none, what would
 * confirm it. A change of a part moves the dip if that part is its cause, and by nothing if it is not; a multiple follows a
 * part that is not known, so it does not say.
 */
export function discriminate(causes: readonly Cause[], unit: LengthUnit = "metres"): Discrimination[] {
  const parts = causes.filter((cause) => cause.part !== null);
  const made = parts.map((cause) => byLength(cause, causes, unit));
  if (causes.some(({ kind }) => kind === "reference" || kind === "ripple")) made.push(withoutAntenna(causes));
  const apart = ({ shiftHz }: Discrimination) => new Set(shiftHz.filter((hz) => hz !== null)).size;
  return made.sort((a, b) => apart(b) - apart(a));
}

function byLength(cause: Cause, causes: readonly Cause[], unit: LengthUnit): Discrimination {
  const feedline = cause.part === FEEDLINE;
  const dipHz = cause.predictedHz + cause.offsetHz;
  const pathM = -dipHz / cause.hzPerMetre;
  const stepM = feedline ? FEEDLINE_STEP_M : Number((pathM * SHARE).toPrecision(2));
  const shiftHz = causes.map((other) => {
    if (other.kind === "multiple") return null;
    if (other.kind === "ripple") return feedline ? null : 0;
    return other.part === cause.part ? -dipHz * (stepM / (pathM + stepM)) : 0;
  });
  const change = feedline
    ? `Add ${formatLength(stepM, unit)} of feedline`
    : `Make ${nameOf(cause)} ${formatLength(stepM, unit)} longer for a try`;
  return { change, shiftHz, words: sentence(change, causes, shiftHz) };
}

function withoutAntenna(causes: readonly Cause[]): Discrimination {
  const change = "Put the load in the antenna's place and sweep";
  const stays = causes.map(({ kind }) => (kind === "reference" ? 0 : null));
  const words = causes
    .map(
      (cause) =>
        `${aloneName(cause)} predicts ${cause.kind === "reference" ? "that the dip stays" : "that it goes"}`,
    )
    .join(", ");
  return { change, shiftHz: stays, words: `${change}: ${words}.` };
}

function sentence(change: string, causes: readonly Cause[], shiftHz: (number | null)[]): string {
  const each = causes.map((cause, i) => {
    const shift = shiftHz[i];
    return `${aloneName(cause)} predicts ${shift === null ? "something else" : shiftWords(shift)}`;
  });
  return `${change}: ${each.join(", ")}.`;
}

function aloneName(cause: Cause): string {
  return cause.title.replace(/^may be /, "").replace(/, if .*$/, "");
}

function nameOf(cause: Cause): string {
  return cause.title.replace(/^may be /, "").split(", ")[0];
}

const FEEDLINE_STEP_M = 1;
const SHARE = 0.1;
