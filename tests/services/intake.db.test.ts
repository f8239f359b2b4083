import { eq } from "drizzle-orm";
import { beforeEach, describe, expect, it, vi } from "vitest";
import * as client from "~/db/client.server";
import { db } from "~/db/client.server";
import * as dips from "~/db/dips.server";
import { newPublicId } from "~/db/ids.server";
import * as jobRows from "~/db/jobs.server";
import * as people from "~/db/people.server";
import { files, jobs, sweeps as sweepTable } from "~/db/schema/index";
import * as sweeps from "~/db/sweeps.server";
import { DEFAULT_SETTINGS } from "~/measurement/sweep";
import { takeIn } from "~/services/intake.server";
import { runDueJobs } from "~/services/jobs.server";
import { writeNote } from "~/services/notes.server";
import { createProject, deleteProject } from "~/services/projects.server";
import { getObject, putObject, sha256Of } from "~/services/storage.server";
import { deleteSweep, keepSettings, readAnew } from "~/services/sweep-edits.server";
import { loadPoints } from "~/services/sweep-points.server";

let by: { id: number };
let project: { id: number; publicId: string };

beforeEach(async () => {
  by = { id: await people.insert({ userName: `ada-${newPublicId()}`, name: "Ada", email: null }) };
  project = await createProject(
    { title: "Reeds", summary: "", visibility: "private", ituRegion: null },
    by.id,
  );
});

/** Invented: a resonance at `dipMHz`, 401 points from 1 to 30 MHz, S11 in dB; `second` adds a shallow one. */
function sweepFile(dipMHz: number, second?: number): Uint8Array {
  const lines = ["Frequency (MHz),S11 (dB)"];
  for (let i = 0; i <= 400; i++) {
    const mhz = 1 + (29 * i) / 400;
    const hollow = (at: number, depth: number, q: number) => depth / (1 + (q * (mhz / at - at / mhz)) ** 2);
    const db = -0.3 - hollow(dipMHz, 22, 14) - (second ? hollow(second, 4.2, 20) : 0);
    lines.push(`${mhz.toFixed(6)},${db.toFixed(4)}`);
  }
  return new TextEncoder().encode(lines.join("\n"));
}

async function taken(bytes: Uint8Array, name = "first sweep.csv", keepUnread = true) {
  return takeIn({ project, by, file: { name, bytes }, keepUnread });
}

async function takenSweep(bytes: Uint8Array): Promise<sweeps.FoundSweep> {
  const result = await taken(bytes);
  if (result.kind !== "read") throw new Error(`expected a read sweep, got ${result.kind}`);
  const found = await sweeps.findByPublicId(result.sweepPublicId);
  if (!found) throw new Error("the sweep is not there");
  return found;
}

const keyCount = async () => (await db.select().from(files).where(eq(files.projectId, project.id))).length;

