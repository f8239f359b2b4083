import { beforeEach, describe, expect, it } from "vitest";
import * as dips from "~/db/dips.server";
import { newPublicId } from "~/db/ids.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import * as sweeps from "~/db/sweeps.server";
import * as trails from "~/db/trails.server";
import * as verdictEvents from "~/db/verdict-events.server";
import { type Antenna, NO_ANTENNA } from "~/measurement/antenna";
import { SPEED_OF_LIGHT } from "~/measurement/feedline";
import { adviseOn } from "~/services/advice.server";
import { changeAntenna } from "~/services/antennas.server";
import { artefactsFor, artefactsOf, judgeDip } from "~/services/causes.server";
import { takeIn } from "~/services/intake.server";
import { changeBands, createProject } from "~/services/projects.server";
import { makeStep } from "~/services/steps.server";
import { changeTrailVerdict } from "~/services/trail-verdicts.server";
import { chosenEvidence, evidenceFor } from "~/services/verdict-evidence.server";
import { changeVerdict, type VerdictIntent } from "~/services/verdicts.server";

let by: { id: number };
let project: { id: number; publicId: string };

function day(n: number): Date {
  return new Date(Date.UTC(2026, 4, n, 10));
}

/** Quarter wave of a wire: 234 ft·MHz, so k = 0.951 (elements.ts names the handbook). */
function quarterHz(lengthM: number): number {
  return (0.951 * SPEED_OF_LIGHT) / (4 * lengthM);
}

/** Half wave of a cable's outside with the same k. */
const BRAID_M = 2.7;
const BRAID_HZ = (0.951 * SPEED_OF_LIGHT) / (2 * BRAID_M);

/** Invented: a pole, a mast without a length, and a cable that runs free for a stretch. */
function antenna(poleM: number, lineM: number | null): Antenna {
  const rest = { heightM: 0, diameterMm: null, material: "", insulated: null, where: "", count: 1 };
  return {
    ...NO_ANTENNA,
    elements: [
      { key: "pole", kind: "vertical", name: "Reed pole", lengthM: poleM, ...rest },
      { key: "mast", kind: "mast", name: "the old mast", lengthM: null, ...rest },
    ],
    feedline: { cable: null, lengthM: lineM, velocityFactor: 0.66, route: "up the bank" },
  };
}

/** Invented: S11 in dB with a hollow of 20 dB at each of these, 1 to 70 MHz. */
function sweepFile(hz: number[]): Uint8Array {
  const lines = ["Frequency (MHz),S11 (dB)"];
  for (let i = 0; i <= 2000; i++) {
    const mhz = 1 + (69 * i) / 2000;
    const db = hz.reduce((sum, at) => sum - 20 / (1 + (15 * (mhz / (at / 1e6) - at / 1e6 / mhz)) ** 2), -0.3);
    lines.push(`${mhz.toFixed(6)},${db.toFixed(4)}`);
  }
  return new TextEncoder().encode(lines.join("\n"));
}

async function take(takenAt: Date, ...hz: number[]) {
  const name = `${takenAt.getUTCDate()} ${hz.length}.csv`;
  const file = { name, bytes: sweepFile(hz) };
  const taken = await takeIn({ project, by, file, title: name, takenAt, keepUnread: false });
  if (taken.kind !== "read") throw new Error(`${name}: ${taken.kind}`);
  const found = (await sweeps.findByPublicId(taken.sweepPublicId)) as sweeps.FoundSweep;
  const all = await dips.findAllBySweep(found.sweep.id);
  const near = (at: number) => {
    const one = all.find(({ dip }) => Math.abs(dip.frequencyHz / at - 1) < 0.02);
    if (!one) throw new Error(`no dip near ${at}`);
    return one.dip;
  };
  return { ...found.sweep, near };
}

beforeEach(async () => {
  by = { id: await people.insert({ userName: `ada-${newPublicId()}`, name: "Ada", email: null }) };
  project = await createProject(
    { title: "Reeds", summary: "", visibility: "private", ituRegion: null },
    by.id,
  );
  await changeBands(project.id, [{ name: "40 m", lowHz: 7e6, highHz: 7.2e6, swrLimit: 2 }]);
});

async function describeAntenna(poleM: number, lineM: number | null, from = day(1)) {
  const wanted = antenna(poleM, lineM);
  const kept = await changeAntenna({
    projectId: project.id,
    by: by.id,
    was: NO_ANTENNA,
    wanted,
    validFrom: from,
    remark: "",
  });
  if (kept.kind !== "kept") throw new Error(kept.kind);
}

