import { createHash } from "node:crypto";
import type { ProjectAction } from "~/auth/permissions";
import { inTransaction, isDuplicate, isReferenceBroken, type Transaction } from "~/db/client.server";
import * as notes from "~/db/notes.server";
import * as projects from "~/db/projects.server";
import { renderNote } from "./markdown.server.ts";
import { MAX_NOTE_CHARACTERS } from "./note-limits.ts";

export interface WriteNote {
  project: { id: number };
  author: { id: number };
  place: notes.NotePlace;
  /** The note that is answered; it stands in the same place. */
  parentPublicId?: string | null;
  body: string;
  /** Made by whoever sends: sent twice, it is stored once. */
  clientKey?: string | null;
  /** When it was written, where that is not now. */
  createdAt?: Date;
}

/** Why a note was not stored, in words for the one who wrote it. */
export class NoteProblem extends Error {}

/** Stores a note, or throws a `NoteProblem` with nothing stored. */
export async function writeNote(input: WriteNote, tx?: Transaction): Promise<{ publicId: string }> {
  const body = checkedBody(input.body);
  const clientKey = input.clientKey ? ownKey(input.author.id, input.clientKey) : null;
  const write = async (within: Transaction) => {
    const before = clientKey && (await notes.findByClientKey(clientKey, within));
    if (before) return { publicId: before.publicId };
    const parentId = input.parentPublicId
      ? await findParent(input.place, input.parentPublicId, within)
      : null;
    const values = {
      ...input.place,
      projectId: input.project.id,
      parentId,
      authorId: input.author.id,
      body,
      clientKey,
      ...(input.createdAt ? { createdAt: input.createdAt } : {}),
    };
    // The project's row first: two who write at once then wait for one another.
    await projects.update(input.project.id, {}, within);
    const { publicId } = await notes.insert(values, within);
    return { publicId };
  };
  try {
    return await (tx ? write(tx) : inTransaction(write));
  } catch (error) {
    if (isReferenceBroken(error)) throw new NoteProblem(GONE);
    const first = clientKey && isDuplicate(error) && (await notes.findByClientKey(clientKey));
    if (!first) throw error;
    return { publicId: first.publicId };
  }
}

export type NoteChange = "done" | "missing" | "refused";

interface ChangeNote {
  project: { id: number };
  notePublicId: string;
  by: { id: number };
}

/** Changes the text; only its author may. Throws a `NoteProblem` for a text that can't stand. */
export async function editNote(input: ChangeNote & { body: string }): Promise<NoteChange> {
  const body = checkedBody(input.body);
  return inTransaction(async (tx) => {
    const note = await lockNote(input, tx);
    if (!note || note.removedAt) return "missing";
    if (note.authorId !== input.by.id) return "refused";
    if (note.body !== body) await notes.updateBody(note.id, body, tx);
    return "done";
  });
}

/**
 * Removes a note: for its author, and for whoever may remove those of others. An answered one leaves a stub; a
 * stub whose last answer goes, goes too.
 */
export async function removeNote(input: ChangeNote & { mayModerate: boolean }): Promise<NoteChange> {
  return inTransaction(async (tx) => {
    const note = await lockNote(input, tx);
    if (!note || note.removedAt) return "missing";
    if (note.authorId !== input.by.id && !input.mayModerate) return "refused";
    if (await notes.hasReplies(note.id, tx)) {
      await notes.setRemoved(note.id, input.by.id, tx);
      return "done";
    }
    await notes.deleteById(note.id, tx);
    for (let parentId = note.parentId; parentId !== null; ) {
      const parent = await notes.lock(parentId, tx);
      if (!parent?.removedAt || (await notes.hasReplies(parent.id, tx))) break;
      await notes.deleteById(parent.id, tx);
      parentId = parent.parentId;
    }
    return "done";
  });
}

/** Who looks at a thread, as far as it changes what is offered. */
export interface ThreadViewer {
  person: { id: number } | null;
  may: (action: ProjectAction) => boolean;
}

