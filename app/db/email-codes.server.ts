import { eq, lt } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { emailCodes } from "./schema/index.ts";

export type EmailCode = typeof emailCodes.$inferSelect;

export async function insert(
  code: Pick<EmailCode, "askHash" | "email" | "codeHash" | "forUserId" | "expiresAt">,
  tx: Queryable = db,
) {
  await tx.insert(emailCodes).values({ ...code, createdAt: new Date() });
}

export async function findByAsk(askHash: string, tx: Queryable = db): Promise<EmailCode | undefined> {
  return (await tx.select().from(emailCodes).where(eq(emailCodes.askHash, askHash)).limit(1))[0];
}

/** Locks the row: two who try at once are counted as two. */
export async function lockByAsk(askHash: string, tx: Queryable): Promise<EmailCode | undefined> {
  return (
    await tx.select().from(emailCodes).where(eq(emailCodes.askHash, askHash)).limit(1).for("update")
  )[0];
}

export async function update(
  id: number,
  values: Partial<Pick<EmailCode, "attempts" | "usedAt" | "expiresAt">>,
  tx: Queryable = db,
) {
  await tx.update(emailCodes).set(values).where(eq(emailCodes.id, id));
}

export async function deleteById(id: number, tx: Queryable = db) {
  await tx.delete(emailCodes).where(eq(emailCodes.id, id));
}

export async function deleteByEmail(email: string, tx: Queryable = db) {
  await tx.delete(emailCodes).where(eq(emailCodes.email, email));
}

export async function deleteExpired(tx: Queryable = db) {
  await tx.delete(emailCodes).where(lt(emailCodes.expiresAt, new Date()));
}
