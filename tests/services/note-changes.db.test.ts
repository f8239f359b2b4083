import { eq } from "drizzle-orm";
import { beforeEach, describe, expect, it } from "vitest";
import { db } from "~/db/client.server";
import * as noteVersions from "~/db/note-versions.server";
import * as noteRows from "~/db/notes.server";
import { notes as noteTable } from "~/db/schema";
import { editNote, purgeNote, removeNote, restoreNote, revisionOf } from "~/services/note-changes.server";
import { countNotes, listThread } from "~/services/note-thread.server";
import { NoteProblem } from "~/services/notes.server";
import { ada, as, asAda, begin, bram, newProject, place, project, text, write } from "./note-writers.ts";

beforeEach(begin);

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
