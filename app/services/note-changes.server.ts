import * as attachments from "~/db/attachments.server";
import { inTransaction, type Transaction } from "~/db/client.server";
import * as jobs from "~/db/jobs.server";
import * as noteReferences from "~/db/note-references.server";
import * as noteVersions from "~/db/note-versions.server";
import * as notes from "~/db/notes.server";
import * as projects from "~/db/projects.server";
import { deleteAttachmentsOfNote } from "./attachments.server.ts";
import { UNDO_MS } from "./note-limits.ts";
import { attachmentsIn, expandNote } from "./note-links.server.ts";
import { checkedBody, tellOfNote } from "./notes.server.ts";

export type NoteChange = "done" | "missing" | "refused";

interface ChangeNote {
  project: { id: number };
  notePublicId: string;
  by: { id: number };
}

export type EditOutcome = NoteChange | { changedSince: { body: string; revision: string } };

/**
 * Changes the text; only its author may. What it said is kept as a version. With `revision` (see `revisionOf`), nothing is
 * written over a change that was made since. Throws a `NoteProblem` for a text that can't stand.
 */
export async function editNote(
  input: ChangeNote & { body: string; revision?: string; at?: Date },
): Promise<EditOutcome> {
  const body = checkedBody(input.body);
  return inTransaction(async (tx) => {
    const note = await lockNote(input, tx);
    if (!note || note.removedAt) return "missing";
    if (note.authorId !== input.by.id) return "refused";
    const before = await noteReferences.findAllByNote(note.id, tx);
    const expanded = await expandNote(note.projectId, body, before, tx);
    if (note.body === expanded.body) return "done";
    const revision = revisionOf(note);
    if (input.revision !== undefined && input.revision !== revision) {
      return { changedSince: { body: note.body, revision } };
    }
    const at = input.at ?? new Date();
    const said = { body: note.body, from: note.editedAt ?? note.createdAt, until: at };
    await noteVersions.insert({ noteId: note.id, ...said, editedBy: input.by.id }, tx);
    await notes.updateBody(note.id, checkedBody(expanded.body), at, tx);
    await noteReferences.replaceAllOfNote(note.id, expanded.references, tx);
    const given = { projectId: note.projectId, by: input.by.id, publicIds: attachmentsIn(expanded.body) };
    await attachments.giveToNote(note.id, given, tx);
    await tellOfNote("note.edited", { publicId: note.publicId, by: input.by, at }, tx);
    return "done";
  });
}

/** Tells one state of a note's text from the next. */
export function revisionOf({ createdAt, editedAt }: Pick<notes.NoteRow, "createdAt" | "editedAt">): string {
  return (editedAt ?? createdAt).toISOString();
}

/**
 * Removes a note: for its author, and for whoever may remove those of others. From now on nobody reads it; its text is
 * kept for as long as it can be brought back, then purged.
 */
export async function removeNote(input: ChangeNote & { mayModerate: boolean }): Promise<NoteChange> {
  return inTransaction(async (tx) => {
    const note = await lockNote(input, tx);
    if (!note || note.removedAt) return "missing";
    if (note.authorId !== input.by.id && !input.mayModerate) return "refused";
    await tellOfNote("note.removed", { publicId: note.publicId, by: input.by }, tx);
    await notes.setRemoved(note.id, input.by.id, tx);
    await jobs.insert("purge-note", { note: note.publicId }, new Date(Date.now() + PURGE_AFTER_MS), tx);
    return "done";
  });
}

/** Brings a note back, for whoever removed it a moment ago. */
export async function restoreNote(input: ChangeNote): Promise<NoteChange | "too-late"> {
  return inTransaction(async (tx) => {
    const note = await lockNote(input, tx);
    if (!note) return "too-late";
    if (!note.removedAt) return "done";
    if (note.removedBy !== input.by.id) return "refused";
    if (Date.now() - note.removedAt.getTime() > UNDO_MS + ON_THE_WAY_MS) return "too-late";
    await notes.setRestored(note.id, tx);
    await tellOfNote("note.edited", { publicId: note.publicId, by: input.by }, tx);
    return "done";
  });
}

/**
 * Ends what can't be undone any more: the text of a removed note goes with its earlier versions. An answered one stays as
 * a stub; a stub whose last answer goes, goes too. Harmless to run twice, and for a note that was brought back.
 */
export async function purgeNote(publicId: string, now = new Date()): Promise<void> {
  await inTransaction(async (tx) => {
    const found = await notes.findByPublicId(publicId, tx);
    const note = found && (await notes.lock(found.note.id, tx));
    if (!note || !isOver(note, now)) return;
    await deleteAttachmentsOfNote(note.id, tx);
    if (await notes.hasReplies(note.id, tx)) {
      await noteVersions.deleteAllByNote(note.id, tx);
      await noteReferences.replaceAllOfNote(note.id, [], tx);
      await notes.emptyBody(note.id, tx);
      return;
    }
    await notes.deleteById(note.id, tx);
    for (let parentId = note.parentId; parentId !== null; ) {
      const parent = await notes.lock(parentId, tx);
      if (!parent || !isOver(parent, now) || (await notes.hasReplies(parent.id, tx))) break;
      await notes.deleteById(parent.id, tx);
      parentId = parent.parentId;
    }
  });
}

function isOver({ removedAt }: notes.NoteRow, now: Date): boolean {
  return removedAt !== null && now.getTime() - removedAt.getTime() >= PURGE_AFTER_MS;
}

/** The project's row before the note's, in the order in which everybody locks them. */
async function lockNote(input: ChangeNote, tx: Transaction) {
  const found = await notes.findByPublicId(input.notePublicId, tx);
  if (!found || found.note.projectId !== input.project.id) return undefined;
  await projects.lock(found.note.projectId, tx);
  return notes.lock(found.note.id, tx);
}

/** What was pressed in time may arrive so much later. */
const ON_THE_WAY_MS = 10_000;
const PURGE_AFTER_MS = 30_000;
