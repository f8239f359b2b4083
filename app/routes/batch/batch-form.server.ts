import { data } from "react-router";
import type { ProjectAccess } from "~/auth/require.server";
import * as batches from "~/db/batches.server";
import { notFound, type PlainError, refused } from "~/errors";
import { addToBatch, beginBatch, type Sent, sealBatch } from "~/services/batch/receive.server";
import { startOnBatch } from "~/services/batch/work.server";
import { batchIdSchema } from "./batch.schema";

/** The batch of this project, or 404. */
export async function requireBatch({ project }: ProjectAccess, publicId: string): Promise<batches.BatchRow> {
  const run = await batches.findByPublicId(publicId);
  if (run?.projectId !== project.id) throw notFound("batch");
  return run;
}

/** Keeps what a form brought for its batch, begun if it is new; with `last` it is checked at once. Answers its id, null where nothing came. */
export async function receiveForm(
  { project, person }: ProjectAccess,
  form: FormData,
  { last }: { last: boolean },
): Promise<string | null> {
  if (!person) throw refused("Sign in first. Nothing was stored.");
  const id = batchIdSchema.safeParse(form.get("batch"));
  if (!id.success) throw refused("This form has no batch. Nothing was stored; load the page anew.");
  const [sent, [table = null]] = await Promise.all([filesOf(form, "files"), filesOf(form, "table")]);
  if (sent.length === 0 && !table && form.get("begun") !== "yes") return null;
  const run = await beginBatch(id.data, project, person);
  if (!run) throw refused("This batch is not of this project. Nothing was stored; load the page anew.");
  if (!(await addToBatch(run.publicId, sent, table))) throw tooLate();
  if (last) {
    await sealBatch(run.publicId);
    await startOnBatch(run.publicId);
  }
  return run.publicId;
}

/** More files, or another table, for a batch that is there. */
export async function receiveMore(run: batches.BatchRow, form: FormData): Promise<boolean> {
  const [sent, [table = null]] = await Promise.all([filesOf(form, "files"), filesOf(form, "table")]);
  if (sent.length === 0 && !table) return false;
  if (!(await addToBatch(run.publicId, sent, table))) throw tooLate();
  await sealBatch(run.publicId);
  await startOnBatch(run.publicId);
  return true;
}

function tooLate() {
  const message =
    "It is being taken in, or was. Nothing of what you sent now was stored: begin another batch with it.";
  return data<PlainError>({ title: "This batch is closed", message }, { status: 409 });
}

function filesOf(form: FormData, field: string): Promise<Sent[]> {
  const files = form
    .getAll(field)
    .filter((entry): entry is File => entry instanceof File && entry.name !== "");
  return Promise.all(
    files.map(async (file) => ({ name: file.name, bytes: new Uint8Array(await file.arrayBuffer()) })),
  );
}
