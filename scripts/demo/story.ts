import type { Given } from "~/readers/reading";
import type { VerdictIntent } from "~/services/verdicts.server";
import type { Who } from "./cast.ts";
import type { Stage } from "./stage.ts";
import type { Told } from "./told.ts";

/** A story: what was swept, said, decided and done, in the order in which it happened. */

/** On a sweep; with `nearMhz` on its dip there; with neither on the project. */
export interface On {
  sweep?: string;
  nearMhz?: number;
}

export interface SweepStep {
  kind: "sweep";
  key: string;
  by: Who;
  at: Date;
  title: string;
  fileName: string;
  bytes: Uint8Array;
  given?: Given;
  /** Key of the bench it was taken with. */
  bench?: string;
}

export interface NoteStep {
  kind: "note";
  /** So that others can answer it. */
  key?: string;
  by: Who;
  at: Date;
  on: On;
  answers?: string;
  text: (told: Told) => string;
}

export interface VerdictStep {
  kind: "verdict";
  by: Who;
  at: Date;
  on: Required<On>;
  intent: VerdictIntent;
  text: (told: Told) => string;
  rests?: Rests;
}

/** What a verdict rests on, by the story's own keys. */
export interface Rests {
  /** The antenna's part whose cause is adopted: then the verdict says what that cause says. */
  cause?: string;
  sweeps?: string[];
  steps?: string[];
  notes?: string[];
  /** Markdown that goes along. */
  note?: (told: Told) => string;
}

/** Anything else that somebody does. */
export interface DeedStep {
  kind: "deed";
  by: Who;
  at: Date;
  do: (stage: Stage, by: { id: number; userName: string }, at: Date) => Promise<void>;
}

export type Step = SweepStep | NoteStep | VerdictStep | DeedStep;

export interface Story {
  title: string;
  summary: string;
  visibility: "private" | "linked" | "public";
  owner: Who;
  members: { who: Who; role: "owner" | "experimenter" | "commenter" | "reader" }[];
  bands: { name: string; lowHz: number; highHz: number; swrLimit: number }[];
  steps: Step[];
}

/** A moment of the story's year, UTC: month, day, hours, minutes. */
export function on(month: number, day: number, hours: number, minutes = 0): Date {
  return new Date(Date.UTC(2026, month - 1, day, hours, minutes));
}
