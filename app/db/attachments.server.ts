import { and, count, eq, inArray, isNull, or, type SQL } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { newPublicId } from "./ids.server.ts";
import type { NotePlace } from "./notes.server.ts";
import { attachments, notes, projects } from "./schema/index.ts";

export type AttachmentRow = typeof attachments.$inferSelect;

/** An attachment with the note it is in; `note` is null until that is sent. */
export async function findByPublicId(publicId: string, tx: Queryable = db) {
  const rows = await tx
    .select({ attachment: attachments, note: { removedAt: notes.removedAt } })
    .from(attachments)
    .leftJoin(notes, eq(notes.id, attachments.noteId))
    .where(eq(attachments.publicId, publicId))
    .limit(1);
  return rows[0] as (typeof rows)[number] | undefined;
}

/** Those of them that a reader sees: of notes that are there, and those that the reader has not sent yet. */
export async function findShown(
  projectId: number,
  publicIds: string[],
  readerId: number | null,
  tx: Queryable = db,
) {
  if (publicIds.length === 0) return [];
  const sent = and(eq(attachments.noteId, notes.id), isNull(notes.removedAt));
  const own = readerId === null ? undefined : isUnsentBy(readerId);
  return tx
    .select({ attachment: attachments, project: projects.publicId })
    .from(attachments)
    .innerJoin(projects, eq(projects.id, attachments.projectId))
    .leftJoin(notes, eq(notes.id, attachments.noteId))
    .where(and(eq(attachments.projectId, projectId), inArray(attachments.publicId, publicIds), or(sent, own)))
    .limit(1000);
}

export async function countUnsent(projectId: number, by: number, tx: Queryable = db): Promise<number> {
  const rows = await tx
    .select({ n: count() })
    .from(attachments)
    .where(and(eq(attachments.projectId, projectId), isUnsentBy(by)));
  return rows[0].n;
}

export async function insert(
  values: Omit<typeof attachments.$inferInsert, "id" | "publicId" | "createdAt">,
  tx: Queryable,
): Promise<string> {
  const publicId = newPublicId();
  await tx.insert(attachments).values({ ...values, publicId, createdAt: new Date() });
  return publicId;
}

/** Puts what its writer uploaded for a note into it. */
export async function giveToNote(
  noteId: number,
  wanted: { projectId: number; by: number; publicIds: string[] },
  tx: Queryable,
): Promise<void> {
  if (wanted.publicIds.length === 0) return;
  await tx
    .update(attachments)
    .set({ noteId })
    .where(
      and(
        eq(attachments.projectId, wanted.projectId),
        inArray(attachments.publicId, wanted.publicIds),
        isUnsentBy(wanted.by),
      ),
    );
}

/** Locks the attachment's row where no note has it. */
export async function lockUnsent(publicId: string, tx: Queryable): Promise<AttachmentRow | undefined> {
  const rows = await tx
    .select()
    .from(attachments)
    .where(and(eq(attachments.publicId, publicId), isNull(attachments.noteId)))
    .limit(1)
    .for("update");
  return rows[0];
}

export function findAllByNote(noteId: number, tx: Queryable = db): Promise<AttachmentRow[]> {
  return tx.select().from(attachments).where(eq(attachments.noteId, noteId)).limit(MOST);
}

/** Those of every note on a sweep with its dips, on a step or on a bench. */
export async function findAllUnder(
  { sweepId, stepId, benchId }: Pick<Partial<NotePlace>, "sweepId" | "stepId" | "benchId">,
  tx: Queryable = db,
): Promise<AttachmentRow[]> {
  const on: SQL[] = [];
  if (sweepId) on.push(eq(notes.sweepId, sweepId));
  if (stepId) on.push(eq(notes.stepId, stepId));
  if (benchId) on.push(eq(notes.benchId, benchId));
  if (on.length === 0) return [];
  const rows = await tx
    .select({ attachment: attachments })
    .from(attachments)
    .innerJoin(notes, eq(notes.id, attachments.noteId))
    .where(or(...on))
    .limit(MOST);
  return rows.map(({ attachment }) => attachment);
}

/** Every stored object of the project's attachments. */
export async function findStorageKeys(projectId: number, tx: Queryable = db): Promise<string[]> {
  const rows = await tx.select().from(attachments).where(eq(attachments.projectId, projectId)).limit(MOST);
  return rows.flatMap(keysOf);
}

/** The objects of one attachment differ in their ending only, so the original's key speaks for them. */
export async function isStorageKeyUsed(key: string, tx: Queryable = db): Promise<boolean> {
  const original = key.replace(/\.(shown|small)$/, "");
  const rows = await tx
    .select({ id: attachments.id })
    .from(attachments)
    .where(eq(attachments.storageKey, original))
    .limit(1);
  return rows.length > 0;
}

export function keysOf({ storageKey, shownKey, smallKey }: AttachmentRow): string[] {
  return [storageKey, shownKey, smallKey].filter((key) => key !== null);
}

export async function deleteById(id: number, tx: Queryable): Promise<void> {
  await tx.delete(attachments).where(eq(attachments.id, id));
}

function isUnsentBy(personId: number) {
  return and(isNull(attachments.noteId), eq(attachments.uploadedBy, personId));
}

const MOST = 100_000;
