import { eq } from "drizzle-orm";
import { beforeEach, describe, expect, it } from "vitest";
import * as benchReferences from "~/db/bench-references.server";
import * as benchRows from "~/db/benches.server";
import { db } from "~/db/client.server";
import * as dips from "~/db/dips.server";
import { newPublicId } from "~/db/ids.server";
import * as people from "~/db/people.server";
import * as projectRows from "~/db/projects.server";
import { benches as benchTable, events } from "~/db/schema/index";
import * as sweeps from "~/db/sweeps.server";
import { IDEAL_STANDARDS, NOTHING_GIVEN } from "~/measurement/bench";
import { qualifyBench } from "~/measurement/correction/qualify";
import { type ReferenceFile, sameFileTwice, takeReferences } from "~/services/bench-references.server";
import { benchForSweep, loadBench, usableBenches } from "~/services/bench-sweeps.server";
import {
  changeBench,
  correctVersion,
  createBench,
  deleteBench,
  rebuildBench,
  setRetired,
} from "~/services/benches.server";
import { takeIn } from "~/services/intake.server";
import { runDueJobs } from "~/services/jobs.server";
import { createProject } from "~/services/projects.server";
import { getObject } from "~/services/storage.server";
import { benchFile, directivityDbOf, GOOD_BRIDGE, POOR_BRIDGE, type Standard } from "../bench-files.ts";

const day = (text: string) => new Date(`${text}T00:00Z`);
const VERSION = {
  validFrom: day("2026-05-03"),
  remark: "",
  parts: [],
  standards: IDEAL_STANDARDS,
  given: NOTHING_GIVEN,
};
const ALL = ["open", "short", "load", "through"] as const;

let by: { id: number };
let project: { id: number; publicId: string };

beforeEach(async () => {
  by = { id: await people.insert({ userName: `ada-${newPublicId()}`, name: "Ada", email: null }) };
  project = await newProject(by);
});

function newProject(owner: { id: number }) {
  return createProject({ title: "Reeds", summary: "", visibility: "private", ituRegion: null }, owner.id);
}

function fileOf(kind: (typeof ALL)[number], truth = GOOD_BRIDGE, standard: Standard = kind): ReferenceFile {
  const bytes = new TextEncoder().encode(benchFile(truth, standard));
  return { kind, file: { name: `${standard}.csv`, bytes } };
}

async function madeBench(files: ReferenceFile[] = ALL.map((kind) => fileOf(kind)), own: "yes" | "no" = "no") {
  const made = await createBench(project, by, { name: "Home bridge", description: "", own }, VERSION);
  const taken = await takeReferences({ ...made, project, by }, files);
  const bench = await benchRows.findById(made.bench.id);
  if (!bench) throw new Error("the bench is not there");
  return { bench, version: made.version, taken };
}

async function antennaSweep(takenAt: Date | null, name = "vertical") {
  const bytes = new TextEncoder().encode(benchFile(GOOD_BRIDGE, "antenna", ` ${name}`));
  const taken = await takeIn({
    project,
    by,
    takenAt,
    file: { name: `${name}.csv`, bytes },
    keepUnread: true,
  });
  if (taken.kind !== "read") throw new Error(`expected a read sweep, got ${taken.kind}`);
  const found = await sweeps.findByPublicId(taken.sweepPublicId);
  if (!found) throw new Error("the sweep is not there");
  return found.sweep;
}

