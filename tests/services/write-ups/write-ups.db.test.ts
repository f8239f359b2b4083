import { beforeEach, describe, expect, it, vi } from "vitest";
import * as activity from "~/db/activity.server";
import * as dips from "~/db/dips.server";
import { newPublicId } from "~/db/ids.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import * as sweeps from "~/db/sweeps.server";
import * as writeUps from "~/db/write-ups.server";
import { takeIn } from "~/services/intake.server";
import { createProject } from "~/services/projects.server";
import { deleteSweep } from "~/services/sweep-edits.server";
import { changeDraft, deleteDraft, makeDraft } from "~/services/write-ups/drafts.server";
import { drawWriteUpFeed } from "~/services/write-ups/feed.server";
import * as loading from "~/services/write-ups/figures.server";
import { publish, revisionOf, takeBack } from "~/services/write-ups/publish.server";
import { drawElsewhere, drawPage, seek } from "~/services/write-ups/published.server";

let by: { id: number };
let project: projects.Project;
let sweep: sweeps.FoundSweep;
let dip: string;

beforeEach(async () => {
  by = { id: await people.insert({ userName: `writer-${newPublicId()}`, name: "Ada Marsh", email: null }) };
  project = await newProject("Reed loop");
  sweep = await take(project, "Before");
  dip = (await dips.findAllBySweep(sweep.sweep.id))[0].dip.publicId;
});

describe("a draft", () => {
  it("keeps figures as they were written and names what it speaks of", async () => {
    const publicId = await draft(
      `See #dip:${dip}.\n\n![a](#dip:${dip})\n\n[b](#sweep:${sweep.sweep.publicId})`,
    );
    const { writeUp } = await row(publicId);
    expect(writeUp.body).toMatch(new RegExp(`^See \\[.*SWR .*, Before\\]\\(dip:${dip}\\)\\.`));
    expect(writeUp.body).toContain(`![a](#dip:${dip})`);
    expect(writeUp.body).toContain(`[b](#sweep:${sweep.sweep.publicId})`);
  });

  it("names what it speaks of at the end of a long text too", async () => {
    const publicId = await draft(`${"word ".repeat(5000)}\n\nSee #dip:${dip}.`);
    expect((await row(publicId)).writeUp.body).toMatch(new RegExp(`See \\[.*\\]\\(dip:${dip}\\)\\.$`));
  });

  it("keeps what two people changed, and asks where both changed the same", async () => {
    const { writeUp } = await row(await draft("One."));
    const was = { title: "Title", body: "One." };
    expect(await changeDraft(writeUp.id, project, was, { title: "Another title", body: "One." })).toEqual({
      kind: "kept",
    });
    expect(await changeDraft(writeUp.id, project, was, { title: "Title", body: "Two." })).toEqual({
      kind: "kept",
    });
    expect((await row(writeUp.publicId)).writeUp).toMatchObject({ title: "Another title", body: "Two." });
    const third = await changeDraft(writeUp.id, project, was, { title: "Title", body: "Three." });
    expect(third.kind === "conflict" && third.conflict.asked).toEqual([
      { name: "body", mine: "Three.", theirs: "Two." },
    ]);
    expect((await row(writeUp.publicId)).writeUp.body).toBe("Two.");
  });

  it("is nothing to anybody outside, and can be deleted while it never was published", async () => {
    const { writeUp } = await row(await draft("One."));
    expect((await seek(writeUp.publicId, null)).kind).toBe("absent");
    expect(await deleteDraft(writeUp.id)).toBe("removed");
    expect(await writeUps.findByPublicId(writeUp.publicId)).toBeUndefined();
  });
});

