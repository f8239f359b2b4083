import { and, asc, eq, inArray, sql } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import {
  benches,
  benchReferences,
  benchVersions,
  files,
  projects,
  readings,
  sweeps,
} from "./schema/index.ts";

export type ReferenceKind = (typeof benchReferences.$inferSelect)["kind"];
export const REFERENCE_KINDS = ["open", "short", "load", "through"] as const satisfies ReferenceKind[];

/** The reference sweeps of some versions, with their files and how they were read. */
export async function findAllByVersions(versionIds: number[], tx: Queryable = db) {
  if (versionIds.length === 0) return [];
  return tx
    .select({
      id: benchReferences.id,
      versionId: benchReferences.versionId,
      kind: benchReferences.kind,
      sweep: {
        id: sweeps.id,
        publicId: sweeps.publicId,
        title: sweeps.title,
        takenAt: sweeps.takenAt,
        problem: sweeps.problem,
        readingId: sweeps.readingId,
        pointCount: sweeps.pointCount,
        startHz: sweeps.startHz,
        stopHz: sweeps.stopHz,
        complex: sweeps.complex,
      },
      project: projects.publicId,
      fileId: files.id,
      fileName: files.name,
      sha256: files.sha256,
      sizeBytes: files.sizeBytes,
      storageKey: files.storageKey,
      reading: readings.reading,
    })
    .from(benchReferences)
    .innerJoin(sweeps, eq(sweeps.id, benchReferences.sweepId))
    .innerJoin(projects, eq(projects.id, sweeps.projectId))
    .innerJoin(files, eq(files.id, sweeps.fileId))
    .leftJoin(readings, eq(readings.id, sweeps.readingId))
    .where(inArray(benchReferences.versionId, versionIds))
    .orderBy(
      asc(benchReferences.versionId),
      sql`field(${benchReferences.kind}, 'open', 'short', 'load', 'through')`,
    )
    .limit(400);
}
export type FoundReference = Awaited<ReturnType<typeof findAllByVersions>>[number];

export async function insert(
  values: Pick<typeof benchReferences.$inferInsert, "versionId" | "kind" | "sweepId">,
  tx: Queryable,
) {
  await tx.insert(benchReferences).values({ ...values, createdAt: new Date() });
}

/** Gives references other kinds, all at once: two of them may change places. */
export async function replaceKinds(
  versionId: number,
  kinds: { sweepId: number; kind: ReferenceKind }[],
  tx: Queryable,
) {
  await tx.delete(benchReferences).where(eq(benchReferences.versionId, versionId));
  if (kinds.length === 0) return;
  const createdAt = new Date();
  await tx.insert(benchReferences).values(kinds.map((kind) => ({ ...kind, versionId, createdAt })));
}

/** The bench and version that a sweep is a reference of, where it is one. */
export async function findBenchesOf(sweepId: number, tx: Queryable = db) {
  return tx
    .select({ bench: benches, version: benchVersions, kind: benchReferences.kind })
    .from(benchReferences)
    .innerJoin(benchVersions, eq(benchVersions.id, benchReferences.versionId))
    .innerJoin(benches, eq(benches.id, benchVersions.benchId))
    .where(eq(benchReferences.sweepId, sweepId))
    .limit(20);
}

/** The originals of the reference sweeps that this bench alone uses. */
export async function findOwnFiles(benchId: number, tx: Queryable = db) {
  const elsewhere = sql`exists (select 1 from ${benchReferences} r
    join ${benchVersions} v on v.id = r.version_id where r.sweep_id = ${sweeps.id} and v.bench_id <> ${benchId})`;
  return tx
    .selectDistinct({ id: files.id, storageKey: files.storageKey })
    .from(benchReferences)
    .innerJoin(benchVersions, eq(benchVersions.id, benchReferences.versionId))
    .innerJoin(sweeps, eq(sweeps.id, benchReferences.sweepId))
    .innerJoin(files, eq(files.id, sweeps.fileId))
    .where(and(eq(benchVersions.benchId, benchId), eq(sweeps.purpose, "reference"), sql`not ${elsewhere}`))
    .limit(400);
}
