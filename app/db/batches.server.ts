import { and, desc, eq, sql } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { bundleRuns, users } from "./schema/index.ts";

/** Batches of sweeps: runs of the kind "batch". Their report is the caller's. */

export type BatchRow = typeof bundleRuns.$inferSelect;

export async function findByPublicId(publicId: string, tx: Queryable = db): Promise<BatchRow | undefined> {
  return (await tx.select().from(bundleRuns).where(ofBatch(publicId)).limit(1))[0];
}

/** Locks the run's row: what several processes write into its report comes one after another. */
export async function lock(publicId: string, tx: Queryable): Promise<BatchRow | undefined> {
  return (await tx.select().from(bundleRuns).where(ofBatch(publicId)).limit(1).for("update"))[0];
}

/** The project's last batches, the newest first, with who sent them. */
export async function findAllByProject(projectId: number, tx: Queryable = db) {
  return tx
    .select({
      publicId: bundleRuns.publicId,
      state: bundleRuns.state,
      /** Of the report, which may be long. */
      phase: sql<string>`json_value(${bundleRuns.report}, '$.phase')`,
      doneParts: bundleRuns.doneParts,
      allParts: bundleRuns.allParts,
      createdAt: bundleRuns.createdAt,
      expiresAt: bundleRuns.expiresAt,
      by: users.name,
    })
    .from(bundleRuns)
    .leftJoin(users, eq(users.id, bundleRuns.userId))
    .where(and(eq(bundleRuns.projectId, projectId), eq(bundleRuns.kind, "batch")))
    .orderBy(desc(bundleRuns.createdAt))
    .limit(20);
}

export async function insert(
  values: Pick<BatchRow, "publicId" | "projectId" | "userId" | "report" | "expiresAt">,
  tx: Queryable,
): Promise<void> {
  const now = new Date();
  await tx
    .insert(bundleRuns)
    .values({ ...values, kind: "batch", state: "waiting", createdAt: now, updatedAt: now });
}

export async function update(
  id: number,
  values: Partial<Pick<BatchRow, "state" | "doneParts" | "allParts" | "report">>,
  tx: Queryable,
): Promise<void> {
  await tx
    .update(bundleRuns)
    .set({ ...values, updatedAt: new Date() })
    .where(eq(bundleRuns.id, id));
}

export async function deleteById(id: number, tx: Queryable): Promise<void> {
  await tx.delete(bundleRuns).where(eq(bundleRuns.id, id));
}

function ofBatch(publicId: string) {
  return and(eq(bundleRuns.publicId, publicId), eq(bundleRuns.kind, "batch"));
}
