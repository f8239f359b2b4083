import { asc, eq } from "drizzle-orm";
import { beforeEach, describe, expect, it } from "vitest";
import * as benchRows from "~/db/benches.server";
import { db } from "~/db/client.server";
import * as dips from "~/db/dips.server";
import { newPublicId } from "~/db/ids.server";
import * as people from "~/db/people.server";
import { analyses } from "~/db/schema/index";
import * as sweeps from "~/db/sweeps.server";
import { IDEAL_STANDARDS, NOTHING_GIVEN } from "~/measurement/bench";
import { DEFAULT_SETTINGS } from "~/measurement/sweep";
import { takeReferences } from "~/services/bench-references.server";
import { correctVersion, createBench, rebuildBench } from "~/services/benches.server";
import { takeIn } from "~/services/intake.server";
import { createProject } from "~/services/projects.server";
import { sweepAt, uncorrected } from "~/services/shown-sweep.server";
import { changedSince, meansOf } from "~/services/sweep-corrections.server";
import {
  analyseAnew,
  chooseBench,
  chooseFeedline,
  keepSettings,
  readAnew,
} from "~/services/sweep-edits.server";
import { type BenchTruth, benchFile, GOOD_BRIDGE, POOR_BRIDGE } from "../bench-files.ts";

const day = (text: string) => new Date(`${text}T00:00Z`);
const VERSION = {
  validFrom: day("2026-05-03"),
  remark: "",
  parts: [],
  standards: IDEAL_STANDARDS,
  given: NOTHING_GIVEN,
};
const KINDS = ["open", "short", "load"] as const;

let by: { id: number };
let project: { id: number; publicId: string };

beforeEach(async () => {
  by = { id: await people.insert({ userName: `ada-${newPublicId()}`, name: "Ada", email: null }) };
  project = await createProject(
    { title: "Reeds", summary: "", visibility: "private", ituRegion: null },
    by.id,
  );
});

const filesOf = (truth: BenchTruth, kinds: readonly (typeof KINDS)[number][], remark = "") =>
  kinds.map((kind) => ({
    kind,
    file: { name: `${kind}.csv`, bytes: new TextEncoder().encode(benchFile(truth, kind, remark)) },
  }));

async function madeBench(truth = GOOD_BRIDGE, kinds: readonly (typeof KINDS)[number][] = KINDS) {
  const made = await createBench(project, by, { name: "Home bridge", description: "", own: "no" }, VERSION);
  await takeReferences({ ...made, project, by }, filesOf(truth, kinds));
  return made;
}

interface Taking {
  takenAt?: Date;
  benchId?: number;
  bytes?: Uint8Array;
}

async function antenna({ takenAt = day("2026-06-01"), benchId, bytes }: Taking = {}) {
  const text = benchFile(GOOD_BRIDGE, "antenna", newPublicId());
  const file = { name: "vertical.csv", bytes: bytes ?? new TextEncoder().encode(text) };
  const taken = await takeIn({ project, by, takenAt, benchId, file, keepUnread: false });
  if (taken.kind !== "read") throw new Error(`expected a sweep, got ${JSON.stringify(taken)}`);
  return again(taken.sweepPublicId);
}

async function again(publicId: string): Promise<sweeps.FoundSweep> {
  const found = await sweeps.findByPublicId(publicId);
  if (!found) throw new Error("the sweep is not there");
  return found;
}

const analysesOf = (sweepId: number) =>
  db.select().from(analyses).where(eq(analyses.sweepId, sweepId)).orderBy(asc(analyses.number));

async function deepest(found: sweeps.FoundSweep) {
  const all = (await dips.findAllBySweep(found.sweep.id)).map(({ dip }) => dip);
  return all.reduce((best, dip) => (dip.returnLossDb > best.returnLossDb ? dip : best)).numbers;
}

