import { and, asc, desc, eq, inArray, isNotNull, like, or, sql } from "drizzle-orm";
import { completeDip } from "~/measurement/dips/complete";
import { db, type Queryable } from "./client.server.ts";
import {
  analyses,
  dips,
  files,
  memberships,
  projects,
  readings,
  sweeps,
  trailDips,
  trails,
  users,
} from "./schema/index.ts";
import { withWholeDips } from "./whole-dips.server.ts";

/** Sweeps of any projects, each with its reading and analysis and with what the person is in its project. Who may see them is asked above. */
export async function findSweeps(publicIds: readonly string[], userId: number | null, tx: Queryable = db) {
  if (publicIds.length === 0) return [];
  const rows = await tx
    .select({
      sweep: sweeps,
      file: files,
      reading: readings,
      analysis: analyses,
      by: users.name,
      project: { publicId: projects.publicId, title: projects.title, visibility: projects.visibility },
      role: memberships.role,
    })
    .from(sweeps)
    .innerJoin(files, eq(files.id, sweeps.fileId))
    .innerJoin(projects, eq(projects.id, sweeps.projectId))
    .leftJoin(
      memberships,
      and(eq(memberships.projectId, sweeps.projectId), eq(memberships.userId, userId ?? 0)),
    )
    .leftJoin(readings, eq(readings.id, sweeps.readingId))
    .leftJoin(analyses, eq(analyses.id, sweeps.analysisId))
    .leftJoin(users, eq(users.id, sweeps.createdBy))
    .where(inArray(sweeps.publicId, [...publicIds]))
    .limit(publicIds.length);
  return rows.map(withWholeDips);
}
export type AskedSweep = Awaited<ReturnType<typeof findSweeps>>[number];

/** The dips that sweeps show now, with their trails; ascending in frequency. */
export async function findDips(sweepIds: readonly number[], tx: Queryable = db) {
  if (sweepIds.length === 0) return [];
  const rows = await tx
    .select({
      sweepId: dips.sweepId,
      publicId: dips.publicId,
      numbers: dips.numbers,
      trail: trails.publicId,
      trailName: trails.name,
    })
    .from(dips)
    .leftJoin(trailDips, eq(trailDips.dipId, dips.id))
    .leftJoin(trails, eq(trails.id, trailDips.trailId))
    .where(and(inArray(dips.sweepId, [...sweepIds]), eq(dips.present, true)))
    .orderBy(asc(dips.frequencyHz))
    .limit(5000);
  return rows.map((row) => ({ ...row, numbers: completeDip(row.numbers) }));
}
export type ComparedDipRow = Awaited<ReturnType<typeof findDips>>[number];

/** Sweeps of the antenna that have numbers and whose title or file name holds the words, the newest first. */
export async function findChoices(projectId: number, words: string, tx: Queryable = db) {
  const pattern = `%${words.replace(/[\\%_]/g, "\\$&")}%`;
  return tx
    .select({
      publicId: sweeps.publicId,
      title: sweeps.title,
      takenAt: sweeps.takenAt,
      createdAt: sweeps.createdAt,
    })
    .from(sweeps)
    .innerJoin(files, eq(files.id, sweeps.fileId))
    .where(
      and(
        eq(sweeps.projectId, projectId),
        eq(sweeps.purpose, "antenna"),
        isNotNull(sweeps.analysisId),
        words === "" ? undefined : or(like(sweeps.title, pattern), like(files.name, pattern)),
      ),
    )
    .orderBy(desc(orderTime), desc(sweeps.id))
    .limit(MOST_CHOICES);
}

const orderTime = sql<Date>`coalesce(${sweeps.takenAt}, ${sweeps.createdAt})`;
const MOST_CHOICES = 40;
