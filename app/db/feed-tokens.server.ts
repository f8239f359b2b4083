import { and, desc, eq, isNull } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { newPublicId } from "./ids.server.ts";
import { feedTokens, projects, users } from "./schema/index.ts";

export async function insert(userId: number, projectId: number, tokenHash: string, tx: Queryable = db) {
  await tx
    .insert(feedTokens)
    .values({ userId, projectId, tokenHash, publicId: newPublicId(), createdAt: new Date() });
}

/** A token that counts, with its project, and whose it is; undefined where it was revoked or its owner is gone. */
export async function findByHash(tokenHash: string, tx: Queryable = db) {
  const rows = await tx
    .select({
      id: feedTokens.id,
      userId: feedTokens.userId,
      project: projects.publicId,
      lastUsedAt: feedTokens.lastUsedAt,
    })
    .from(feedTokens)
    .innerJoin(projects, eq(projects.id, feedTokens.projectId))
    .innerJoin(users, eq(users.id, feedTokens.userId))
    .where(
      and(
        eq(feedTokens.tokenHash, tokenHash),
        isNull(feedTokens.revokedAt),
        isNull(users.suspendedAt),
        isNull(users.closedAt),
      ),
    )
    .limit(1);
  return rows[0];
}

export async function setUsed(id: number, tx: Queryable = db) {
  await tx.update(feedTokens).set({ lastUsedAt: new Date() }).where(eq(feedTokens.id, id));
}

export async function findAllByUser(userId: number, projectId: number, tx: Queryable = db) {
  return tx
    .select({
      publicId: feedTokens.publicId,
      createdAt: feedTokens.createdAt,
      lastUsedAt: feedTokens.lastUsedAt,
    })
    .from(feedTokens)
    .where(
      and(eq(feedTokens.userId, userId), eq(feedTokens.projectId, projectId), isNull(feedTokens.revokedAt)),
    )
    .orderBy(desc(feedTokens.id))
    .limit(20);
}

export async function revoke(userId: number, publicId: string, tx: Queryable = db) {
  await tx
    .update(feedTokens)
    .set({ revokedAt: new Date() })
    .where(and(eq(feedTokens.userId, userId), eq(feedTokens.publicId, publicId)));
}
