import { and, asc, desc, eq, lte } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { noteVersions, users } from "./schema/index.ts";

/** What a note said before, oldest first, each with who changed it then. */
export async function findAllByNote(noteId: number, tx: Queryable = db) {
  return tx
    .select({
      body: noteVersions.body,
      from: noteVersions.from,
      until: noteVersions.until,
      editedBy: users.name,
    })
    .from(noteVersions)
    .leftJoin(users, eq(users.id, noteVersions.editedBy))
    .where(eq(noteVersions.noteId, noteId))
    .orderBy(asc(noteVersions.id))
    .limit(MOST_VERSIONS);
}

/** What a note said before a change of that moment. */
export async function findLastUntil(noteId: number, until: Date, tx: Queryable = db) {
  const rows = await tx
    .select({ body: noteVersions.body })
    .from(noteVersions)
    .where(and(eq(noteVersions.noteId, noteId), lte(noteVersions.until, until)))
    .orderBy(desc(noteVersions.until), desc(noteVersions.id))
    .limit(1);
  return rows[0];
}

export async function insert(
  values: Omit<typeof noteVersions.$inferInsert, "id">,
  tx: Queryable,
): Promise<void> {
  await tx.insert(noteVersions).values(values);
}

export async function deleteAllByNote(noteId: number, tx: Queryable): Promise<void> {
  await tx.delete(noteVersions).where(eq(noteVersions.noteId, noteId));
}

const MOST_VERSIONS = 200;
