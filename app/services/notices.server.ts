import { inTransaction, type Transaction } from "~/db/client.server";
import * as follows from "~/db/follows.server";
import * as noteVersions from "~/db/note-versions.server";
import * as notes from "~/db/notes.server";
import * as notices from "~/db/notices.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import type { EventAbout } from "~/db/schema";
import { subjectsIn } from "./markdown-links.ts";
import { mailAtOnce } from "./notice-mails.server.ts";

type Found = NonNullable<Awaited<ReturnType<typeof notices.findEvent>>>;

/**
 * An event becomes lines in inboxes, and mails for those who want them at once: for who is named or answered, and for who
 * follows what it is about, if they are members at this moment. Harmless to run twice.
 */
export async function tellOf(eventId: number, now = new Date()): Promise<void> {
  const found = await notices.findEvent(eventId);
  if (!found || now.getTime() - found.event.at.getTime() > OLD_MS) return;
  const { about, kind } = found.event;
  const stored = about.note ? (await notes.findByPublicId(about.note))?.note : undefined;
  const note = stored?.removedAt ? undefined : stored;
  if (kind.startsWith("note.") && !note) return;
  await inTransaction(async (tx) => {
    const subjects = await subjectsOf(about, found.project.publicId, tx);
    await letAuthorFollow(found, subjects[0], tx);
    const said = await follows.findAllOn(found.project.id, subjects, tx);
    const muted = new Set(said.filter((one) => one.muted).map(({ userId }) => userId));
    const reasons = new Map<number, notices.NoticeReason>();
    const followed = said.filter((one) => one.at <= found.event.at);
    if (kind === "note.edited" && note) {
      for (const userId of await newlyNamed(note, found.event.at, tx)) reasons.set(userId, "mention");
    } else {
      for (const { userId } of followed) reasons.set(userId, kind === "verdict.given" ? "verdict" : "follow");
      if (note) for (const [userId, reason] of await calledBy(note, tx)) reasons.set(userId, reason);
    }
    if (kind === "mention.found") {
      // It waits for an owner's word, and nobody else has anything to do with it.
      reasons.clear();
      const members = await projects.findMembers(found.project.id, tx);
      for (const { userId, role } of members) if (role === "owner") reasons.set(userId, "follow");
    }
    const wanted = [...reasons.keys()].filter((userId) => !muted.has(userId));
    const hearers = await notices.findHearers(found.project.id, wanted, found.event.actorId, tx);
    const made = await notices.insertNew(
      hearers.map(({ id }) => ({
        userId: id,
        projectId: found.project.id,
        eventId,
        noteId: note?.id ?? null,
        reason: reasons.get(id) ?? "follow",
      })),
      tx,
    );
    await mailAtOnce(found.project, hearers, made, tx);
  });
}

/** Narrowest first; the project, which holds them all, last. */
async function subjectsOf(about: EventAbout, project: string, tx: Transaction): Promise<follows.Subject[]> {
  const trail = about.trail ?? (about.dip ? await follows.findTrailOfDip(about.dip, tx) : undefined);
  const { dip, step, bench, sweep } = about;
  const named = Object.entries({ dip, trail, step, bench, sweep, project });
  return named.flatMap(([kind, id]) => (id ? [{ kind: kind as follows.FollowKind, id }] : []));
}

/** Whom a change of the text names who was not named before it and was never told that the note names them. */
async function newlyNamed(note: notes.NoteRow, at: Date, tx: Transaction): Promise<number[]> {
  const before = new Set(subjectsIn((await noteVersions.findLastUntil(note.id, at, tx))?.body ?? ""));
  const told = new Set(await notices.findNamed(note.id, tx));
  const named = await peopleIn(
    subjectsIn(note.body).filter((subject) => !before.has(subject)),
    tx,
  );
  return named.filter((userId) => !told.has(userId));
}

/** Who writes in a thread hears what is said in it from then on; a word on the whole project is no such wish. */
async function letAuthorFollow({ event, project }: Found, thread: follows.Subject, tx: Transaction) {
  const wrote = event.kind === "note.added" || (event.kind === "verdict.given" && event.about.note);
  if (!wrote || event.actorId === null || thread.kind === "project") return;
  await follows.setUnlessSaid(event.actorId, project.id, thread, event.at, tx);
}

/** Who is answered, and who is named, which counts for more. */
async function calledBy(note: notes.NoteRow, tx: Transaction): Promise<[number, notices.NoticeReason][]> {
  const called: [number, notices.NoticeReason][] = [];
  const parent = note.parentId ? await notes.lock(note.parentId, tx) : undefined;
  if (parent?.authorId) called.push([parent.authorId, "reply"]);
  for (const userId of await peopleIn(subjectsIn(note.body), tx)) called.push([userId, "mention"]);
  return called;
}

async function peopleIn(subjects: Iterable<string>, tx: Transaction): Promise<number[]> {
  const found: number[] = [];
  for (const subject of subjects) {
    const [kind, publicId] = subject.split(":");
    const person = kind === "person" ? await people.findByPublicId(publicId, tx) : undefined;
    if (person) found.push(person.id);
  }
  return found;
}

/** What is written down for an earlier time is no news. */
const OLD_MS = 2 * 24 * 60 * 60 * 1000;
