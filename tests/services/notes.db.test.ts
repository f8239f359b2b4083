import { asc, eq } from "drizzle-orm";
import { beforeEach, describe, expect, it } from "vitest";
import { mayInProject, type ProjectRole } from "~/auth/permissions";
import * as benches from "~/db/benches.server";
import { db } from "~/db/client.server";
import { newPublicId } from "~/db/ids.server";
import * as noteVersions from "~/db/note-versions.server";
import * as noteRows from "~/db/notes.server";
import * as people from "~/db/people.server";
import { events, notes as noteTable } from "~/db/schema";
import * as steps from "~/db/steps.server";
import { IDEAL_STANDARDS, NOTHING_GIVEN } from "~/measurement/bench";
import { createBench } from "~/services/benches.server";
import { editNote, purgeNote, removeNote, restoreNote, revisionOf } from "~/services/note-changes.server";
import { MAX_NOTE_CHARACTERS } from "~/services/note-limits";
import { countNotes, listThread } from "~/services/note-thread.server";
import { NoteProblem, type WriteNote, writeNote } from "~/services/notes.server";
import { createProject } from "~/services/projects.server";
import { makeStep } from "~/services/steps.server";

let ada: { id: number };
let bram: { id: number };
let project: { id: number };
let place: noteRows.NotePlace;

beforeEach(async () => {
  const person = async (name: string) => ({
    id: await people.insert({ userName: `${name}-${newPublicId()}`, name, email: null }),
  });
  ada = await person("Ada");
  bram = await person("Bram");
  project = await newProject();
  place = { projectId: project.id, sweepId: null, dipId: null };
});

function newProject() {
  return createProject({ title: "Reeds", summary: "", visibility: "private", ituRegion: null }, ada.id);
}

function write(author: { id: number }, body: string, more: Partial<WriteNote> = {}) {
  return writeNote({ project, author, place, body, ...more });
}

function as(person: { id: number } | null, role: ProjectRole | null) {
  return { person, may: (action: Parameters<typeof mayInProject>[1]) => mayInProject(role, action) };
}

const asAda = () => as(ada, "owner");

describe("writeNote", () => {
  it("stores a note with line ends of one kind", async () => {
    await write(ada, "one\r\ntwo\r\n\r\n");
    const [note] = await listThread(place, asAda());
    expect(note.body).toBe("one\ntwo");
    expect(note.html).toBe("<p>one\ntwo</p>\n");
    expect(note.author?.name).toBe("Ada");
  });

  it.each(["", "  \n\t ", "\r\n"])("refuses %j and stores nothing", async (body) => {
    await expect(write(ada, body)).rejects.toThrow(NoteProblem);
    expect(await listThread(place, asAda())).toEqual([]);
  });

  it("takes as many characters as a note may have, and no more", async () => {
    await write(ada, "x".repeat(MAX_NOTE_CHARACTERS));
    await expect(write(ada, "x".repeat(MAX_NOTE_CHARACTERS + 1))).rejects.toThrow(/20001 characters/);
    expect(countNotes(await listThread(place, asAda()))).toBe(1);
  });

  it("keeps every character", async () => {
    await write(ada, "λ/4 ≈ 4,1 m 😀 \u0000 '\"\\");
    expect((await listThread(place, asAda()))[0].body).toBe("λ/4 ≈ 4,1 m 😀 \u0000 '\"\\");
  });

  it("stores what is sent twice once, also at the same time", async () => {
    const clientKey = crypto.randomUUID();
    const sent = await Promise.all(Array.from({ length: 6 }, () => write(ada, "once", { clientKey })));
    const again = await write(ada, "once", { clientKey });
    expect(new Set([...sent, again].map((note) => note.publicId)).size).toBe(1);
    expect(countNotes(await listThread(place, asAda()))).toBe(1);
  });

  it("tells the keys of two people apart", async () => {
    const clientKey = crypto.randomUUID();
    const first = await write(ada, "mine", { clientKey });
    const second = await write(bram, "mine too", { clientKey });
    expect(second.publicId).not.toBe(first.publicId);
  });

  it("lets many write at once", async () => {
    await Promise.all(Array.from({ length: 12 }, (_, i) => write(i % 2 ? ada : bram, `note ${i}`)));
    expect(countNotes(await listThread(place, asAda()))).toBe(12);
  });

  it("answers only what stands in the same place", async () => {
    const other = await newProject();
    const { publicId } = await write(ada, "here");
    const elsewhere = { ...place, projectId: other.id };
    await expect(
      write(bram, "no", { place: elsewhere, project: other, parentPublicId: publicId }),
    ).rejects.toThrow(NoteProblem);
    await expect(write(bram, "no", { parentPublicId: "nothing-there" })).rejects.toThrow(NoteProblem);
    expect(await listThread(elsewhere, asAda())).toEqual([]);
  });
});