describe("what may be behind a dip", () => {
  it("is judged with the antenna of that day, and names what could not be", async () => {
    await describeAntenna(10.2, BRAID_M);
    const sweep = await take(day(2), quarterHz(10.2), BRAID_HZ);
    const judged = await judgeDip(sweep.near(BRAID_HZ), sweep, "metres");
    expect(judged.then.kind).toBe("described");
    const braid = judged.causes.find(({ part }) => part === "feedline");
    expect(braid?.arithmetic).toContain("2.7");
    expect(Math.abs(braid?.offsetHz ?? Number.NaN)).toBeLessThan(0.01 * BRAID_HZ);
    expect(judged.causes.indexOf(braid as (typeof judged.causes)[number])).toBeLessThan(3);
    expect(judged.notJudged.map(({ name }) => name)).toEqual(["the old mast"]);
    // VF·c/(2l) = 0.66·299.79/(5.4)
    expect((judged.ripplePeriodHz ?? 0) / 1e6).toBeCloseTo(36.64, 1);
    // The sweep's own page knows of the same ripple.
    const same = artefactsFor(sweep.near(BRAID_HZ).numbers, antenna(10.2, BRAID_M), await artefactsOf(sweep));
    expect(same).toEqual({ ripplePeriodHz: judged.ripplePeriodHz, references: [] });
    const pole = await judgeDip(sweep.near(quarterHz(10.2)), sweep, "metres");
    expect(pole.causes[0]).toMatchObject({ kind: "part", part: "pole", order: 1 });
  });

  it("takes no part of an antenna that is described only later", async () => {
    await describeAntenna(10.2, BRAID_M, day(5));
    const sweep = await take(day(2), quarterHz(10.2), BRAID_HZ);
    const judged = await judgeDip(sweep.near(quarterHz(10.2)), sweep, "metres");
    expect(judged.then).toMatchObject({ kind: "before", describedFrom: day(5) });
    expect(judged.causes.filter(({ kind }) => kind === "part")).toEqual([]);
    expect(judged.notJudged).toEqual([]);
  });
});

describe("advice", () => {
  it("trims in proportion after one sweep, and by the line after two lengths", async () => {
    await describeAntenna(10.4, BRAID_M);
    const bands = await projects.findDesignBands(project.id);
    const first = await take(day(2), quarterHz(10.4));
    const adviceOn = async (sweep: typeof first, hz: number) => {
      const dip = sweep.near(hz);
      const trail = await trails.findByDip(dip.id);
      const judged = await judgeDip(dip, sweep, "metres");
      const advice = await adviseOn(dip, trail?.publicId ?? null, judged, bands, "metres");
      return advice?.trims[0];
    };
    const alone = await adviceOn(first, quarterHz(10.4));
    // L·f/f_wanted with f ∝ 1/L is the length whose quarter wave is wanted.
    const wantedM = (10.4 * quarterHz(10.4)) / 7.1e6;
    expect(alone).toMatchObject({ part: "pole", lengthM: 10.4, lengthsSeen: 1, changedSince: false });
    expect(alone?.trim.method).toBe("proportion");
    expect(alone?.trim.lengthM).toBeCloseTo(wantedM, 2);

    const target = { part: "pole", field: "lengthM" as const };
    const quantities = [{ label: "Reed pole, length", unit: "m", from: null, to: 10.2, target }];
    await makeStep(
      { projectId: project.id, by: by.id },
      {
        title: "Cut",
        body: "",
        state: "done",
        at: day(3),
        quantities,
      },
    );
    const second = await take(day(4), quarterHz(10.2));
    const line = await adviceOn(second, quarterHz(10.2));
    expect(line).toMatchObject({ lengthM: 10.2, lengthsSeen: 2, changedSince: false });
    expect(line?.trim.method).toBe("line");
    expect(line?.trim.lengthM).toBeCloseTo(wantedM, 1);
    expect(line?.trim.lowM).toBeLessThan(wantedM);
    expect(line?.trim.highM).toBeGreaterThan(wantedM);
    // Of the older sweep it is advice from then.
    expect(await adviceOn(first, quarterHz(10.4))).toMatchObject({ changedSince: true, lengthsSeen: 1 });
  });

  it("has nothing to cut for a dip that is far from every design band", async () => {
    await describeAntenna(10.2, BRAID_M);
    const bands = await projects.findDesignBands(project.id);
    const sweep = await take(day(2), BRAID_HZ);
    const judged = await judgeDip(sweep.near(BRAID_HZ), sweep, "metres");
    const advice = await adviseOn(sweep.near(BRAID_HZ), null, judged, bands, "metres");
    expect(advice?.trims).toEqual([]);
    expect(advice?.offset.share).toBeGreaterThan(1);
  });
});

