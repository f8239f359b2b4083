import { beforeEach, describe, expect, it } from "vitest";
import * as antennas from "~/db/antennas.server";
import { newPublicId } from "~/db/ids.server";
import * as people from "~/db/people.server";
import * as steps from "~/db/steps.server";
import { type Antenna, NO_ANTENNA } from "~/measurement/antenna";
import { antennaAt, changeAntenna } from "~/services/antennas.server";
import { createProject } from "~/services/projects.server";
import { changeStep, deleteStep, makeStep, type StepValues, stepWas } from "~/services/steps.server";

let by: number;
let projectId: number;

/** Invented: one pole. */
function pole(lengthM: number, more: Partial<Antenna> = {}): Antenna {
  return {
    ...NO_ANTENNA,
    elements: [
      {
        key: "pole",
        kind: "vertical",
        name: "Reed pole",
        lengthM,
        count: 1,
        heightM: 0,
        diameterMm: null,
        material: "",
        insulated: null,
        where: "",
      },
    ],
    ...more,
  };
}

function day(n: number, hour = 10): Date {
  return new Date(Date.UTC(2026, 4, n, hour));
}

beforeEach(async () => {
  by = await people.insert({ userName: `ada-${newPublicId()}`, name: "Ada", email: null });
  const project = await createProject(
    { title: "Reeds", summary: "", visibility: "private", ituRegion: null },
    by,
  );
  projectId = project.id;
});

function change(was: Antenna, wanted: Antenna, validFrom: Date) {
  return changeAntenna({ projectId, by, was, wanted, validFrom, remark: "" });
}

async function lengthOn(at: Date): Promise<number | null | string> {
  const then = await antennaAt(projectId, at);
  return then.kind === "described" ? (then.version.content.elements[0]?.lengthM ?? null) : then.kind;
}

function cut(to: number, at: Date | null, state: StepValues["state"] = "done"): StepValues {
  const target = { part: "pole", field: "lengthM" as const };
  const quantities = [{ label: "Reed pole, length", unit: "m", from: null, to, target }];
  return { title: `Cut to ${to}`, body: "", state, at, quantities };
}

async function make(values: StepValues): Promise<steps.FoundStep> {
  const made = await makeStep({ projectId, by }, values);
  if (made.kind !== "kept") throw new Error(made.problem.message);
  return (await steps.findByPublicId(made.publicId)) as steps.FoundStep;
}

describe("the antenna and its days", () => {
  it("is not described before its first day, and never taken from later", async () => {
    expect(await antennaAt(projectId, day(1))).toEqual({ kind: "never" });
    await change(NO_ANTENNA, pole(10.2), day(3));
    expect(await antennaAt(projectId, day(2))).toEqual({ kind: "before", describedFrom: day(3) });
    expect(await lengthOn(day(3))).toBe(10.2);
    expect(await lengthOn(day(30))).toBe(10.2);
  });

  it("keeps every change with its day, and nothing that is none", async () => {
    await change(NO_ANTENNA, pole(10.2), day(3));
    expect(await change(pole(10.2), pole(10.2), day(4))).toEqual({ kind: "nothing" });
    expect(await change(pole(10.2), pole(10), day(5))).toEqual({ kind: "kept" });
    expect([await lengthOn(day(4)), await lengthOn(day(5))]).toEqual([10.2, 10]);
    const all = await antennas.findAllByProject(projectId);
    expect(all.map(({ version }) => version.number)).toEqual([1, 2]);
  });

  it("asks where two changed one entry, and takes the second word when it insists", async () => {
    await change(NO_ANTENNA, pole(10.2), day(3));
    await change(pole(10.2), pole(10.1), day(4));
    const late = await change(pole(10.2), pole(10), day(5));
    expect(late).toMatchObject({
      kind: "conflict",
      conflicts: [{ path: "pole.lengthM", was: 10.1, now: 10 }],
    });
    expect(await lengthOn(day(6))).toBe(10.1);
    if (late.kind !== "conflict") throw new Error("no conflict");
    expect(await change(late.now, pole(10), day(5))).toEqual({ kind: "kept" });
    expect(await lengthOn(day(6))).toBe(10);
  });

  it("lets a change of the past run on into what came after it", async () => {
    await change(NO_ANTENNA, pole(10.2), day(3));
    await change(pole(10.2), pole(10.2, { ground: "mown" }), day(9));
    await change(pole(10.2, { ground: "mown" }), pole(10, { ground: "mown" }), day(5));
    expect([await lengthOn(day(4)), await lengthOn(day(6)), await lengthOn(day(10))]).toEqual([10.2, 10, 10]);
    const grounds = await Promise.all([day(6), day(10)].map((at) => antennaAt(projectId, at)));
    expect(grounds.map((then) => then.kind === "described" && then.version.content.ground)).toEqual([
      "",
      "mown",
    ]);
  });
});

