import { beforeAll, describe, expect, it } from "vitest";
import * as projects from "~/db/projects.server";
import * as steps from "~/db/steps.server";
import * as trails from "~/db/trails.server";
import { createProject } from "~/services/projects.server";
import { Browser } from "./browser.ts";
import { makePerson, type Someone, sendSweep, signIn, tokenOf, touchstone, unique } from "./world.ts";

/** The strip map and the trails of a project of three sweeps, over HTTP. */

let owner: Someone;
let browser: Browser;
let project: { id: number; publicId: string };
let page: string;
const sent: { id: string; dips: { id: string }[] }[] = [];

beforeAll(async () => {
  owner = await makePerson("owner");
  browser = await signIn(owner);
  const values = { title: unique("Strips"), summary: "", visibility: "public" as const, ituRegion: 1 };
  project = await createProject(values, owner.id);
  page = `/projects/${project.publicId}`;
  const token = await tokenOf(owner);
  for (const day of ["01", "02", "03"]) {
    const fields = { title: `Day ${day}`, takenAt: `2026-05-${day}T10:00:00Z` };
    const answer = await sendSweep(project.publicId, token, touchstone(), fields);
    sent.push(await answer.json());
  }
});

const textOf = async (path: string, by = browser) => {
  const answer = await by.get(path);
  expect(answer.status).toBe(200);
  return answer.text();
};
const trailPage = async (index = 0) =>
  `${page}/trails/${(await trails.findAllByProject(project.id))[index].publicId}`;
/** Newest first, as the map's captions stand. */
const captions = (html: string) =>
  [...html.matchAll(/class="strip-caption"[^>]*>.*?<a [^>]*>([^<]*)<\/a>/g)].map(([, title]) => title);

describe("the strip map", () => {
  it("draws every sweep with its trail, complete without scripts, for anybody who may read", async () => {
    const html = await textOf(page, new Browser());
    expect(captions(html)).toEqual(["Day 03", "Day 02", "Day 01"]);
    expect(html.match(/class="trail-stop"/g)).toHaveLength(3);
    expect(html).toContain(`href="${await trailPage()}"`);
    expect(html).toMatch(/aria-label="Trail 7\.1\d*\u2009MHz, in 3 sweeps"/);
  });

  it("keeps axis, stretch and hidden sweeps in the address; nonsense is left at its default", async () => {
    const html = await textOf(`${page}?axis=linear&from=7&to=7.4&hide=${sent[1].id}`);
    expect(captions(html)).toEqual(["Day 03", "Day 01"]);
    expect(html).toContain("1 of 3 sweeps hidden");
    expect(html).toMatch(/aria-current="true"[^>]*>Linear/);
    for (const search of ["?from=x&to=-3", "?from=9&to=8", "?from=900&to=901", "?hide=nobody&axis=round"]) {
      expect(captions(await textOf(page + search))).toHaveLength(3);
    }
    expect(captions(await textOf(`${page}?${sent.map(({ id }) => `hide=${id}`).join("&")}`))).toEqual([]);
  });

  it("writes steps between the strips and draws where a planned one should put the trail", async () => {
    const [trail] = await trails.findAllByProject(project.id);
    const step = { projectId: project.id, body: "", quantities: [], createdBy: owner.id, expected: [] };
    const expected = [
      { trail: trail.publicId, frequencyHz: 7.3e6, lowHz: 7.2e6, highHz: 7.4e6, how: "7.1 × 1.028" },
    ];
    const at = new Date("2026-05-01T18:00:00Z");
    const { inTransaction } = await import("~/db/client.server");
    await inTransaction(async (tx) => {
      await steps.insert({ ...step, title: "Wire cut by 2 cm", state: "done", at }, tx);
      await steps.insert({ ...step, title: "Cut 20 cm more", state: "planned", expected }, tx);
    });
    const html = await textOf(page);
    const order = ["Cut 20 cm more", "Day 03", "Day 02", "Wire cut by 2 cm", "Day 01"];
    const words = html.slice(html.indexOf("strip-map-words"));
    expect(order.map((text) => words.indexOf(text))).toEqual(
      [...order.map((text) => words.indexOf(text))].sort((a, b) => a - b),
    );
    expect(html).toContain("7.1 × 1.028");
    expect(html.match(/class="ghost"/g)).toHaveLength(1);
    expect(await textOf(await trailPage())).toContain("Cut 20 cm more");
  });

  it("teaches the next action where there is no sweep", async () => {
    const values = { title: unique("Empty"), summary: "", visibility: "private" as const, ituRegion: null };
    const { publicId } = await createProject(values, owner.id);
    expect(await textOf(`/projects/${publicId}`)).toContain("Add the first sweep");
  });
});

