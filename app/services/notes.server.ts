import { createHash } from "node:crypto";
import * as attachments from "~/db/attachments.server";
import { inTransaction, isDuplicate, isReferenceBroken, type Transaction } from "~/db/client.server";
import * as noteReferences from "~/db/note-references.server";
import * as notes from "~/db/notes.server";
import * as projects from "~/db/projects.server";
import { record } from "./events.server.ts";
import { MAX_NOTE_CHARACTERS } from "./note-limits.ts";
import { attachmentsIn, expandNote } from "./note-links.server.ts";
import type { PictureRegion } from "./note-parts.ts";
import { aboutNote } from "./note-places.ts";

export interface WriteNote {
  project: { id: number };
  author: { id: number };
  place: notes.NotePlace;
  /** The note that is answered; it stands in the same place. */
  parentPublicId?: string | null;
  /** On a sweep: the stretch of frequency, or the region of its picture, that it speaks of. */
  part?: NotePart;
  body: string;
  /** Made by whoever sends: sent twice, it is stored once. */
  clientKey?: string | null;
  /** When it was written, where that is not now. */
  createdAt?: Date;
  /** It stands beside something that is told itself. */
  quiet?: boolean;
}

export type NotePart = { fromHz: number; toHz: number } | { region: PictureRegion };

/** Why a note was not stored, in words for the one who wrote it. */
export class NoteProblem extends Error {}

/** Stores a note, or throws a `NoteProblem` with nothing stored. */
export async function writeNote(input: WriteNote, tx?: Transaction): Promise<{ publicId: string }> {
  const body = checkedBody(input.body);
  const clientKey = input.clientKey ? ownKey(input.author.id, input.clientKey) : null;
  const write = async (within: Transaction) => {
    const before = clientKey && (await notes.findByClientKey(clientKey, within));
    if (before) return { publicId: before.publicId };
    // The project's row first: two who write at once then wait for one another.
    await projects.update(input.project.id, {}, within);
    const expanded = await expandNote(input.project.id, body, [], within);
    const parentId = input.parentPublicId
      ? await findParent(input.place, input.parentPublicId, within)
      : null;
    const values = {
      ...input.place,
      ...input.part,
      projectId: input.project.id,
      parentId,
      authorId: input.author.id,
      body: checkedBody(expanded.body),
      clientKey,
      ...(input.createdAt ? { createdAt: input.createdAt } : {}),
    };
    const { id, publicId } = await notes.insert(values, within);
    await noteReferences.replaceAllOfNote(id, expanded.references, within);
    const publicIds = attachmentsIn(expanded.body);
    await attachments.giveToNote(id, { projectId: input.project.id, by: input.author.id, publicIds }, within);
    const { author: by, createdAt: at, quiet } = input;
    await tellOfNote("note.added", { publicId, by, at, quiet }, within);
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

/** Writes down what happened to a note, in the transaction that does it. */
export async function tellOfNote(
  kind: "note.added" | "note.edited" | "note.removed",
  { publicId, by, ...more }: { publicId: string; by: { id: number }; at?: Date; quiet?: boolean },
  tx: Transaction,
): Promise<void> {
  const found = await notes.findByPublicId(publicId, tx);
  if (!found) return;
  await record(
    { projectId: found.note.projectId, kind, actorId: by.id, about: aboutNote(publicId, found), ...more },
    tx,
  );
}

async function findParent(place: notes.NotePlace, publicId: string, tx: Transaction): Promise<number> {
  const parent = (await notes.findByPublicId(publicId, tx))?.note;
  if (!parent || !samePlace(parent, place)) throw new NoteProblem(GONE);
  return parent.id;
}

function samePlace(parent: notes.NoteRow, place: notes.NotePlace): boolean {
  return (
    parent.projectId === place.projectId &&
    (["sweepId", "dipId", "trailId", "stepId", "benchId"] as const).every(
      (on) => parent[on] === (place[on] ?? null),
    )
  );
}

/** The text as it is kept, or a `NoteProblem`. */
export function checkedBody(text: string): string {
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

const GONE =
  "The note you answer, or what it stands on, is not there any more. Nothing was stored; load the page again to see what is there.";