describe("a bench from four files", () => {
  it("takes its references in and knows its directivity", async () => {
    const { bench, taken } = await madeBench();
    expect(taken.map(({ how }) => how)).toEqual(["read", "read", "read", "read"]);
    const loaded = await loadBench(bench, await versionOf(bench.id, "2026-06-01"));
    expect(loaded.references.map(({ kind }) => kind)).toEqual([...ALL]);
    const quality = qualifyBench(loaded.correction, { swr: 1.5, tolerance: 0.1 });
    // Truth: the closed form that made the files. The worst of a stretch around is given, so never more than the truth.
    for (const mhz of [5, 30, 60, 90]) {
      const i = quality.frequencyHz.findIndex((hz) => hz >= mhz * 1e6);
      const over = quality.directivityDb[i] - directivityDbOf(GOOD_BRIDGE, quality.frequencyHz[i]);
      expect(over, `${mhz} MHz`).toBeLessThan(0.1);
      expect(over, `${mhz} MHz`).toBeGreaterThan(-1.5);
      expect(Math.abs(quality.insertionLossDb[i] - GOOD_BRIDGE.lossDb), `${mhz} MHz`).toBeLessThan(0.1);
    }
  });

  it("keeps them out of the antenna's sweeps, counts and open dips", async () => {
    await madeBench([fileOf("load", GOOD_BRIDGE, "antenna")]);
    expect((await sweeps.findAllByProject(project.id)).rows).toEqual([]);
    expect(await sweeps.countByProject(project.id)).toBe(0);
    expect(await dips.countOpenByProject(project.id)).toBe(0);
    expect(await dips.findOpenByProject(project.id)).toEqual([]);
    const [mine] = (await projectRows.findPageByUser(by.id)).rows;
    expect(mine).toMatchObject({ sweepCount: 0 });
  });

  it("reads levels without a 0 dB line as the ratios they are", async () => {
    const levels = ALL.map((kind): ReferenceFile => {
      const text = benchFile(GOOD_BRIDGE, kind).replace("S11 (dB)", "Level (dBm)");
      return { kind, file: { name: `${kind}.csv`, bytes: new TextEncoder().encode(text) } };
    });
    const { bench, taken } = await madeBench(levels);
    expect(taken.map(({ how }) => how)).toEqual(["read", "read", "read", "read"]);
    const { correction, readAs } = await loadBench(bench, await versionOf(bench.id, "2026-06-01"));
    expect(readAs.open).toEqual({ quantity: "level", zeroDb: 0 });
    const quality = qualifyBench(correction, { swr: 1.5, tolerance: 0.1 });
    expect(quality.insertionLossDb[100]).toBeCloseTo(12.04, 1);
  });

  it("uses a file that is there already, and says so", async () => {
    const sweep = await antennaSweep(null, "load");
    const bytes = new TextEncoder().encode(benchFile(GOOD_BRIDGE, "antenna", " load"));
    const { taken } = await madeBench([{ kind: "load", file: { name: "again.csv", bytes } }]);
    expect(taken[0].how).toBe("shared");
    expect(taken[0].message).toContain("also stays among the project's sweeps");
    expect(await sweeps.countByProject(project.id)).toBe(1);
    expect((await benchReferences.findBenchesOf(sweep.id)).map(({ kind }) => kind)).toEqual(["load"]);
  });

  it("refuses one file for two kinds and a second of one kind", async () => {
    expect(sameFileTwice([fileOf("open"), fileOf("short", GOOD_BRIDGE, "open")])).toEqual(["open", "short"]);
    expect(sameFileTwice(ALL.map((kind) => fileOf(kind)))).toBeNull();
    const { bench, version } = await madeBench([fileOf("open")]);
    const again = await takeReferences({ bench, version, project, by }, [
      fileOf("short", GOOD_BRIDGE, "open"),
      fileOf("open", POOR_BRIDGE),
    ]);
    expect(again.map(({ how }) => how)).toEqual(["refused", "refused"]);
    expect(again[0].message).toContain("the same file as the open");
    expect(await benchReferences.findAllByVersions([version.id])).toHaveLength(1);
  });

  it("keeps the bench when a file can't be read, and says which", async () => {
    const nothing = { kind: "short" as const, file: { name: "short.csv", bytes: new Uint8Array() } };
    const { taken, version } = await madeBench([fileOf("open"), nothing, fileOf("load")]);
    expect(taken.map(({ how }) => how)).toEqual(["read", "refused", "read"]);
    expect(taken[1].message).toContain("short.csv");
    expect((await benchReferences.findAllByVersions([version.id])).map(({ kind }) => kind)).toEqual([
      "open",
      "load",
    ]);
  });
});

describe("the version that counts for a sweep", () => {
  it("is the one of its day", async () => {
    const { bench } = await madeBench();
    const sweep = await antennaSweep(day("2026-05-20"));
    const with_ = (takenAt: Date | null) => benchForSweep({ ...sweep, benchId: bench.id, takenAt });
    await rebuildBench(bench, by, { ...VERSION, validFrom: day("2026-07-01"), remark: "Another arm" });
    expect(await with_(day("2026-05-20"))).toMatchObject({ kind: "bench", version: { number: 1 } });
    expect(await with_(day("2026-07-01"))).toMatchObject({ kind: "bench", version: { number: 2 } });
    // Without a date of its own, the day it came in counts: today.
    expect(await with_(null)).toMatchObject({ kind: "bench", version: { number: 2 } });
    expect(await benchForSweep({ ...sweep, benchId: null })).toBeNull();
  });

  it("is none before the first, and that is said", async () => {
    const { bench } = await madeBench();
    const sweep = await antennaSweep(day("2026-05-02"));
    const found = await benchForSweep({ ...sweep, benchId: bench.id });
    expect(found).toMatchObject({ kind: "problem", code: "bench-later" });
    expect(found?.kind === "problem" && found.message).toMatch(/from 3 May 2026 on.*taken on 2 May 2026/);
    const gone = await benchForSweep({ ...sweep, benchId: bench.id + 1_000_000 });
    expect(gone).toMatchObject({ kind: "problem", code: "bench-gone", bench: null });
  });

  it("keeps its references when the bench is rebuilt", async () => {
    const { bench } = await madeBench();
    const before = await loadBench(bench, await versionOf(bench.id, "2026-06-01"));
    const version = await rebuildBench(bench, by, { ...VERSION, validFrom: day("2026-07-01"), remark: "So" });
    await takeReferences({ bench, version, project, by }, [fileOf("load", POOR_BRIDGE)]);
    const after = await loadBench(bench, await versionOf(bench.id, "2026-06-01"));
    expect(after.sha256).toEqual(before.sha256);
    const now = await loadBench(bench, await versionOf(bench.id, "2026-08-01"));
    expect(Object.keys(now.sha256)).toEqual(["load"]);
  });
});

