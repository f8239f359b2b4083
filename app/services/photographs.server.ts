import { inTransaction, isOutcomeUnknown, type Transaction } from "~/db/client.server";
import { newPublicId } from "~/db/ids.server";
import * as jobs from "~/db/jobs.server";
import * as photographs from "~/db/photographs.server";
import { record } from "./events.server.ts";
import { cleanFileName, plainText } from "./file-names.ts";
import { copiesOf, PhotographRefused } from "./photograph-copies.server.ts";
import { deleteObject, getObject, putObject, sha256Of } from "./storage.server.ts";

/**
 * Photographs of a bench (`benchId`), of a step (`stepId`) or, with neither, of the project's antenna. A page lists them with
 * `listPhotographs(of)` in its loader and shows them with `<Photographs>` (`~/components/photographs/Photographs`), whose forms go
 * to `POST /projects/:project/photographs`; nothing else is needed of the page. The original is kept as it was given; pages
 * show copies that are upright and carry no metadata.
 */
export async function listPhotographs(of: photographs.PhotographOf): Promise<ShownPhotograph[]> {
  const rows = await photographs.findAllOf(of);
  return rows.map(({ publicId, caption, name, width, height }) => ({
    publicId,
    caption,
    name,
    width,
    height,
  }));
}

/** A photograph as a page needs it. Its pictures: `/projects/:project/photographs/:photograph/small` (at most 640 px) and `…/shown`. */
export interface ShownPhotograph {
  publicId: string;
  /** Empty where nobody wrote one. */
  caption: string;
  /** Of the file as it was given. */
  name: string;
  /** Pixels of the copy that is shown. */
  width: number;
  height: number;
}

export interface NewPhotograph {
  of: photographs.PhotographOf;
  project: { publicId: string };
  by: { id: number };
  file: { name: string; bytes: Uint8Array };
  caption: string;
  /** When it was added, where that is not now. */
  at?: Date;
}

export type AddedPhotograph = { kind: "added"; publicId: string } | { kind: "refused"; message: string };

/** Takes one photograph in. Its objects are noted for removal before they are stored, as those of a sweep are. */
export async function addPhotograph({
  of,
  project,
  by,
  file,
  caption,
  at,
}: NewPhotograph): Promise<AddedPhotograph> {
  if (file.bytes.length > MAX_PHOTOGRAPH_BYTES) return { kind: "refused", message: TOO_LARGE };
  if ((await photographs.countOf(of)) >= MOST_PHOTOGRAPHS) return { kind: "refused", message: TOO_MANY };
  const copies = await copiesOf(file.bytes).catch((error) => {
    if (error instanceof PhotographRefused) return error.message;
    throw error;
  });
  if (typeof copies === "string") return { kind: "refused", message: copies };
  const storageKey = `photographs/${project.publicId}/${newPublicId()}${newPublicId()}`;
  const objects = [
    { key: storageKey, bytes: file.bytes, type: "application/octet-stream" },
    { key: shownKeyOf(storageKey), bytes: copies.shown, type: "image/jpeg" },
    { key: smallKeyOf(storageKey), bytes: copies.small, type: "image/jpeg" },
  ];
  const undoAt = new Date(Date.now() + UNDO_AFTER_MS);
  const undo = await Promise.all(objects.map(({ key }) => jobs.insert("delete-object", { key }, undoAt)));
  await Promise.all(objects.map(({ key, bytes, type }) => putObject(key, bytes, type)));
  try {
    const publicId = await inTransaction(async (tx) => {
      const made = await photographs.insert(
        {
          ...of,
          caption: cleanCaption(caption),
          name: cleanFileName(file.name),
          sizeBytes: file.bytes.length,
          sha256: sha256Of(file.bytes),
          storageKey,
          shownKey: shownKeyOf(storageKey),
          smallKey: smallKeyOf(storageKey),
          width: copies.width,
          height: copies.height,
          createdBy: by.id,
        },
        tx,
      );
      await jobs.deleteAllByIds(undo, tx);
      await tell("photograph.added", of, by, tx, at);
      return made;
    });
    return { kind: "added", publicId };
  } catch (error) {
    // Their jobs remove them later, unless the row is there after all.
    if (isOutcomeUnknown(error)) throw error;
    await Promise.all(objects.map(({ key }) => deleteObject(key).catch(() => undefined)));
    throw error;
  }
}

export type PhotographSize = "small" | "shown" | "original";

/** The stored bytes of one size. */
export function readPhotograph(
  photograph: photographs.PhotographRow,
  size: PhotographSize,
): Promise<Uint8Array> {
  const keys = {
    small: photograph.smallKey,
    shown: photograph.shownKey,
    original: photograph.storageKey,
  };
  return getObject(keys[size]);
}

export function changeCaption(photograph: photographs.PhotographRow, caption: string): Promise<void> {
  return photographs.updateCaption(photograph.id, cleanCaption(caption));
}

/** Deletes a photograph; its objects go once the row is gone. */
export function deletePhotograph(photograph: photographs.PhotographRow, by: { id: number }): Promise<void> {
  return inTransaction(async (tx) => {
    await deleteWithObjects(photograph, tx);
    await tell("photograph.deleted", photograph, by, tx);
  });
}

/** Deletes all photographs of a bench or a step, in the transaction that deletes that: rows that merely cascade leave objects. */
export async function deletePhotographsOf(of: photographs.PhotographOf, tx: Transaction): Promise<void> {
  for (const photograph of await photographs.findAllOf(of, tx)) await deleteWithObjects(photograph, tx);
}

/** Its line says of what the photograph is. */
async function tell(
  kind: "photograph.added" | "photograph.deleted",
  of: photographs.PhotographOf,
  by: { id: number },
  tx: Transaction,
  at?: Date,
): Promise<void> {
  const { bench, step } = await photographs.findSubject(of, tx);
  const title = bench?.name ?? step?.title ?? "the antenna";
  const about = { bench: bench?.publicId, step: step?.publicId, title };
  await record({ projectId: of.projectId, kind, actorId: by.id, about, at }, tx);
}

async function deleteWithObjects(photograph: photographs.PhotographRow, tx: Transaction): Promise<void> {
  const { id, storageKey, shownKey, smallKey } = photograph;
  const keys = [storageKey, shownKey, smallKey].map((key) => ({ key }));
  await jobs.insertAll("delete-object", keys, tx);
  await photographs.deleteById(id, tx);
}

function cleanCaption(text: string): string {
  return Array.from(plainText(text).replace(/\s+/g, " ")).slice(0, MOST_CAPTION).join("");
}

/** `isStorageKeyUsed` of photographs finds the row of a copy by this rule. */
function shownKeyOf(storageKey: string): string {
  return `${storageKey}.shown`;
}

function smallKeyOf(storageKey: string): string {
  return `${storageKey}.small`;
}

export const MOST_CAPTION = 300;
const MOST_PHOTOGRAPHS = 60;
/** Telephones of 2026 give 3 to 15 MB (common practice, no source). */
const MAX_PHOTOGRAPH_BYTES = 30 * 1024 * 1024;
const UNDO_AFTER_MS = 60 * 60 * 1000;
const TOO_LARGE = "It has more than 30 MB. Give a smaller copy.";
const TOO_MANY = `There are ${MOST_PHOTOGRAPHS} photographs here already. Delete one first.`;
