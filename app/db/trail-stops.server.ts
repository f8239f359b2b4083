import { and, asc, desc, eq, isNull, sql } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { dipNumber } from "./dip-numbers.server.ts";
import { dips, notes, sweeps, trailDips, trails, users } from "./schema/index.ts";
import { standing } from "./standing-verdict.server.ts";

/** Numbers of a dip as its trail is read; limits of noise alone where the bench's are not known. */
const stopColumns = {
  id: dips.id,
  publicId: dips.publicId,
  frequencyHz: dips.frequencyHz,
  minimumSwr: dips.minimumSwr,
  frequencyUncertaintyHz: dipNumber("frequencyUncertaintyHz"),
  minimumSwrLow: dipNumber("minimumSwrLow", "minimumSwrNoiseLow"),
  minimumSwrHigh: dipNumber("minimumSwrHigh", "minimumSwrNoiseHigh"),
  at: sweeps.takenAt,
  sweepTitle: sweeps.title,
  sweepPublicId: sweeps.publicId,
};

/** The dips of every trail of a project, each trail's in order of time. */
export async function findAllByProject(projectId: number, tx: Queryable = db) {
  return tx
    .select({ trailId: trailDips.trailId, ...stopColumns })
    .from(trailDips)
    .innerJoin(trails, eq(trails.id, trailDips.trailId))
    .innerJoin(dips, eq(dips.id, trailDips.dipId))
    .innerJoin(sweeps, eq(sweeps.id, dips.sweepId))
    .where(eq(trails.projectId, projectId))
    .orderBy(asc(orderTime), asc(sweeps.id))
    .limit(MOST_STOPS);
}

/** One trail's dips in order of time, with all their numbers and how much was said on each. */
export async function findAllByTrail(trailId: number, tx: Queryable = db) {
  return tx
    .select({
      ...stopColumns,
      sweepId: sweeps.id,
      numbers: dips.numbers,
      verdict: standing.verdict,
      verdictText: standing.verdictText,
      noteCount:
        sql<number>`(select count(*) from ${notes} n where n.dip_id = ${dips.id} and n.removed_at is null)`.mapWith(
          Number,
        ),
    })
    .from(trailDips)
    .innerJoin(trails, eq(trails.id, trailDips.trailId))
    .innerJoin(dips, eq(dips.id, trailDips.dipId))
    .innerJoin(sweeps, eq(sweeps.id, dips.sweepId))
    .where(eq(trailDips.trailId, trailId))
    .orderBy(asc(orderTime), asc(sweeps.id))
    .limit(MOST_STOPS);
}

/** What was said last on the trail's dips, newest first. */
export async function findNotes(trailId: number, limit: number, tx: Queryable = db) {
  return tx
    .select({
      publicId: notes.publicId,
      body: notes.body,
      at: notes.createdAt,
      author: users.name,
      sweepTitle: sweeps.title,
      dipPublicId: dips.publicId,
      frequencyHz: dips.frequencyHz,
    })
    .from(notes)
    .innerJoin(trailDips, eq(trailDips.dipId, notes.dipId))
    .innerJoin(dips, eq(dips.id, notes.dipId))
    .innerJoin(sweeps, eq(sweeps.id, dips.sweepId))
    .leftJoin(users, eq(users.id, notes.authorId))
    .where(and(eq(trailDips.trailId, trailId), isNull(notes.removedAt)))
    .orderBy(desc(notes.createdAt), desc(notes.id))
    .limit(limit);
}

/** By when a sweep was taken, or where that is unknown by when it came in: as in every list of sweeps. */
const orderTime = sql<Date>`coalesce(${sweeps.takenAt}, ${sweeps.createdAt})`;
const MOST_STOPS = 20_000;
