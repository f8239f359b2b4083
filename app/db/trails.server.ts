import { and, asc, desc, eq, inArray, isNotNull, or, sql } from "drizzle-orm";
import { alias, union } from "drizzle-orm/mysql-core";
import { db, type Queryable } from "./client.server.ts";
import { newPublicId } from "./ids.server.ts";
import {
  dips,
  notes,
  sweeps,
  trailDecisions,
  trailDips,
  trails,
  users,
  verdictEvents,
} from "./schema/index.ts";

export type TrailRow = typeof trails.$inferSelect;
export type DecisionRow = typeof trailDecisions.$inferSelect;

/** The sweeps of a project that have numbers, in order of time, references left out. */
export async function findSweeps(projectId: number, tx: Queryable = db) {
  return tx
    .select({ id: sweeps.id, title: sweeps.title, startHz: sweeps.startHz, stopHz: sweeps.stopHz })
    .from(sweeps)
    .where(and(eq(sweeps.projectId, projectId), ofTheStory))
    .orderBy(asc(orderTime), asc(sweeps.id))
    .limit(MOST_SWEEPS);
}

/** What pairing needs of their dips: those found now and not at a sweep's end. */
export async function findDips(projectId: number, tx: Queryable = db) {
  return tx
    .select({
      id: dips.id,
      sweepId: dips.sweepId,
      frequencyHz: dips.frequencyHz,
      returnLossDb: dips.returnLossDb,
      widthHz: sql<number | null>`if(json_value(${dips.numbers}, '$.bandwidth.open') in ('1', 'true'), null,
        json_value(${dips.numbers}, '$.bandwidth.widthHz'))`.mapWith(Number),
    })
    .from(dips)
    .innerJoin(sweeps, eq(sweeps.id, dips.sweepId))
    .where(
      and(
        eq(dips.projectId, projectId),
        ofTheStory,
        eq(dips.present, true),
        sql`json_value(${dips.numbers}, '$.edge') not in ('1', 'true')`,
      ),
    )
    .orderBy(asc(dips.id))
    .limit(MOST_DIPS);
}

export async function findAllByProject(projectId: number, tx: Queryable = db): Promise<TrailRow[]> {
  return tx
    .select()
    .from(trails)
    .where(eq(trails.projectId, projectId))
    .orderBy(asc(trails.frequencyHz), asc(trails.id))
    .limit(MOST_DIPS);
}

/** Which dip is on which trail. */
export async function findMembers(projectId: number, tx: Queryable = db) {
  return tx
    .select({ dipId: trailDips.dipId, trailId: trailDips.trailId })
    .from(trailDips)
    .innerJoin(trails, eq(trails.id, trailDips.trailId))
    .where(eq(trails.projectId, projectId))
    .limit(MOST_DIPS);
}

export async function findByPublicId(publicId: string, tx: Queryable = db) {
  const rows = await tx
    .select({ trail: trails, verdictBy: users.name })
    .from(trails)
    .leftJoin(users, eq(users.id, trails.verdictBy))
    .where(eq(trails.publicId, publicId))
    .limit(1);
  return rows[0];
}

/** The trail that a dip is on. */
export async function findByDip(dipId: number, tx: Queryable = db): Promise<TrailRow | undefined> {
  const rows = await tx
    .select({ trail: trails })
    .from(trailDips)
    .innerJoin(trails, eq(trails.id, trailDips.trailId))
    .where(eq(trailDips.dipId, dipId))
    .limit(1);
  return rows[0]?.trail;
}

/** Locks the trail's row: names and verdicts of it come one after another. */
export async function lock(id: number, tx: Queryable): Promise<TrailRow | undefined> {
  return (await tx.select().from(trails).where(eq(trails.id, id)).limit(1).for("update"))[0];
}

export async function update(id: number, values: Partial<TrailRow>, tx: Queryable) {
  await tx.update(trails).set(values).where(eq(trails.id, id));
}

/** New trails; answers their row ids in the given order. */
export async function insertAll(
  projectId: number,
  frequenciesHz: number[],
  tx: Queryable,
): Promise<number[]> {
  if (frequenciesHz.length === 0) return [];
  const createdAt = new Date();
  const rows = frequenciesHz.map((frequencyHz) => ({
    projectId,
    frequencyHz,
    createdAt,
    publicId: newPublicId(),
  }));
  await tx.insert(trails).values(rows);
  const publicIds = rows.map(({ publicId }) => publicId);
  const found = await tx
    .select({ id: trails.id, publicId: trails.publicId })
    .from(trails)
    .where(inArray(trails.publicId, publicIds))
    .limit(publicIds.length);
  const idOf = new Map(found.map(({ id, publicId }) => [publicId, id]));
  return publicIds.map((publicId) => idOf.get(publicId) as number);
}

/** Puts dips on trails, from wherever they were. */
export async function setMembers(members: { dipId: number; trailId: number }[], tx: Queryable) {
  if (members.length === 0) return;
  await tx
    .insert(trailDips)
    .values(members)
    .onDuplicateKeyUpdate({ set: { trailId: sql`values(${trailDips.trailId})` } });
}

export async function deleteMembers(dipIds: number[], tx: Queryable) {
  if (dipIds.length > 0) await tx.delete(trailDips).where(inArray(trailDips.dipId, dipIds));
}

