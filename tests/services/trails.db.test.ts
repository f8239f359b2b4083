import { beforeEach, describe, expect, it } from "vitest";
import { inTransaction } from "~/db/client.server";
import * as dips from "~/db/dips.server";
import { newPublicId } from "~/db/ids.server";
import * as people from "~/db/people.server";
import * as sweeps from "~/db/sweeps.server";
import * as trails from "~/db/trails.server";
import { DEFAULT_SETTINGS } from "~/measurement/sweep";
import { takeIn } from "~/services/intake.server";
import { createProject } from "~/services/projects.server";
import { deleteSweep, keepSettings, keepTitleAndDate } from "~/services/sweep-edits.server";
import { joinDip, joinTrails, partDips, takeBack } from "~/services/trail-corrections.server";
import { changeTrailVerdict, nameTrail } from "~/services/trail-verdicts.server";
import { refreshTrails } from "~/services/trails.server";
import { chosenEvidence, evidenceForTrail, evidenceKey } from "~/services/verdict-evidence.server";

let by: { id: number };
let project: { id: number; publicId: string };

beforeEach(async () => {
  by = { id: await people.insert({ userName: `ada-${newPublicId()}`, name: "Ada", email: null }) };
  project = await createProject(
    { title: "Reeds", summary: "", visibility: "private", ituRegion: null },
    by.id,
  );
});

/** Invented: hollows of 20 dB at these frequencies, 1201 points from 1 to 60 MHz, S11 in dB. */
function sweepFile(...mhzs: number[]): Uint8Array {
  const lines = ["Frequency (MHz),S11 (dB)"];
  for (let i = 0; i <= 1200; i++) {
    const mhz = 1 + (59 * i) / 1200;
    const db = mhzs.reduce((sum, at) => sum - 20 / (1 + (20 * (mhz / at - at / mhz)) ** 2), -0.3);
    lines.push(`${mhz.toFixed(6)},${db.toFixed(4)}`);
  }
  return new TextEncoder().encode(lines.join("\n"));
}

/** A sweep of the given day with these dips; answers its public id. */
async function swept(day: number, ...mhzs: number[]): Promise<string> {
  const taken = await takeIn({
    project,
    by,
    file: { name: `day ${day}.csv`, bytes: sweepFile(...mhzs) },
    takenAt: new Date(Date.UTC(2026, 5, day)),
    keepUnread: false,
  });
  if (taken.kind !== "read") throw new Error(`expected a read sweep, got ${taken.kind}`);
  return taken.sweepPublicId;
}

async function find(publicId: string) {
  const found = await sweeps.findByPublicId(publicId);
  if (!found) throw new Error("The sweep is not there.");
  return found;
}

async function dipNear(sweep: string, mhz: number) {
  const all = await dips.findAllBySweep((await find(sweep)).sweep.id);
  const near = all.find(({ dip }) => Math.abs(dip.frequencyHz / 1e6 - mhz) < 0.2);
  if (!near) throw new Error(`No dip near ${mhz} MHz.`);
  return near.dip;
}

/** Each trail as its dips in order of frequency, MHz with one decimal. */
async function ways(): Promise<string[]> {
  const members = await trails.findMembers(project.id);
  const found = await trails.findDips(project.id);
  const rows = await trails.findAllByProject(project.id);
  return rows.map((row) => {
    const own = members.filter(({ trailId }) => trailId === row.id).map(({ dipId }) => dipId);
    const mhz = found.filter(({ id }) => own.includes(id)).map((dip) => dip.frequencyHz / 1e6);
    return `${row.name}${mhz
      .sort((a, b) => a - b)
      .map((value) => value.toFixed(1))
      .join(" ")}`;
  });
}

const trailAt = async (sweep: string, mhz: number) => {
  const trail = await trails.findByDip((await dipNear(sweep, mhz)).id);
  if (!trail) throw new Error("The dip is on no trail.");
  return trail;
};