describe("where a note stands", () => {
  const at = new Date("2026-05-01T12:00:00Z");

  it("keeps the threads of a step, a bench and the project apart", async () => {
    const made = await makeStep(
      { projectId: project.id, by: ada.id },
      { title: "More turns", body: "", state: "done", at, quantities: [] },
    );
    const step = made.kind === "kept" ? (await steps.findByPublicId(made.publicId))?.step : undefined;
    const details = {
      validFrom: at,
      remark: "",
      parts: [],
      standards: IDEAL_STANDARDS,
      given: NOTHING_GIVEN,
    };
    const { bench } = await createBench(
      project,
      ada,
      { name: "Bridge", description: "", own: "no" },
      details,
    );
    const on = {
      step: { ...place, stepId: step?.id ?? 0 },
      bench: { ...place, benchId: (await benches.findByPublicId(bench.publicId))?.bench.id ?? 0 },
      project: place,
    };
    const first = await write(ada, "on the step", { place: on.step });
    await write(ada, "on the bench", { place: on.bench });
    await write(ada, "on the project", { place: on.project });
    for (const [kind, there] of Object.entries(on)) {
      expect((await listThread(there, asAda())).map(({ html }) => text(html))).toEqual([`on the ${kind}`]);
    }
    await expect(write(bram, "no", { place: on.bench, parentPublicId: first.publicId })).rejects.toThrow(
      NoteProblem,
    );
    const told = await db
      .select({ kind: events.kind, about: events.about })
      .from(events)
      .where(eq(events.projectId, project.id))
      .orderBy(asc(events.id));
    expect(told.filter(({ kind }) => kind === "note.added").map(({ about }) => about.title)).toEqual([
      "the step More turns",
      "the bench Bridge",
      "the project",
    ]);
    expect(JSON.stringify(told)).not.toContain("on the step");
  });
});

describe("listThread", () => {
  it("puts every answer under the note that began it, oldest first", async () => {
    const first = await write(ada, "first");
    const second = await write(ada, "second");
    const answer = await write(bram, "to first", { parentPublicId: first.publicId });
    const deeper = await write(ada, "to the answer", { parentPublicId: answer.publicId });
    await write(bram, "to the deeper one", { parentPublicId: deeper.publicId });
    await write(bram, "to second", { parentPublicId: second.publicId });
    const thread = await listThread(place, asAda());
    expect(thread.map((note) => [text(note.html), note.replies.map((reply) => text(reply.html))])).toEqual([
      ["first", ["to first", "to the answer", "to the deeper one"]],
      ["second", ["to second"]],
    ]);
    expect(thread[0].replies.map((reply) => reply.answers)).toEqual([
      null,
      { publicId: answer.publicId, author: "Bram" },
      { publicId: deeper.publicId, author: "Ada" },
    ]);
    expect(countNotes(thread)).toBe(6);
  });

  it.each([
    ["owner", true, { mayEdit: false, mayRemove: true }],
    ["experimenter", true, { mayEdit: false, mayRemove: false }],
    ["reader", false, { mayEdit: false, mayRemove: false }],
  ] as const)("offers a %s what the role may do", async (role, writes, onOthers) => {
    await write(ada, "Ada's");
    await write(bram, "Bram's");
    const thread = await listThread(place, as(bram, role));
    expect(thread[0]).toMatchObject(onOthers);
    expect(thread[1]).toMatchObject({ mayEdit: writes, mayRemove: writes });
    expect(thread[0].body).toBeNull();
  });

  it("offers a visitor nothing", async () => {
    await write(ada, "Ada's");
    expect((await listThread(place, as(null, "reader")))[0]).toMatchObject({
      body: null,
      mayEdit: false,
      mayRemove: false,
    });
  });

  it("is empty where nothing was said", async () => {
    expect(await listThread(place, asAda())).toEqual([]);
  });
});

