import { eq } from "drizzle-orm";
import { beforeAll, describe, expect, it } from "vitest";
import { db } from "~/db/client.server";
import { findByPublicId as findDip } from "~/db/dips.server";
import * as jobs from "~/db/jobs.server";
import * as people from "~/db/people.server";
import {
  analyses,
  dips,
  facts,
  memberships,
  notes,
  projects,
  steps,
  sweeps,
  users,
  verdictEvents,
} from "~/db/schema/index";
import { findTrailStops } from "~/db/steps.server";
import * as writeUps from "~/db/write-ups.server";
import { drawPage, seek } from "~/services/write-ups/published.server";
import { buildDemo } from "../../scripts/demo/build.ts";
import { play } from "../../scripts/demo/play.ts";
import { reedBankStory } from "../../scripts/demo/reed-bank-story.ts";

const STORY = "The vertical on the reed bank";

async function demo() {
  const [project] = await db.select().from(projects).where(eq(projects.title, STORY));
  const of = { sweeps, notes, dips, steps };
  const rows = async <Table extends keyof typeof of>(table: Table) =>
    (await db
      .select()
      .from(of[table])
      .where(eq(of[table].projectId, project.id))) as (typeof of)[Table]["$inferSelect"][];
  return {
    project,
    sweeps: await rows("sweeps"),
    notes: await rows("notes"),
    dips: await rows("dips"),
    steps: await rows("steps"),
  };
}

let first: Awaited<ReturnType<typeof buildDemo>>;
beforeAll(async () => {
  first = await buildDemo();
}, 120_000);

