import type { Transaction } from "~/db/client.server";
import * as trails from "~/db/trails.server";
import { type FoundTrail, findTrails, type TrailSweep } from "~/measurement/trails";
import { type TrailDecision, withoutDip } from "~/measurement/trails/decisions";
import { keepIdentities } from "~/measurement/trails/identity";

/**
 * Finds the project's trails anew and stores them: called in every transaction that changes its sweeps or dips, after
 * `projects.lock`, so that two who do so at once come one after the other. A trail keeps its identity while it keeps most
 * of its dips; one that was named or judged stays even without any.
 */
export async function refreshTrails(projectId: number, tx: Transaction): Promise<void> {
  const [sweeps, decisions, rows, members, judged] = [
    await loadTrailSweeps(projectId, tx),
    await trails.findDecisions(projectId, tx),
    await trails.findAllByProject(projectId, tx),
    await trails.findMembers(projectId, tx),
    new Set(await trails.findJudged(projectId, tx)),
  ];
  const found = findTrails(
    sweeps,
    decisions.map(({ decision }) => decisionOf(decision)),
  ).trails;
  const stored = rows.map((row) => ({
    id: row.id,
    dipIds: members.filter(({ trailId }) => trailId === row.id).map(({ dipId }) => String(dipId)),
    cared: isCared(row) || judged.has(row.id),
  }));
  const ways = found.map(({ stops }) => stops.map(({ dip }) => dip.id));
  const { idOf, left } = keepIdentities(ways, stored);
  const fresh = found.filter((_, i) => idOf[i] === null);
  const ids = await trails.insertAll(projectId, fresh.map(newestHz), tx);
  for (const [i, trail] of fresh.entries()) idOf[found.indexOf(trail)] = ids[i];
  await storeMembers(found, idOf as number[], members, tx);
  for (const [i, trail] of found.entries()) {
    const row = rows.find(({ id }) => id === idOf[i]);
    if (row && row.frequencyHz !== newestHz(trail)) {
      await trails.update(row.id, { frequencyHz: newestHz(trail) }, tx);
    }
  }
  await trails.deleteAll(
    left.filter(({ cared }) => !cared).map(({ id }) => id),
    tx,
  );
}

/** The sweeps of the story with their dips, as the pairing takes them; a dip's id is its row's. */
export async function loadTrailSweeps(
  projectId: number,
  tx?: Transaction,
): Promise<(TrailSweep & { title: string })[]> {
  const sweeps = await trails.findSweeps(projectId, tx);
  const dips = await trails.findDips(projectId, tx);
  const bySweep = new Map<number, TrailSweep["dips"][number][]>(sweeps.map(({ id }) => [id, []]));
  for (const { sweepId, ...dip } of dips) bySweep.get(sweepId)?.push({ ...dip, id: String(dip.id) });
  return sweeps.map(({ id, title, startHz, stopHz }) => ({
    title,
    id: String(id),
    startHz: startHz ?? Number.NaN,
    stopHz: stopHz ?? Number.NaN,
    dips: bySweep.get(id) ?? [],
  }));
}

/**
 * Before dips are deleted: what people decided through them is decided between those that stay (A = B and B = C become
 * A = C).
 */
export async function keepDecisionsAround(dipIds: number[], tx: Transaction): Promise<void> {
  const touching = await trails.findDecisionsOn(dipIds, tx);
  let said = touching.map((row) => ({ ...decisionOf(row), by: row.by, at: row.at }));
  for (const id of dipIds) said = withoutDip(said, String(id));
  for (const { kind, a, b, by, at } of said) {
    await trails.setDecision({ oneId: Number(a), otherId: Number(b), decision: kind, by, at }, tx);
  }
}

export function decisionOf({ oneId, otherId, decision }: trails.DecisionRow): TrailDecision {
  return { kind: decision, a: String(oneId), b: String(otherId) };
}

function isCared({ name, verdict, verdictText }: trails.TrailRow): boolean {
  return name !== "" || verdict !== "open" || verdictText !== "";
}

/** Only what changed is written. */
async function storeMembers(
  found: FoundTrail[],
  ids: number[],
  before: { dipId: number; trailId: number }[],
  tx: Transaction,
): Promise<void> {
  const was = new Map(before.map(({ dipId, trailId }) => [dipId, trailId]));
  const now = found.flatMap(({ stops }, i) =>
    stops.map(({ dip }) => ({ dipId: Number(dip.id), trailId: ids[i] })),
  );
  const there = new Set(now.map(({ dipId }) => dipId));
  await trails.deleteMembers(
    [...was.keys()].filter((dipId) => !there.has(dipId)),
    tx,
  );
  await trails.setMembers(
    now.filter(({ dipId, trailId }) => was.get(dipId) !== trailId),
    tx,
  );
}

function newestHz({ stops }: FoundTrail): number {
  return stops[stops.length - 1].dip.frequencyHz;
}