export interface ThreadNote {
  publicId: string;
  /** Null for a former member, and for a removed note. */
  author: { name: string; userName: string } | null;
  createdAt: Date;
  editedAt: Date | null;
  removed: boolean;
  html: string;
  /** As it was written; only for who may edit it. */
  body: string | null;
  mayEdit: boolean;
  mayRemove: boolean;
  /** The note that this one answers, where that is not the one it stands under. */
  answers: { publicId: string; author: string } | null;
  /** Every answer below, however deep, oldest first; empty in answers themselves. */
  replies: ThreadNote[];
}

/** The notes of one place, ready for drawing: oldest first, with all that answers each under it. */
export async function listThread(place: notes.NotePlace, viewer: ThreadViewer): Promise<ThreadNote[]> {
  const rows = await notes.findAllByPlace(place);
  const byId = new Map(rows.map((row) => [row.note.id, row]));
  const drawn = new Map<number, ThreadNote>();
  const heads: ThreadNote[] = [];
  for (const row of rows) {
    const parent = row.note.parentId === null ? undefined : byId.get(row.note.parentId);
    const head = parent && drawn.get(parent.note.id);
    if (!head) {
      const note = drawNote(row, viewer, null);
      drawn.set(row.note.id, note);
      heads.push(note);
      continue;
    }
    const deeper = head.publicId !== parent.note.publicId;
    const author = parent.author?.name ?? FORMER;
    head.replies.push(drawNote(row, viewer, deeper ? { publicId: parent.note.publicId, author } : null));
    // Whoever answers this one is shown under the same head.
    drawn.set(row.note.id, head);
  }
  return heads;
}

export function countNotes(thread: ThreadNote[]): number {
  return thread.reduce((sum, note) => sum + (note.removed ? 0 : 1) + countNotes(note.replies), 0);
}

function drawNote(
  { note, author }: notes.ListedNote,
  { person, may }: ThreadViewer,
  answers: ThreadNote["answers"],
): ThreadNote {
  const removed = note.removedAt !== null;
  const own = person !== null && note.authorId === person.id && may("note.write");
  const mayEdit = own && !removed;
  return {
    publicId: note.publicId,
    author: author && !removed ? { name: author.name, userName: author.userName } : null,
    createdAt: note.createdAt,
    editedAt: note.editedAt,
    removed,
    html: removed ? "" : renderNote(note.body),
    body: mayEdit ? note.body : null,
    mayEdit,
    mayRemove: !removed && (own || (person !== null && may("note.moderate"))),
    answers,
    replies: [],
  };
}

async function lockNote(input: ChangeNote, tx: Transaction) {
  const found = await notes.findByPublicId(input.notePublicId, tx);
  if (!found || found.note.projectId !== input.project.id) return undefined;
  return notes.lock(found.note.id, tx);
}

async function findParent(place: notes.NotePlace, publicId: string, tx: Transaction): Promise<number> {
  const parent = (await notes.findByPublicId(publicId, tx))?.note;
  const there =
    parent?.projectId === place.projectId && parent.sweepId === place.sweepId && parent.dipId === place.dipId;
  if (!parent || !there) throw new NoteProblem(GONE);
  return parent.id;
}

function checkedBody(text: string): string {
  const body = text.replace(/\r\n?/g, "\n").trimEnd();
  if (body.trim() === "") throw new NoteProblem("The note is empty. Nothing was stored.");
  if (body.length > MAX_NOTE_CHARACTERS) {
    throw new NoteProblem(
      `The note has ${body.length} characters; the most is ${MAX_NOTE_CHARACTERS}. Nothing was stored.`,
    );
  }
  return body;
}

/** Two people who send the same key have written two notes. */
function ownKey(authorId: number, clientKey: string): string {
  return createHash("sha256").update(`${authorId} ${clientKey}`).digest("hex").slice(0, 40);
}

const FORMER = "a former member";
const GONE =
  "The note you answer, or what it stands on, is not there any more. Nothing was stored; load the page again to see what is there.";
