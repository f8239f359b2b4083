import { inTransaction, type Transaction } from "~/db/client.server";
import * as projects from "~/db/projects.server";
import * as trails from "~/db/trails.server";
import { record } from "./events.server.ts";
import { loadTrailSweeps, refreshTrails } from "./trails.server.ts";

/** Corrections of trails by hand. Each is a word on two dips; it stays, whatever is found later. */

export interface Correction {
  projectId: number;
  by: { id: number };
  at?: Date;
}

export type Joined =
  | { kind: "done"; trail: trails.TrailRow }
  | { kind: "already" }
  | { kind: "missing" }
  /** Both trails have a dip in this sweep (its row id). */
  | { kind: "both-in"; sweepId: number };

/** The dip belongs to this trail: it is one with the trail's dip next before it, else with the next after it. */
export function joinDip(input: Correction & { dipId: number; trailId: number }): Promise<Joined> {
  return inTransaction(async (tx) => {
    const known = await lockedOrder(input.projectId, tx);
    const at = known.order.get(input.dipId);
    const stops = known.stopsOf(input.trailId);
    if (at === undefined || stops.length === 0) return { kind: "missing" };
    if (stops.some(({ dipId }) => dipId === input.dipId)) return { kind: "already" };
    const before = stops.findLast((stop) => stop.index < at);
    const after = stops.find((stop) => stop.index > at);
    const partner = before ?? after;
    if (!partner) return { kind: "both-in", sweepId: known.sweepIds[at] };
    return decide(input, [[partner.dipId, input.dipId, "same"]], input.dipId, tx);
  });
}

/** Two trails are one: refused where both have a dip in one sweep. */
export function joinTrails(input: Correction & { trailId: number; otherId: number }): Promise<Joined> {
  return inTransaction(async (tx) => {
    const known = await lockedOrder(input.projectId, tx);
    const [one, other] = [known.stopsOf(input.trailId), known.stopsOf(input.otherId)];
    if (one.length === 0 || other.length === 0) return { kind: "missing" };
    if (input.trailId === input.otherId) return { kind: "already" };
    const both = one.find(({ index }) => other.some((stop) => stop.index === index));
    if (both) return { kind: "both-in", sweepId: known.sweepIds[both.index] };
    const way = [
      ...one.map((stop) => ({ ...stop, own: true })),
      ...other.map((stop) => ({ ...stop, own: false })),
    ];
    way.sort((a, b) => a.index - b.index);
    const words = way
      .slice(1)
      .flatMap((stop, i): Word[] => (stop.own === way[i].own ? [] : [[way[i].dipId, stop.dipId, "same"]]));
    return decide(input, words, one[0].dipId, tx);
  });
}

/** Two dips that followed one another are not the same one. */
export function partDips(input: Correction & { dipId: number; otherId: number }): Promise<Joined> {
  return inTransaction(async (tx) => {
    const known = await lockedOrder(input.projectId, tx);
    if (input.dipId === input.otherId || !known.order.has(input.dipId) || !known.order.has(input.otherId))
      return { kind: "missing" };
    return decide(input, [[input.dipId, input.otherId, "apart"]], input.dipId, tx);
  });
}

/** Takes a correction back: the pairing decides again. */
export function takeBack(input: Correction & { dipId: number; otherId: number }): Promise<Joined> {
  return inTransaction(async (tx) => {
    await projects.lock(input.projectId, tx);
    if (!(await trails.deleteDecision(input.dipId, input.otherId, tx))) return { kind: "missing" };
    return finish(input, input.dipId, "A correction of a trail was taken back", tx);
  });
}

type Word = [oneId: number, otherId: number, decision: "same" | "apart"];

async function decide(input: Correction, words: Word[], dipId: number, tx: Transaction): Promise<Joined> {
  const at = input.at ?? new Date();
  for (const [oneId, otherId, decision] of words) {
    await trails.setDecision({ oneId, otherId, decision, by: input.by.id, at }, tx);
  }
  return finish(input, dipId, "A trail was corrected by hand", tx);
}

async function finish(input: Correction, dipId: number, title: string, tx: Transaction): Promise<Joined> {
  await refreshTrails(input.projectId, tx);
  const trail = await trails.findByDip(dipId, tx);
  if (!trail) return { kind: "missing" };
  const about = { trail: trail.publicId, title };
  await record(
    { projectId: input.projectId, kind: "trail.corrected", actorId: input.by.id, about, at: input.at },
    tx,
  );
  return { kind: "done", trail };
}

/** The project's dips in order of time, and each trail's, read under the lock. */
async function lockedOrder(projectId: number, tx: Transaction) {
  await projects.lock(projectId, tx);
  const sweeps = await loadTrailSweeps(projectId, tx);
  const members = await trails.findMembers(projectId, tx);
  const order = new Map(sweeps.flatMap(({ dips }, i) => dips.map(({ id }) => [Number(id), i] as const)));
  const stopsOf = (trailId: number) =>
    members
      .filter((member) => member.trailId === trailId)
      .flatMap(({ dipId }) => {
        const index = order.get(dipId);
        return index === undefined ? [] : [{ dipId, index }];
      })
      .sort((a, b) => a.index - b.index);
  return { order, stopsOf, sweepIds: sweeps.map(({ id }) => Number(id)) };
}
