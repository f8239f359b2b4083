import { createHash } from "node:crypto";
import { and, desc, eq, ne } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { sentMentions, writeUps } from "./schema/index.ts";

export type SentMention = typeof sentMentions.$inferSelect;

/**
 * Notes that a page is to be told of this version; answers the row id, which is a new one each time: a try that is put off
 * for older news finds no row any more, and can't undo what was queued since.
 */
export async function queue(
  { writeUpId, target, number }: { writeUpId: number; target: string; number: number },
  tx: Queryable,
): Promise<number> {
  const targetSha256 = createHash("sha256").update(target).digest("hex");
  const which = and(eq(sentMentions.writeUpId, writeUpId), eq(sentMentions.targetSha256, targetSha256));
  const before = (await tx.select().from(sentMentions).where(which).limit(1).for("update")).at(0);
  await tx.delete(sentMentions).where(which);
  const endpoint = before?.endpoint ?? null;
  const row = { writeUpId, targetSha256, target, number, endpoint, state: "queued" as const, at: new Date() };
  const [{ id }] = await tx.insert(sentMentions).values(row).$returningId();
  return id;
}

/** With the public id of what tells it. */
export async function findById(id: number, tx: Queryable = db) {
  const rows = await tx
    .select({ sent: sentMentions, writeUp: writeUps.publicId })
    .from(sentMentions)
    .innerJoin(writeUps, eq(writeUps.id, sentMentions.writeUpId))
    .where(eq(sentMentions.id, id))
    .limit(1);
  return rows[0];
}

export async function findAllByWriteUp(writeUpId: number, tx: Queryable = db): Promise<SentMention[]> {
  return tx.select().from(sentMentions).where(eq(sentMentions.writeUpId, writeUpId)).limit(MOST_KNOWN);
}

/** What the write-ups of a project told others, or tried to, newest first; who does not want to be told is left out. */
export async function findAllByProject(projectId: number, limit: number, tx: Queryable = db) {
  return tx
    .select({ sent: sentMentions, writeUp: { publicId: writeUps.publicId, title: writeUps.title } })
    .from(sentMentions)
    .innerJoin(writeUps, eq(writeUps.id, sentMentions.writeUpId))
    .where(and(eq(writeUps.projectId, projectId), ne(sentMentions.state, "none")))
    .orderBy(desc(sentMentions.at), desc(sentMentions.id))
    .limit(limit);
}

export async function update(
  id: number,
  values: Partial<Pick<SentMention, "state" | "reason" | "endpoint">>,
  tx: Queryable = db,
) {
  await tx
    .update(sentMentions)
    .set({ ...values, at: new Date() })
    .where(eq(sentMentions.id, id));
}

export async function deleteById(id: number, tx: Queryable = db) {
  await tx.delete(sentMentions).where(eq(sentMentions.id, id));
}

/** Fifty a version, and what older ones told. */
const MOST_KNOWN = 500;