describe("trails as sweeps come, go and change their day", () => {
  it("grow with every sweep and keep who they are", async () => {
    const first = await swept(1, 7, 20);
    const before = await trailAt(first, 7);
    const second = await swept(2, 7.2, 20.2);
    expect(await ways()).toEqual(["7.0 7.2", "20.0 20.2"]);
    expect((await trailAt(second, 7.2)).publicId).toBe(before.publicId);
    expect((await trailAt(second, 7.2)).frequencyHz / 1e6).toBeCloseTo(7.2, 1);
  });

  it("follow the order of days, also after a day was put right", async () => {
    await swept(1, 20);
    await swept(3, 24);
    const middle = await swept(9, 22);
    expect(await ways()).toEqual(["24.0 22.0", "20.0"].map((w) => w.split(" ").sort().join(" ")).sort());
    const { sweep } = await find(middle);
    await keepTitleAndDate(sweep, {}, { title: sweep.title, takenAt: new Date(Date.UTC(2026, 5, 2)) }, by.id);
    expect(await ways()).toEqual(["20.0 22.0 24.0"]);
  });

  it("are left when a sweep is deleted, named ones never silently", async () => {
    await swept(1, 20);
    const only = await swept(2, 20, 40);
    const named = await trailAt(only, 40);
    await nameTrail({ trail: named, by, name: "braid " });
    await deleteSweep(await find(only), by.id);
    expect(await ways()).toEqual(["20.0", "braid "]);
  });

  it("stay through an analysis that finds no dips any more", async () => {
    const first = await swept(1, 20);
    const trail = await trailAt(first, 20);
    await nameTrail({ trail, by, name: "long wire " });
    await keepSettings(await find(first), { ...DEFAULT_SETTINGS, minimumProminenceDb: 30 }, by.id);
    expect(await ways()).toEqual(["long wire "]);
  });

  it("come out whole when sweeps arrive at once", async () => {
    await Promise.all([1, 2, 3, 4, 5].map((day) => swept(day, 20 + day / 10)));
    expect(await ways()).toEqual(["20.1 20.2 20.3 20.4 20.5"]);
  });
});

