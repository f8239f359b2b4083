import { execFileSync } from "node:child_process";
import { eq } from "drizzle-orm";
import { beforeAll, describe, expect, it } from "vitest";
import { db } from "~/db/client.server";
import * as dips from "~/db/dips.server";
import { newPublicId } from "~/db/ids.server";
import * as people from "~/db/people.server";
import * as plates from "~/db/plates.server";
import * as projects from "~/db/projects.server";
import { plateSources } from "~/db/schema/index";
import * as sweeps from "~/db/sweeps.server";
import { analyse } from "~/measurement/analyse";
import { IDEAL_STANDARDS, NOTHING_GIVEN } from "~/measurement/bench";
import { takeReferences } from "~/services/bench-references.server";
import { createBench } from "~/services/benches.server";
import { toTouchstone } from "~/services/exports.server";
import { takeIn } from "~/services/intake.server";
import { runDueJobs } from "~/services/jobs.server";
import { checkAgain } from "~/services/plates/check.server";
import { defaultsFor, type PlateChoices } from "~/services/plates/choices";
import type { FormName } from "~/services/plates/form-names";
import { forgetForms, readForm } from "~/services/plates/forms.server";
import { freeze } from "~/services/plates/freeze.server";
import { parseRecord } from "~/services/plates/record";
import { type PlateKind, subjectOf } from "~/services/plates/subject";
import { withdraw } from "~/services/plates/withdraw.server";
import { createProject, deleteProject } from "~/services/projects.server";
import { makeStep } from "~/services/steps.server";
import { deleteObject, getObject, sha256Of } from "~/services/storage.server";
import { deleteSweep, keepSettings, keepTitleAndDate } from "~/services/sweep-edits.server";
import { benchFile, GOOD_BRIDGE } from "../../bench-files.ts";
import { sweepOf } from "./sample.ts";

/** All data is invented. */

type Project = projects.Project;
const text = (words: string) => new TextEncoder().encode(words);
const day = (d: number) => new Date(Date.UTC(2026, 5, d, 10));

let by: { id: number; name: string };
let project: Project;
const made: Partial<Record<PlateKind, string>> = {};
let sweepIds: string[];

async function take(title: string, d: number, file: { name: string; bytes: Uint8Array }, benchId?: number) {
  const taken = await takeIn({ project, by, file, title, takenAt: day(d), benchId, keepUnread: false });
  if (taken.kind !== "read") throw new Error(`${title}: ${JSON.stringify(taken)}`);
  return taken.sweepPublicId;
}

async function make(from: string, more: Partial<PlateChoices> = {}): Promise<string> {
  const subject = subjectOf(from);
  if (!subject) throw new Error(from);
  const choices = { ...defaultsFor({ title: `Of ${from.split(":")[0]}` }), ...more };
  const done = await freeze({ project, subject, choices, by });
  if ("problem" in done) throw new Error(done.problem);
  return done.publicId;
}

async function rowOf(publicId: string): Promise<plates.PlateRow> {
  const row = await plates.findByPublicId(publicId);
  if (!row) throw new Error("no plate");
  return row;
}

/** Every stored form by its name, as it comes out of the store. */
async function hashesOf(publicId: string): Promise<Record<string, string>> {
  forgetForms(publicId);
  const forms = await plates.findForms((await rowOf(publicId)).id);
  const hashes = await Promise.all(
    forms.map(async ({ form, storageKey }) => [form, sha256Of(await getObject(storageKey))]),
  );
  return Object.fromEntries(hashes.sort());
}

