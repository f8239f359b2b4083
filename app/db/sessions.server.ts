import { and, desc, eq, gt, lt, ne } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { sessions, users } from "./schema/index.ts";

export async function findById(id: string, tx: Queryable = db) {
  const rows = await tx
    .select({ session: sessions, user: users })
    .from(sessions)
    .leftJoin(users, eq(users.id, sessions.userId))
    .where(and(eq(sessions.id, id), gt(sessions.expiresAt, new Date())))
    .limit(1);
  return rows[0];
}

export async function findAllByUser(userId: number, tx: Queryable = db) {
  return tx
    .select()
    .from(sessions)
    .where(and(eq(sessions.userId, userId), gt(sessions.expiresAt, new Date())))
    .orderBy(desc(sessions.lastSeenAt))
    .limit(100);
}

export async function insert(values: typeof sessions.$inferInsert, tx: Queryable = db) {
  await tx.insert(sessions).values(values);
}

export async function update(id: string, values: Partial<typeof sessions.$inferInsert>, tx: Queryable = db) {
  await tx.update(sessions).set(values).where(eq(sessions.id, id));
}

export async function deleteById(id: string, tx: Queryable = db) {
  await tx.delete(sessions).where(eq(sessions.id, id));
}

/** Ends one session, if it is this user’s. */
export async function deleteByUser(userId: number, id: string, tx: Queryable = db) {
  await tx.delete(sessions).where(and(eq(sessions.userId, userId), eq(sessions.id, id)));
}

export async function deleteOthers(userId: number, keepId: string, tx: Queryable = db) {
  await tx.delete(sessions).where(and(eq(sessions.userId, userId), ne(sessions.id, keepId)));
}

export async function deleteAllByUser(userId: number, tx: Queryable = db) {
  await tx.delete(sessions).where(eq(sessions.userId, userId));
}

export async function deleteExpired(tx: Queryable = db) {
  await tx.delete(sessions).where(lt(sessions.expiresAt, new Date()));
}
