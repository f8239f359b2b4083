import { and, asc, count, desc, eq, inArray, lt, or, sql } from "drizzle-orm";
import type { AnalysisSettings, Dip, Warning } from "~/measurement/sweep";
import type { Given, Reading } from "~/readers/reading";
import { db, type Queryable } from "./client.server.ts";
import { decodeCursor, encodeCursor } from "./cursor.server.ts";
import { newPublicId } from "./ids.server.ts";
import {
  analyses,
  dips,
  files,
  notes,
  readings,
  type StoredCorrection,
  sweepPoints,
  sweeps,
  trailDips,
  trails,
  users,
} from "./schema/index.ts";
import { standingVerdict } from "./standing-verdict.server.ts";
import { withWholeDips } from "./whole-dips.server.ts";

export type SweepRow = typeof sweeps.$inferSelect;

/** A sweep with its file, its current reading and analysis, all in one query. */
export async function findByPublicId(publicId: string, tx: Queryable = db) {
  const rows = await tx
    .select({ sweep: sweeps, file: files, reading: readings, analysis: analyses, by: users.name })
    .from(sweeps)
    .innerJoin(files, eq(files.id, sweeps.fileId))
    .leftJoin(readings, eq(readings.id, sweeps.readingId))
    .leftJoin(analyses, eq(analyses.id, sweeps.analysisId))
    .leftJoin(users, eq(users.id, sweeps.createdBy))
    .where(eq(sweeps.publicId, publicId))
    .limit(1);
  return rows.map(withWholeDips).at(0);
}
export type FoundSweep = NonNullable<Awaited<ReturnType<typeof findByPublicId>>>;

/** Locks the sweep's row: readings and analyses of one sweep are numbered one after another. */
export async function lock(id: number, tx: Queryable): Promise<SweepRow | undefined> {
  return (await tx.select().from(sweeps).where(eq(sweeps.id, id)).limit(1).for("update"))[0];
}

/** The antenna's sweeps, newest first; a bench's references stand with their bench. */
export async function findAllByProject(
  projectId: number,
  page: { limit?: number; cursor?: string } = {},
  tx: Queryable = db,
) {
  const limit = Math.min(page.limit ?? 100, 100);
  const before = page.cursor ? decodeCursor(page.cursor) : undefined;
  const rows = await tx
    .select({
      id: sweeps.id,
      publicId: sweeps.publicId,
      title: sweeps.title,
      takenAt: sweeps.takenAt,
      createdAt: sweeps.createdAt,
      problem: sweeps.problem,
      pointCount: sweeps.pointCount,
      startHz: sweeps.startHz,
      stopHz: sweeps.stopHz,
      referenceOhm: sweeps.referenceOhm,
      complex: sweeps.complex,
      preview: sweeps.preview,
      fileName: files.name,
      fileSha256: files.sha256,
      reading: readings.reading,
      by: users.name,
      noteCount:
        sql<number>`(select count(*) from ${notes} n where n.sweep_id = ${sweeps.id} and n.removed_at is null)`.mapWith(
          Number,
        ),
    })
    .from(sweeps)
    .innerJoin(files, eq(files.id, sweeps.fileId))
    .leftJoin(readings, eq(readings.id, sweeps.readingId))
    .leftJoin(users, eq(users.id, sweeps.createdBy))
    .where(
      and(
        eq(sweeps.projectId, projectId),
        eq(sweeps.purpose, "antenna"),
        before && or(lt(orderTime, before.at), and(eq(orderTime, before.at), lt(sweeps.id, before.id))),
      ),
    )
    .orderBy(desc(orderTime), desc(sweeps.id))
    .limit(limit + 1);
  const last = rows.length > limit ? rows[limit - 1] : undefined;
  return {
    rows: rows.slice(0, limit),
    nextCursor: last ? encodeCursor({ at: last.takenAt ?? last.createdAt, id: last.id }) : null,
  };
}

/** How many sweeps of the antenna there are. */
export async function countByProject(projectId: number, tx: Queryable = db): Promise<number> {
  const rows = await tx
    .select({ n: count() })
    .from(sweeps)
    .where(and(eq(sweeps.projectId, projectId), eq(sweeps.purpose, "antenna")));
  return rows[0].n;
}

export async function insert(
  values: Pick<
    typeof sweeps.$inferInsert,
    "projectId" | "fileId" | "title" | "takenAt" | "createdBy" | "purpose"
  >,
  tx: Queryable,
) {
  const publicId = newPublicId();
  const [row] = await tx
    .insert(sweeps)
    .values({ ...values, publicId, createdAt: new Date() })
    .$returningId();
  return { id: row.id, publicId };
}

export async function update(id: number, values: Partial<typeof sweeps.$inferInsert>, tx: Queryable = db) {
  await tx.update(sweeps).set(values).where(eq(sweeps.id, id));
}

