import { inTransaction, type Transaction } from "~/db/client.server";
import * as noteReferences from "~/db/note-references.server";
import * as noteVersions from "~/db/note-versions.server";
import * as notes from "~/db/notes.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import * as reports from "~/db/reports.server";
import { env } from "~/env.server";
import { tellOfNote } from "./notes.server.ts";
import { queueMail } from "./outbox.server.ts";
import { changeAccount } from "./people.server.ts";
import { takeOne } from "./rate-limit.server.ts";

/** Notes told to the administrator, who reads such a note and nothing else of its project. */

export type Reported = "done" | "already" | "too-many";

export async function reportNote(input: {
  note: { id: number };
  by: { id: number };
  reason: string;
}): Promise<Reported> {
  if ((await takeOne("report", String(input.by.id))) !== null) return "too-many";
  return inTransaction(async (tx) => {
    await notes.lock(input.note.id, tx);
    if (await reports.isOpenBy(input.note.id, input.by.id, tx)) return "already";
    const { reason } = input;
    await reports.insert({ noteId: input.note.id, reason, reportedBy: input.by.id }, tx);
    await tellAdministrators(tx);
    return "done";
  });
}

/** What an administrator may decide. */
export const OUTCOMES = {
  leave: "The note stays.",
  remove: "The note was removed.",
  suspend: "The note was removed, and its author suspended.",
} as const;
export type Outcome = keyof typeof OUTCOMES;

export type Closed = "done" | "missing" | "last-administrator";

/** Decides on a note, for everybody who reported it. */
export async function closeReport(publicId: string, outcome: Outcome, by: { id: number }): Promise<Closed> {
  const found = await reports.findOpen(publicId);
  if (!found) return "missing";
  const { authorId } = found.note;
  if (outcome === "suspend" && authorId !== null && !(await changeAccount(authorId, "suspend"))) {
    return "last-administrator";
  }
  await inTransaction(async (tx) => {
    await projects.lock(found.note.projectId, tx);
    const note = await notes.lock(found.note.id, tx);
    if (outcome !== "leave" && note && !note.removedAt) await takeDown(note, by, tx);
    await reports.closeAllOfNote(found.note.id, { closedBy: by.id, outcome: OUTCOMES[outcome] }, tx);
  });
  return "done";
}

/** Its text goes at once and for good; its row stays, so that what was decided can be read. */
async function takeDown(note: notes.NoteRow, by: { id: number }, tx: Transaction): Promise<void> {
  await tellOfNote("note.removed", { publicId: note.publicId, by }, tx);
  await notes.setRemoved(note.id, by.id, tx);
  await noteVersions.deleteAllByNote(note.id, tx);
  await noteReferences.replaceAllOfNote(note.id, [], tx);
  await notes.emptyBody(note.id, tx);
}

async function tellAdministrators(tx: Transaction): Promise<void> {
  const heading = "A note was reported";
  const words = {
    heading,
    parts: [
      {
        kind: "text" as const,
        text: "Somebody told the administrators of this site about a note. What it says is on the page only.",
      },
      { kind: "link" as const, label: "Reported notes", href: `${env.BASE_URL}/admin/reports` },
    ],
    footer: [{ kind: "text" as const, text: "This mail comes because you are an administrator." }],
  };
  for (const { id, email } of await people.findAdministrators(tx)) {
    if (email) await queueMail({ toAddress: email, userId: id, subject: heading, words }, tx);
  }
}
