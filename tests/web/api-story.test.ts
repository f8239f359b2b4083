import { beforeAll, describe, expect, it } from "vitest";
import { NO_ANTENNA } from "~/measurement/antenna";
import * as shapes from "~/routes/api/story-schemas";
import { changeAntenna } from "~/services/antennas.server";
import { changeBands } from "~/services/projects.server";
import { askApi } from "./browser.ts";
import { problemOf } from "./problem.ts";
import { type Crew, makeCrew, makePlace, type Place, sendSweep, tokenOf, touchstone } from "./world.ts";

/** The experiment's story in the API. */

let crew: Crew;
let place: Place;
let token: string;

/** A quarter wave of this length has its dip at 7.1 MHz, where the world's sweeps have theirs: 71.35 m·MHz (k = 0.952). */
const POLE_M = 10.05;

beforeAll(async () => {
  crew = await makeCrew();
  place = await makePlace(crew, "private");
  token = await tokenOf(crew.owner);
  const unsaid = { heightM: null, diameterMm: null, material: "", insulated: null, where: "", count: 1 };
  const wanted = {
    ...NO_ANTENNA,
    elements: [
      { key: "pole", kind: "vertical" as const, name: "Reed pole", lengthM: POLE_M, ...unsaid },
      { key: "mast", kind: "mast" as const, name: "Mast", lengthM: null, ...unsaid },
    ],
  };
  const validFrom = new Date("2025-01-01T00:00:00Z");
  const task = { projectId: place.projectId, by: crew.owner.id, was: NO_ANTENNA, wanted, validFrom };
  await changeAntenna({ ...task, remark: "put up" });
  await changeBands(place.projectId, [{ name: "40 m", lowHz: 7e6, highHz: 7.05e6, swrLimit: 2 }]);
});

function post(path: string, body: unknown, withToken = token): Promise<Response> {
  const headers = { "Content-Type": "application/json" };
  return askApi(path, withToken, { method: "POST", body: JSON.stringify(body), headers });
}

describe("the antenna", () => {
  it("is given as it was on a day, with every change", async () => {
    const path = `/projects/${place.project}/antenna`;
    const now = shapes.antennaShape.parse(await (await askApi(path, token)).json());
    expect(now.antenna?.elements[0]).toMatchObject({ key: "pole", lengthM: POLE_M });
    expect(now.versions).toHaveLength(1);
    const before = shapes.antennaShape.parse(await (await askApi(`${path}?on=2024-12-31`, token)).json());
    expect(before).toMatchObject({ antenna: null, describedFrom: "2025-01-01T00:00:00.000Z" });
    const same = shapes.antennaShape.parse(await (await askApi(`${path}?on=2025-01-01`, token)).json());
    expect(same.antenna?.elements).toHaveLength(2);
    expect((await problemOf(await askApi(`${path}?on=soon`, token), 422)).errors?.[0].field).toBe("on");
  });
});