describe("a trail", () => {
  it("is named, judged, parted, joined and taken back by plain forms", async () => {
    const here = await trailPage();
    const send = (fields: Record<string, string>, to = here) => browser.post(to, fields);
    expect((await send({ intent: "name", name: "Long wire" })).status).toBe(302);
    expect(await textOf(page)).toContain("Long wire");
    expect((await send({ intent: "propose", was: "open", text: "A quarter wave." })).status).toBe(302);
    const late = await send({ intent: "settle", was: "open", text: "Late." }, `${here}.data`);
    expect(late.status).toBe(409);
    expect(await textOf(here)).toContain("A quarter wave.");

    const [, second, third] = sent.map(({ dips }) => dips[0].id);
    expect((await send({ intent: "part", one: second, other: third })).status).toBe(302);
    expect(await trails.findAllByProject(project.id)).toHaveLength(2);
    const parted = await textOf(here);
    expect(parted).toContain("are not the same dip");
    expect(await textOf(`${page}/dips/${third}`)).toContain("It belongs to another trail");

    const named = (await trails.findAllByProject(project.id)).find(({ name }) => name === "Long wire");
    const lone = (await trails.findAllByProject(project.id)).find(({ name }) => name === "");
    const back = { intent: "join-dip", dip: third, trail: named?.publicId ?? "" };
    expect((await send(back, `${page}/trails/${lone?.publicId}`)).status).toBe(302);
    expect(await trails.findAllByProject(project.id)).toHaveLength(1);
    expect((await send({ intent: "take-back", one: third, other: second })).status).toBe(302);
    expect(await textOf(here)).toContain("Nothing was corrected");
  });

  it("says why a form was not done, and does nothing", async () => {
    const here = await trailPage();
    const own = { intent: "join", other: here.slice(-10) };
    const same = await browser.post(`${here}.data`, own);
    expect(same.status).toBe(409);
    expect(await same.text()).toContain("one trail already");
    expect((await browser.post(here, own)).status).toBe(302);
    expect(await textOf(here)).toContain("one trail already");
    const nonsense = await browser.post(here, { intent: "name", name: "n".repeat(81) });
    expect(nonsense.status).toBe(400);
    expect(await nonsense.text()).toContain("at most 80 characters");
    expect((await browser.post(here, { intent: "rub out" })).status).toBe(400);
    expect(
      (await browser.post(here, { intent: "part", one: "2222222222", other: "3333333333" })).status,
    ).toBe(404);
  });

  it("is not another project's, and is read without forms by who may only read", async () => {
    const [, tail] = (await trailPage()).split("/trails/");
    const values = { title: unique("Else"), summary: "", visibility: "public" as const, ituRegion: null };
    const elsewhere = await createProject(values, owner.id);
    expect((await browser.get(`/projects/${elsewhere.publicId}/trails/${tail}`)).status).toBe(404);
    expect((await projects.findMembers(elsewhere.id)).length).toBe(1);
    const read = await textOf(await trailPage(), new Browser());
    expect(read).not.toContain('name="intent"');
  });
});
