import { inTransaction, isOutcomeUnknown } from "~/db/client.server";
import * as files from "~/db/files.server";
import { newPublicId } from "~/db/ids.server";
import * as jobs from "~/db/jobs.server";
import * as plates from "~/db/plates.server";
import * as projects from "~/db/projects.server";
import { env } from "~/env.server";
import { record as recordEvent } from "../events.server.ts";
import { log } from "../log.server.ts";
import { BusyPrinting, printForms } from "../printing.server.ts";
import { deleteObject, putObject, sha256Of } from "../storage.server.ts";
import type { PlateChoices } from "./choices.ts";
import { type Composed, compose } from "./compose.server.ts";
import type { OfProject, Problem } from "./gather.server.ts";
import type { MadeForm } from "./make-forms.server.ts";
import type { PlateRecord } from "./record.ts";
import type { PlateSubject } from "./subject.ts";

export interface Freeze {
  project: OfProject;
  subject: PlateSubject;
  choices: PlateChoices;
  by: { id: number; name: string };
  /** The version that this one mends, and what was wrong with it. */
  mends?: { plate: plates.PlateRow; reason: string } | null;
  /** Where whoever asks chose it; a second plate of that id is a duplicate. */
  publicId?: string;
  /** When it is made, where that is not now. */
  at?: Date;
}

/**
 * Freezes a plate: every form is made and stored first, then all rows are written in one transaction. Removal of the stored
 * forms is noted before and taken back in that transaction, so that whatever dies half-way leaves nothing behind.
 */
export function freeze(input: Freeze): Promise<{ publicId: string } | Problem> {
  return inTurn(input.project.id, () => freezeNow(input));
}

/** One of a project after the other: side by side all would bear the same number, and all but one be made again. */
async function inTurn<T>(projectId: number, work: () => Promise<T>): Promise<T> {
  const turn = (turns.get(projectId) ?? Promise.resolve()).then(work);
  const ended = turn.catch(() => undefined);
  turns.set(projectId, ended);
  try {
    return await turn;
  } finally {
    if (turns.get(projectId) === ended) turns.delete(projectId);
  }
}

async function freezeNow(input: Freeze): Promise<{ publicId: string } | Problem> {
  const composed = await compose(input.project, input.subject, input.choices);
  if ("problem" in composed) return composed;
  const publicId = input.publicId ?? newPublicId();
  for (let attempt = 1; ; attempt++) {
    const place = await placeOf(input);
    if ("problem" in place) return place;
    const done = await freezeAs(input, composed, { publicId, ...place });
    // Another process took the number while the forms were made: they bear it, so they are made again.
    if (done !== "taken" || attempt >= ATTEMPTS) return done === "taken" ? BUSY : done;
  }
}

interface Place {
  number: number;
  version: number;
  previous: plates.PlateRow | null;
}

/** The number and version that it would get now. */
async function placeOf({ project, mends }: Freeze): Promise<Place | Problem> {
  return inTransaction(async (tx) => {
    if (!mends) return { number: await plates.nextNumber(project.id, tx), version: 1, previous: null };
    const newest = await plates.findNewest(project.id, mends.plate.number, tx);
    if (newest?.id !== mends.plate.id) return OVERTAKEN;
    return { number: newest.number, version: newest.version + 1, previous: newest };
  });
}

