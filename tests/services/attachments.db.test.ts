import { eq } from "drizzle-orm";
import sharp from "sharp";
import { beforeEach, describe, expect, it } from "vitest";
import { mayInProject, type ProjectRole } from "~/auth/permissions";
import * as attachments from "~/db/attachments.server";
import { db } from "~/db/client.server";
import { newPublicId } from "~/db/ids.server";
import * as people from "~/db/people.server";
import { jobs } from "~/db/schema";
import { addAttachment, dropUnsent, readAttachment } from "~/services/attachments.server";
import { purgeNote, removeNote } from "~/services/note-changes.server";
import { listThread } from "~/services/note-thread.server";
import { writeNote } from "~/services/notes.server";
import { createProject, deleteProject } from "~/services/projects.server";

let ada: { id: number };
let bram: { id: number };
let project: { id: number; publicId: string };
const place = () => ({ projectId: project.id, sweepId: null, dipId: null });

beforeEach(async () => {
  const person = async (name: string) => ({
    id: await people.insert({ userName: `${name}-${newPublicId()}`, name, email: null }),
  });
  ada = await person("Ada");
  bram = await person("Bram");
  const about = { title: "Reeds", summary: "", visibility: "private" as const, ituRegion: null };
  project = await createProject(about, ada.id);
});

const SWEEP = new TextEncoder().encode("# MHz S RI R 50\n7.0 0.5 0.1\n7.1 0.1 0.0\n");

/** A picture that says where it was taken. */
function photograph(): Promise<Uint8Array> {
  return sharp({ create: { width: 900, height: 600, channels: 3, background: "#7a9" } })
    .withExif({ IFD0: { Copyright: "a secret place" } })
    .jpeg()
    .toBuffer();
}

async function add(name: string, bytes: Uint8Array, by = ada) {
  const added = await addAttachment({ project, by, file: { name, bytes } });
  if (added.kind !== "added") throw new Error(added.message);
  return added;
}

async function html(person: { id: number } | null, role: ProjectRole): Promise<string> {
  const thread = await listThread(place(), { person, may: (action) => mayInProject(role, action) });
  return thread.map((note) => note.html).join("");
}

describe("attachments", () => {
  it("show a picture by copies that say nothing but the picture", async () => {
    const original = await photograph();
    expect(new TextDecoder("latin1").decode(original)).toContain("a secret place");
    const { publicId, markdown } = await add("mast [1].jpg", original);
    expect(markdown).toBe(`![mast \\[1\\].jpg](attachment:${publicId})`);
    const row = (await attachments.findByPublicId(publicId))?.attachment;
    if (!row) throw new Error("The file is not there.");
    for (const size of ["small", "shown"] as const) {
      const copy = await readAttachment(row, size);
      expect(new TextDecoder("latin1").decode(copy)).not.toContain("a secret place");
      expect((await sharp(copy).metadata()).exif).toBeUndefined();
    }
    expect(Buffer.from(await readAttachment(row, "file")).equals(original)).toBe(true);
    await writeNote({ project, author: ada, place: place(), body: markdown });
    const path = `/projects/${project.publicId}/attachments/${publicId}`;
    expect(await html(bram, "reader")).toContain(`<img src="${path}/small" alt="mast [1].jpg" width="900"`);
  });

  it("offer a sweep file to whoever may take it in", async () => {
    const { markdown } = await add("loop.s1p", SWEEP);
    await writeNote({ project, author: ada, place: place(), body: `Here: ${markdown}` });
    expect(await html(bram, "experimenter")).toContain("Take it in as a sweep");
    expect(await html(bram, "commenter")).not.toContain("Take it in as a sweep");
    expect(await html(bram, "commenter")).toContain("loop.s1p</a>");
  });

  it.each([
    ["nothing", new Uint8Array(), "It is empty."],
    [
      "a program",
      Uint8Array.from([0x7f, 0x45, 0x4c, 0x46, 0, 0, 0, 1]),
      "Notes take pictures and sweep files.",
    ],
    [
      "a drawing that can run",
      new TextEncoder().encode('<svg xmlns="http://www.w3.org/2000/svg" onload="alert(1)"/>'),
      null,
    ],
  ])("take %s only as what can't run", async (_, bytes, message) => {
    const added = await addAttachment({ project, by: ada, file: { name: "x.png", bytes } });
    if (message === null) {
      // Text, and never sent as anything but a download.
      const row = added.kind === "added" && (await attachments.findByPublicId(added.publicId));
      expect(row ? row.attachment : row).toMatchObject({ mediaType: "text/plain", shownKey: null });
    } else {
      expect(added).toMatchObject({ kind: "refused", message: expect.stringContaining(message) });
    }
  });

  it("are nobody else's until they are sent, and not taken into somebody else's note", async () => {
    const { publicId, markdown } = await add("loop.s1p", SWEEP);
    await writeNote({ project, author: bram, place: place(), body: markdown });
    expect(await html(bram, "experimenter")).toContain("not there any more");
    expect((await attachments.findByPublicId(publicId))?.attachment.noteId).toBeNull();
  });

  it("go after a day in no note, and with the note they are in", async () => {
    const [lost, kept] = [await add("lost.s1p", SWEEP), await add("kept.s1p", SWEEP)];
    const { publicId } = await writeNote({ project, author: ada, place: place(), body: kept.markdown });
    for (const one of [lost, kept]) await dropUnsent(one.publicId);
    expect(await attachments.findByPublicId(lost.publicId)).toBeUndefined();
    const row = (await attachments.findByPublicId(kept.publicId))?.attachment;
    await removeNote({ project, notePublicId: publicId, by: ada, mayModerate: false });
    await purgeNote(publicId, new Date(Date.now() + 60_000));
    expect(await attachments.findByPublicId(kept.publicId)).toBeUndefined();
    const due = await db.select().from(jobs).where(eq(jobs.kind, "delete-object"));
    expect(due.map(({ payload }) => (payload as { key: string }).key)).toContain(row?.storageKey);
  });

  it("go with their project", async () => {
    const { publicId } = await add("loop.s1p", SWEEP);
    const key = (await attachments.findByPublicId(publicId))?.attachment.storageKey;
    await deleteProject(project.id);
    const due = await db.select().from(jobs).where(eq(jobs.kind, "delete-object"));
    expect(due.map(({ payload }) => (payload as { key: string }).key)).toContain(key);
  });
});