beforeAll(async () => {
  const id = await people.insert({ userName: `ada-${newPublicId()}`, name: "Ada Marsh", email: null });
  by = { id, name: "Ada Marsh" };
  const { publicId } = await createProject(
    { title: "Reed bank", summary: "", visibility: "private", ituRegion: 1 },
    id,
  );
  project = (await projects.findWithRole(publicId, id))?.project as Project;
  await projects.replaceDesignBands(
    project.id,
    [{ name: "40 m", lowHz: 7e6, highHz: 7.2e6, swrLimit: 2 }],
    db,
  );
  const version = {
    validFrom: new Date("2026-05-03"),
    remark: "",
    parts: [],
    standards: IDEAL_STANDARDS,
    given: NOTHING_GIVEN,
  };
  const bench = await createBench(project, by, { name: "Home bridge", description: "", own: "no" }, version);
  const files = (["open", "short", "load"] as const).map((kind) => ({
    kind,
    file: { name: `${kind}.csv`, bytes: text(benchFile(GOOD_BRIDGE, kind)) },
  }));
  await takeReferences({ ...bench, project, by }, files);
  const s1p = (hz: number) =>
    text(
      toTouchstone(
        sweepOf([
          { hz, ohm: 45, q: 12 },
          { hz: 2.6 * hz, ohm: 62, q: 20 },
        ]),
        ["invented"],
      ),
    );
  sweepIds = [
    await take("Before", 1, { name: "before.s1p", bytes: s1p(7.1e6) }),
    await take("After", 3, { name: "after.s1p", bytes: s1p(7.25e6) }),
    await take(
      "With the bridge",
      5,
      { name: "bridge.csv", bytes: text(benchFile(GOOD_BRIDGE, "antenna")) },
      bench.bench.id,
    ),
  ];
  await makeStep(
    { projectId: project.id, by: id },
    { title: "Trimmed", body: "", state: "done", at: day(2), quantities: [] },
  );
  const first = await sweeps.findByPublicId(sweepIds[0]);
  const [dip] = await dips.findAllBySweep(first?.sweep.id as number);
  const { trail } = (await import("~/db/trails.server").then((t) =>
    t.findByDip(dip.dip.id).then((row) => ({ trail: row })),
  )) as { trail: { publicId: string } };
  made.sweep = await make(`sweep:${sweepIds[2]}`);
  made.dip = await make(`dip:${dip.dip.publicId}`, { quantity: "swr" });
  made.compare = await make(`compare:${sweepIds[0]},${sweepIds[1]}`);
  made.trail = await make(`trail:${trail.publicId}`);
  made.strip = await make("strip", { labels: { [sweepIds[0]]: "=first" } });
  made.bench = await make(`bench:${bench.bench.publicId}`);
}, 60_000);

