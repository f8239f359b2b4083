import { createHash } from "node:crypto";
import { db, inTransaction } from "~/db/client.server";
import * as files from "~/db/files.server";
import { newPublicId } from "~/db/ids.server";
import * as notes from "~/db/notes.server";
import * as outbox from "~/db/outbox.server";
import * as plates from "~/db/plates.server";
import * as projects from "~/db/projects.server";
import * as reports from "~/db/reports.server";
import * as sweeps from "~/db/sweeps.server";
import * as webmentions from "~/db/webmentions.server";
import * as writeUps from "~/db/write-ups.server";
import { propose } from "~/services/plates/compose.server";
import { freeze } from "~/services/plates/freeze.server";
import { revisionOf } from "~/services/write-ups/publish.server";
import { SERVER } from "./browser.ts";
import { type Place, type Someone, unique } from "./world.ts";

/** What a test puts into a place where it is asked for, and changes in it. */

/** A plate of the place's sweep; its public id. */
export async function freezePlate(place: Place, by: Someone): Promise<string> {
  const found = await projects.findWithRole(place.project, by.id);
  const subject = { kind: "sweep" as const, ids: [place.sweep] };
  const choices = found && (await propose(found.project, subject));
  if (!choices || "problem" in choices) throw new Error("There is nothing to be frozen.");
  const maker = { id: by.id, name: by.userName };
  const made = await freeze({ project: found.project, subject, choices, by: maker });
  if ("problem" in made) throw new Error(made.problem);
  return made.publicId;
}

/** Another plate that says the same, without its forms: made at once. */
export async function copyPlate(publicId: string): Promise<string> {
  const row = await plates.findByPublicId(publicId);
  if (!row?.projectId) throw new Error("There is no such plate.");
  const { id: _, ...values } = row;
  const copy = { ...values, publicId: newPublicId(), number: await plates.nextNumber(row.projectId, db) };
  await plates.insert(copy, [], [], db);
  return copy.publicId;
}

/** An open report on the place's note; its public id. */
export async function openReport(place: Place, by: Someone): Promise<string> {
  const found = await notes.findByPublicId(place.note);
  const noteId = found?.note.id ?? 0;
  await reports.insert({ noteId, reason: "A walk.", reportedBy: by.id });
  const open = await reports.findAll("open", 1000);
  return open.findLast(({ note }) => note.id === noteId)?.report.publicId ?? "";
}

/** A mail that waits for longer than any test; its public id. */
export async function waitingMail(): Promise<string> {
  const toAddress = `${unique("mail")}@fennmarsh.example`;
  const messageId = `<${toAddress}>`;
  const mail = { messageId, onceKey: null, toAddress, userId: null, subject: "A walk", text: "", html: "" };
  await inTransaction(async (tx) => {
    await outbox.insert({ ...mail, headers: {} }, tx);
    const row = await outbox.findByMessageId(messageId, tx);
    await outbox.putOff(row?.id ?? 0, new Date(Date.now() + 3.6e6), "put off by a test", tx);
  });
  return (await outbox.findByMessageId(messageId))?.publicId ?? "";
}

/** A page elsewhere that links to the place's write-up and waits for an owner's word; its public id. */
export function waitingMention(place: Place): Promise<string> {
  return inTransaction(async (tx) => {
    const found = await writeUps.findByPublicId(place.writeUp, tx);
    const source = `https://notes.example/${unique("page")}`;
    const of = { plateId: null, writeUpId: found?.writeUp.id ?? 0 };
    const target = `${SERVER}/write-ups/${place.writeUp}`;
    const publicId = await webmentions.receive({ source, target, ...of }, tx);
    const row = await webmentions.findByPublicId(publicId, tx);
    await webmentions.update(row?.mention.id ?? 0, { state: "verified", title: "Reeds and radials" }, tx);
    return publicId;
  });
}

/** Sweeps that were never read, many of them of one moment: for lists. */
export function addBareSweeps(projectId: number, howMany: number): Promise<void> {
  const moment = new Date("2026-09-14T17:20:00Z");
  return inTransaction(async (tx) => {
    for (let i = 0; i < howMany; i++) {
      const name = unique("bare");
      const sha256 = createHash("sha256").update(name).digest("hex");
      const fileId = await files.insert(
        { projectId, name, sizeBytes: 1, sha256, storageKey: `none/${name}`, uploadedBy: null },
        tx,
      );
      await sweeps.insert({ projectId, fileId, title: name, takenAt: moment, createdBy: null }, tx);
    }
  });
}

/** Writes in the place's write-up; what the draft is told apart by then. */
export async function rewriteDraft(place: Place): Promise<string> {
  const found = await writeUps.findByPublicId(place.writeUp);
  if (!found) return "";
  const { title } = found.writeUp;
  const body = unique("Written anew");
  await writeUps.update(found.writeUp.id, { body });
  return revisionOf({ title, body });
}
