import { eq } from "drizzle-orm";
import { beforeEach, describe, expect, it } from "vitest";
import * as blocks from "~/db/blocks.server";
import { db, inTransaction } from "~/db/client.server";
import { newPublicId } from "~/db/ids.server";
import * as outbox from "~/db/outbox.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import * as reports from "~/db/reports.server";
import * as schema from "~/db/schema";
import { closeAccount } from "~/services/closing.server";
import { listThread } from "~/services/note-thread.server";
import { writeNote } from "~/services/notes.server";
import { queueMail } from "~/services/outbox.server";
import { addMember, createProject, removeMember } from "~/services/projects.server";
import { closeReport, reportNote } from "~/services/reports.server";
import { findTokenHolder, makeToken } from "~/services/tokens.server";
import { tablesNaming } from "../tables-naming.ts";

let ada: people.User;
let bram: people.User;
let project: { id: number; publicId: string };

async function person(name: string, more: { administrator?: boolean } = {}): Promise<people.User> {
  const userName = `${name.toLowerCase()}-${newPublicId()}`;
  const email = `${userName}@fennmarsh.example`;
  const id = await people.insert({ userName, name: `${name} ${newPublicId()}`, email, ...more });
  await people.insertIdentity(id, "email", email);
  return (await people.findById(id)) as people.User;
}

beforeEach(async () => {
  ada = await person("Ada");
  bram = await person("Bram");
  project = await createProject(
    { title: "Reeds", summary: "", visibility: "private", ituRegion: null },
    ada.id,
  );
  await addMember(project.id, bram.userName, "commenter", ada.id);
});

const place = () => ({
  projectId: project.id,
  sweepId: null,
  dipId: null,
  trailId: null,
  stepId: null,
  benchId: null,
});
const asOwner = () => ({ person: ada, may: () => true });

function write(author: people.User, body: string, parentPublicId?: string) {
  return writeNote({ project, author, place: place(), body, parentPublicId });
}

async function words(): Promise<(string | null)[]> {
  const thread = await listThread(place(), asOwner());
  return thread
    .flatMap((note) => [note, ...note.replies])
    .map((note) =>
      note.removed ? null : `${note.author?.name}: ${note.html.replace(/<[^>]+>/g, "").trim()}`,
    );
}

describe("closing an account", () => {
  it("is refused while a project would be left without an owner, and says which", async () => {
    const answer = await closeAccount(ada.id, "stay");
    expect(answer).toMatchObject({
      kind: "owns",
      projects: [{ publicId: project.publicId, title: "Reeds" }],
    });
    expect((await people.findById(ada.id))?.closedAt).toBeNull();
    await projects.updateMember(project.id, bram.id, "owner");
    expect(await closeAccount(ada.id, "stay")).toEqual({ kind: "closed" });
  });

  it("lets two owners who close at once not both go", async () => {
    await projects.updateMember(project.id, bram.id, "owner");
    const answers = await Promise.all([closeAccount(ada.id, "stay"), closeAccount(bram.id, "stay")]);
    expect(answers.map((answer) => answer.kind).sort()).toEqual(["closed", "owns"]);
  });

  it("keeps the notes under a former member", async () => {
    await write(bram, "The choke helped.");
    await closeAccount(bram.id, "stay");
    expect(await words()).toEqual(["A former member: The choke helped."]);
  });

  it("or removes them: answered ones leave a stub, chains of one's own go whole", async () => {
    const first = await write(bram, "answered");
    await write(ada, "an answer", first.publicId);
    const chain = await write(bram, "alone");
    await write(bram, "with an answer of my own", chain.publicId);
    await closeAccount(bram.id, "go");
    expect(await words()).toEqual([null, `${ada.name}: an answer`]);
    const left = await db.select().from(schema.notes).where(eq(schema.notes.authorId, bram.id));
    expect(left.map((note) => note.body)).toEqual([""]);
  });

  it("leaves no name, address, session, token, membership or mail behind", async () => {
    const token = await makeToken(bram.id, "for a test", "read");
    await blocks.insert(ada.id, bram.id);
    const words = { heading: "Hello", parts: [], footer: [] };
    await inTransaction((tx) =>
      queueMail({ toAddress: bram.email ?? "", userId: bram.id, subject: "Hello", words }, tx),
    );
    await closeAccount(bram.id, "stay");
    expect(await findTokenHolder(token)).toBeUndefined();
    expect(await people.findByIdentity("email", bram.email ?? "")).toBeUndefined();
    expect(await people.findByUserName(bram.userName)).toBeUndefined();
    expect((await projects.findMembers(project.id)).map((row) => row.userId)).toEqual([ada.id]);
    expect((await outbox.findPage(["waiting"])).map((mail) => mail.toAddress)).not.toContain(bram.email);
    for (const secret of [bram.name, bram.userName]) expect(await tablesNaming(secret)).toEqual([]);
  });

  it("can't leave a site without an administrator", async () => {
    await db.update(schema.users).set({ administrator: false });
    const keeper = await person("Keeper", { administrator: true });
    expect(await closeAccount(keeper.id, "stay")).toEqual({ kind: "last-administrator" });
    await person("Second", { administrator: true });
    expect(await closeAccount(keeper.id, "stay")).toEqual({ kind: "closed" });
  });

  it("lets nobody add the one who is gone", async () => {
    await closeAccount(bram.id, "stay");
    const gone = await people.findById(bram.id);
    expect(await addMember(project.id, gone?.userName ?? "", "reader", ada.id)).toBe("unknown");
    expect(await removeMember(project.id, gone?.userName ?? "", ada.id)).toBe("not-a-member");
  });
});