describe("takeIn", () => {
  it("stores the original, the points, the analysis and the dips", async () => {
    const bytes = sweepFile(7.1);
    const found = await takenSweep(bytes);
    expect(found.sweep.title).toBe("first sweep");
    expect(found.sweep.pointCount).toBe(401);
    expect(found.sweep.startHz).toBe(1e6);
    expect(found.sweep.stopHz).toBe(30e6);
    expect(found.file.sha256).toBe(sha256Of(bytes));
    expect(sha256Of(await getObject(found.file.storageKey))).toBe(sha256Of(bytes));
    const points = await loadPoints(found.reading?.id ?? 0);
    expect(points.frequencyHz).toHaveLength(401);
    const [{ dip }, ...others] = await dips.findAllBySweep(found.sweep.id);
    expect(others).toEqual([]);
    expect(Math.abs(dip.frequencyHz - 7.1e6)).toBeLessThan(20_000);
    expect(found.analysis?.dips[0].publicId).toBe(dip.publicId);
  });

  it("says where the same file already is, in this project only", async () => {
    const bytes = sweepFile(7.2);
    const first = await taken(bytes);
    const second = await taken(bytes, "other name.csv");
    expect(second.kind).toBe("twice");
    expect(second).toMatchObject({ sweepPublicId: first.kind === "read" && first.sweepPublicId });
    const elsewhere = await createProject(
      { title: "Shed", summary: "", visibility: "private", ituRegion: null },
      by.id,
    );
    const third = await takeIn({ project: elsewhere, by, file: { name: "a.csv", bytes }, keepUnread: true });
    expect(third.kind).toBe("read");
  });

  it("takes one file once when it is sent eight times at once", async () => {
    const bytes = sweepFile(7.3);
    const results = await Promise.all(Array.from({ length: 8 }, () => taken(bytes)));
    expect(results.filter((result) => result.kind === "read")).toHaveLength(1);
    expect(results.filter((result) => result.kind === "twice")).toHaveLength(7);
    expect(await keyCount()).toBe(1);
  });

  it("keeps what it cannot read when asked to, with the reason", async () => {
    const result = await taken(new TextEncoder().encode("dear diary\nno numbers today\n"));
    expect(result.kind).toBe("unread");
    const found = await sweeps.findByPublicId(result.kind === "unread" ? result.sweepPublicId : "");
    expect(found?.sweep.problem?.message).toBeTruthy();
    expect(found?.sweep.pointCount).toBeNull();
    expect((await getObject(found?.file.storageKey ?? "")).length).toBe(28);
  });

  it("refuses it whole when asked to, and refuses an empty file always", async () => {
    const bad = await taken(new TextEncoder().encode("dear diary\n"), "x.txt", false);
    expect(bad.kind).toBe("refused");
    expect((await taken(new Uint8Array())).kind).toBe("refused");
    expect(await keyCount()).toBe(0);
  });

  it("leaves neither an object nor rows when the database refuses", async () => {
    const before = await db.select().from(sweepTable);
    const gone = { id: 4_000_000_000, publicId: "gone" };
    await expect(
      takeIn({ project: gone, by, file: { name: "a.csv", bytes: sweepFile(7.4) }, keepUnread: true }),
    ).rejects.toThrow();
    expect(await db.select().from(sweepTable)).toHaveLength(before.length);
    const undo = (await db.select().from(jobs)).filter((job) =>
      JSON.stringify(job.payload).includes("/gone/"),
    );
    expect(undo).toHaveLength(1);
    await expect(getObject((undo[0].payload as { key: string }).key)).rejects.toThrow();
  });

  it("keeps the original of a sweep that is there although the answer to its commit was lost", async () => {
    const real = client.inTransaction;
    const lost = vi.spyOn(client, "inTransaction").mockImplementation(async (work) => {
      await real(work);
      throw Object.assign(new Error("Connection lost"), { fatal: true });
    });
    const bytes = sweepFile(7.1);
    await expect(taken(bytes)).rejects.toThrow("Connection lost");
    lost.mockRestore();
    expect(await taken(bytes)).toMatchObject({ kind: "twice" });
    const [file] = await db.select().from(files).where(eq(files.projectId, project.id));
    expect(sha256Of(await getObject(file.storageKey))).toBe(file.sha256);
  });

  it("removes an object that a killed upload left behind, and only that", async () => {
    const found = await takenSweep(sweepFile(7.5));
    const orphan = `originals/test/${newPublicId()}`;
    await putObject(orphan, new Uint8Array([1, 2, 3]));
    await jobRows.insert("delete-object", { key: orphan });
    await jobRows.insert("delete-object", { key: found.file.storageKey });
    await runDueJobs();
    await expect(getObject(orphan)).rejects.toThrow();
    expect((await getObject(found.file.storageKey)).length).toBe(found.file.sizeBytes);
  });
});

