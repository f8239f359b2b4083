import { and, asc, eq, isNull } from "drizzle-orm";
import { beforeEach, describe, expect, it } from "vitest";
import { db } from "~/db/client.server";
import * as follows from "~/db/follows.server";
import { newPublicId } from "~/db/ids.server";
import * as mailChoices from "~/db/mail-choices.server";
import * as notices from "~/db/notices.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import { blocks, events, jobs, outbox } from "~/db/schema";
import * as steps from "~/db/steps.server";
import { sendDigests } from "~/services/digests.server";
import { inboxOf, openNotice } from "~/services/inbox.server";
import { isStillWanted } from "~/services/mail-wanted.server";
import { editNote } from "~/services/note-changes.server";
import { type WriteNote, writeNote } from "~/services/notes.server";
import { tellOf } from "~/services/notices.server";
import { addMember, createProject } from "~/services/projects.server";
import { makeStep } from "~/services/steps.server";
import { isWayOut, takeWayOut } from "~/services/unsubscribe.server";
import { changeVerdict } from "~/services/verdicts.server";
import { addBareDip } from "./bare-dip.ts";

interface Person {
  id: number;
  publicId: string;
  email: string;
}
let ada: Person;
let bram: Person;
let cleo: Person;
let project: projects.Project;
let step: { id: number; publicId: string };

async function person(name: string): Promise<Person> {
  const email = `${newPublicId()}@fennmarsh.example`;
  const id = await people.insert({ userName: `${name}-${newPublicId()}`, name, email });
  return { id, email, publicId: (await people.findById(id))?.publicId ?? "" };
}

beforeEach(async () => {
  [ada, bram, cleo] = [await person("ada"), await person("bram"), await person("cleo")];
  const made = await createProject(
    { title: "Reeds", summary: "", visibility: "public", ituRegion: null },
    ada.id,
  );
  await projects.insertMember(made.id, bram.id, "commenter");
  await projects.insertMember(made.id, cleo.id, "reader");
  project = (await projects.findWithRoleById(made.id, ada.id))?.project as projects.Project;
  const kept = await makeStep(
    { projectId: project.id, by: ada.id },
    { title: "More turns", body: "", state: "planned", at: null, quantities: [] },
  );
  const publicId = kept.kind === "kept" ? kept.publicId : "";
  step = { id: (await steps.findByPublicId(publicId))?.step.id ?? 0, publicId };
});

const write = (author: Person, body: string, more: Partial<WriteNote> = {}) =>
  writeNote({
    project,
    author,
    place: { projectId: project.id, sweepId: null, dipId: null, stepId: step.id },
    body,
    ...more,
  });

/** Tells of everything that happened in the project, twice. */
async function tellAll() {
  const rows = await db
    .select({ id: events.id })
    .from(events)
    .where(eq(events.projectId, project.id))
    .orderBy(asc(events.id));
  for (const { id } of [...rows, ...rows]) await tellOf(id);
}

/** Tells what a job was written for, as the background work does. */
async function tellDue() {
  const rows = await db.select({ id: events.id }).from(events).where(eq(events.projectId, project.id));
  const own = new Set(rows.map(({ id }) => id));
  const due = await db.select({ payload: jobs.payload }).from(jobs).where(eq(jobs.kind, "tell"));
  for (const { payload } of due) {
    const { event } = payload as { event: number };
    if (own.has(event)) await tellOf(event);
  }
}

const wordsOf = async (who: Person) =>
  (await inboxOf(who.id, {})).threads.flatMap(({ items }) => items.map(({ words }) => words));

const mailsTo = (who: Person) =>
  db.select().from(outbox).where(eq(outbox.toAddress, who.email)).orderBy(asc(outbox.id));