async function freezeAs(
  input: Freeze,
  composed: Composed,
  place: Place & { publicId: string },
): Promise<{ publicId: string } | Problem | "taken"> {
  const { project, by } = input;
  const record = numbered(input, composed, place);
  const forms = await printForms({ record, sweeps: composed.sweeps }).catch((error) => {
    if (error instanceof BusyPrinting) return null;
    throw error;
  });
  if (!forms) return MUCH_PRINTED;
  const stored = await storeForms(record.id, forms);
  try {
    const done = await inTransaction(async (tx) => {
      await projects.lock(project.id, tx);
      const fileIds = composed.sources.map(({ fileId }) => fileId);
      const there = await files.hold(fileIds, tx);
      if (fileIds.some((id) => !there.has(id))) return GONE_MEANWHILE;
      const newest = place.previous && (await plates.findNewest(project.id, place.number, tx));
      if (newest && newest.id !== place.previous?.id) return OVERTAKEN;
      if (!place.previous && (await plates.nextNumber(project.id, tx)) !== place.number) return "taken";
      const text = JSON.stringify(record);
      await plates.insert(
        {
          publicId: record.id,
          projectId: project.id,
          number: record.number,
          version: record.version,
          previousId: place.previous?.id ?? null,
          kind: record.kind,
          title: record.title,
          caption: record.caption,
          licence: record.licence.id,
          record: text,
          recordSha256: sha256Of(Buffer.from(text)),
          createdBy: by.id,
          createdAt: new Date(record.madeAt),
        },
        stored.map(({ undo: _, ...row }) => row),
        composed.sources.map(({ source, recipe, storageKey }) => ({
          role: source.role,
          sweep: source.sweep,
          name: source.name,
          sha256: source.sha256,
          sizeBytes: source.sizeBytes,
          storageKey,
          recipe: JSON.stringify(recipe),
        })),
        tx,
      );
      await jobs.deleteAllByIds(
        stored.map(({ undo }) => undo),
        tx,
      );
      const kind = place.previous ? "plate.mended" : "plate.made";
      const about = { plate: record.id, title: record.title };
      await recordEvent({ projectId: project.id, kind, actorId: by.id, about, at: input.at }, tx);
      return { publicId: record.id };
    });
    if (done === "taken" || "problem" in done) await removeForms(stored);
    return done;
  } catch (error) {
    // Their jobs remove them later, unless the plate is there after all.
    if (!isOutcomeUnknown(error)) await removeForms(stored);
    throw error;
  }
}

function numbered(
  { by, mends, at = new Date() }: Freeze,
  { record }: Composed,
  { publicId, number, version, previous }: Place & { publicId: string },
): PlateRecord {
  return {
    format: "swale-plate/1",
    id: publicId,
    number,
    version,
    address: addressOf(publicId),
    previous: previous && {
      address: addressOf(previous.publicId),
      version: previous.version,
      reason: mends?.reason ?? "",
    },
    madeAt: at.toISOString(),
    madeBy: by.name,
    ...record,
    people: [...record.people, { name: by.name, part: version > 1 ? "made this version" : "made the plate" }],
  };
}

function addressOf(publicId: string): string {
  return `${env.BASE_URL}/plates/${publicId}`;
}

type StoredRow = Parameters<typeof plates.insert>[1][number] & { undo: number };

/** Each is read back and compared once it is stored. */
async function storeForms(publicId: string, forms: readonly MadeForm[]): Promise<StoredRow[]> {
  const later = new Date(Date.now() + UNDO_AFTER_MS);
  const stored: StoredRow[] = [];
  for (const { form, mediaType, bytes } of forms) {
    const storageKey = `plates/${publicId}/${form}-${newPublicId()}`;
    const undo = await jobs.insert("delete-object", { key: storageKey }, later);
    await putObject(storageKey, bytes, mediaType);
    const sizeBytes = bytes.length;
    const sha256 = sha256Of(bytes);
    stored.push({ form, mediaType, sha256, sizeBytes, storageKey, createdAt: new Date(), undo });
  }
  return stored;
}

/** What can't be removed now is removed by its job. */
async function removeForms(stored: readonly StoredRow[]): Promise<void> {
  const done = await Promise.allSettled(stored.map(({ storageKey }) => deleteObject(storageKey)));
  const failed = done.filter(({ status }) => status === "rejected").length;
  if (failed > 0) log.warn({ failed }, "forms of a plate that was not written stay for a while");
}

/** Of this process, by the project's row id: the end of whatever came last. */
const turns = new Map<number, Promise<unknown>>();
const ATTEMPTS = 3;
const UNDO_AFTER_MS = 60 * 60 * 1000;
const GONE_MEANWHILE: Problem = {
  problem: "A sweep or reference of this plate was deleted while it was made.",
};
const OVERTAKEN: Problem = {
  problem: "Somebody made a newer version of this plate in the meantime: mend that one.",
};
const BUSY: Problem = {
  problem: "Others freeze plates of this project at this moment: try again.",
};
const MUCH_PRINTED: Problem = {
  problem: "Many plates are made at this moment: try again in a minute.",
};