describe("analyses", () => {
  it("keep a dip's identity, and a dip with notes even when it is not found any more", async () => {
    const found = await takenSweep(sweepFile(7.1, 18.1));
    const before = await dips.findAllBySweep(found.sweep.id);
    expect(before).toHaveLength(2);
    const shallow = before[1].dip;
    await writeNote({
      project,
      author: by,
      place: { projectId: project.id, sweepId: found.sweep.id, dipId: shallow.id },
      body: "Who are you?",
    });
    await keepSettings(found, { ...DEFAULT_SETTINGS, minimumProminenceDb: 10 }, by.id);
    const after = await dips.findAllBySweep(found.sweep.id);
    expect(after.map(({ dip }) => [dip.publicId, dip.present])).toEqual([
      [before[0].dip.publicId, true],
      [shallow.publicId, false],
    ]);
    const again = await sweeps.findByPublicId(found.sweep.publicId);
    expect(again?.analysis).toMatchObject({ number: 2, settings: { minimumProminenceDb: 10 } });
    if (again) await keepSettings(again, DEFAULT_SETTINGS, by.id);
    const back = await dips.findAllBySweep(found.sweep.id);
    expect(back.map(({ dip }) => [dip.publicId, dip.present])).toEqual([
      [before[0].dip.publicId, true],
      [shallow.publicId, true],
    ]);
  });

  it("drop a dip on which nobody said anything", async () => {
    const found = await takenSweep(sweepFile(7.1, 18.1));
    await keepSettings(found, { ...DEFAULT_SETTINGS, minimumProminenceDb: 10 }, by.id);
    expect(await dips.findAllBySweep(found.sweep.id)).toHaveLength(1);
  });

  it("survive two people who keep settings at once", async () => {
    const found = await takenSweep(sweepFile(7.1, 18.1));
    await Promise.all(
      [4, 5, 6, 7].map((minimumProminenceDb) =>
        keepSettings(found, { ...DEFAULT_SETTINGS, minimumProminenceDb }, by.id),
      ),
    );
    expect(await sweeps.countAnalyses(found.sweep.id)).toBe(5);
  });

  it("are made anew by another reading; one that fails changes nothing", async () => {
    const found = await takenSweep(sweepFile(7.1));
    expect(await readAnew(found, { text: { valueColumn: 7 } }, DEFAULT_SETTINGS, by.id)).not.toBeNull();
    expect((await sweeps.findByPublicId(found.sweep.publicId))?.reading?.number).toBe(1);
    expect(await readAnew(found, { text: { frequencyUnit: "kHz" } }, DEFAULT_SETTINGS, by.id)).toBeNull();
    const again = await sweeps.findByPublicId(found.sweep.publicId);
    expect(again?.reading?.number).toBe(2);
    expect(again?.sweep.startHz).toBe(1000);
  });

  it("are not made of nothing: a reading whose every point is a gap is refused", async () => {
    const text = "MHz,S11 (dB),remark\n7,-1,x\n7.1,-12,y\n7.2,-1.5,z\n7.3,-1,x\n";
    const found = await takenSweep(new TextEncoder().encode(text));
    const problem = await readAnew(found, { text: { valueColumn: 2 } }, DEFAULT_SETTINGS, by.id);
    expect(problem?.message).toBeTruthy();
    expect((await sweeps.findByPublicId(found.sweep.publicId))?.reading?.number).toBe(1);
  });

  it("offer the choices made for the last file of the same shape", async () => {
    const first = await takenSweep(sweepFile(7.1));
    await readAnew(first, { text: { referenceOhm: 75 } }, DEFAULT_SETTINGS, by.id);
    const second = await takenSweep(sweepFile(9.9));
    expect(second.sweep.referenceOhm).toBe(75);
    expect(second.reading?.reading?.assumed[0]).toContain("as the last file of this shape");
  });
});

describe("deleting", () => {
  it("a sweep takes its dips, notes and original with it", async () => {
    const found = await takenSweep(sweepFile(7.1));
    await deleteSweep(found, by.id);
    expect(await sweeps.findByPublicId(found.sweep.publicId)).toBeUndefined();
    expect(await dips.findAllBySweep(found.sweep.id)).toEqual([]);
    await runDueJobs();
    await expect(getObject(found.file.storageKey)).rejects.toThrow();
  });

  it("a project takes every original with it", async () => {
    const found = await takenSweep(sweepFile(7.1));
    await deleteProject(project.id);
    await runDueJobs();
    await expect(getObject(found.file.storageKey)).rejects.toThrow();
    expect(await keyCount()).toBe(0);
  });
});