describe("a frozen plate", () => {
  it("has a number of its own, and every form that its kind can have", async () => {
    const rows = await plates.findAllByProject(project.id);
    expect(rows.map(({ number, kind }) => [number, kind])).toEqual([
      [1, "sweep"],
      [2, "dip"],
      [3, "compare"],
      [4, "trail"],
      [5, "strip"],
      [6, "bench"],
    ]);
    for (const [kind, id] of Object.entries(made)) {
      const forms = Object.keys(await hashesOf(id));
      expect(forms.length, kind).toBe(kind === "dip" ? 17 : 16);
      expect(forms.includes("s1p"), kind).toBe(kind === "dip");
    }
  });

  it("says its numbers with limits, and how they came about", async () => {
    const sweep = parseRecord((await rowOf(made.sweep as string)).record);
    const [source, ...references] = sweep.sources;
    expect(source).toMatchObject({
      role: "sweep",
      title: "With the bridge",
      correction: { plane: "port" },
      bench: { name: "Home bridge" },
    });
    expect(references.map(({ role }) => role)).toEqual(["open", "short", "load"]);
    expect(source.correction?.references.open).toBe(references[0].sha256);
    const [dip] = sweep.figure.dips;
    // The bridge's antenna in closed form: 60 Ω at 21.2 MHz, so an SWR of 1.2 lies within the limits.
    expect(dip.minimumSwrLow as number).toBeLessThanOrEqual(1.2);
    expect(dip.minimumSwrHigh as number).toBeGreaterThanOrEqual(1.2);
    expect(sweep.tables[0].rows[0]).toMatchObject({ frequency: expect.closeTo(21.2, 1), verdict: "open" });
    const trail = parseRecord((await rowOf(made.trail as string)).record);
    expect(trail.tables[0].rows).toHaveLength(2);
    // 7.1 to 7.25 MHz.
    expect(trail.tables[0].rows[1].moved).toBeCloseTo(150, -1);
    const strip = parseRecord((await rowOf(made.strip as string)).record);
    expect(strip.figure.steps).toMatchObject([{ label: "Trimmed", before: sweepIds[1] }]);
    const csv = (await readForm(made.strip as string, "csv")) as { bytes: Buffer };
    expect(csv.bytes.toString()).toContain("'=first");
  });

  it("gives Touchstone that another reader finds equal to the sweep", async () => {
    const form = (await readForm(made.dip as string, "s1p")) as { bytes: Buffer };
    const program = `
import json, sys, io, os, tempfile, warnings
warnings.simplefilter("ignore")
import skrf
with tempfile.TemporaryDirectory() as d:
    p = os.path.join(d, "a.s1p"); open(p, "wb").write(sys.stdin.buffer.read())
    n = skrf.Network(p)
print(json.dumps([list(n.f), list(n.s[:,0,0].real), list(n.s[:,0,0].imag), float(n.z0[0,0].real)]))`;
    const out = execFileSync("/usr/bin/python3", ["-c", program], { input: form.bytes, maxBuffer: 1e8 });
    const [f, re, im, z0] = JSON.parse(out.toString().trim().split("\n").at(-1) ?? "") as [
      number[],
      number[],
      number[],
      number,
    ];
    const truth = sweepOf([
      { hz: 7.1e6, ohm: 45, q: 12 },
      { hz: 2.6 * 7.1e6, ohm: 62, q: 20 },
    ]);
    expect(z0).toBe(50);
    expect(f).toHaveLength(401);
    for (const i of [0, 100, 200, 400]) {
      expect(Math.abs(f[i] / truth.frequencyHz[i] - 1)).toBeLessThan(1e-12);
      expect(Math.abs(re[i] - (truth.gammaRe as Float64Array)[i])).toBeLessThan(1e-12);
      expect(Math.abs(im[i] - (truth.gammaIm as Float64Array)[i])).toBeLessThan(1e-12);
    }
  });

  it("comes out identical again while the method is the same", async () => {
    for (const [kind, id] of Object.entries(made))
      expect(await checkAgain(await rowOf(id)), kind).toEqual({ same: true });
  });
});

describe("a plate for ever", () => {
  it("stays byte for byte, whatever becomes of what it shows", async () => {
    const ids = Object.values(made);
    const before = await Promise.all(ids.map(hashesOf));
    const same = async () => expect(await Promise.all(ids.map(hashesOf))).toEqual(before);

    await projects.update(project.id, { title: "Another name" }, db);
    const first = (await sweeps.findByPublicId(sweepIds[0])) as sweeps.FoundSweep;
    await keepTitleAndDate(first.sweep, {}, { title: "Renamed", takenAt: null }, by.id);
    await keepSettings(first, { swrLimit: 1.5, minimumProminenceDb: 6 }, by.id);
    await same();
    for (const id of sweepIds)
      await deleteSweep((await sweeps.findByPublicId(id)) as sweeps.FoundSweep, by.id);
    await runDueJobs();
    await same();
    await deleteProject(project.id);
    await runDueJobs();
    await same();
    for (const id of ids) {
      const row = await rowOf(id);
      expect(row.projectId).toBeNull();
      expect(await checkAgain(row)).toEqual({ same: true });
    }
  });

  it("says what differs under a newer method, by how much and why", async () => {
    const row = await rowOf(made.dip as string);
    const [frozen] = parseRecord(row.record).figure.dips;
    const newer: typeof analyse = (sweep, settings) => {
      const found = analyse(sweep, settings);
      return { ...found, dips: found.dips.map((dip) => ({ ...dip, frequencyHz: dip.frequencyHz + 500 })) };
    };
    const outcome = await checkAgain(row, { version: "99", analyse: newer });
    if (outcome.same) throw new Error("expected differences");
    const moved = outcome.differences.find(({ what }) => what.endsWith("frequency, Hz"));
    expect(moved).toMatchObject({ frozen: frozen.frequencyHz, now: frozen.frequencyHz + 500 });
    expect(moved?.why).toMatch(/^\+500\. The method is now version 99; this was found by version /);
    // A newer version that finds the same is no difference.
    expect(await checkAgain(row, { version: "99" })).toEqual({ same: true });
  });

  it("says which original is missing or was changed", async () => {
    const row = await rowOf(made.compare as string);
    const [source] = await plates.findSources(row.id);
    await db
      .update(plateSources)
      .set({ sha256: "f".repeat(64) })
      .where(eq(plateSources.id, source.id));
    expect(await checkAgain(row)).toMatchObject({
      same: false,
      differences: [{ what: `the original ${source.name}`, frozen: "f".repeat(64), now: source.sha256 }],
    });
    await deleteObject(source.storageKey);
    expect(await checkAgain(row)).toMatchObject({ same: false, differences: [{ now: "missing" }] });
  });
});

