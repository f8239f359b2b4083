import type { Cast } from "./cast.ts";
import type { Told } from "./told.ts";

/** Where a story happens, and what has its place in it by now. */
export interface Stage {
  cast: Cast;
  project: { id: number; publicId: string };
  told: Told;
  /** By the story's own keys: row ids of sweeps, public ids of notes, steps and plates. */
  sweepIds: Map<string, number>;
  noteIds: Map<string, string>;
  stepIds: Map<string, string>;
  plateIds: Map<string, string>;
  /** Row ids of benches: one for all stories, as a bench is used in several projects. */
  benchIds: Map<string, number>;
}

export function idOf<Id>(ids: ReadonlyMap<string, Id>, key: string, what: string): Id {
  const id = ids.get(key);
  if (id === undefined) throw new Error(`The demo has no ${what} "${key}" yet.`);
  return id;
}