describe("editNote", () => {
  it("is for the author, and is seen", async () => {
    const { publicId } = await write(ada, "before");
    expect(await editNote({ project, notePublicId: publicId, by: bram, body: "no" })).toBe("refused");
    expect(await editNote({ project, notePublicId: publicId, by: ada, body: "after" })).toBe("done");
    const [note] = await listThread(place, asAda());
    expect(note.body).toBe("after");
    expect(note.editedAt).toBeInstanceOf(Date);
  });

  it("does not count the same text as a change", async () => {
    const { publicId } = await write(ada, "same");
    expect(await editNote({ project, notePublicId: publicId, by: ada, body: "same\r\n" })).toBe("done");
    expect((await listThread(place, asAda()))[0].editedAt).toBeNull();
  });

  it("keeps what it said, with from when to when", async () => {
    const at = (minute: number) => new Date(Date.UTC(2026, 4, 1, 12, minute));
    const { publicId } = await write(ada, "one", { createdAt: at(0) });
    const noteId = (await noteRows.findByPublicId(publicId))?.note.id ?? 0;
    await editNote({ project, notePublicId: publicId, by: ada, body: "two", at: at(1) });
    await editNote({ project, notePublicId: publicId, by: ada, body: "three", at: at(2) });
    expect(await noteVersions.findAllByNote(noteId)).toEqual([
      { body: "one", from: at(0), until: at(1), editedBy: "Ada" },
      { body: "two", from: at(1), until: at(2), editedBy: "Ada" },
    ]);
  });

  it("writes nothing over a change made in another window", async () => {
    const { publicId } = await write(ada, "one");
    const note = (await noteRows.findByPublicId(publicId))?.note;
    if (!note) throw new Error("The note is not there.");
    const revision = revisionOf(note);
    const edit = (body: string, wished: string) =>
      editNote({ project, notePublicId: publicId, by: ada, body, revision: wished, at: new Date(2027, 1) });
    expect(await edit("two", revision)).toBe("done");
    const refused = await edit("three", revision);
    expect(refused).toMatchObject({ changedSince: { body: "two" } });
    expect((await listThread(place, asAda()))[0].body).toBe("two");
    const now = typeof refused === "object" ? refused.changedSince.revision : "";
    expect(await edit("three", now)).toBe("done");
  });

  it("does not reach into another project", async () => {
    const { publicId } = await write(ada, "here");
    const other = await newProject();
    expect(await editNote({ project: other, notePublicId: publicId, by: ada, body: "no" })).toBe("missing");
    expect(await removeNote({ project: other, notePublicId: publicId, by: ada, mayModerate: true })).toBe(
      "missing",
    );
    expect(text((await listThread(place, asAda()))[0].html)).toBe("here");
  });

  it("keeps the text where the new one is empty", async () => {
    const { publicId } = await write(ada, "stays");
    await expect(editNote({ project, notePublicId: publicId, by: ada, body: " " })).rejects.toThrow(
      NoteProblem,
    );
    expect((await listThread(place, asAda()))[0].body).toBe("stays");
  });
});

