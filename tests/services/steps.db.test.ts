import { beforeEach, describe, expect, it } from "vitest";
import { newPublicId } from "~/db/ids.server";
import * as people from "~/db/people.server";
import * as steps from "~/db/steps.server";
import * as sweeps from "~/db/sweeps.server";
import { type Antenna, NO_ANTENNA } from "~/measurement/antenna";
import { SPEED_OF_LIGHT } from "~/measurement/feedline";
import { changeAntenna } from "~/services/antennas.server";
import { takeIn } from "~/services/intake.server";
import { createProject } from "~/services/projects.server";
import { loadEffect } from "~/services/step-effects.server";
import { expectedAfter } from "~/services/step-expectations.server";
import { changeStep, confirmSweeps, makeStep, stepWas } from "~/services/steps.server";
import { deleteSweep } from "~/services/sweep-edits.server";

let by: number;
let project: { id: number; publicId: string };

function day(n: number): Date {
  return new Date(Date.UTC(2026, 4, n, 10));
}

/** Where a quarter-wave pole of this length has its dip: k = 0.951 (elements.ts names the handbook). */
function dipOf(lengthM: number): number {
  return (0.951 * SPEED_OF_LIGHT) / (4 * lengthM);
}

/** Invented: S11 in dB with a dip at each frequency given. */
function sweepFile(...dipsHz: number[]): Uint8Array {
  const lines = ["Frequency (MHz),S11 (dB)"];
  for (let i = 0; i <= 1000; i++) {
    const mhz = 1 + (39 * i) / 1000;
    const hollow = (hz: number) => 20 / (1 + (14 * (mhz / (hz / 1e6) - hz / 1e6 / mhz)) ** 2);
    lines.push(`${mhz.toFixed(6)},${(-0.3 - dipsHz.reduce((sum, hz) => sum + hollow(hz), 0)).toFixed(4)}`);
  }
  return new TextEncoder().encode(lines.join("\n"));
}

async function take(title: string, takenAt: Date, ...dipsHz: number[]): Promise<sweeps.FoundSweep> {
  const file = { name: `${title}.csv`, bytes: sweepFile(...dipsHz) };
  const taken = await takeIn({ project, by: { id: by }, file, title, takenAt, keepUnread: false });
  if (taken.kind !== "read") throw new Error(`${title}: ${taken.kind}`);
  return (await sweeps.findByPublicId(taken.sweepPublicId)) as sweeps.FoundSweep;
}

/** Invented: one pole and nothing else. */
function pole(lengthM: number): Antenna {
  const kind = "vertical" as const;
  const rest = { heightM: 0, diameterMm: null, material: "", insulated: null, where: "" };
  return { ...NO_ANTENNA, elements: [{ key: "pole", kind, name: "Reed pole", lengthM, count: 1, ...rest }] };
}

function cutTo(to: number) {
  const target = { part: "pole", field: "lengthM" as const };
  return [{ label: "Reed pole, length", unit: "m", from: null, to, target }];
}

async function makeDone(title: string, at: Date, quantities = cutTo(10)) {
  const values = { title, body: "", state: "done" as const, at, quantities };
  const made = await makeStep({ projectId: project.id, by }, values);
  if (made.kind !== "kept") throw new Error(made.problem.message);
  return (await steps.findByPublicId(made.publicId))?.step as steps.StepRow;
}

async function effectOf(step: steps.StepRow) {
  return loadEffect(project.id, step, await steps.findSweepsInOrder(project.id));
}

beforeEach(async () => {
  by = await people.insert({ userName: `ada-${newPublicId()}`, name: "Ada", email: null });
  project = await createProject({ title: "Reeds", summary: "", visibility: "private", ituRegion: null }, by);
  const start = { was: NO_ANTENNA, wanted: pole(10.2), validFrom: day(1), remark: "" };
  await changeAntenna({ projectId: project.id, by, ...start });
});