export async function deleteAll(ids: number[], tx: Queryable) {
  if (ids.length > 0) await tx.delete(trails).where(inArray(trails.id, ids));
}

/** Trails of the project on which a verdict was ever given or a note written. */
export async function findJudged(projectId: number, tx: Queryable = db): Promise<number[]> {
  const judged = tx
    .select({ id: verdictEvents.trailId })
    .from(verdictEvents)
    .where(and(eq(verdictEvents.projectId, projectId), isNotNull(verdictEvents.trailId)));
  const saidOf = tx
    .select({ id: notes.trailId })
    .from(notes)
    .where(and(eq(notes.projectId, projectId), isNotNull(notes.trailId)));
  const rows = await union(judged, saidOf).limit(MOST_DIPS);
  return rows.flatMap(({ id }) => (id === null ? [] : [id]));
}

const one = alias(dips, "one_dip");
const other = alias(dips, "other_dip");
const oneSweep = alias(sweeps, "one_sweep");
const otherSweep = alias(sweeps, "other_sweep");

/** What people decided in the project, oldest first, with the two dips as they are read. */
export async function findDecisions(projectId: number, tx: Queryable = db) {
  return tx
    .select({
      decision: trailDecisions,
      by: users.name,
      one: { publicId: one.publicId, frequencyHz: one.frequencyHz, sweepTitle: oneSweep.title },
      other: { publicId: other.publicId, frequencyHz: other.frequencyHz, sweepTitle: otherSweep.title },
    })
    .from(trailDecisions)
    .innerJoin(one, eq(one.id, trailDecisions.oneId))
    .innerJoin(other, eq(other.id, trailDecisions.otherId))
    .innerJoin(oneSweep, eq(oneSweep.id, one.sweepId))
    .innerJoin(otherSweep, eq(otherSweep.id, other.sweepId))
    .leftJoin(users, eq(users.id, trailDecisions.by))
    .where(eq(one.projectId, projectId))
    .orderBy(asc(trailDecisions.at), asc(trailDecisions.oneId), asc(trailDecisions.otherId))
    .limit(MOST_DIPS);
}

/** Decisions that name one of the dips, oldest first. */
export async function findDecisionsOn(dipIds: number[], tx: Queryable): Promise<DecisionRow[]> {
  if (dipIds.length === 0) return [];
  return tx
    .select()
    .from(trailDecisions)
    .where(or(inArray(trailDecisions.oneId, dipIds), inArray(trailDecisions.otherId, dipIds)))
    .orderBy(asc(trailDecisions.at), asc(trailDecisions.oneId), asc(trailDecisions.otherId))
    .limit(MOST_DIPS);
}

/** The last word on a pair counts: one that was said before what is there changes nothing. */
export async function setDecision({ oneId, otherId, ...said }: DecisionRow, tx: Queryable) {
  await tx
    .insert(trailDecisions)
    .values({ oneId: Math.min(oneId, otherId), otherId: Math.max(oneId, otherId), ...said })
    .onDuplicateKeyUpdate({
      set: {
        decision: newer(trailDecisions.decision),
        by: newer(trailDecisions.by),
        // Last: the others ask for the time that was there.
        at: newer(trailDecisions.at),
      },
    });
}

function newer(column: typeof trailDecisions.decision | typeof trailDecisions.by | typeof trailDecisions.at) {
  return sql`if(values(${trailDecisions.at}) >= ${trailDecisions.at}, values(${column}), ${column})`;
}

export async function deleteDecision(oneId: number, otherId: number, tx: Queryable): Promise<boolean> {
  const [low, high] = [Math.min(oneId, otherId), Math.max(oneId, otherId)];
  const [{ affectedRows }] = await tx
    .delete(trailDecisions)
    .where(and(eq(trailDecisions.oneId, low), eq(trailDecisions.otherId, high)));
  return affectedRows > 0;
}

export async function findSweepTitle(sweepId: number, tx: Queryable = db): Promise<string | undefined> {
  const rows = await tx.select({ title: sweeps.title }).from(sweeps).where(eq(sweeps.id, sweepId)).limit(1);
  return rows[0]?.title;
}

export async function insertVerdictEvent(
  event: Omit<typeof verdictEvents.$inferInsert, "id" | "publicId">,
  tx: Queryable,
) {
  await tx.insert(verdictEvents).values({ ...event, publicId: newPublicId() });
}

/** Every verdict that was given on a trail, newest first. */
export async function findVerdictEvents(trailId: number, tx: Queryable = db) {
  return tx
    .select({ event: verdictEvents, by: users.name })
    .from(verdictEvents)
    .leftJoin(users, eq(users.id, verdictEvents.by))
    .where(eq(verdictEvents.trailId, trailId))
    .orderBy(desc(verdictEvents.at), desc(verdictEvents.id))
    .limit(100);
}

/** By when a sweep was taken, or where that is unknown by when it came in: as in every list of sweeps. */
const orderTime = sql<Date>`coalesce(${sweeps.takenAt}, ${sweeps.createdAt})`;
const ofTheStory = and(
  eq(sweeps.purpose, "antenna"),
  isNotNull(sweeps.analysisId),
  isNotNull(sweeps.startHz),
  isNotNull(sweeps.stopHz),
);
const MOST_SWEEPS = 2000;
const MOST_DIPS = 50_000;