describe("the demo", () => {
  it("is built once", async () => {
    expect(first).toBe("built");
    const before = await demo();
    expect(await buildDemo()).toBe("there already");
    expect(await demo()).toEqual(before);
  });

  it("publishes a write-up that shows plates and figures and says that it is invented", async () => {
    const { project } = await demo();
    const [listed] = await writeUps.findAllByProject(project.id, { drafts: false });
    const sought = await seek(listed.publicId, null);
    if (sought.kind !== "shown") throw new Error(sought.kind);
    const { version, frozen } = sought.publication;
    expect(version.body).toContain("invented");
    expect(frozen.figures.map(({ subject }) => subject.split(":")[0]).sort()).toEqual([
      "dip",
      "plate",
      "plate",
    ]);
    expect((await drawPage(sought.publication, null)).html).not.toContain("article-missing");
  });

  it("has enough of everything, and says that it is invented", async () => {
    const found = await demo();
    expect(found.sweeps.length).toBeGreaterThanOrEqual(12);
    expect(found.notes.length).toBeGreaterThanOrEqual(25);
    expect(new Set(found.notes.map((note) => note.authorId)).size).toBe(4);
    const all = await db.select().from(projects);
    expect(all.map((project) => [project.visibility, project.demo]).sort()).toEqual([
      ["private", 1],
      ["public", 1],
      ["public", 1],
    ]);
    for (const { summary } of all) expect(summary).toMatch(/invented/i);
  });

  it("goes on for about six weeks of 2026, in order", async () => {
    const found = await demo();
    const times = found.notes.map((note) => note.createdAt.getTime());
    expect(times).toEqual([...times].sort((a, b) => a - b));
    const taken = found.sweeps.map((sweep) => sweep.takenAt?.getTime() ?? 0);
    expect(Math.min(...taken)).toBeGreaterThan(Date.UTC(2026, 0, 1));
    expect((Math.max(...taken) - Math.min(...taken)) / 86_400_000).toBeCloseTo(42, 0);
  });

  it("ends settled: every dip that was chased has the same verdict", async () => {
    const found = await demo();
    const standing = await Promise.all(found.dips.map((dip) => findDip(dip.publicId)));
    const chased = standing.filter((one) => one?.dip.verdictText.includes("outside of the braid"));
    expect(chased.length).toBeGreaterThanOrEqual(9);
    expect(chased.every((one) => one?.dip.verdict === "settled" && one.verdictBy === "Ada Marsh")).toBe(true);
    expect(chased.filter((one) => one?.byTrail).length).toBe(chased.length - 1);
  });

  it("lets two people settle a cause that was adopted, on evidence", async () => {
    const { project } = await demo();
    const events = await db.select().from(verdictEvents).where(eq(verdictEvents.projectId, project.id));
    const proposed = events.find(({ evidence }) => evidence.some(({ kind }) => kind === "step"));
    expect(proposed?.text).toMatch(/^May be Braid from hub to stake, half wave/);
    const settled = events.find((one) => one.dipId === proposed?.dipId && one.verdict === "settled");
    expect(settled?.evidence.length).toBeGreaterThanOrEqual(4);
    expect(settled?.by).not.toBe(proposed?.by);
  });

  it("met where its plan put the chased dip, and plans one more cut", async () => {
    const { project, sweeps: taken } = await demo();
    const all = await db.select().from(steps).where(eq(steps.projectId, project.id));
    expect(all.filter(({ state }) => state === "done").length).toBeGreaterThanOrEqual(7);
    const far = all.find(({ title }) => title === "Stake moved out to 3.24 m");
    const sweep = taken.find(({ title }) => title === far?.title);
    const stops = await findTrailStops(project.id);
    const came = stops.find(
      (stop) =>
        stop.sweepId === sweep?.id &&
        stop.numbers.frequencyHz / 1e6 < 46 &&
        stop.numbers.frequencyHz / 1e6 > 43,
    );
    const expected = far?.expected.find(({ how }) => how.includes("2.76"));
    // 52.2 MHz × 2.76 / 3.24
    expect((expected?.frequencyHz ?? 0) / 1e6).toBeCloseTo(44.5, 0);
    expect(came?.numbers.frequencyHz).toBeGreaterThan(expected?.lowHz ?? Number.NaN);
    expect(came?.numbers.frequencyHz).toBeLessThan(expected?.highHz ?? Number.NaN);
    const planned = all.filter(({ state }) => state === "planned");
    expect(planned.map(({ expected: places }) => places.length > 0)).toEqual([true]);
  });

  it("has a bench behind the bridge's sweeps, one at the antenna, and three that repeat one another", async () => {
    const { sweeps: taken } = await demo();
    const corrected = await db.select().from(analyses);
    const planeOf = (id: number | null) =>
      corrected.find((one) => one.id === id)?.correction?.plane ?? "instrument";
    const planes = taken.map(({ analysisId }) => planeOf(analysisId));
    expect(planes.filter((plane) => plane === "port").length).toBe(3);
    expect(planes.filter((plane) => plane === "antenna").length).toBe(1);
    expect(taken.filter(({ repeatGroup }) => repeatGroup !== null).length).toBe(3);
    const bridge = taken.find(({ title }) => title === "With the bridge");
    const its = (await demo()).dips.filter(({ sweepId, present }) => sweepId === bridge?.id && present);
    expect(its.every(({ numbers }) => numbers.edge || numbers.minimumSwrHigh !== null)).toBe(true);
  });

  it("says nothing that is not there: links lead somewhere, numbers are numbers", async () => {
    const found = await demo();
    const known = new Set([
      ...found.dips.map((dip) => `/projects/${found.project.publicId}/dips/${dip.publicId}`),
      ...found.sweeps.map((sweep) => `/projects/${found.project.publicId}/sweeps/${sweep.publicId}`),
      ...found.steps.map((step) => `/projects/${found.project.publicId}/steps/${step.publicId}`),
    ]);
    let links = 0;
    for (const { body } of found.notes) {
      expect(body).not.toMatch(/NaN|undefined|null|Infinity|unknown|\[object/);
      for (const [, path] of body.matchAll(/\]\((\/[^)]*)\)/g)) {
        links++;
        expect(known.has(path)).toBe(true);
      }
    }
    expect(links).toBeGreaterThan(15);
  });

  it("lets the stand-in's people into these accounts, the keeper as administrator where there is one", async () => {
    const provider = process.env.LOCAL_GITHUB === "1" ? "github" : "demo";
    expect((await people.findByIdentity(provider, "1001"))?.userName).toBe("ada-marsh");
    const administrators = await db.select().from(users).where(eq(users.administrator, true));
    expect(administrators.map((user) => user.userName)).toEqual(provider === "github" ? ["site-keeper"] : []);
  });

  it("is cleaned and built anew when a build was killed half-way", async () => {
    const before = await demo();
    const ada = await people.findByUserName("ada-marsh");
    const one = { id: ada?.id ?? 0, userName: "ada-marsh" };
    await db.delete(facts).where(eq(facts.name, "demo"));
    const half = { ...reedBankStory(), members: [], steps: reedBankStory().steps.slice(0, 2) };
    const cast = { "ada-marsh": one, "bram-sedge": one, "cleo-reed": one, "dov-heron": one };
    await play(half, cast);
    expect(await buildDemo()).toBe("built");
    const again = await demo();
    expect((await db.select().from(projects)).length).toBe(3);
    expect(again.project.id).not.toBe(before.project.id);
    expect(again.sweeps.map((sweep) => sweep.title)).toEqual(before.sweeps.map((sweep) => sweep.title));
    const plain = (rows: typeof before.notes) =>
      rows.map((note) => note.body.replace(/\(\/projects[^)]*\)/g, ""));
    expect(plain(again.notes)).toEqual(plain(before.notes));
    expect((await db.select().from(memberships)).length).toBe(4 + 4 + 3);
    expect((await db.select().from(users)).length).toBeLessThanOrEqual(5);
    expect(await jobs.findFact("demo")).toBeTruthy();
  }, 120_000);
});
