import { and, eq, notInArray } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { noteReferences } from "./schema/index.ts";

export type NoteReferenceRow = typeof noteReferences.$inferSelect;
export type NewReference = Pick<NoteReferenceRow, "kind" | "subject" | "text">;

export async function findAllByNote(noteId: number, tx: Queryable = db): Promise<NoteReferenceRow[]> {
  return tx.select().from(noteReferences).where(eq(noteReferences.noteId, noteId)).limit(MOST);
}

/** Makes these the references of the note; one that was there already keeps its row. */
export async function replaceAllOfNote(noteId: number, now: NewReference[], tx: Queryable): Promise<void> {
  const subjects = now.map(({ subject }) => subject);
  await tx
    .delete(noteReferences)
    .where(
      and(
        eq(noteReferences.noteId, noteId),
        subjects.length > 0 ? notInArray(noteReferences.subject, subjects) : undefined,
      ),
    );
  if (now.length === 0) return;
  const values = now.map((reference) => ({ noteId, ...reference }));
  await tx.insert(noteReferences).ignore().values(values);
}

/** A reference takes a dozen characters of the 20,000 that a note has. */
const MOST = 2000;
