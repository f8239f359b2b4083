import { and, asc, desc, eq, inArray, isNotNull, ne, sql } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { analyses, files, readings, sweeps, users } from "./schema/index.ts";
import type { FoundSweep } from "./sweeps.server.ts";
import { withWholeDips } from "./whole-dips.server.ts";

/** The sweeps of one group with their readings and analyses, the oldest first. */
export async function findGroup(projectId: number, group: string, tx: Queryable = db): Promise<FoundSweep[]> {
  const rows = await tx
    .select({ sweep: sweeps, file: files, reading: readings, analysis: analyses, by: users.name })
    .from(sweeps)
    .innerJoin(files, eq(files.id, sweeps.fileId))
    .leftJoin(readings, eq(readings.id, sweeps.readingId))
    .leftJoin(analyses, eq(analyses.id, sweeps.analysisId))
    .leftJoin(users, eq(users.id, sweeps.createdBy))
    .where(and(eq(sweeps.projectId, projectId), eq(sweeps.repeatGroup, group)))
    .orderBy(asc(takenOrIn), asc(sweeps.id))
    .limit(MOST_REPEATS);
  return rows.map(withWholeDips);
}

/** Antenna sweeps of the project that were read, the newest first: what could be a repeat of this one. */
export async function findCandidates(projectId: number, exceptId: number, tx: Queryable = db) {
  return tx
    .select({
      publicId: sweeps.publicId,
      title: sweeps.title,
      takenAt: sweeps.takenAt,
      startHz: sweeps.startHz,
      stopHz: sweeps.stopHz,
      repeatGroup: sweeps.repeatGroup,
    })
    .from(sweeps)
    .where(
      and(
        eq(sweeps.projectId, projectId),
        ne(sweeps.id, exceptId),
        eq(sweeps.purpose, "antenna"),
        isNotNull(sweeps.analysisId),
      ),
    )
    .orderBy(desc(takenOrIn), desc(sweeps.id))
    .limit(100);
}

/** Locks those of these sweeps that are in the project and were read. */
export async function lockAll(projectId: number, publicIds: string[], tx: Queryable) {
  if (publicIds.length === 0) return [];
  return tx
    .select({ id: sweeps.id, publicId: sweeps.publicId, repeatGroup: sweeps.repeatGroup })
    .from(sweeps)
    .where(
      and(eq(sweeps.projectId, projectId), inArray(sweeps.publicId, publicIds), isNotNull(sweeps.analysisId)),
    )
    .orderBy(asc(sweeps.id))
    .limit(MOST_REPEATS)
    .for("update");
}

export async function findIdsOfGroup(projectId: number, group: string, tx: Queryable): Promise<number[]> {
  const rows = await tx
    .select({ id: sweeps.id })
    .from(sweeps)
    .where(and(eq(sweeps.projectId, projectId), eq(sweeps.repeatGroup, group)))
    .orderBy(asc(sweeps.id))
    .limit(MOST_REPEATS)
    .for("update");
  return rows.map((row) => row.id);
}

export async function setGroup(ids: number[], group: string | null, tx: Queryable): Promise<void> {
  if (ids.length === 0) return;
  await tx.update(sweeps).set({ repeatGroup: group }).where(inArray(sweeps.id, ids));
}

const takenOrIn = sql<Date>`coalesce(${sweeps.takenAt}, ${sweeps.createdAt})`;
/** A person sweeps the same thing a handful of times; a script perhaps some dozens. */
export const MOST_REPEATS = 50;