describe("blocking", () => {
  it("folds the notes of the one away for the other, and lets nobody be added by whom they blocked", async () => {
    await write(ada, "one");
    await write(bram, "two");
    await blocks.insert(ada.id, bram.id);
    const seen = async (who: people.User) =>
      (await listThread(place(), { person: who, may: () => true })).map((note) => note.folded);
    expect(await seen(ada)).toEqual([false, true]);
    expect(await seen(bram)).toEqual([false, false]);
    const his = await createProject(
      { title: "Dike", summary: "", visibility: "private", ituRegion: null },
      bram.id,
    );
    expect(await addMember(his.id, ada.userName, "reader", bram.id)).toBe("unwilling");
    await blocks.deleteOne(ada.id, bram.id);
    expect(await addMember(his.id, ada.userName, "reader", bram.id)).toBe("added");
  });
});

describe("a reported note", () => {
  let keeper: people.User;
  let noteId: number;

  beforeEach(async () => {
    keeper = await person("Keeper", { administrator: true });
    const { publicId } = await write(bram, "Something rude");
    noteId = (await db.select().from(schema.notes).where(eq(schema.notes.publicId, publicId)))[0].id;
  });

  const report = (by: people.User) => reportNote({ note: { id: noteId }, by, reason: "Rude." });
  const open = async () => (await reports.findAll("open")).filter((row) => row.note.id === noteId);

  it("stands once for each who reports it, and the administrators get a mail without its words", async () => {
    expect(await report(ada)).toBe("done");
    expect(await report(ada)).toBe("already");
    const [{ report: row, note }] = await open();
    expect([row.reason, note.body]).toEqual(["Rude.", "Something rude"]);
    const mails = await db.select().from(schema.outbox).where(eq(schema.outbox.userId, keeper.id));
    expect(mails.map((mail) => mail.subject)).toEqual(["A note was reported"]);
    expect(mails[0].text).not.toMatch(/rude/i);
  });

  it.each([
    ["leave", ["Something rude"], false],
    ["remove", [], false],
    ["suspend", [], true],
  ] as const)("is decided for everybody: %s", async (outcome, left, suspended) => {
    await Promise.all([report(ada), report(keeper)]);
    const [{ report: row }] = await open();
    expect(await closeReport(row.publicId, outcome, keeper)).toBe("done");
    expect(await closeReport(row.publicId, outcome, keeper)).toBe("missing");
    expect(await open()).toEqual([]);
    const thread = await listThread(place(), asOwner());
    expect(thread.filter((note) => !note.removed).map((note) => note.body ?? note.html)).toHaveLength(
      left.length,
    );
    expect((await people.findById(bram.id))?.suspendedAt !== null).toBe(suspended);
    const closed = (await reports.findAll("closed")).filter((one) => one.note.id === noteId);
    expect(closed).toHaveLength(2);
  });
});