describe("changing a bench", () => {
  it("corrects which reference is which", async () => {
    const { bench, version } = await madeBench([
      fileOf("open", GOOD_BRIDGE, "short"),
      fileOf("short", GOOD_BRIDGE, "open"),
    ]);
    const [open, short] = await benchReferences.findAllByVersions([version.id]);
    const kinds = new Map([
      [open.sweep.publicId, "short" as const],
      [short.sweep.publicId, "open" as const],
    ]);
    await correctVersion(bench, version.id, by, { ...VERSION, validFrom: day("2026-04-01") }, kinds);
    const [nowOpen] = await benchReferences.findAllByVersions([version.id]);
    expect(nowOpen.fileName).toBe("open.csv");
    expect((await versionOf(bench.id, "2026-04-02")).number).toBe(1);
  });

  it("does not undo what somebody else changed meanwhile", async () => {
    const { bench } = await madeBench([]);
    const was = { name: "Home bridge", description: "", own: "no" } as const;
    await changeBench(bench, by, was, { ...was, name: "Shed bridge" });
    const late = await changeBench(bench, by, was, { ...was, name: "Barn bridge" });
    expect(late).toEqual({
      asked: [{ name: "name", mine: "Barn bridge", theirs: "Shed bridge" }],
      rest: { description: "", own: "no" },
      was: JSON.stringify({ ...was, name: "Shed bridge" }),
    });
    const other = await changeBench(bench, by, was, { ...was, description: "Two arms." });
    expect(other).toBeNull();
    expect(await benchRows.findById(bench.id)).toMatchObject({
      name: "Shed bridge",
      description: "Two arms.",
    });
  });

  it("deletes an unused one with its files, and none that a sweep rests on", async () => {
    const { bench, version } = await madeBench([fileOf("open")]);
    const [reference] = await benchReferences.findAllByVersions([version.id]);
    const found = await sweeps.findByPublicId(reference.sweep.publicId);
    const sweep = await antennaSweep(day("2026-05-20"));
    await sweeps.update(sweep.id, { benchId: bench.id });
    expect(await deleteBench(bench)).toBe(false);
    expect(await benchRows.findById(bench.id)).toBeDefined();
    await sweeps.update(sweep.id, { benchId: null });
    expect(await deleteBench(bench)).toBe(true);
    expect(await benchRows.findById(bench.id)).toBeUndefined();
    expect(await sweeps.findByPublicId(reference.sweep.publicId)).toBeUndefined();
    await runDueJobs();
    await expect(getObject(found?.file.storageKey ?? "")).rejects.toThrow();
    expect(await sweeps.findByPublicId(sweep.publicId)).toBeDefined();
  });

  it("writes down what happened", async () => {
    const { bench } = await madeBench([fileOf("open")]);
    await setRetired(bench, by, true);
    const rows = await db.select().from(events).where(eq(events.projectId, project.id));
    const told = rows
      .filter(({ kind }) => kind.startsWith("bench."))
      .map(({ kind, about }) => [kind, about.title]);
    expect(told).toEqual([
      ["bench.added", "Home bridge"],
      ["bench.changed", "Home bridge: an open for version 1"],
      ["bench.changed", "Home bridge: put away"],
    ]);
  });
});

describe("benches that can be used", () => {
  it("are the project's and its experimenters' own, none put away", async () => {
    const { bench } = await madeBench([], "yes");
    const cleo = {
      id: await people.insert({ userName: `cleo-${newPublicId()}`, name: "Cleo", email: null }),
    };
    const there = await newProject(cleo);
    const usable = async () => (await usableBenches(there.id)).map((row) => row.bench.id);
    expect(await usable()).toEqual([]);
    await projectRows.insertMember(there.id, by.id, "commenter");
    expect(await usable()).toEqual([]);
    await projectRows.updateMember(there.id, by.id, "experimenter");
    expect(await usable()).toEqual([bench.id]);
    expect(await benchRows.isUsableIn(bench, there.id)).toBe(true);
    expect((await usableBenches(project.id)).map((row) => row.bench.id)).toEqual([bench.id]);
    await setRetired(bench, by, true);
    expect(await usable()).toEqual([]);
    await db.update(benchTable).set({ ownerId: null, retiredAt: null }).where(eq(benchTable.id, bench.id));
    expect(await usable()).toEqual([]);
  });
});

async function versionOf(benchId: number, at: string) {
  const version = await benchRows.findVersionAt(benchId, day(at));
  if (!version) throw new Error(`no version at ${at}`);
  return version;
}