describe("removeNote", () => {
  const remove = (notePublicId: string, by: { id: number }, mayModerate = false) =>
    removeNote({ project, notePublicId, by, mayModerate });
  const restore = (notePublicId: string, by: { id: number }) => restoreNote({ project, notePublicId, by });
  const later = () => new Date(Date.now() + 60_000);
  const bodyOf = async (publicId: string) => (await noteRows.findByPublicId(publicId))?.note.body;

  it("takes an unanswered note out of everybody's sight at once, and away for good later", async () => {
    const { publicId } = await write(bram, "gone");
    expect(await remove(publicId, ada)).toBe("refused");
    expect(await remove(publicId, bram)).toBe("done");
    expect(await remove(publicId, bram)).toBe("missing");
    expect(await listThread(place, asAda())).toEqual([]);
    await purgeNote(publicId);
    expect(await bodyOf(publicId)).toBe("gone");
    await purgeNote(publicId, later());
    expect(await noteRows.findByPublicId(publicId)).toBeUndefined();
    await purgeNote(publicId, later());
  });

  it("is for an owner too", async () => {
    const { publicId } = await write(bram, "gone");
    expect(await remove(publicId, ada, true)).toBe("done");
  });

  it("can be undone by who did it, and by nobody else", async () => {
    const { publicId } = await write(bram, "back again");
    await remove(publicId, ada, true);
    expect((await listThread(place, asAda()))[0]).toMatchObject({ html: "", body: null, mayRestore: true });
    expect(await listThread(place, as(bram, "commenter"))).toEqual([]);
    expect(await restore(publicId, bram)).toBe("refused");
    expect(await restore(publicId, ada)).toBe("done");
    expect(await restore(publicId, ada)).toBe("done");
    await purgeNote(publicId, later());
    expect((await listThread(place, as(bram, "commenter")))[0]).toMatchObject({ body: "back again" });
  });

  it("can't be undone when its time is over", async () => {
    const { publicId } = await write(bram, "gone");
    await remove(publicId, bram);
    await aged(publicId);
    expect(await listThread(place, as(bram, "commenter"))).toEqual([]);
    expect(await restore(publicId, bram)).toBe("too-late");
    await purgeNote(publicId);
    expect(await restore(publicId, bram)).toBe("too-late");
  });

  it("leaves a stub without text, name or versions where it was answered", async () => {
    const { publicId } = await write(bram, "secret");
    await editNote({ project, notePublicId: publicId, by: bram, body: "still secret" });
    const noteId = (await noteRows.findByPublicId(publicId))?.note.id ?? 0;
    await write(ada, "answer", { parentPublicId: publicId });
    expect(await remove(publicId, bram)).toBe("done");
    const [stub] = await listThread(place, asAda());
    expect(stub).toMatchObject({ removed: true, html: "", body: null, author: null, mayEdit: false });
    expect(stub.replies.map((reply) => text(reply.html))).toEqual(["answer"]);
    await purgeNote(publicId, later());
    expect(await bodyOf(publicId)).toBe("");
    expect(await noteVersions.findAllByNote(noteId)).toEqual([]);
    expect(await editNote({ project, notePublicId: publicId, by: bram, body: "back" })).toBe("missing");
  });

  it("takes stubs away with their last answer", async () => {
    const top = await write(bram, "top");
    const middle = await write(ada, "middle", { parentPublicId: top.publicId });
    const leaf = await write(bram, "leaf", { parentPublicId: middle.publicId });
    await remove(top.publicId, bram);
    await remove(middle.publicId, ada);
    expect(countNotes(await listThread(place, asAda()))).toBe(1);
    await remove(leaf.publicId, bram);
    expect(await listThread(place, as(null, "reader"))).toEqual([]);
    for (const { publicId } of [top, middle, leaf]) await purgeNote(publicId, later());
    expect(await noteRows.findByPublicId(top.publicId)).toBeUndefined();
  });

  it("never loses an answer that is written meanwhile", async () => {
    for (let round = 0; round < 25; round++) {
      const { publicId } = await write(ada, "question");
      const [answer] = await Promise.allSettled([
        write(bram, "answer", { parentPublicId: publicId }),
        remove(publicId, ada).then(() => purgeNote(publicId, later())),
      ]);
      const stored = answer.status === "fulfilled" && (await noteRows.findByPublicId(answer.value.publicId));
      if (answer.status === "fulfilled") expect(stored).toBeTruthy();
      else expect(answer.reason).toBeInstanceOf(NoteProblem);
    }
  });
});

/** As if the note had been removed a minute ago. */
async function aged(publicId: string): Promise<void> {
  const removedAt = new Date(Date.now() - 60_000);
  await db.update(noteTable).set({ removedAt }).where(eq(noteTable.publicId, publicId));
}

function text(html: string): string {
  return html.replace(/<[^>]*>/g, "").trim();
}