describe("a published version", () => {
  it("says the same after everything that it shows was changed, renamed and deleted", async () => {
    const publicId = await draft(
      `![The sweep](#sweep:${sweep.sweep.publicId})\n\n![The dip](#dip:${dip})\n\nIt is #dip:${dip}.`,
    );
    await publishNow(publicId);
    const before = await page(publicId);
    expect(before).toContain("<svg");
    expect(before).toContain("Lowest SWR");
    await sweeps.update(sweep.sweep.id, { title: "A secret name" });
    await deleteSweep(sweep, by.id);
    await changeDraft((await row(publicId)).writeUp.id, project, {}, { title: "New", body: "New." });
    const again = await page(publicId, "1");
    expect(again).toBe(before);
    expect(again).not.toContain("A secret name");
  });

  it("tells whoever may not open the project nothing beside what was published", async () => {
    const publicId = await draft(`![The dip](#dip:${dip})\n\nIt is #dip:${dip}.`);
    await publishNow(publicId);
    const sought = await seek(publicId, null);
    if (sought.kind !== "shown") throw new Error(sought.kind);
    const outside = (await drawPage(sought.publication, null)).html;
    expect(outside).not.toContain(`/projects/${project.publicId}`);
    expect(outside).not.toContain("now:");
    const inside = await drawPage(sought.publication, { person: null, may: () => true });
    expect(inside.html).toContain(`/projects/${project.publicId}/dips/${dip}`);
  });

  it("shows nothing of another project", async () => {
    const other = await newProject("A private bench");
    const secret = await take(other, "Never shown");
    const publicId = await draft(
      `![x](#sweep:${secret.sweep.publicId})\n\nSee #sweep:${secret.sweep.publicId}.`,
    );
    await publishNow(publicId);
    const text = await page(publicId);
    expect(text).toContain("There is no such figure");
    expect(text).not.toContain("Never shown");
  });

  it("draws no more figures than a page shows", async () => {
    const load = vi.spyOn(loading, "loadFigures");
    const lines = Array.from({ length: 60 }, (_, i) => `![a](#plate:none${i})`);
    await publishNow(await draft(lines.join("\n\n")));
    expect(load.mock.calls.at(-1)?.[1]).toHaveLength(40);
    load.mockRestore();
  });

  it("is followed by the next, and stays at its number", async () => {
    const publicId = await draft("First words.");
    expect(await publishNow(publicId)).toEqual({ kind: "published", number: 1 });
    expect(await publishNow(publicId)).toEqual({ kind: "same-as-published" });
    const { writeUp } = await row(publicId);
    await changeDraft(writeUp.id, project, {}, { title: "Title", body: "Second words." });
    expect(await publishNow(publicId, "Put right.")).toEqual({ kind: "published", number: 2 });
    expect(await page(publicId)).toContain("Second words.");
    expect(await page(publicId, "1")).toContain("First words.");
    expect((await seek(publicId, "3")).kind).toBe("absent");
    expect((await seek(publicId, "one")).kind).toBe("absent");
    expect((await writeUps.findVersions(writeUp.id)).map(({ remark }) => remark)).toEqual(["Put right.", ""]);
  });

  it("is not published over words that nobody looked at", async () => {
    const { writeUp } = await row(await draft("First words."));
    const revision = revisionOf(writeUp);
    await changeDraft(writeUp.id, project, {}, { title: "Title", body: "Other words." });
    expect(await publish(writeUp, project, by, { revision, remark: "" })).toEqual({ kind: "changed-since" });
    expect(await writeUps.findLastNumber(writeUp.id)).toBe(0);
  });

  it("is taken back with all its versions, can't be deleted, and can be published again", async () => {
    const publicId = await draft("Words.");
    await publishNow(publicId);
    const { writeUp } = await row(publicId);
    expect(await takeBack(writeUp, by)).toBe(true);
    expect(await takeBack(writeUp, by)).toBe(false);
    expect((await seek(publicId, null)).kind).toBe("taken-back");
    expect((await seek(publicId, "1")).kind).toBe("taken-back");
    expect(await deleteDraft(writeUp.id)).toBe("published-once");
    expect(await publishNow(publicId)).toEqual({ kind: "published", number: 2 });
    expect((await seek(publicId, "1")).kind).toBe("shown");
  });

  it("two who publish at once make two versions or one, never one number twice", async () => {
    const publicId = await draft("Words.");
    const outcomes = await Promise.all([publishNow(publicId), publishNow(publicId), publishNow(publicId)]);
    const numbers = outcomes.flatMap((one) => (one.kind === "published" ? [one.number] : []));
    expect(numbers).toEqual([1]);
  });

  it("stands in the account of the project and in its feed", async () => {
    const publicId = await draft("## Head\n\nFirst words & more.");
    await publishNow(publicId);
    await takeBack((await row(publicId)).writeUp, by);
    await publishNow(publicId);
    await draft("Never published.");
    const kinds = (await activity.findPage(project.id, { limit: 3 })).map(({ kind, about }) => [
      kind,
      about.writeUp,
    ]);
    expect(kinds).toEqual([
      ["write-up.published", publicId],
      ["write-up.taken-back", publicId],
      ["write-up.published", publicId],
    ]);
    const feed = await drawWriteUpFeed(project);
    expect(feed.match(/<entry>/g)).toHaveLength(1);
    expect(feed).toContain(`/write-ups/${publicId}"/>`);
    expect(feed).toContain("<summary>First words &#38; more.</summary>");
  });
});

async function newProject(title: string): Promise<projects.Project> {
  const made = await createProject({ title, summary: "", visibility: "private", ituRegion: 1 }, by.id);
  const found = await projects.findWithRole(made.publicId, by.id);
  if (!found) throw new Error("The project is not there.");
  return found.project;
}

async function take(of: projects.Project, title: string): Promise<sweeps.FoundSweep> {
  const file = { name: `${title}.csv`, bytes: sweepFile() };
  const taken = await takeIn({ project: of, by, file, title, takenAt: new Date(), keepUnread: false });
  if (taken.kind !== "read") throw new Error(`${title}: ${taken.kind}`);
  return (await sweeps.findByPublicId(taken.sweepPublicId)) as sweeps.FoundSweep;
}

let files = 0;

/** Invented: S11 in dB with a dip at 7.1 MHz. */
function sweepFile(): Uint8Array {
  files += 1;
  const lines = ["Frequency (MHz),S11 (dB)"];
  for (let i = 0; i <= 300; i++) {
    const mhz = 6 + (2.4 * i) / 300;
    const db = -0.3 - files / 1e4 - 20 / (1 + (40 * (mhz / 7.1 - 7.1 / mhz)) ** 2);
    lines.push(`${mhz.toFixed(6)},${db.toFixed(5)}`);
  }
  return new TextEncoder().encode(lines.join("\n"));
}

function draft(body: string): Promise<string> {
  return makeDraft(project, by, { title: "Title", body });
}

async function row(publicId: string): Promise<writeUps.FoundWriteUp> {
  const found = await writeUps.findByPublicId(publicId);
  if (!found) throw new Error("The write-up is not there.");
  return found;
}

async function publishNow(publicId: string, remark = "") {
  const { writeUp } = await row(publicId);
  return publish(writeUp, project, by, { revision: revisionOf(writeUp), remark });
}

/** As a stranger reads it, drawn anew each time. */
async function page(publicId: string, version: string | null = null): Promise<string> {
  const sought = await seek(publicId, version);
  if (sought.kind !== "shown") throw new Error(sought.kind);
  return drawElsewhere(sought.publication, "", { plates: new Map(), plateSource: () => null }).html;
}
