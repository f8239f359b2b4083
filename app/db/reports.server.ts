import { and, asc, count, desc, eq, isNotNull, isNull } from "drizzle-orm";
import { alias } from "drizzle-orm/mysql-core";
import { db, type Queryable } from "./client.server.ts";
import { newPublicId } from "./ids.server.ts";
import { notes, reports, users } from "./schema/index.ts";

const reporters = alias(users, "reporters");

export async function insert(
  values: { noteId: number; reason: string; reportedBy: number },
  tx: Queryable = db,
) {
  await tx.insert(reports).values({ ...values, publicId: newPublicId(), createdAt: new Date() });
}

/** Has this person an open report on this note? */
export async function isOpenBy(noteId: number, reportedBy: number, tx: Queryable = db): Promise<boolean> {
  const rows = await tx
    .select({ id: reports.id })
    .from(reports)
    .where(and(eq(reports.noteId, noteId), eq(reports.reportedBy, reportedBy), isNull(reports.closedAt)))
    .limit(1);
  return rows.length > 0;
}

/** With the note as it reads now, and nothing else of its project. Open ones oldest first, closed ones newest first. */
export async function findAll(which: "open" | "closed", limit = 100, tx: Queryable = db) {
  const open = which === "open";
  return tx
    .select({
      report: reports,
      note: { id: notes.id, body: notes.body, editedAt: notes.editedAt, removedAt: notes.removedAt },
      author: { publicId: users.publicId, name: users.name, userName: users.userName },
      reporter: { name: reporters.name, userName: reporters.userName },
    })
    .from(reports)
    .innerJoin(notes, eq(notes.id, reports.noteId))
    .leftJoin(users, eq(users.id, notes.authorId))
    .leftJoin(reporters, eq(reporters.id, reports.reportedBy))
    .where(open ? isNull(reports.closedAt) : isNotNull(reports.closedAt))
    .orderBy(open ? asc(reports.id) : desc(reports.closedAt))
    .limit(limit);
}

export async function countOpen(tx: Queryable = db): Promise<number> {
  return (await tx.select({ n: count() }).from(reports).where(isNull(reports.closedAt)))[0].n;
}

/** With its note; undefined for one that is closed. */
export async function findOpen(publicId: string, tx: Queryable = db) {
  const rows = await tx
    .select({ report: reports, note: notes })
    .from(reports)
    .innerJoin(notes, eq(notes.id, reports.noteId))
    .where(and(eq(reports.publicId, publicId), isNull(reports.closedAt)))
    .limit(1);
  return rows[0];
}

/** Every open report of the note: one decision is for all of them. */
export async function closeAllOfNote(
  noteId: number,
  closed: { closedBy: number; outcome: string },
  tx: Queryable = db,
) {
  await tx
    .update(reports)
    .set({ ...closed, closedAt: new Date() })
    .where(and(eq(reports.noteId, noteId), isNull(reports.closedAt)));
}