describe("a bench applied to a sweep taken before", () => {
  it("finds the dips anew at the port and keeps what was found before", async () => {
    const { bench } = await madeBench();
    const sweep = await antenna();
    const [before] = await analysesOf(sweep.sweep.id);
    expect(before.correction).toBeNull();
    expect((await deepest(sweep)).minimumSwrLow).toBeNull();
    const dipBefore = (await dips.findAllBySweep(sweep.sweep.id))[0].dip.publicId;

    await chooseBench(sweep, bench.id, by.id);
    const now = await again(sweep.sweep.publicId);
    expect(now.analysis?.correction).toMatchObject({
      kind: "scalar",
      plane: "port",
      fromHz: 1e6,
      toHz: 100e6,
      bench: { bench: bench.publicId, number: 1, name: "Home bridge" },
      feedline: null,
    });
    expect(Object.keys(now.analysis?.correction?.references ?? {}).sort()).toEqual(["load", "open", "short"]);
    expect(await analysesOf(sweep.sweep.id)).toHaveLength(2);
    expect((await analysesOf(sweep.sweep.id))[0]).toEqual(before);
    // The same dip: its thread would stay.
    expect((await dips.findAllBySweep(sweep.sweep.id)).map(({ dip }) => dip.publicId)).toContain(dipBefore);
  });

  it("gives limits that hold the truth, closer ones with the better bridge", async () => {
    const good = await madeBench();
    const poor = await createBench(
      project,
      by,
      { name: "Rough bridge", description: "", own: "no" },
      VERSION,
    );
    await takeReferences({ ...poor, project, by }, filesOf(POOR_BRIDGE, KINDS));
    const sweep = await antenna();
    await chooseBench(sweep, good.bench.id, by.id);
    const close = await deepest(await again(sweep.sweep.publicId));
    const rough = await antenna({
      bytes: new TextEncoder().encode(benchFile(POOR_BRIDGE, "antenna", newPublicId())),
      benchId: poor.bench.id,
    });
    const far = await deepest(rough);
    // 60 Ω against 50 Ω at resonance: 1.2.
    for (const { minimumSwrLow, minimumSwrHigh } of [close, far]) {
      expect(minimumSwrLow).toBeLessThanOrEqual(1.2);
      expect(minimumSwrHigh).toBeGreaterThanOrEqual(1.2);
    }
    const width = ({ minimumSwrLow: low, minimumSwrHigh: high }: typeof close) => (high ?? 0) - (low ?? 0);
    expect(width(close)).toBeLessThan(width(far) / 3);
    expect(far.shares[0].source).toBe("directivity");
  });

  it("corrects at once what comes in with a bench, and when it is read anew", async () => {
    const { bench } = await madeBench();
    const sweep = await antenna({ benchId: bench.id });
    expect(sweep.sweep.benchId).toBe(bench.id);
    expect(sweep.analysis?.correction).toMatchObject({ kind: "scalar", plane: "port" });
    await readAnew(sweep, {}, DEFAULT_SETTINGS, by.id);
    expect((await again(sweep.sweep.publicId)).analysis).toMatchObject({
      number: 2,
      correction: { kind: "scalar", plane: "port" },
    });
  });

  it("is taken off again with the sweep as measured", async () => {
    const { bench } = await madeBench();
    const sweep = await antenna({ benchId: bench.id });
    await chooseBench(sweep, null, by.id);
    const now = await again(sweep.sweep.publicId);
    expect([now.sweep.benchId, now.analysis?.correction]).toEqual([null, null]);
  });

  it("reads levels that have no 0 dB line against the bench's own", async () => {
    const asLevels = (text: string) => new TextEncoder().encode(text.replace("S11 (dB)", "Level (dBm)"));
    const made = await createBench(project, by, { name: "Levels", description: "", own: "no" }, VERSION);
    const files = filesOf(GOOD_BRIDGE, KINDS).map(({ kind, file }) => ({
      kind,
      file: { ...file, bytes: asLevels(benchFile(GOOD_BRIDGE, kind)) },
    }));
    await takeReferences({ ...made, project, by }, files);
    const bytes = asLevels(benchFile(GOOD_BRIDGE, "antenna", newPublicId()));
    const sweep = await antenna({ bytes, benchId: made.bench.id });
    expect(sweep.reading?.reading?.quantity).toBe("level");
    expect(sweep.analysis?.correction).toMatchObject({ kind: "scalar", plane: "port" });
    expect((await deepest(sweep)).minimumSwr).toBeCloseTo(1.2, 1);
  });
});