describe("what a step did", () => {
  it("is told from the sweeps nearest to it, dip by dip", async () => {
    const before = await take("before", day(2), dipOf(10.2), 25e6);
    const after = await take("after", day(4), dipOf(10), 25e6, 3.5e6);
    await take("later", day(6), dipOf(9.8));
    const effect = await effectOf(await makeDone("Cut", day(3)));
    expect([effect.before?.publicId, effect.after?.publicId]).toEqual([
      before.sweep.publicId,
      after.sweep.publicId,
    ]);
    const [fresh, cut, other] = effect.movements;
    expect(cut.kind).toBe("moved");
    expect(cut.byHz).toBeCloseTo(dipOf(10) - dipOf(10.2), -4);
    expect(Math.abs((cut.byHz ?? 0) - (dipOf(10) - dipOf(10.2)))).toBeLessThan(cut.uncertaintyHz ?? 0);
    expect([fresh.kind, other.kind]).toEqual(["appeared", "still"]);
    const most = Math.max(...(effect.difference?.db ?? []));
    expect(most).toBeGreaterThan(10);
  });

  it("waits for a sweep after it, and says which are chosen by hand", async () => {
    const first = await take("first", day(2), dipOf(10.2));
    const second = await take("second", day(2 + 1), dipOf(10.19));
    const step = await makeDone("Cut", day(5));
    const alone = await effectOf(step);
    expect([alone.before?.title, alone.after]).toEqual(["second", null]);
    expect(alone.movements).toEqual([]);

    const actor = { projectId: project.id, by };
    await confirmSweeps(step, actor, { beforeSweepId: first.sweep.id, afterSweepId: second.sweep.id });
    const said = (await steps.findByPublicId(step.publicId))?.step as steps.StepRow;
    const chosen = await effectOf(said);
    expect([chosen.before?.title, chosen.after?.title]).toEqual(["first", "second"]);
    expect([chosen.around.beforeSaid, chosen.around.afterSaid]).toEqual([true, true]);

    await deleteSweep(first, by);
    const left = (await steps.findByPublicId(step.publicId))?.step as steps.StepRow;
    const again = await effectOf(left);
    expect(again.around.beforeSaid).toBe(false);
    expect(again.after?.title).toBe("second");
  });

  it("leaves references of a bench out", async () => {
    await take("before", day(2), dipOf(10.2));
    const file = { name: "open.csv", bytes: sweepFile(12e6) };
    await takeIn({
      project,
      by: { id: by },
      file,
      takenAt: day(4),
      purpose: "reference",
      keepUnread: false,
    });
    expect((await effectOf(await makeDone("Cut", day(3)))).after).toBeNull();
  });
});

describe("a planned step", () => {
  it("expects its trail where the shorter pole puts it, and is met by the sweep that comes", async () => {
    await take("before", day(2), dipOf(10.2), 25e6);
    const quantities = cutTo(10);
    const expected = await expectedAfter(project.id, quantities, "metres");
    expect(expected).toHaveLength(2);
    const [cut] = expected;
    expect(cut.frequencyHz).toBeCloseTo(dipOf(10), -4);

    const values = { title: "Cut", body: "", state: "planned" as const, at: null, quantities };
    const made = await makeStep({ projectId: project.id, by }, values, expected);
    const planned = (await steps.findByPublicId(made.kind === "kept" ? made.publicId : ""))
      ?.step as steps.StepRow;
    expect((await effectOf(planned)).after).toBeNull();

    const wanted = { ...planned, state: "done" as const, at: day(3) };
    await changeStep(planned.id, { projectId: project.id, by }, stepWas(planned), wanted);
    await take("after", day(4), dipOf(10), 25e6);
    const done = (await steps.findByPublicId(planned.publicId))?.step as steps.StepRow;
    expect(done.quantities[0].from).toBe(10.2);
    const [met] = (await effectOf(done)).expected;
    expect(met.came?.frequencyHz).toBeGreaterThan(met.lowHz ?? Number.NaN);
    expect(met.came?.frequencyHz).toBeLessThan(met.highHz ?? Number.NaN);
  });

  it("follows the line that two earlier lengths showed", async () => {
    await take("as built", day(2), dipOf(10.2));
    await makeDone("Cut", day(3), cutTo(10));
    await take("cut once", day(4), dipOf(10) * 0.999);
    await makeDone("Cut again", day(5), cutTo(9.8));
    await take("cut twice", day(6), dipOf(9.8) * 0.998);
    const [place] = await expectedAfter(project.id, cutTo(9.6), "metres");
    expect(place.how).toContain("line through 3 earlier lengths");
    expect(place.frequencyHz).toBeCloseTo(dipOf(9.6) * 0.997, -4);
  });

  it("expects nothing where no antenna is described", async () => {
    project = await createProject({ title: "Bare", summary: "", visibility: "private", ituRegion: null }, by);
    await take("before", day(2), 7e6);
    expect(await expectedAfter(project.id, cutTo(10), "metres")).toEqual([]);
  });
});
