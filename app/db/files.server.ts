import { and, asc, count, eq, inArray, sql } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { newPublicId } from "./ids.server.ts";
import { attachments, files, photographs, plateSources, sweeps } from "./schema/index.ts";

/** Bytes of everything as it was given: originals of sweeps, photographs, and what is attached to notes. */
export async function sumStoredBytes(tx: Queryable = db): Promise<{ files: number; bytes: number }> {
  const sums = await Promise.all(
    [files, photographs, attachments].map((table) =>
      tx
        .select({ files: count(), bytes: sql<number>`coalesce(sum(${table.sizeBytes}), 0)`.mapWith(Number) })
        .from(table),
    ),
  );
  const all = sums.flat();
  return {
    files: all.reduce((sum, row) => sum + row.files, 0),
    bytes: all.reduce((sum, row) => sum + row.bytes, 0),
  };
}

export async function findBySha256(projectId: number, sha256: string, tx: Queryable = db) {
  const rows = await tx
    .select({ file: files, sweep: SWEEP_OF_FILE })
    .from(files)
    .innerJoin(sweeps, eq(sweeps.fileId, files.id))
    .where(and(eq(files.projectId, projectId), eq(files.sha256, sha256)))
    .orderBy(asc(sweeps.id))
    .limit(1);
  return rows[0];
}

export async function findStorageKeys(projectId: number, tx: Queryable = db): Promise<string[]> {
  const rows = await tx
    .select({ key: files.storageKey })
    .from(files)
    .where(eq(files.projectId, projectId))
    .limit(100_000);
  return rows.map((row) => row.key);
}

/** By a sweep's file, or by a plate that rests on it: that keeps the original when sweep and project are gone. */
export async function isStorageKeyUsed(key: string, tx: Queryable = db): Promise<boolean> {
  const [own, ofPlates] = await Promise.all([
    tx.select({ id: files.id }).from(files).where(eq(files.storageKey, key)).limit(1),
    tx.select({ id: plateSources.id }).from(plateSources).where(eq(plateSources.storageKey, key)).limit(1),
  ]);
  return own.length + ofPlates.length > 0;
}

/** Which of these are still there; they stay until the transaction ends. */
export async function hold(ids: readonly number[], tx: Queryable): Promise<Set<number>> {
  if (ids.length === 0) return new Set();
  const rows = await tx
    .select({ id: files.id })
    .from(files)
    .where(inArray(files.id, [...ids]))
    .for("update");
  return new Set(rows.map(({ id }) => id));
}

export async function insert(
  values: Omit<typeof files.$inferInsert, "publicId" | "createdAt">,
  tx: Queryable,
) {
  const [row] = await tx
    .insert(files)
    .values({ ...values, publicId: newPublicId(), createdAt: new Date() })
    .$returningId();
  return row.id;
}

const SWEEP_OF_FILE = {
  id: sweeps.id,
  publicId: sweeps.publicId,
  title: sweeps.title,
  purpose: sweeps.purpose,
};