describe("corrections by hand", () => {
  it("survive recomputation, new sweeps and the deletion of the sweep between", async () => {
    const one = await swept(1, 20, 22);
    const two = await swept(2, 20.1, 21.9);
    const three = await swept(3, 20.2, 21.8);
    const low = await trailAt(one, 20);
    expect(
      await joinDip({ projectId: project.id, by, dipId: (await dipNear(two, 21.9)).id, trailId: low.id }),
    ).toMatchObject({ kind: "done" });
    const crossed = ["20.0 21.8 21.9", "20.1 20.2 22.0"];
    expect((await ways()).sort()).toEqual(crossed);
    await inTransaction((tx) => refreshTrails(project.id, tx));
    expect((await ways()).sort()).toEqual(crossed);
    await joinDip({
      projectId: project.id,
      by,
      dipId: (await dipNear(three, 20.2)).id,
      trailId: (await trailAt(one, 20)).id,
    });
    expect((await ways()).sort()).toEqual(["20.0 20.2 21.9", "20.1 21.8 22.0"]);
    await deleteSweep(await find(two), by.id);
    expect((await ways()).sort()).toEqual(["20.0 20.2", "21.8 22.0"]);
    await swept(4, 20.3, 21.7);
    expect((await ways()).sort()).toEqual(["20.0 20.2 20.3", "21.7 21.8 22.0"]);
  });

  it("contract through a deleted sweep where the distance alone would not pair", async () => {
    const one = await swept(1, 20);
    const two = await swept(2, 28);
    const three = await swept(3, 40);
    const join = async (sweep: string, mhz: number) =>
      joinDip({
        projectId: project.id,
        by,
        dipId: (await dipNear(sweep, mhz)).id,
        trailId: (await trailAt(one, 20)).id,
      });
    await join(two, 28);
    await join(three, 40);
    expect(await ways()).toEqual(["20.0 28.0 40.0"]);
    await deleteSweep(await find(two), by.id);
    expect(await ways()).toEqual(["20.0 40.0"]);
  });

  it("part, join whole trails and can be taken back", async () => {
    const one = await swept(1, 20);
    const two = await swept(2, 20.2);
    const [a, b] = [await dipNear(one, 20), await dipNear(two, 20.2)];
    const pair = { projectId: project.id, by, dipId: a.id, otherId: b.id };
    expect(await partDips(pair)).toMatchObject({ kind: "done" });
    expect(await ways()).toEqual(["20.0", "20.2"]);
    await takeBack(pair);
    expect(await ways()).toEqual(["20.0 20.2"]);
    expect(await takeBack(pair)).toEqual({ kind: "missing" });
    await partDips(pair);
    const [x, y] = [await trailAt(one, 20), await trailAt(two, 20.2)];
    expect(await joinTrails({ projectId: project.id, by, trailId: x.id, otherId: y.id })).toMatchObject({
      kind: "done",
    });
    expect(await ways()).toEqual(["20.0 20.2"]);
  });

  it("say where two trails are both seen, and what is not there", async () => {
    const one = await swept(1, 20, 30);
    const [x, y] = [await trailAt(one, 20), await trailAt(one, 30)];
    const sweepId = (await find(one)).sweep.id;
    const task = { projectId: project.id, by };
    expect(await joinTrails({ ...task, trailId: x.id, otherId: y.id })).toEqual({ kind: "both-in", sweepId });
    expect(await joinTrails({ ...task, trailId: x.id, otherId: x.id })).toEqual({ kind: "already" });
    const dip = await dipNear(one, 20);
    expect(await joinDip({ ...task, dipId: dip.id, trailId: y.id })).toEqual({ kind: "both-in", sweepId });
    expect(await joinDip({ ...task, dipId: dip.id, trailId: x.id })).toEqual({ kind: "already" });
    expect(await joinDip({ ...task, dipId: 0, trailId: x.id })).toEqual({ kind: "missing" });
  });
});

describe("changeTrailVerdict", () => {
  it("rests on what was chosen of the trail's own dips and sweeps, as it read then", async () => {
    const trail = await trailAt(await swept(1, 20), 20);
    const offered = await evidenceForTrail({ id: trail.id, projectId: trail.projectId });
    expect(offered.map(({ kind }) => kind)).toEqual(["dip", "sweep"]);
    const evidence = chosenEvidence([evidenceKey(offered[0]), "sweep:nosuchone1"], offered);
    await changeTrailVerdict({ trail, by, intent: "propose", text: "The mast", was: "open", evidence });
    const [{ event }] = await trails.findVerdictEvents(trail.id);
    expect(event.evidence).toEqual([
      { kind: "dip", id: offered[0].id, text: expect.stringMatching(/^20.*MHz in “/) },
    ]);
  });

  it("keeps every verdict that was given", async () => {
    const trail = await trailAt(await swept(1, 20), 20);
    const say = (intent: "propose" | "settle" | "reopen", was: trails.TrailRow["verdict"]) =>
      changeTrailVerdict({ trail, by, intent, text: ` ${intent} `, was });
    expect(await say("propose", "open")).toBe("done");
    expect(await say("settle", "open")).toBe("changed-since");
    expect(await say("settle", "proposed")).toBe("done");
    expect(await say("settle", "settled")).toBe("not-now");
    expect(await say("reopen", "settled")).toBe("done");
    const events = await trails.findVerdictEvents(trail.id);
    expect(events.map(({ event, by: who }) => [event.verdict, event.text, who])).toEqual([
      ["open", "reopen", "Ada"],
      ["settled", "settle", "Ada"],
      ["proposed", "propose", "Ada"],
    ]);
  });
});
