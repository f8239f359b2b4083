import { asc, eq } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { newPublicId } from "./ids.server.ts";
import { cables } from "./schema/index.ts";

export type CableRow = typeof cables.$inferSelect;

/** A project's own cable entries, by name. */
export async function findAllByProject(projectId: number, tx: Queryable = db): Promise<CableRow[]> {
  return tx.select().from(cables).where(eq(cables.projectId, projectId)).orderBy(asc(cables.name)).limit(100);
}

export async function findByPublicId(publicId: string, tx: Queryable = db) {
  const rows = await tx.select().from(cables).where(eq(cables.publicId, publicId)).limit(1);
  return rows[0] as CableRow | undefined;
}

/** Throws a duplicate (`isDuplicate`) where the project has a cable of this name. */
export async function insert(
  values: Omit<typeof cables.$inferInsert, "id" | "publicId" | "createdAt">,
  tx: Queryable = db,
) {
  const publicId = newPublicId();
  await tx.insert(cables).values({ ...values, publicId, createdAt: new Date() });
  return publicId;
}

/** Sweeps keep the figures that they were corrected with: their feedline is stored with them. */
export async function deleteById(id: number, tx: Queryable = db) {
  await tx.delete(cables).where(eq(cables.id, id));
}
