import { and, asc, count, eq, inArray, isNull, lt, lte, notInArray, or } from "drizzle-orm";
import { db, inTransaction, type Queryable } from "./client.server.ts";
import { facts, jobs } from "./schema/index.ts";

export type JobRow = typeof jobs.$inferSelect;

/** Rows in one statement. */
const BATCH = 500;

export async function insert(kind: string, payload: unknown, runAt: Date = new Date(), tx: Queryable = db) {
  const [row] = await tx.insert(jobs).values({ kind, payload, runAt, createdAt: new Date() }).$returningId();
  return row.id;
}

/** Many of one kind, due now. */
export async function insertAll(kind: string, payloads: unknown[], tx: Queryable = db) {
  const now = new Date();
  for (let i = 0; i < payloads.length; i += BATCH) {
    const batch = payloads.slice(i, i + BATCH);
    await tx.insert(jobs).values(batch.map((payload) => ({ kind, payload, runAt: now, createdAt: now })));
  }
}

/** Of these kinds, or of every kind but these. */
export type Which = { only: string[] } | { but: string[] };

/** Claims due work for `leaseMs`; other processes skip what is locked and see it again when the lease runs out. */
export async function claim(limit: number, leaseMs: number, which: Which = { but: [] }): Promise<JobRow[]> {
  return inTransaction(async (tx) => {
    const now = new Date();
    const rows = await tx
      .select()
      .from(jobs)
      .where(and(lte(jobs.runAt, now), or(isNull(jobs.lockedUntil), lt(jobs.lockedUntil, now)), isOf(which)))
      .orderBy(asc(jobs.runAt))
      .limit(limit)
      .for("update", { skipLocked: true });
    for (const row of rows) {
      await tx
        .update(jobs)
        .set({ lockedUntil: new Date(now.getTime() + leaseMs), attempts: row.attempts + 1 })
        .where(eq(jobs.id, row.id));
    }
    return rows;
  });
}

function isOf(which: Which) {
  if ("only" in which) return inArray(jobs.kind, which.only);
  return which.but.length > 0 ? notInArray(jobs.kind, which.but) : undefined;
}

export async function deleteById(id: number, tx: Queryable = db) {
  await tx.delete(jobs).where(eq(jobs.id, id));
}

/** In one statement. */
export async function deleteAllByIds(ids: readonly number[], tx: Queryable = db) {
  if (ids.length > 0) await tx.delete(jobs).where(inArray(jobs.id, [...ids]));
}

export async function putOff(id: number, runAt: Date, lastError: string, tx: Queryable = db) {
  await tx.update(jobs).set({ runAt, lockedUntil: null, lastError }).where(eq(jobs.id, id));
}

export async function countAll(tx: Queryable = db): Promise<number> {
  return (await tx.select({ n: count() }).from(jobs))[0].n;
}

export async function findFact(name: string, tx: Queryable = db): Promise<unknown> {
  return (await tx.select().from(facts).where(eq(facts.name, name)).limit(1))[0]?.value;
}

export async function setFact(name: string, value: unknown, tx: Queryable = db) {
  const at = new Date();
  await tx.insert(facts).values({ name, value, at }).onDuplicateKeyUpdate({ set: { value, at } });
}