describe("versions and withdrawal", () => {
  it("mends by a new version of the same number, once", async () => {
    const { publicId } = await createProject(
      { title: "Two", summary: "", visibility: "private", ituRegion: null },
      by.id,
    );
    project = (await projects.findWithRole(publicId, by.id))?.project as Project;
    const id = await take("One", 1, {
      name: "one.s1p",
      bytes: text(toTouchstone(sweepOf([{ hz: 9e6, ohm: 45, q: 12 }]), [])),
    });
    const subject = { kind: "sweep" as const, ids: [id] };
    const choices = defaultsFor({ title: "A slip" });
    const first = await rowOf(await make(`sweep:${id}`));
    const mended = await freeze({
      project,
      subject,
      choices,
      by,
      mends: { plate: first, reason: "A slip in the title" },
    });
    if ("problem" in mended) throw new Error(mended.problem);
    const second = await rowOf(mended.publicId);
    expect([second.number, second.version, second.previousId]).toEqual([1, 2, first.id]);
    expect(parseRecord(second.record).previous).toMatchObject({ version: 1, reason: "A slip in the title" });
    expect((await plates.findVersions(first)).map(({ version }) => version)).toEqual([1, 2]);
    expect((await plates.findVersions(second)).map(({ publicId: one }) => one)).toEqual([
      first.publicId,
      second.publicId,
    ]);
    expect(
      await freeze({ project, subject, choices, by, mends: { plate: first, reason: "again" } }),
    ).toHaveProperty("problem");

    expect(await readForm(second.publicId, "svg-light")).toHaveProperty("bytes");
    expect(await withdraw(second, "Wrong antenna", by)).toBe(true);
    expect(await withdraw(second, "Wrong antenna", by)).toBe(false);
    for (const form of ["svg-light", "csv"] satisfies FormName[])
      expect(await readForm(second.publicId, form)).toBe("withdrawn");
    expect(await readForm(first.publicId, "svg-light")).toHaveProperty("bytes");
  });

  it("gives two that are frozen at once numbers of their own, and bears them in its forms", async () => {
    const [sweep] = (await sweeps.findAllByProject(project.id)).rows;
    const done = await Promise.all([make(`sweep:${sweep.publicId}`), make(`sweep:${sweep.publicId}`)]);
    const rows = await Promise.all(done.map(rowOf));
    expect(rows.map(({ number }) => number).sort()).toEqual([2, 3]);
    for (const { publicId, number } of rows) {
      const svg = (await readForm(publicId, "svg-light")) as { bytes: Buffer };
      expect(svg.bytes.toString()).toContain(`PLATE ${number}<`);
    }
  });

  it("refuses what is not of the project", async () => {
    const choices = defaultsFor({ title: "Nothing" });
    for (const from of ["sweep:aaaaaaaaaa", "dip:aaaaaaaaaa", "trail:aaaaaaaaaa", "bench:aaaaaaaaaa"]) {
      const subject = subjectOf(from);
      if (!subject) throw new Error(from);
      expect(await freeze({ project, subject, choices, by })).toHaveProperty("problem");
    }
  });
});