describe("a verdict", () => {
  const give = async (
    publicId: string,
    intent: VerdictIntent,
    text: string,
    at: Date,
    keys: string[] = [],
  ) => {
    const found = await dips.findByPublicId(publicId);
    if (!found) throw new Error("The dip is not there.");
    const trail = await trails.findByDip(found.dip.id);
    const from = (await sweeps.findByPublicId(found.sweep.publicId)) as sweeps.FoundSweep;
    const { causes } = await judgeDip(found.dip, from.sweep, "metres");
    const evidence = chosenEvidence(keys, await evidenceFor(found.dip, trail?.id ?? null, causes));
    return changeVerdict({ dip: found.dip, by, intent, text, was: found.dip.verdict, evidence, at });
  };

  it("keeps who, when and the evidence as it read, and drops what is not there", async () => {
    await describeAntenna(10.2, BRAID_M);
    const sweep = await take(day(2), BRAID_HZ);
    const dip = sweep.near(BRAID_HZ);
    const [{ key }] = (await judgeDip(dip, sweep, "metres")).causes;
    const keys = [`cause:${key}`, `sweep:${sweep.publicId}`, "step:nothere"];
    expect(await give(dip.publicId, "propose", "the braid", day(6), keys)).toBe("done");
    expect(await give(dip.publicId, "settle", "the braid", day(7))).toBe("done");
    const events = await verdictEvents.findAllOnDip(dip.id, null);
    expect(events.map(({ event, by: name }) => [event.verdict, event.at, name])).toEqual([
      ["settled", day(7), "Ada"],
      ["proposed", day(6), "Ada"],
    ]);
    const proposed = events[1].event.evidence;
    expect(proposed.map(({ kind }) => kind)).toEqual(["cause", "sweep"]);
    expect(proposed[0].text).toContain("2.7");
  });

  it("of a trail stands for its dips, later ones too, until one has its own word", async () => {
    const first = await take(day(2), BRAID_HZ);
    const second = await take(day(3), BRAID_HZ * 1.001);
    const trail = (await trails.findByDip(first.near(BRAID_HZ).id)) as trails.TrailRow;
    await give(first.near(BRAID_HZ).publicId, "propose", "a guess", day(4));
    const settle = { trail, by, intent: "settle" as const, text: "the braid", was: "open" as const };
    expect(await changeTrailVerdict({ ...settle, at: day(5) })).toBe("done");
    const third = await take(day(6), BRAID_HZ * 0.999);
    const standing = async (sweep: typeof first) => {
      const found = await dips.findByPublicId(sweep.near(BRAID_HZ).publicId);
      return [found?.dip.verdict, found?.dip.verdictText, found?.verdictBy, found?.byTrail];
    };
    for (const sweep of [first, second, third]) {
      expect(await standing(sweep)).toEqual(["settled", "the braid", "Ada", true]);
    }
    expect(await dips.countOpenByProject(project.id)).toBe(0);

    // The dip's own word, after the trail's, is the last one.
    expect(await give(second.near(BRAID_HZ).publicId, "reopen", "it moved by itself", day(7))).toBe("done");
    expect(await standing(second)).toEqual(["open", "it moved by itself", "Ada", false]);
    expect(await standing(third)).toEqual(["settled", "the braid", "Ada", true]);
    expect(await dips.countOpenByProject(project.id)).toBe(1);

    const again = await trails.findByDip(first.near(BRAID_HZ).id);
    expect(again?.id).toBe(trail.id);
    const reopen = { trail, by, intent: "reopen" as const, text: "not sure", was: "settled" as const };
    expect(await changeTrailVerdict({ ...reopen, at: day(8) })).toBe("done");
    expect(await standing(first)).toEqual(["proposed", "a guess", "Ada", false]);
    expect(await standing(third)).toEqual(["open", "", null, false]);
  });
});