describe("steps", () => {
  it("are written down, change the antenna, and stand between the sweeps that say so", async () => {
    const own = await makePlace(crew, "private");
    const validFrom = new Date("2025-01-01T00:00:00Z");
    const element = { ...(await antennaOf(place.project)).antenna?.elements[0], key: "pole" };
    const wanted = { ...NO_ANTENNA, elements: [element as (typeof NO_ANTENNA.elements)[number]] };
    const task = { projectId: own.projectId, by: crew.owner.id, was: NO_ANTENNA, wanted, validFrom };
    await changeAntenna({ ...task, remark: "" });
    const made = await post(`/projects/${own.project}/steps`, {
      title: "Cut the pole",
      state: "done",
      at: "2026-05-01T12:00:00+02:00",
      quantities: [
        { part: "pole", field: "lengthM", to: 9.9 },
        { label: "Rain since", unit: "h", from: 0, to: 3 },
      ],
    });
    expect(made.status).toBe(201);
    const step = shapes.stepShape.parse(await made.json());
    expect(step).toMatchObject({ title: "Cut the pole", at: "2026-05-01T10:00:00.000Z", state: "done" });
    expect(step.quantities.map(({ from, to, unit }) => [from, to, unit])).toEqual([
      [POLE_M, 9.9, "m"],
      [0, 3, "h"],
    ]);
    expect(made.headers.get("Location")).toBe(step.links.self);
    expect((await antennaOf(own.project)).antenna?.elements[0].lengthM).toBe(9.9);

    // Taken before the step by its date, and yet the one after it.
    const fields = { step: step.id, takenAt: "2026-04-30T10:00:00Z" };
    const sweep = await (await sendSweep(own.project, token, touchstone(), fields)).json();
    const again = shapes.stepShape.parse(await (await askApi(`/steps/${step.id}`, token)).json());
    expect(again.after).toBe(sweep.id);
    const list = shapes.stepListShape.parse(
      await (await askApi(`/projects/${own.project}/steps`, token)).json(),
    );
    expect(list.items.map(({ id }) => id)).toContain(step.id);
  });

  it("planned, say where every trail should go", async () => {
    const made = await post(`/projects/${place.project}/steps`, {
      title: "Longer",
      state: "planned",
      quantities: [{ part: "pole", field: "lengthM", to: POLE_M * 1.01 }],
    });
    const step = shapes.stepShape.parse(await made.json());
    expect(step.expected.length).toBeGreaterThan(0);
    // One per cent longer, so one per cent lower.
    expect(step.expected[0].frequencyHz / 7.1e6).toBeCloseTo(1 / 1.01, 3);
    const refused = await sendSweep(place.project, token, touchstone(), { step: step.id });
    expect((await problemOf(refused, 422)).errors?.[0].field).toBe("step");
  });

  const good = { title: "Cut", state: "done", at: "2026-05-01T10:00:00Z" };
  it.each([
    [{ ...good, title: "" }, "title"],
    [{ ...good, at: undefined }, "at"],
    [{ ...good, at: "2199-01-01T00:00:00Z" }, "at"],
    [{ ...good, state: "perhaps" }, "state"],
    [{ ...good, quantities: [{ to: 3 }] }, "quantities.0.label"],
    [{ ...good, quantities: [{ part: "pole", to: 3 }] }, "quantities.0.field"],
    [{ ...good, quantities: [{ part: "pole", field: "lengthM" }] }, "quantities.0.to"],
    [{ ...good, quantities: [{ part: "pole", field: "lengthM", to: 0 }] }, "quantities.0.to"],
    [{ ...good, quantities: [{ part: "pole", field: "lengthM", to: 1000 }] }, "quantities.0.to"],
    [{ ...good, quantities: [{ part: "nothing", field: "lengthM", to: 3 }] }, "quantities.0.part"],
    [{ ...good, surprise: 1 }, "body"],
  ])("answers 422 and the field for %j", async (body, field) => {
    const problem = await problemOf(await post(`/projects/${place.project}/steps`, body), 422);
    expect(problem.errors?.[0].field).toBe(field);
  });

  it("refuses a sweep that names a step of another project", async () => {
    const other = await makePlace(crew, "private");
    const refused = await sendSweep(place.project, token, touchstone(), { step: other.step });
    expect((await problemOf(refused, 422)).errors?.[0].field).toBe("step");
  });
});

describe("trails, benches and causes", () => {
  it("follow the dips of a project", async () => {
    const list = shapes.trailListShape.parse(
      await (await askApi(`/projects/${place.project}/trails`, token)).json(),
    );
    const own = list.items.find(({ id }) => id === place.trail);
    expect(own?.dips.map(({ sweep }) => sweep)).toContain(place.sweep);
    const one = shapes.trailShape.parse(await (await askApi(`/trails/${place.trail}`, token)).json());
    expect(one).toEqual(own);
  });

  it("name every bench with its versions", async () => {
    const list = shapes.benchListShape.parse(
      await (await askApi(`/projects/${place.project}/benches`, token)).json(),
    );
    expect(list.items.find(({ id }) => id === place.bench)?.versions).toMatchObject([
      { number: 1, validFrom: "2026-01-01T00:00:00.000Z", references: [] },
    ]);
  });

  it("judge a dip, and say what to cut", async () => {
    const answer = await askApi(`/dips/${place.dip}/causes`, token);
    const judged = shapes.causesShape.parse(await answer.json());
    expect(judged.causes[0]).toMatchObject({ kind: "part", part: "pole", order: 1 });
    expect(judged.causes[0].offsetHz + judged.causes[0].predictedHz).toBeCloseTo(7.1e6, -4);
    expect(judged.notJudged.map(({ name }) => name)).toContain("Mast");
    const [trim] = judged.trims;
    expect(trim).toMatchObject({ part: "pole", band: "40 m", lengthM: POLE_M, method: "proportion" });
    expect(trim.toM / POLE_M).toBeCloseTo(7.1e6 / 7.025e6, 3);
    expect(judged.verdicts).toEqual([]);
  });

  it("are hidden where the project is", async () => {
    const stranger = await tokenOf((await makeCrew()).owner);
    for (const path of [
      `/projects/${place.project}/antenna`,
      `/projects/${place.project}/steps`,
      `/steps/${place.step}`,
      `/projects/${place.project}/trails`,
      `/trails/${place.trail}`,
      `/projects/${place.project}/benches`,
      `/dips/${place.dip}/causes`,
    ]) {
      await problemOf(await askApi(path, stranger), 404);
    }
  });
});

async function antennaOf(project: string) {
  const answer = await askApi(`/projects/${project}/antenna`, token);
  return shapes.antennaShape.parse(await answer.json());
}
