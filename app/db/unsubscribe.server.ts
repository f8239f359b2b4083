import { eq } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { projects, unsubscribeTokens } from "./schema/index.ts";

export async function insert(tokenHash: string, userId: number, projectId: number, tx: Queryable) {
  await tx.insert(unsubscribeTokens).values({ tokenHash, userId, projectId, createdAt: new Date() });
}

export async function findByHash(tokenHash: string, tx: Queryable = db) {
  const rows = await tx
    .select({ token: unsubscribeTokens, project: { id: projects.id, publicId: projects.publicId } })
    .from(unsubscribeTokens)
    .leftJoin(projects, eq(projects.id, unsubscribeTokens.projectId))
    .where(eq(unsubscribeTokens.tokenHash, tokenHash))
    .limit(1);
  return rows[0];
}

export async function setUsed(tokenHash: string, tx: Queryable = db) {
  await tx
    .update(unsubscribeTokens)
    .set({ usedAt: new Date() })
    .where(eq(unsubscribeTokens.tokenHash, tokenHash));
}
