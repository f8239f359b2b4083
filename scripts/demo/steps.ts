import type { Who } from "./cast.ts";
import type { NoteStep, On, Rests, Step, SweepStep, VerdictStep } from "./story.ts";

/** Short forms of what happens in a story. */

export function swept(step: Omit<SweepStep, "kind">): Step {
  return { kind: "sweep", ...step };
}

/** Who says what, when and on what; `more` names the note or the one that it answers. */
export function said(
  by: Who,
  at: Date,
  on: On,
  text: NoteStep["text"] | string,
  more: Pick<NoteStep, "key" | "answers"> = {},
): Step {
  return { kind: "note", by, at, on, text: typeof text === "string" ? () => text : text, ...more };
}

export function decided(
  by: Who,
  at: Date,
  on: Required<On>,
  intent: VerdictStep["intent"],
  text: VerdictStep["text"] | string,
  rests?: Rests,
): Step {
  return { kind: "verdict", by, at, on, intent, text: typeof text === "string" ? () => text : text, rests };
}

/** Proposes what the product's own list of causes says of that part of the antenna. */
export function adopted(
  by: Who,
  at: Date,
  on: Required<On>,
  rests: Rests & Required<Pick<Rests, "cause">>,
): Step {
  return { kind: "verdict", by, at, on, intent: "propose", text: () => "", rests };
}
