import { and, asc, eq } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { blocks, users } from "./schema/index.ts";

/** Whom the person blocked, by name. */
export async function findAllByBlocker(blockerId: number, tx: Queryable = db) {
  return tx
    .select({ userId: users.id, userName: users.userName, name: users.name, at: blocks.at })
    .from(blocks)
    .innerJoin(users, eq(users.id, blocks.blockedId))
    .where(eq(blocks.blockerId, blockerId))
    .orderBy(asc(users.name))
    .limit(1000);
}

export async function findBlockedIds(blockerId: number, tx: Queryable = db): Promise<number[]> {
  const rows = await tx
    .select({ id: blocks.blockedId })
    .from(blocks)
    .where(eq(blocks.blockerId, blockerId))
    .limit(1000);
  return rows.map((row) => row.id);
}

/** Has this person blocked that one? */
export async function exists(blockerId: number, blockedId: number, tx: Queryable = db): Promise<boolean> {
  const rows = await tx
    .select({ at: blocks.at })
    .from(blocks)
    .where(and(eq(blocks.blockerId, blockerId), eq(blocks.blockedId, blockedId)))
    .limit(1);
  return rows.length > 0;
}

export async function insert(blockerId: number, blockedId: number, tx: Queryable = db) {
  await tx.insert(blocks).ignore().values({ blockerId, blockedId, at: new Date() });
}

export async function deleteOne(blockerId: number, blockedId: number, tx: Queryable = db) {
  await tx.delete(blocks).where(and(eq(blocks.blockerId, blockerId), eq(blocks.blockedId, blockedId)));
}