describe("tellOf", () => {
  it("tells who is named and who is answered, once, and never who did it", async () => {
    const { publicId } = await write(ada, `@x [@bram](person:${bram.publicId}) see this`);
    await write(bram, "seen", { parentPublicId: publicId });
    await tellAll();
    expect(await wordsOf(bram)).toEqual(["ada named you on the step More turns"]);
    expect(await wordsOf(ada)).toEqual(["bram answered you on the step More turns"]);
    expect(await wordsOf(cleo)).toEqual([]);
    expect(await mailsTo(bram)).toHaveLength(1);
  });

  it("tells whom a change of a note names, once, and nobody else", async () => {
    const named = `[@bram](person:${bram.publicId})`;
    await follows.set(cleo.id, project.id, { kind: "project", id: project.publicId }, false);
    const { publicId: notePublicId } = await write(ada, "look");
    const edit = (body: string) => editNote({ project, notePublicId, by: ada, body });
    await edit(`look, ${named}`);
    await edit(`look there, ${named}`);
    await edit("look there");
    await edit(`look here, ${named}`);
    await tellAll();
    expect(await wordsOf(bram)).toEqual(["ada named you on the step More turns"]);
    expect(await mailsTo(bram)).toHaveLength(1);
    expect(await wordsOf(cleo)).toEqual(["ada wrote on the step More turns"]);
    const later = await write(ada, `${named} one`);
    await tellAll();
    await editNote({ project, notePublicId: later.publicId, by: ada, body: `${named} two` });
    await tellAll();
    expect(await mailsTo(bram)).toHaveLength(2);
  });

  it("makes one notice of a verdict and of the note that says it", async () => {
    const dip = await addBareDip(project.id);
    await follows.set(bram.id, project.id, { kind: "dip", id: dip.publicId }, false);
    await follows.set(cleo.id, project.id, { kind: "project", id: project.publicId }, false);
    const details = `[@cleo](person:${cleo.publicId}) agrees`;
    const given = { dip, by: ada, intent: "propose" as const, was: "open" as const, details };
    expect(await changeVerdict({ ...given, text: "the braid" })).toBe("done");
    await tellDue();
    expect(await wordsOf(bram)).toEqual(["ada gave a verdict: the braid"]);
    expect(await wordsOf(cleo)).toEqual(["ada gave a verdict: the braid"]);
    expect((await inboxOf(bram.id, {})).threads[0].items[0].line).toContain("Verdict proposed: the braid");
    expect(await mailsTo(bram)).toHaveLength(1);
    expect(await follows.findByUser(ada.id, [{ kind: "dip", id: dip.publicId }])).toEqual(
      new Map([[`dip:${dip.publicId}`, false]]),
    );
  });

  it("tells who is added to a project by somebody, in the inbox and by mail", async () => {
    const dora = await person("dora");
    const userName = (await people.findById(dora.id))?.userName ?? "";
    expect(await addMember(project.id, userName, "reader", ada.id)).toBe("added");
    expect(await addMember(project.id, userName, "reader", ada.id)).toBe("already");
    expect(await wordsOf(dora)).toEqual(["ada added you to the project"]);
    const [mail, ...more] = await mailsTo(dora);
    expect(more).toEqual([]);
    expect(mail.subject).toBe("ada added you to the project Reeds");
    expect(mail.text).toContain(`/projects/${project.publicId}`);
    await mailChoices.set(bram.id, null, "none");
    await projects.deleteMember(project.id, bram.id);
    await addMember(project.id, (await people.findById(bram.id))?.userName ?? "", "reader", ada.id);
    expect(await wordsOf(bram)).toEqual(["ada added you to the project"]);
    expect(await mailsTo(bram)).toEqual([]);
  });

  it("tells authors what is said later where they wrote, and followers of the project all of it", async () => {
    await follows.set(cleo.id, project.id, { kind: "project", id: project.publicId }, false);
    await write(bram, "first");
    await write(ada, "second");
    await tellAll();
    expect(await wordsOf(bram)).toEqual(["ada wrote on the step More turns"]);
    expect((await wordsOf(cleo)).sort()).toEqual([
      "ada wrote on the step More turns",
      "bram wrote on the step More turns",
    ]);
  });

  it("keeps still where it is muted or blocked, even when named", async () => {
    const named = `[@bram](person:${bram.publicId}) [@cleo](person:${cleo.publicId})`;
    await follows.set(bram.id, project.id, { kind: "step", id: step.publicId }, true);
    await db.insert(blocks).values({ blockerId: cleo.id, blockedId: ada.id, at: new Date() });
    await write(ada, named);
    await tellAll();
    expect([await wordsOf(bram), await wordsOf(cleo)]).toEqual([[], []]);
  });

  it("tells nobody who is no member at that moment, and shows nothing to who is none later", async () => {
    await write(ada, `[@bram](person:${bram.publicId}) one`);
    await tellAll();
    expect(await notices.countUnread(bram.id)).toBe(1);
    const [mail] = await mailsTo(bram);
    expect(await isStillWanted(mail.onceKey ?? "", bram.email)).toBe(true);
    await projects.deleteMember(project.id, bram.id);
    await write(ada, `[@bram](person:${bram.publicId}) two`);
    await tellAll();
    expect([await wordsOf(bram), await notices.countUnread(bram.id)]).toEqual([[], 0]);
    expect(await isStillWanted(mail.onceKey ?? "", bram.email)).toBe(false);
    expect(await mailsTo(bram)).toHaveLength(1);
  });
});

