import { FEEDLINE } from "../elements.ts";
import type { LengthUnit } from "../lengths.ts";
import type { Cause } from "./cause.ts";
import { shiftOf, type Try, tryOn } from "./tries.ts";
import { shiftWords } from "./words.ts";

/** One change to try, and what each cause says will happen to the dip. */
export interface Discrimination {
  /** "Add 1 m of feedline". */
  change: string;
  /** In the order of the causes: the predicted shift, Hz; null where it is none (see `predictions`). */
  shiftHz: (number | null)[];
  /** In the order of the causes, in words: "−0.9 MHz", "nothing", "that the dip goes". */
  predictions: string[];
  /** All of it in one sentence. */
  words: string;
}

/**
 * Changes that tell the causes of one dip apart, the one that sets the most of them apart first; of one cause alone, what would
 * confirm it. A change of a part moves the dip if the wave runs along that part, and by nothing if it does not; a multiple
 * follows a part that is not known, so it does not say.
 */
export function discriminate(causes: readonly Cause[], unit: LengthUnit = "metres"): Discrimination[] {
  const made = causes.flatMap(({ part, path }) => {
    if (part === null || path === null) return [];
    return [byLength(part, tryOn(part, path.name, path.series, path.lengthM, unit), causes)];
  });
  if (causes.some(({ kind }) => kind === "reference" || kind === "ripple")) made.push(withoutAntenna(causes));
  const apart = ({ predictions }: Discrimination) => new Set(predictions).size;
  return made.sort((a, b) => apart(b) - apart(a));
}

function byLength(part: string, { change, stepM }: Try, causes: readonly Cause[]): Discrimination {
  const shiftHz = causes.map((cause) => {
    const { kind, path } = cause;
    if (kind === "multiple" || (kind === "ripple" && part === FEEDLINE)) return null;
    if (path === null) return 0;
    const share = cause.part === part ? 1 : path.joined?.part === part ? path.joined.share : 0;
    return share === 0 ? 0 : shiftOf(cause.predictedHz + cause.offsetHz, path.lengthM, share * stepM);
  });
  const predictions = causes.map(({ kind }, i) => {
    const shift = shiftHz[i];
    if (shift !== null) return shiftWords(shift);
    return kind === "ripple" ? "minima closer together" : "a move with the lower dip, or none";
  });
  return asked(change, causes, shiftHz, predictions);
}

function withoutAntenna(causes: readonly Cause[]): Discrimination {
  const stays = causes.map(({ kind }) => kind === "reference");
  return asked(
    "Put the load in the antenna's place and sweep",
    causes,
    stays.map((stay) => (stay ? 0 : null)),
    stays.map((stay) => (stay ? "that the dip stays" : "that it goes")),
  );
}

function asked(change: string, causes: readonly Cause[], shiftHz: (number | null)[], predictions: string[]) {
  const each = causes.map(({ name }, i) =>
    `${name}, predicts ${predictions[i]}`.replace(/^([^,]*), predicts/, "$1 predicts"),
  );
  return { change, shiftHz, predictions, words: `${change}: ${each.join("; ")}.` };
}
