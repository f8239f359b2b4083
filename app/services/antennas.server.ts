import * as antennas from "~/db/antennas.server";
import { inTransaction, type Queryable, type Transaction } from "~/db/client.server";
import * as projects from "~/db/projects.server";
import { type Antenna, NO_ANTENNA } from "~/measurement/antenna";
import { type ChangedEntry, carryOn, changesBetween, mergeAntenna } from "./antenna-changes.ts";
import { record } from "./events.server.ts";

export type AntennaThen =
  | { kind: "described"; version: antennas.AntennaVersion }
  /** The moment lies before the first version: what the antenna was then is not known. */
  | { kind: "before"; describedFrom: Date }
  | { kind: "never" };

/** The antenna as it was at a moment. */
export async function antennaAt(projectId: number, at: Date, tx?: Queryable): Promise<AntennaThen> {
  const version = await antennas.findAt(projectId, at, tx);
  if (version) return { kind: "described", version };
  const describedFrom = await antennas.findFirstDay(projectId, tx);
  return describedFrom ? { kind: "before", describedFrom } : { kind: "never" };
}

export interface ChangeAntenna {
  projectId: number;
  by: number | null;
  /** As the form was filled in when it was opened. */
  was: Antenna;
  wanted: Antenna;
  validFrom: Date;
  /** What changed, in a line; may be empty. */
  remark: string;
  at?: Date;
}

export type AntennaChange =
  | { kind: "kept" }
  | { kind: "nothing" }
  /** Nothing was kept. `merged` is what would be, with the conflicting entries as they are `now`. */
  | { kind: "conflict"; conflicts: ChangedEntry[]; merged: Antenna; now: Antenna };

/** Keeps a change of the antenna as a version of its own from `validFrom` on, and lets it run on into later ones. */
export function changeAntenna(input: ChangeAntenna): Promise<AntennaChange> {
  return inTransaction(async (tx) => {
    await projects.lock(input.projectId, tx);
    const now = (await antennas.findAt(input.projectId, input.validFrom, tx))?.content ?? NO_ANTENNA;
    const { antenna, conflicts } = mergeAntenna(input.was, now, input.wanted);
    if (conflicts.length > 0) return { kind: "conflict", conflicts, merged: antenna, now };
    if (changesBetween(now, antenna).length === 0) return { kind: "nothing" };
    await insertVersion({ ...input, content: antenna, stepId: null }, tx);
    const about = { title: input.remark || "The antenna was changed" };
    await record(
      { projectId: input.projectId, kind: "antenna.changed", actorId: input.by, about, at: input.at },
      tx,
    );
    return { kind: "kept" };
  });
}

export interface InsertVersion {
  projectId: number;
  by: number | null;
  validFrom: Date;
  content: Antenna;
  remark: string;
  stepId: number | null;
  number?: number;
}

/** Puts a version in its place and carries what it changed on into those after it. The project's row must be locked. */
export async function insertVersion({ by, ...version }: InsertVersion, tx: Transaction): Promise<void> {
  const publicId = await antennas.insert({ ...version, createdBy: by }, tx);
  const all = await antennas.findAllByProject(version.projectId, tx);
  const here = all.findIndex((one) => one.version.publicId === publicId);
  await carryOnFrom(all[here - 1]?.version.content ?? NO_ANTENNA, version.content, all.slice(here + 1), tx);
}

/** Takes a version and what it changed out of the story; what was changed again since stays. */
export async function withdrawVersion(id: number, projectId: number, tx: Transaction): Promise<void> {
  const all = await antennas.findAllByProject(projectId, tx);
  const here = all.findIndex((one) => one.version.id === id);
  if (here < 0) return;
  const before = all[here - 1]?.version.content ?? NO_ANTENNA;
  await antennas.deleteById(id, tx);
  await carryOnFrom(all[here].version.content, before, all.slice(here + 1), tx);
}

async function carryOnFrom(
  was: Antenna,
  now: Antenna,
  later: antennas.ListedVersion[],
  tx: Transaction,
): Promise<void> {
  const contents = later.map(({ version }) => version.content);
  for (const [i, content] of carryOn(was, now, contents).entries()) {
    if (changesBetween(contents[i], content).length === 0) continue;
    await antennas.updateContent(later[i].version.id, content, tx);
  }
}