describe("the inbox", () => {
  it("puts what is unread first, and opening a thread reads all of it", async () => {
    await write(bram, "here");
    await write(ada, "one");
    await write(ada, "two");
    await write(ada, `[@bram](person:${bram.publicId})`, {
      place: { projectId: project.id, sweepId: null, dipId: null },
    });
    await tellAll();
    const { threads } = await inboxOf(bram.id, {});
    expect(threads.map(({ title, unread }) => [title, unread])).toEqual([
      ["the project", 1],
      ["the step More turns", 2],
    ]);
    expect(await openNotice(cleo.id, threads[1].publicId)).toBeUndefined();
    expect(await openNotice(bram.id, threads[0].publicId)).toMatch(/^\/projects\/\w+\/notes\/\w+$/);
    expect((await inboxOf(bram.id, {})).threads.map(({ unread }) => unread)).toEqual([2, 0]);
    await notices.setRead(bram.id, { project: project.publicId });
    expect(await notices.countUnread(bram.id)).toBe(0);
  });
});

describe("mails", () => {
  it("carry the note, the way to answer it, and a way out that needs no signing in", async () => {
    await write(ada, `[@bram](person:${bram.publicId}) <b>look</b> at *this*`);
    await tellAll();
    const [mail] = await mailsTo(bram);
    expect(mail.subject).toBe("ada named you on the step More turns");
    expect(mail.text).toMatch(/> @bram <b>look<\/b> at this/);
    expect(mail.text).toMatch(/\/projects\/\w+\/notes\/\w+/);
    expect(mail.html).toContain("<em>this</em>");
    expect(mail.html).not.toContain("<b>look");
    const token = /\/unsubscribe\/([\w-]+)>/.exec(mail.headers["List-Unsubscribe"])?.[1] ?? "";
    expect(mail.headers["List-Unsubscribe-Post"]).toBe("List-Unsubscribe=One-Click");
    expect(await isWayOut(token)).toBe(true);
    expect([await takeWayOut(token, "project"), await takeWayOut(token, "project")]).toEqual([
      "done",
      "done",
    ]);
    expect(await takeWayOut(`${token}x`, "all")).toBe("missing");
    await write(ada, `[@bram](person:${bram.publicId}) again`);
    await tellAll();
    expect(await mailsTo(bram)).toHaveLength(1);
    expect(await isStillWanted(mail.onceKey ?? "", bram.email)).toBe(false);
    expect(await notices.countUnread(bram.id)).toBe(2);
  });

  it.each([
    ["hourly", 60 * 60 * 1000],
    ["daily", 24 * 60 * 60 * 1000],
  ] as const)("come %s as one, of what was not read, whoever asks how often", async (mode, laterMs) => {
    await mailChoices.set(bram.id, project, mode);
    await write(bram, "here");
    for (const body of ["one", "two", "three"]) await write(ada, body);
    await tellAll();
    await sendDigests(new Date(Date.now() - laterMs));
    expect(await mailsTo(bram)).toEqual([]);
    const later = new Date(Date.now() + laterMs);
    await Promise.all([sendDigests(later), sendDigests(later), sendDigests(later)]);
    const [mail, ...more] = await mailsTo(bram);
    expect([mail.subject, more.length]).toEqual(["3 things in Reeds", 0]);
    expect(mail.text).toMatch(/> one[\s\S]+> two[\s\S]+> three/);
    await projects.deleteMember(project.id, bram.id);
    expect(await isStillWanted(mail.onceKey ?? "", bram.email)).toBe(false);
  });

  it("do not come where none is wanted, nor to an address that is another one now", async () => {
    await mailChoices.set(bram.id, null, "none");
    await write(ada, `[@bram](person:${bram.publicId})`);
    await tellAll();
    await sendDigests(new Date(Date.now() + 1e9));
    expect(await mailsTo(bram)).toEqual([]);
    await mailChoices.set(bram.id, project, "once");
    await write(ada, `[@bram](person:${bram.publicId}) but here`);
    await tellAll();
    const [mail] = await mailsTo(bram);
    await people.update(bram.id, { email: `${newPublicId()}@fennmarsh.example` });
    expect(await isStillWanted(mail.onceKey ?? "", bram.email)).toBe(false);
    expect(await isStillWanted("code:1", bram.email)).toBe(true);
    expect(await db.$count(outbox, and(eq(outbox.userId, bram.id), isNull(outbox.onceKey)))).toBe(0);
  });
});
