import { beforeEach, describe, expect, it } from "vitest";
import { mayInProject, type ProjectRole } from "~/auth/permissions";
import { newPublicId } from "~/db/ids.server";
import * as noteRows from "~/db/notes.server";
import * as people from "~/db/people.server";
import { MAX_NOTE_CHARACTERS } from "~/services/note-limits";
import {
  countNotes,
  editNote,
  listThread,
  NoteProblem,
  removeNote,
  type WriteNote,
  writeNote,
} from "~/services/notes.server";
import { createProject } from "~/services/projects.server";

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

  it("takes an unanswered note away", async () => {
    const { publicId } = await write(bram, "gone");
    expect(await remove(publicId, ada)).toBe("refused");
    expect(await remove(publicId, bram)).toBe("done");
    expect(await remove(publicId, bram)).toBe("missing");
    expect(await listThread(place, asAda())).toEqual([]);
  });

  it("is for an owner too", async () => {
    const { publicId } = await write(bram, "gone");
    expect(await remove(publicId, ada, true)).toBe("done");
  });

  it("leaves a stub without text or name where it was answered", async () => {
    const { publicId } = await write(bram, "secret");
    await write(ada, "answer", { parentPublicId: publicId });
    expect(await remove(publicId, bram)).toBe("done");
    const [stub] = await listThread(place, asAda());
    expect(stub).toMatchObject({ removed: true, html: "", body: null, author: null, mayEdit: false });
    expect(stub.replies.map((reply) => text(reply.html))).toEqual(["answer"]);
    expect((await noteRows.findByPublicId(publicId))?.note.body).toBe("");
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
    expect(await listThread(place, asAda())).toEqual([]);
  });

  it("never loses an answer that is written meanwhile", async () => {
    for (let round = 0; round < 25; round++) {
      const { publicId } = await write(ada, "question");
      const [answer] = await Promise.allSettled([
        write(bram, "answer", { parentPublicId: publicId }),
        remove(publicId, ada),
      ]);
      const stored = answer.status === "fulfilled" && (await noteRows.findByPublicId(answer.value.publicId));
      if (answer.status === "fulfilled") expect(stored).toBeTruthy();
      else expect(answer.reason).toBeInstanceOf(NoteProblem);
    }
  });
});

function text(html: string): string {
  return html.replace(/<[^>]*>/g, "").trim();
}
