import { and, desc, eq, isNull } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { newPublicId } from "./ids.server.ts";
import { apiTokens, users } from "./schema/index.ts";

export type TokenScope = (typeof apiTokens.$inferSelect)["scope"];

export async function findByHash(tokenHash: string, tx: Queryable = db) {
  const rows = await tx
    .select({ token: apiTokens, user: users })
    .from(apiTokens)
    .innerJoin(users, eq(users.id, apiTokens.userId))
    .where(and(eq(apiTokens.tokenHash, tokenHash), isNull(apiTokens.revokedAt)))
    .limit(1);
  return rows[0];
}

/** Those that still open something, newest first. */
export async function findAllByUser(userId: number, tx: Queryable = db) {
  return tx
    .select({
      publicId: apiTokens.publicId,
      label: apiTokens.label,
      scope: apiTokens.scope,
      createdAt: apiTokens.createdAt,
      lastUsedAt: apiTokens.lastUsedAt,
    })
    .from(apiTokens)
    .where(and(eq(apiTokens.userId, userId), isNull(apiTokens.revokedAt)))
    .orderBy(desc(apiTokens.id))
    .limit(100);
}

export async function insert(
  values: { userId: number; label: string; scope: TokenScope; tokenHash: string },
  tx: Queryable = db,
) {
  await tx.insert(apiTokens).values({ ...values, publicId: newPublicId(), createdAt: new Date() });
}

export async function updateLastUsed(id: number, tx: Queryable = db) {
  await tx.update(apiTokens).set({ lastUsedAt: new Date() }).where(eq(apiTokens.id, id));
}

/** Revokes one, if it is this user's. */
export async function revoke(userId: number, publicId: string, tx: Queryable = db) {
  await tx
    .update(apiTokens)
    .set({ revokedAt: new Date() })
    .where(and(eq(apiTokens.userId, userId), eq(apiTokens.publicId, publicId), isNull(apiTokens.revokedAt)));
}