describe("steps that change the antenna", () => {
  beforeEach(async () => {
    await change(NO_ANTENNA, pole(10.2), day(1));
  });

  it("make a version of their own, and take it along when they are changed", async () => {
    const { step } = await make(cut(10, day(5)));
    expect(step.quantities[0].from).toBe(10.2);
    expect([await lengthOn(day(4)), await lengthOn(day(5))]).toEqual([10.2, 10]);

    const moved = await changeStep(step.id, { projectId, by }, stepWas(step), cut(9.9, day(7)));
    expect(moved).toEqual({ kind: "kept" });
    expect([await lengthOn(day(6)), await lengthOn(day(7))]).toEqual([10.2, 9.9]);
    expect(await antennas.findAllByProject(projectId)).toHaveLength(2);
  });

  it("give the antenna back when they are deleted, but not what was changed again since", async () => {
    const first = await make(cut(10, day(5)));
    const second = await make(cut(9.8, day(8)));
    expect(second.step.quantities[0].from).toBe(10);
    await deleteStep(first.step, { projectId, by });
    expect([await lengthOn(day(6)), await lengthOn(day(9))]).toEqual([10.2, 9.8]);
    await deleteStep(second.step, { projectId, by });
    expect(await lengthOn(day(9))).toBe(10.2);
  });

  it("of one moment count in the order they were written down, also after a change of the first", async () => {
    const first = await make(cut(10, day(5)));
    await make(cut(9.8, day(5)));
    expect(await lengthOn(day(5))).toBe(9.8);
    await changeStep(first.step.id, { projectId, by }, stepWas(first.step), {
      ...cut(10.1, day(5)),
      title: "Cut a little",
    });
    expect(await lengthOn(day(6))).toBe(9.8);
    const listed = await steps.findAllByProject(projectId);
    expect(listed.map(({ step }) => step.title)).toEqual(["Cut a little", "Cut to 9.8"]);
  });

  it("leave the antenna alone while they are planned, and change it when they are done", async () => {
    const { step } = await make(cut(10, null, "planned"));
    expect(await lengthOn(day(20))).toBe(10.2);
    expect(await changeStep(step.id, { projectId, by }, stepWas(step), cut(10, day(6)))).toEqual({
      kind: "kept",
    });
    expect([await lengthOn(day(5)), await lengthOn(day(6))]).toEqual([10.2, 10]);
  });

  it("can't be of a day before the antenna is described, and leave nothing half done", async () => {
    const made = await makeStep({ projectId, by }, cut(10, new Date("2026-01-01T00:00Z")));
    expect(made).toMatchObject({ kind: "problem", problem: { index: 0 } });
    expect(await steps.findAllByProject(projectId)).toEqual([]);

    const { step } = await make(cut(10, day(5)));
    const early = cut(10, new Date("2026-01-01T00:00Z"));
    expect(await changeStep(step.id, { projectId, by }, stepWas(step), early)).toMatchObject({
      kind: "problem",
    });
    expect(await lengthOn(day(6))).toBe(10);
  });

  it("keep what two people changed of one step in two places, and ask where it is the same place", async () => {
    const { step } = await make(cut(10, day(5)));
    const opened = stepWas(step);
    await changeStep(step.id, { projectId, by }, opened, { ...cut(10, day(5)), title: "Theirs" });
    const mine = { ...cut(10, day(5)), title: step.title, body: "With a saw." };
    expect(
      await changeStep(step.id, { projectId, by }, opened, { ...mine, quantities: step.quantities }),
    ).toEqual({
      kind: "kept",
    });
    const now = (await steps.findByPublicId(step.publicId))?.step;
    expect([now?.title, now?.body]).toEqual(["Theirs", "With a saw."]);
    const late = await changeStep(step.id, { projectId, by }, opened, {
      ...mine,
      title: "Mine",
      quantities: step.quantities,
    });
    expect(late).toMatchObject({ kind: "conflict", conflicts: ["title"] });
  });

  it("written down at once by two people both count", async () => {
    const results = await Promise.all([
      makeStep({ projectId, by }, cut(10, day(5))),
      makeStep({ projectId, by }, cut(9.8, day(6))),
    ]);
    expect(results.map(({ kind }) => kind)).toEqual(["kept", "kept"]);
    expect(await lengthOn(day(7))).toBe(9.8);
    const numbers = (await antennas.findAllByProject(projectId)).map(({ version }) => version.number);
    expect([...numbers].sort()).toEqual([1, 2, 3]);
  });
});
