import * as attachments from "~/db/attachments.server";
import { inTransaction, isOutcomeUnknown, type Transaction } from "~/db/client.server";
import { newPublicId } from "~/db/ids.server";
import * as jobs from "~/db/jobs.server";
import { cleanFileName } from "./file-names.ts";
import { asLabel } from "./note-words.ts";
import { copiesOf, type PhotographCopies, PhotographRefused } from "./photograph-copies.server.ts";
import { deleteObject, getObject, putObject, sha256Of } from "./storage.server.ts";

/** Pictures and sweep files in notes. The original is kept as it was given; pages show copies without metadata. */

export interface NewAttachment {
  project: { id: number; publicId: string };
  by: { id: number };
  file: { name: string; bytes: Uint8Array };
}

export type AddedAttachment =
  | { kind: "added"; publicId: string /** What names it in the note's text. */; markdown: string }
  | { kind: "refused"; message: string };

/**
 * Takes a file in for a note that is being written; one that is in no note after a day goes again. Its objects are noted
 * for removal before they are stored, as those of a sweep are.
 */
export async function addAttachment({ project, by, file }: NewAttachment): Promise<AddedAttachment> {
  if (file.bytes.length === 0) return { kind: "refused", message: EMPTY };
  if (file.bytes.length > MAX_ATTACHMENT_BYTES) return { kind: "refused", message: TOO_LARGE };
  if ((await attachments.countUnsent(project.id, by.id)) >= MOST_UNSENT) {
    return { kind: "refused", message: TOO_MANY };
  }
  const found = await whatItIs(file.bytes);
  if (typeof found === "string") return { kind: "refused", message: found };
  const storageKey = `attachments/${project.publicId}/${newPublicId()}${newPublicId()}`;
  const objects = [{ key: storageKey, bytes: file.bytes, type: "application/octet-stream" }];
  if (found.copies) {
    objects.push({ key: `${storageKey}.shown`, bytes: found.copies.shown, type: "image/jpeg" });
    objects.push({ key: `${storageKey}.small`, bytes: found.copies.small, type: "image/jpeg" });
  }
  const undoAt = new Date(Date.now() + UNDO_AFTER_MS);
  const undo = await Promise.all(objects.map(({ key }) => jobs.insert("delete-object", { key }, undoAt)));
  await Promise.all(objects.map(({ key, bytes, type }) => putObject(key, bytes, type)));
  const name = cleanFileName(file.name);
  try {
    const publicId = await inTransaction(async (tx) => {
      const made = await attachments.insert(
        {
          projectId: project.id,
          name,
          mediaType: found.mediaType,
          sizeBytes: file.bytes.length,
          sha256: sha256Of(file.bytes),
          storageKey,
          shownKey: found.copies ? `${storageKey}.shown` : null,
          smallKey: found.copies ? `${storageKey}.small` : null,
          width: found.copies?.width ?? null,
          height: found.copies?.height ?? null,
          uploadedBy: by.id,
        },
        tx,
      );
      await jobs.deleteAllByIds(undo, tx);
      const dropAt = new Date(Date.now() + UNSENT_FOR_MS);
      await jobs.insert("drop-attachment", { attachment: made }, dropAt, tx);
      return made;
    });
    const markdown = `${found.copies ? "!" : ""}[${asLabel(name)}](attachment:${publicId})`;
    return { kind: "added", publicId, markdown };
  } catch (error) {
    // Their jobs remove them later, unless the row is there after all.
    if (isOutcomeUnknown(error)) throw error;
    await Promise.all(objects.map(({ key }) => deleteObject(key).catch(() => undefined)));
    throw error;
  }
}

export type AttachmentSize = "small" | "shown" | "file";

export function readAttachment(row: attachments.AttachmentRow, size: AttachmentSize): Promise<Uint8Array> {
  const keys = { small: row.smallKey, shown: row.shownKey, file: row.storageKey };
  return getObject(keys[size] ?? row.storageKey);
}

/** Drops a file that its writer never sent. Harmless to run twice. */
export async function dropUnsent(publicId: string): Promise<void> {
  await inTransaction(async (tx) => {
    const row = await attachments.lockUnsent(publicId, tx);
    if (row) await deleteWithObjects(row, tx);
  });
}

/** Deletes the files of a note, in the transaction that deletes its text. */
export async function deleteAttachmentsOfNote(noteId: number, tx: Transaction): Promise<void> {
  for (const row of await attachments.findAllByNote(noteId, tx)) await deleteWithObjects(row, tx);
}

/** Deletes the files of all notes on a sweep, a step or a bench, in the transaction that deletes that: rows that merely cascade leave objects. */
export async function deleteAttachmentsUnder(
  place: Parameters<typeof attachments.findAllUnder>[0],
  tx: Transaction,
): Promise<void> {
  for (const row of await attachments.findAllUnder(place, tx)) await deleteWithObjects(row, tx);
}

async function deleteWithObjects(row: attachments.AttachmentRow, tx: Transaction): Promise<void> {
  const keys = attachments.keysOf(row).map((key) => ({ key }));
  await jobs.insertAll("delete-object", keys, tx);
  await attachments.deleteById(row.id, tx);
}

/** A picture with its copies, or text; by what is in it, whatever its name says. Else why it is not taken. */
async function whatItIs(
  bytes: Uint8Array,
): Promise<{ mediaType: string; copies: PhotographCopies | null } | string> {
  try {
    return { mediaType: "image/*", copies: await copiesOf(bytes) };
  } catch (error) {
    if (!(error instanceof PhotographRefused)) throw error;
    return isText(bytes) ? { mediaType: "text/plain", copies: null } : `${error.message} ${KINDS}`;
  }
}

/** Text in one of the encodings in which instruments write: no control characters but those between lines and fields. */
function isText(bytes: Uint8Array): boolean {
  const marked = (bytes[0] === 0xff && bytes[1] === 0xfe) || (bytes[0] === 0xfe && bytes[1] === 0xff);
  return marked || !bytes.subarray(0, LOOKED_AT).some((byte) => byte < 9 || (byte > 13 && byte < 27));
}

const MAX_ATTACHMENT_BYTES = 30 * 1024 * 1024;
/** Of one person in one project at a time. */
const MOST_UNSENT = 50;
const UNSENT_FOR_MS = 24 * 60 * 60 * 1000;
const UNDO_AFTER_MS = 60 * 60 * 1000;
const LOOKED_AT = 4096;

const EMPTY = "It is empty.";
const TOO_LARGE = "It has more than 30 MB. Give a smaller copy.";
const TOO_MANY = `There are ${MOST_UNSENT} files here that you have not sent with a note yet. Send or leave those first.`;
const KINDS = "Notes take pictures and sweep files.";
