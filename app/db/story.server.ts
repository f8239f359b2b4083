import { and, asc, count, desc, eq, inArray, isNotNull, isNull, sql } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { dipNumber } from "./dip-numbers.server.ts";
import { analyses, dips, notes, steps, sweeps, trailDips, trails } from "./schema/index.ts";
import { standing } from "./standing-verdict.server.ts";

/** What the strip map is drawn from: the newest sweeps of the antenna that have numbers, oldest of them first. */
export async function findStrips(projectId: number, tx: Queryable = db) {
  const rows = await tx
    .select({
      id: sweeps.id,
      publicId: sweeps.publicId,
      title: sweeps.title,
      takenAt: sweeps.takenAt,
      createdAt: sweeps.createdAt,
      startHz: sweeps.startHz,
      stopHz: sweeps.stopHz,
      pointCount: sweeps.pointCount,
      preview: sweeps.preview,
      readingId: sweeps.readingId,
      /** Its points are drawn as they were measured. */
      asMeasured:
        sql<boolean>`json_type(${analyses.correction}) is null or json_type(${analyses.correction}) = 'NULL'`.mapWith(
          Boolean,
        ),
    })
    .from(sweeps)
    .innerJoin(analyses, eq(analyses.id, sweeps.analysisId))
    .where(and(eq(sweeps.projectId, projectId), eq(sweeps.purpose, "antenna"), isNotNull(sweeps.preview)))
    .orderBy(desc(orderTime), desc(sweeps.id))
    .limit(MOST_STRIPS);
  return rows.reverse();
}
export type StripRow = Awaited<ReturnType<typeof findStrips>>[number];

/** Their dips, with as much of their numbers as is written on the map. */
export async function findDips(sweepIds: number[], tx: Queryable = db) {
  if (sweepIds.length === 0) return [];
  return tx
    .select({
      id: dips.id,
      sweepId: dips.sweepId,
      publicId: dips.publicId,
      frequencyHz: dips.frequencyHz,
      frequencyUncertaintyHz: dipNumber("frequencyUncertaintyHz"),
      minimumSwr: dips.minimumSwr,
      minimumSwrLow: dipNumber("minimumSwrLow", "minimumSwrNoiseLow"),
      minimumSwrHigh: dipNumber("minimumSwrHigh", "minimumSwrNoiseHigh"),
      returnLossDb: dips.returnLossDb,
      verdict: standing.verdict,
      verdictText: standing.verdictText,
    })
    .from(dips)
    .leftJoin(trailDips, eq(trailDips.dipId, dips.id))
    .leftJoin(trails, eq(trails.id, trailDips.trailId))
    .where(and(inArray(dips.sweepId, sweepIds), eq(dips.present, true)))
    .orderBy(asc(dips.frequencyHz))
    .limit(20_000);
}
export type StripDip = Awaited<ReturnType<typeof findDips>>[number];

/** Sweeps of the antenna that are not read yet, newest first. */
export async function findUnread(projectId: number, tx: Queryable = db) {
  return tx
    .select({ publicId: sweeps.publicId, title: sweeps.title })
    .from(sweeps)
    .where(and(eq(sweeps.projectId, projectId), eq(sweeps.purpose, "antenna"), isNull(sweeps.analysisId)))
    .orderBy(desc(sweeps.id))
    .limit(20);
}

/** How much there is of everything. */
export async function countStory(projectId: number, tx: Queryable = db) {
  const [sweepRows, stepRows, noteRows] = await Promise.all([
    tx
      .select({ n: count() })
      .from(sweeps)
      .where(and(eq(sweeps.projectId, projectId), eq(sweeps.purpose, "antenna"))),
    tx
      .select({ n: count() })
      .from(steps)
      .where(and(eq(steps.projectId, projectId), eq(steps.state, "done"))),
    tx
      .select({ n: count() })
      .from(notes)
      .where(and(eq(notes.projectId, projectId), isNull(notes.removedAt))),
  ]);
  return { sweeps: sweepRows[0].n, steps: stepRows[0].n, notes: noteRows[0].n };
}

const orderTime = sql<Date>`coalesce(${sweeps.takenAt}, ${sweeps.createdAt})`;
export const MOST_STRIPS = 200;