/** Deletes the file's row, and with it the sweep and all that hangs on it. */
export async function deleteByFileId(fileId: number, tx: Queryable) {
  await tx.delete(files).where(eq(files.id, fileId));
}

export interface NewReading {
  sweepId: number;
  given: Given;
  reading: Reading | null;
  createdBy: number | null;
}

export async function insertReading(values: NewReading, parts: Buffer[], tx: Queryable): Promise<number> {
  const [row] = await tx
    .insert(readings)
    .values({
      ...values,
      number: await nextNumber(readings, values.sweepId, tx),
      publicId: newPublicId(),
      shape: values.reading?.shape.slice(0, 190) ?? null,
      createdAt: new Date(),
    })
    .$returningId();
  for (const [part, data] of parts.entries()) {
    await tx.insert(sweepPoints).values({ readingId: row.id, part, data });
  }
  return row.id;
}

export async function findPoints(readingId: number, tx: Queryable = db): Promise<Buffer[]> {
  const rows = await tx
    .select({ data: sweepPoints.data })
    .from(sweepPoints)
    .where(eq(sweepPoints.readingId, readingId))
    .orderBy(asc(sweepPoints.part))
    .limit(100);
  return rows.map((row) => row.data);
}

/** The parts of many readings' points, each in their order. */
export async function findPointsOfAll(
  readingIds: number[],
  tx: Queryable = db,
): Promise<Map<number, Buffer[]>> {
  const found = new Map<number, Buffer[]>();
  if (readingIds.length === 0) return found;
  const rows = await tx
    .select({ readingId: sweepPoints.readingId, data: sweepPoints.data })
    .from(sweepPoints)
    .where(inArray(sweepPoints.readingId, readingIds))
    .orderBy(asc(sweepPoints.readingId), asc(sweepPoints.part))
    .limit(10_000);
  for (const { readingId, data } of rows) found.set(readingId, [...(found.get(readingId) ?? []), data]);
  return found;
}

/**
 * What was chosen for the last file of this shape in the project. A bench's references count `withReferences` only: their level of
 * the 0 dB line is arbitrary, and right for nothing but the sweeps that are divided by them.
 */
export async function findGivenByShape(
  projectId: number,
  shape: string,
  withReferences: boolean,
  tx: Queryable = db,
) {
  const rows = await tx
    .select({ given: readings.given })
    .from(readings)
    .innerJoin(sweeps, eq(sweeps.readingId, readings.id))
    .where(
      and(
        eq(readings.shape, shape.slice(0, 190)),
        eq(sweeps.projectId, projectId),
        withReferences ? undefined : eq(sweeps.purpose, "antenna"),
      ),
    )
    .orderBy(desc(readings.id))
    .limit(1);
  return rows[0]?.given;
}

export interface NewAnalysis {
  sweepId: number;
  readingId: number;
  version: string;
  settings: AnalysisSettings;
  correction: StoredCorrection | null;
  noiseDb: number | null;
  warnings: Warning[];
  dips: (Dip & { publicId: string })[];
  createdBy: number | null;
}

export async function insertAnalysis(values: NewAnalysis, tx: Queryable): Promise<number> {
  const [row] = await tx
    .insert(analyses)
    .values({
      ...values,
      number: await nextNumber(analyses, values.sweepId, tx),
      publicId: newPublicId(),
      createdAt: new Date(),
    })
    .$returningId();
  return row.id;
}

export async function countAnalyses(sweepId: number, tx: Queryable = db): Promise<number> {
  const rows = await tx.select({ n: count() }).from(analyses).where(eq(analyses.sweepId, sweepId));
  return rows[0].n;
}

/** Dips of many sweeps at once, for lists. */
export async function findDipsOf(sweepIds: number[], tx: Queryable = db) {
  if (sweepIds.length === 0) return [];
  return tx
    .select({
      sweepId: dips.sweepId,
      publicId: dips.publicId,
      frequencyHz: dips.frequencyHz,
      minimumSwr: dips.minimumSwr,
      returnLossDb: dips.returnLossDb,
      verdict: standingVerdict,
    })
    .from(dips)
    .leftJoin(trailDips, eq(trailDips.dipId, dips.id))
    .leftJoin(trails, eq(trails.id, trailDips.trailId))
    .where(and(inArray(dips.sweepId, sweepIds), eq(dips.present, true)))
    .orderBy(asc(dips.frequencyHz))
    .limit(5000);
}

async function nextNumber(table: typeof readings | typeof analyses, sweepId: number, tx: Queryable) {
  const rows = await tx
    .select({ n: sql<number>`coalesce(max(${table.number}), 0) + 1`.mapWith(Number) })
    .from(table)
    .where(eq(table.sweepId, sweepId));
  return rows[0].n;
}

/** Newest first by when it was taken, or where that is unknown by when it came in. */
const orderTime = sql<Date>`coalesce(${sweeps.takenAt}, ${sweeps.createdAt})`;