describe("a bench that was rebuilt", () => {
  it("leaves old sweeps as they are and says where another version would count", async () => {
    const { bench } = await madeBench(POOR_BRIDGE);
    const sweep = await antenna({ benchId: bench.id });
    const kept = await analysesOf(sweep.sweep.id);
    const row = await benchRows.findById(bench.id);
    if (!row) throw new Error("no bench");
    const later = await rebuildBench(row, by, {
      ...VERSION,
      validFrom: day("2026-07-01"),
      remark: "new arm",
    });
    await takeReferences(
      { bench: { ...bench, name: "Home bridge" }, version: later, project, by },
      filesOf(GOOD_BRIDGE, KINDS, " rebuilt"),
    );
    const now = await again(sweep.sweep.publicId);
    expect(now.sweep.analysisId).toBe(sweep.sweep.analysisId);
    expect(await analysesOf(sweep.sweep.id)).toEqual(kept);
    // The day of the sweep lies before the rebuild: the old version still counts.
    expect(changedSince(now.analysis?.correction ?? null, await meansOf(now.sweep))).toBeNull();

    const fresh = await antenna({ takenAt: day("2026-07-02"), benchId: bench.id });
    expect(fresh.analysis?.correction?.bench?.number).toBe(2);

    // Its day put right, the sweep falls under the rebuilt bench: said, and computed only when somebody asks.
    await sweeps.update(now.sweep.id, { takenAt: day("2026-07-03") });
    const moved = await again(sweep.sweep.publicId);
    expect(changedSince(moved.analysis?.correction ?? null, await meansOf(moved.sweep))).toMatch(
      /now has version 2/,
    );
    expect(await analysesOf(sweep.sweep.id)).toEqual(kept);
    const drawn = await sweepAt(moved);
    expect(drawn?.means.bench?.version.number).toBe(1);
    await analyseAnew(moved, by.id);
    const anew = await again(sweep.sweep.publicId);
    expect(anew.analysis?.correction?.bench?.number).toBe(2);
    expect(changedSince(anew.analysis?.correction ?? null, await meansOf(anew.sweep))).toBeNull();
  });

  it("says when its standards were put right since", async () => {
    const { bench, version } = await madeBench();
    const sweep = await antenna({ benchId: bench.id });
    const row = await benchRows.findById(bench.id);
    if (!row) throw new Error("no bench");
    const standards = { ...IDEAL_STANDARDS, loadReturnLossDb: 40 };
    await correctVersion(row, version.id, by, { ...VERSION, standards }, new Map());
    const now = await again(sweep.sweep.publicId);
    expect(changedSince(now.analysis?.correction ?? null, await meansOf(now.sweep))).toMatch(
      /have changed since/,
    );
  });
});

describe("what stands in the way of a correction", () => {
  it("is said where the bench is of the future, and nothing is corrected", async () => {
    const { bench } = await madeBench();
    const sweep = await antenna({ takenAt: day("2026-04-01"), benchId: bench.id });
    expect(sweep.analysis?.correction).toBeNull();
    const warning = sweep.analysis?.warnings.find(({ code }) => code === "bench-not-used");
    expect(warning?.message).toMatch(/described from 3 May 2026 on.*1 Apr 2026/);
  });

  it("is shown in grey where the references are too short", async () => {
    const { bench } = await madeBench();
    const rows = Array.from({ length: 300 }, (_, i) => `${1 + i},${(-20 + (i % 7) / 100).toFixed(3)}`);
    const bytes = new TextEncoder().encode(["Frequency (MHz),S11 (dB)", ...rows].join("\n"));
    const sweep = await antenna({ benchId: bench.id, bytes });
    const at = await sweepAt(sweep);
    if (!at) throw new Error("no points");
    const outside = uncorrected(at);
    at.sweep.frequencyHz.forEach((hz, i) => {
      expect(Number.isNaN(at.sweep.magnitude[i])).toBe(hz > 100e6);
      expect(Number.isNaN(outside?.[i] ?? Number.NaN)).toBe(hz <= 100e6);
    });
  });
});

describe("a feedline", () => {
  const LINE = { name: "own values", k1: 0.01, k2: 0, lengthM: 20, velocityFactor: 0.66 };

  it("is said without moving the dips, then kept at the antenna and followed when it changes", async () => {
    const { bench } = await madeBench();
    const sweep = await antenna({ benchId: bench.id });
    expect(await chooseFeedline(sweep, LINE, by.id)).toBe(false);
    const said = await again(sweep.sweep.publicId);
    expect(said.analysis?.number).toBe(1);
    await keepSettings(said, DEFAULT_SETTINGS, by.id, "antenna");
    const kept = await again(sweep.sweep.publicId);
    expect(kept.analysis?.correction).toMatchObject({ kind: "scalar", plane: "antenna", feedline: LINE });
    // Loss between port and antenna hides mismatch: at the antenna the SWR is higher.
    expect((await deepest(kept)).minimumSwr).toBeGreaterThan((await deepestOfFirst(sweep)) + 0.005);
    expect(await chooseFeedline(kept, null, by.id)).toBe(true);
    expect((await again(sweep.sweep.publicId)).analysis?.correction?.plane).toBe("port");
  });

  async function deepestOfFirst(found: sweeps.FoundSweep) {
    const [first] = await analysesOf(found.sweep.id);
    return Math.min(...first.dips.map((dip) => dip.minimumSwr));
  }
});
