import { and, asc, count, desc, eq, inArray, lt, lte, or, sql } from "drizzle-orm";
import { db, inTransaction, isDuplicate, type Queryable } from "./client.server.ts";
import { newPublicId } from "./ids.server.ts";
import { outbox } from "./schema/index.ts";

export type OutboxRow = typeof outbox.$inferSelect;
export type OutboxState = OutboxRow["state"];

export type NewMail = Pick<OutboxRow, "messageId" | "onceKey" | "toAddress" | "userId"> &
  Pick<OutboxRow, "subject" | "text" | "html" | "headers">;

/** False where a mail with this key was written before: nothing is written then. */
export async function insert(mail: NewMail, tx: Queryable = db): Promise<boolean> {
  const now = new Date();
  try {
    await tx
      .insert(outbox)
      .values({ ...mail, publicId: newPublicId(), state: "waiting", nextAt: now, createdAt: now });
    return true;
  } catch (error) {
    if (mail.onceKey !== null && isDuplicate(error)) return false;
    throw error;
  }
}

/**
 * Takes due mails for `leaseMs`; other processes skip what is locked. A mail whose lease ran out is taken again: whoever
 * had it is gone, and it may have arrived or not.
 */
export async function claim(limit: number, leaseMs: number): Promise<OutboxRow[]> {
  return inTransaction(async (tx) => {
    const now = new Date();
    const rows = await tx
      .select()
      .from(outbox)
      .where(
        or(
          and(eq(outbox.state, "waiting"), lte(outbox.nextAt, now)),
          and(eq(outbox.state, "sending"), lt(outbox.lockedUntil, now)),
        ),
      )
      .orderBy(asc(outbox.nextAt))
      .limit(limit)
      .for("update", { skipLocked: true });
    if (rows.length === 0) return [];
    const lockedUntil = new Date(now.getTime() + leaseMs);
    const ids = rows.map((row) => row.id);
    await tx
      .update(outbox)
      .set({ state: "sending", lockedUntil, attempts: sql`${outbox.attempts} + 1` })
      .where(inArray(outbox.id, ids));
    return rows.map((row) => ({ ...row, attempts: row.attempts + 1 }));
  });
}

/** Keeps a mail that is still being sent from being taken by another process. */
export async function renew(id: number, lockedUntil: Date, tx: Queryable = db) {
  await tx
    .update(outbox)
    .set({ lockedUntil })
    .where(and(eq(outbox.id, id), eq(outbox.state, "sending")));
}

/** Its text goes: what was sent is in the reader's mailbox, and a code in it opens nothing from here. */
export async function setSent(id: number, tx: Queryable = db) {
  const done = { state: "sent" as const, sentAt: new Date(), text: "", html: "", headers: {} };
  await tx
    .update(outbox)
    .set({ ...done, lockedUntil: null, lastError: null })
    .where(eq(outbox.id, id));
}

export async function putOff(id: number, nextAt: Date, error: string, tx: Queryable = db) {
  await tx
    .update(outbox)
    .set({ state: "waiting", nextAt, lockedUntil: null, lastError: error })
    .where(eq(outbox.id, id));
}

export async function setFailed(id: number, error: string, tx: Queryable = db) {
  await tx
    .update(outbox)
    .set({ state: "failed", lockedUntil: null, lastError: error })
    .where(eq(outbox.id, id));
}

export async function deleteById(id: number, tx: Queryable = db) {
  await tx.delete(outbox).where(eq(outbox.id, id));
}

/** Another try for one that was given up, or at once for one that waits; its Message-ID stays. */
export async function retry(publicId: string, tx: Queryable = db): Promise<boolean> {
  const [{ affectedRows }] = await tx
    .update(outbox)
    .set({ state: "waiting", attempts: 0, nextAt: new Date() })
    .where(and(eq(outbox.publicId, publicId), inArray(outbox.state, ["failed", "waiting"])));
  return affectedRows > 0;
}

export async function findByMessageId(messageId: string, tx: Queryable = db): Promise<OutboxRow | undefined> {
  return (await tx.select().from(outbox).where(eq(outbox.messageId, messageId)).limit(1))[0];
}

/** Without subject and text: they may tell of a private project. Newest first. */
export async function findPage(states: OutboxState[], limit = 100, offset = 0, tx: Queryable = db) {
  return tx
    .select({
      publicId: outbox.publicId,
      toAddress: outbox.toAddress,
      state: outbox.state,
      attempts: outbox.attempts,
      nextAt: outbox.nextAt,
      lastError: outbox.lastError,
      createdAt: outbox.createdAt,
      sentAt: outbox.sentAt,
    })
    .from(outbox)
    .where(inArray(outbox.state, states))
    .orderBy(desc(outbox.id))
    .limit(limit)
    .offset(offset);
}

export async function countByState(tx: Queryable = db): Promise<Record<OutboxState, number>> {
  const rows = await tx
    .select({ state: outbox.state, n: count() })
    .from(outbox)
    .groupBy(outbox.state)
    .limit(10);
  const none = { waiting: 0, sending: 0, sent: 0, failed: 0 };
  return Object.assign(none, Object.fromEntries(rows.map((row) => [row.state, row.n])));
}

/** What was sent long ago; a mail that failed stays until somebody looked. */
export async function deleteSentBefore(date: Date, tx: Queryable = db) {
  await tx.delete(outbox).where(and(eq(outbox.state, "sent"), lt(outbox.createdAt, date)));
}

/** What was not sent yet to somebody who does not want it any more. */
export async function deleteUnsentByUser(userId: number, tx: Queryable = db) {
  await tx.delete(outbox).where(and(eq(outbox.userId, userId), inArray(outbox.state, ["waiting", "failed"])));
}
