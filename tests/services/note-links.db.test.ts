import { beforeEach, describe, expect, it } from "vitest";
import { mayInProject } from "~/auth/permissions";
import * as dips from "~/db/dips.server";
import { newPublicId } from "~/db/ids.server";
import * as noteReferences from "~/db/note-references.server";
import * as notes from "~/db/notes.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import * as sweeps from "~/db/sweeps.server";
import { DEFAULT_SETTINGS } from "~/measurement/sweep";
import { takeIn } from "~/services/intake.server";
import { editNote } from "~/services/note-changes.server";
import { expandNote, loadLinks } from "~/services/note-links.server";
import { listThread } from "~/services/note-thread.server";
import { writeNote } from "~/services/notes.server";
import { createProject } from "~/services/projects.server";
import { deleteSweep, keepSettings } from "~/services/sweep-edits.server";

let ada: { id: number };
let bram: { id: number; userName: string; publicId: string };
let project: { id: number; publicId: string };

beforeEach(async () => {
  ada = { id: await people.insert({ userName: `ada-${newPublicId()}`, name: "Ada", email: null }) };
  const id = await people.insert({ userName: `bram-${newPublicId()}`, name: "Bram Sedge", email: null });
  const user = await people.findById(id);
  if (!user) throw new Error("Bram is not there.");
  bram = user;
  project = await newProject();
  await projects.insertMember(project.id, bram.id, "commenter");
});

function newProject() {
  return createProject({ title: "Reeds", summary: "", visibility: "private", ituRegion: null }, ada.id);
}

/** Invented: one hollow of 20 dB at 7.1 MHz, S11 in dB. */
function sweepFile(): Uint8Array {
  const lines = ["Frequency (MHz),S11 (dB)"];
  for (let mhz = 6; mhz <= 8.2; mhz += 0.01) {
    lines.push(`${mhz.toFixed(3)},${(-0.3 - 20 / (1 + (20 * (mhz / 7.1 - 7.1 / mhz)) ** 2)).toFixed(4)}`);
  }
  return new TextEncoder().encode(lines.join("\n"));
}

async function swept(where: { id: number; publicId: string }, title: string) {
  const taken = await takeIn({
    project: where,
    by: ada,
    file: { name: "a.csv", bytes: sweepFile() },
    title,
    keepUnread: false,
  });
  if (taken.kind !== "read") throw new Error(`The file was not read: ${taken.kind}.`);
  const found = await sweeps.findByPublicId(taken.sweepPublicId);
  if (!found) throw new Error("The sweep is not there.");
  const [{ dip }] = await dips.findAllBySweep(found.sweep.id);
  return { found, sweep: found.sweep.publicId, dip: dip.publicId };
}

const place = () => ({ projectId: project.id, sweepId: null, dipId: null });
const thread = async () =>
  (await listThread(place(), { person: ada, may: (action) => mayInProject("owner", action) }))[0];

describe("mentions", () => {
  it("name members, follow their names, and nobody else", async () => {
    await writeNote({ project, author: ada, place: place(), body: `Look @${bram.userName}, and @nobody` });
    expect((await thread()).body).toBe(`Look [@Bram Sedge](person:${bram.publicId}), and @nobody`);
    await people.update(bram.id, { name: "Bram *Reed*" });
    expect((await thread()).html).toContain('<span class="mention">@Bram *Reed*</span>, and @nobody');
    await projects.deleteMember(project.id, bram.id);
    expect((await thread()).html).toBe("<p>Look @Bram Sedge, and @nobody</p>\n");
  });

  it("leave code and addresses alone", async () => {
    const written = `\`@${bram.userName}\` x@${bram.userName}.example\n\n\`\`\`\n@${bram.userName}\n\`\`\``;
    expect(await expandNote(project.id, written)).toEqual({ body: written, references: [], mentioned: [] });
  });

  it("are told to who sends them out", async () => {
    const { mentioned } = await expandNote(project.id, `@${bram.userName} @${bram.userName.toUpperCase()}`);
    expect(mentioned).toEqual([bram.publicId]);
  });
});

describe("references", () => {
  it("keep the words of when they were written, and show those of now", async () => {
    const { dip, found } = await swept(project, "Before [the] choke");
    await writeNote({ project, author: ada, place: place(), body: `See #dip:${dip}.` });
    const first = await thread();
    expect(first.body).toMatch(
      new RegExp(
        `^See \\[7\\.\\d+.MHz, SWR [\\d.]+.*Before \\\\\\[the\\\\\\] choke\\]\\(dip:${dip}\\)\\.$`,
        "u",
      ),
    );
    const now = /now: ([^<]*)</.exec(first.html)?.[1];
    await sweeps.update(found.sweep.id, { title: "After the choke" });
    const later = await thread();
    expect(later.body).toBe(first.body);
    expect(later.html).toContain("now: 7.");
    expect(/now: ([^<]*)</.exec(later.html)?.[1]).not.toBe(now);
    expect(later.html).toContain(`href="/projects/${project.publicId}/dips/${dip}"`);
  });

  it("keep their words through an edit, and can't be given other ones", async () => {
    const { sweep, found } = await swept(project, "One");
    const { publicId } = await writeNote({ project, author: ada, place: place(), body: `#sweep:${sweep}` });
    await sweeps.update(found.sweep.id, { title: "Two" });
    const body = `[SWR 1.0](sweep:${sweep}) again`;
    await editNote({ project, notePublicId: publicId, by: ada, body });
    expect((await thread()).body).toBe(`[One (1 dip)](sweep:${sweep}) again`);
    const id = (await notes.findByPublicId(publicId))?.note.id ?? 0;
    expect(await noteReferences.findAllByNote(id)).toMatchObject([{ kind: "sweep", text: "One (1 dip)" }]);
    await editNote({ project, notePublicId: publicId, by: ada, body: "nothing" });
    expect(await noteReferences.findAllByNote(id)).toEqual([]);
  });

  it("say nothing of another project", async () => {
    const other = await newProject();
    const { dip, sweep } = await swept(other, "A secret title");
    const written = `#dip:${dip} [x](sweep:${sweep})`;
    const expanded = await expandNote(project.id, written);
    expect(expanded).toEqual({ body: written, references: [], mentioned: [] });
    const links = await loadLinks(project.id, [written, `[y](dip:${dip})`], {
      person: ada,
      may: () => true,
    });
    expect(links.references.size).toBe(0);
  });

  it("stay as they were written when what they name is gone", async () => {
    const { dip, found } = await swept(project, "Gone");
    await writeNote({ project, author: ada, place: place(), body: `#dip:${dip}` });
    await keepSettings(found, { ...DEFAULT_SETTINGS, minimumProminenceDb: 60 }, ada.id);
    await deleteSweep(found, ada.id);
    const { html } = await thread();
    expect(html).toContain('<span class="reference">7.');
    expect(html).not.toContain("<a ");
  });
});
