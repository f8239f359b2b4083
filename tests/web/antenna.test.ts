import { beforeAll, beforeEach, describe, expect, it } from "vitest";
import * as projects from "~/db/projects.server";
import { createProject } from "~/services/projects.server";
import { Browser } from "./browser.ts";
import { makePerson, type Someone, sendSweep, signIn, tokenOf, touchstone, unique } from "./world.ts";

/** Antenna and steps by forms alone, as a browser without scripts sends them. */

let owner: Someone;
let ada: Browser;
let project: { id: number; publicId: string };
let base: string;

beforeAll(async () => {
  owner = await makePerson("owner");
  ada = await signIn(owner);
});
beforeEach(async () => {
  const about = { title: unique("Reeds"), summary: "", visibility: "public" as const, ituRegion: null };
  project = await createProject(about, owner.id);
  base = `/projects/${project.publicId}`;
});

const SINCE = "2026-05-01T08:00";

/** Invented: one pole. */
function pole(length: string, more: Record<string, string> = {}) {
  return {
    intent: "keep",
    since: SINCE,
    "elements[0].kind": "vertical",
    "elements[0].name": "Reed pole",
    "elements[0].length": length,
    ...more,
  };
}

async function describeIt(length = "10.2"): Promise<void> {
  const kept = await ada.post(`${base}/antenna/edit`, pole(length));
  expect(kept.status).toBe(302);
  expect(kept.headers.get("Location")).toBe(`${base}/antenna`);
}

/** What the form carries of the antenna as it began. */
async function opened(): Promise<{ was: string; key: string }> {
  const page = await (await ada.get(`${base}/antenna/edit`)).text();
  const was = attribute(page, "was");
  return { was, key: JSON.parse(was).elements[0]?.key };
}

function attribute(page: string, name: string): string {
  const tag = page.match(new RegExp(`<input[^>]*name="${name}"[^>]*>`))?.[0] ?? "";
  const value = /value="([^"]*)"/.exec(tag)?.[1] ?? "";
  return value.replaceAll("&quot;", '"').replaceAll("&#x27;", "'").replaceAll("&amp;", "&");
}

async function words(path: string, browser = ada): Promise<string> {
  const text = await (await browser.get(path)).text();
  const main = text.slice(text.indexOf("<main"), text.indexOf("</main>"));
  return main
    .replace(/<script.*?<\/script>/gs, "")
    .replace(/<[^>]*>/g, " ")
    .replace(/&#x27;/g, "'")
    .replace(/[\u2009\s]+/g, " ");
}

describe("the antenna's form", () => {
  it.each([
    ["zero", "0", "more than zero"],
    ["a negative length", "-3 m", "negative"],
    ["no length at all", "about ten", "A number was expected"],
  ])("refuses %s and loses nothing that was typed", async (_, length, message) => {
    const answer = await ada.post(`${base}/antenna/edit`, pole(length, { ground: "wet reeds" }));
    expect(answer.status).toBe(400);
    const page = await answer.text();
    expect(page).toMatch(message);
    expect(page).toContain(`value="${length}"`);
    expect(page).toContain("wet reeds");
  });

  it("asks about a kilometre, and takes it when that is meant", async () => {
    const asked = await ada.post(`${base}/antenna/edit`, pole("1 km"));
    expect(asked.status).toBe(400);
    expect(await asked.text()).toMatch(/The lengths in question are right/);
    expect((await ada.post(`${base}/antenna/edit`, pole("1 km", { confirm: "on" }))).status).toBe(302);
    expect(await words(`${base}/antenna`)).toContain("1000 m");
  });

  it("gives another row without scripts", async () => {
    const page = await (await ada.post(`${base}/antenna/edit`, pole("10.2", { intent: "another" }))).text();
    expect(page).toContain('name="elements[1].length"');
    expect(page).toContain('value="10.2"');
    expect(await words(`${base}/antenna`)).toContain("not described yet");
  });

  it("shows lengths by the person's setting, to visitors in metres, and keeps them exact", async () => {
    await describeIt("33 ft 5 5/8 in");
    expect(await words(`${base}/antenna`, new Browser())).toContain("10.201 m");
    await ada.post("/settings", { intent: "lengths", lengthUnit: "ft" });
    expect(await words(`${base}/antenna`)).toContain("33 ft 5 5/8 in");
    const { was, key } = await opened();
    const same = await ada.post(
      `${base}/antenna/edit`,
      pole("33 ft 5 5/8 in", { was, "elements[0].key": key, "elements[0].count": "1" }),
    );
    expect(same.status).toBe(302);
    expect((await words(`${base}/antenna`)).match(/UTC/g)).toHaveLength(2);
    await ada.post("/settings", { intent: "lengths", lengthUnit: "m" });
  });

  it("tells the later of two what the first one changed, and keeps both words in order", async () => {
    await describeIt();
    const { was, key } = await opened();
    const change = (length: string, basis: string) =>
      ada.post(
        `${base}/antenna/edit`,
        pole(length, { was: basis, "elements[0].key": key, since: "2026-05-03T08:00" }),
      );
    expect((await change("10.1", was)).status).toBe(302);
    const late = await change("10", was);
    expect(late.status).toBe(409);
    const page = await late.text();
    expect(page).toContain("Reed pole, length</legend>");
    expect(page).toMatch(/name="elements\[0\]\.length"[^>]* value="10 m"/);
    expect(page).toMatch(/name="elements\[0\]\.length"[^>]* value="10\.1 m"/);
    expect((await change("10", attribute(page, "was"))).status).toBe(302);
    expect(await words(`${base}/antenna`)).toContain("10.1 m → 10 m");
  });

  it("says of a day before its description that it is not described, and never shows a later one", async () => {
    await describeIt();
    const before = await words(`${base}/antenna?on=2026-04-30`);
    expect(before).toContain("not described for that day");
    expect(before).not.toContain("Feedline and ground");
    expect(await words(`${base}/antenna?on=2026-05-01`)).toContain("10.2 m");
    expect(await words(`${base}/antenna?on=never`)).toContain("As it is since");
  });

  it("keeps design bands, for those who may change the antenna", async () => {
    const band = {
      "bands[0].name": "40 m",
      "bands[0].lowMhz": "7",
      "bands[0].highMhz": "7,2",
      "bands[0].swrLimit": "2",
    };
    expect((await ada.post(`${base}/antenna/edit`, { intent: "bands", ...band })).status).toBe(302);
    expect((await projects.findDesignBands(project.id)).map(({ highHz }) => highHz)).toEqual([7.2e6]);
    const wrong = await ada.post(`${base}/antenna/edit`, {
      intent: "bands",
      ...band,
      "bands[0].highMhz": "6",
    });
    expect(wrong.status).toBe(400);
  });
});

describe("steps by form", () => {
  async function stepOf(more: Record<string, string>) {
    return ada.post(`${base}/steps/new`, {
      intent: "keep",
      title: "Cut the pole",
      state: "done",
      at: "2026-05-05T12:00",
      ...more,
    });
  }

  it("change the antenna they point at, from that day on", async () => {
    await describeIt();
    const { key } = await opened();
    const made = await stepOf({
      "quantities[0].target": `${key}.lengthM`,
      "quantities[0].to": "32 ft 9 3/4 in",
      "quantities[1].label": "turns",
      "quantities[1].from": "9",
      "quantities[1].to": "12",
    });
    expect(made.status).toBe(302);
    const step = await words(made.headers.get("Location") ?? "");
    expect(step).toContain("Reed pole, length: 10.2 m → 10.001 m (−20 cm)");
    expect(step).toContain("turns: 9 → 12");
    expect(await words(`${base}/antenna?on=2026-05-04`)).toContain("Reed pole vertical 10.2 m");
    expect(await words(`${base}/antenna?on=2026-05-05`)).toContain("Reed pole vertical 10.001 m");

    const here = made.headers.get("Location") ?? "";
    expect((await ada.post(here, { intent: "delete" })).status).toBe(302);
    expect((await ada.get(here)).status).toBe(404);
    expect(await words(`${base}/antenna`)).toContain("Reed pole vertical 10.2 m");
  });

  it.each([
    ["without a day though done", { at: "" }, "Say when it was done"],
    ["of a day to come though done", { at: "2199-01-01T00:00" }, "yet to come"],
    ["with a length of zero", { "quantities[0].to": "0" }, "more than zero"],
    ["with a kilometre", { "quantities[0].to": "1 km" }, "The lengths in question are right"],
    [
      "that says the antenna was otherwise",
      { "quantities[0].from": "9" },
      "The antenna says 10.2 m there, not 9 m",
    ],
    ["of a day before the antenna is described", { at: "2026-04-01T12:00" }, "not described for that day"],
    ["with words for a number", { "quantities[0].target": "", "quantities[0].label": "x" }, "A number"],
  ])("are refused %s, with what was typed", async (_, more: Record<string, string>, message) => {
    await describeIt();
    const { key } = await opened();
    const to = "quantities[0].label" in more ? "a bit" : "10";
    const answer = await stepOf({
      "quantities[0].target": `${key}.lengthM`,
      "quantities[0].to": to,
      ...more,
    });
    expect(answer.status).toBe(400);
    const page = await answer.text();
    expect(page.replaceAll("&#x27;", "'")).toContain(message);
    expect(page).toContain('value="Cut the pole"');
    expect(await words(`${base}/steps`)).toContain("No steps yet");
  });

  it("find their sweeps by date, and say when two lie between the same ones", async () => {
    const token = await tokenOf(owner);
    for (const day of ["2026-05-04T12:00:00Z", "2026-05-06T12:00:00Z"]) {
      const sent = await sendSweep(project.publicId, token, touchstone(), {
        takenAt: day,
        title: `of ${day.slice(0, 10)}`,
      });
      expect(sent.status).toBe(201);
    }
    const first = await stepOf({});
    const second = await stepOf({ title: "Moved the stake" });
    const page = await words(first.headers.get("Location") ?? "");
    expect(page).toContain("before: of 2026-05-04");
    expect(page).toContain("after: of 2026-05-06");
    expect(page).toContain("did not move beyond its limits");
    expect(page).toMatch(/Between the same sweeps lies also Moved the stake/);
    expect(await words(`${base}/steps`)).toContain("Their effects can't be told apart");

    const here = second.headers.get("Location") ?? "";
    const foreign = await ada.post(here, { intent: "sweeps", before: "nothing123", after: "" });
    expect(foreign.status).toBe(400);
  });

  it("planned, wait for their day without touching the antenna", async () => {
    await describeIt();
    const { key } = await opened();
    const made = await stepOf({
      state: "planned",
      at: "",
      "quantities[0].target": `${key}.lengthM`,
      "quantities[0].to": "10",
    });
    const here = made.headers.get("Location") ?? "";
    expect(await words(here)).toContain("Mark it done");
    expect(await words(`${base}/antenna`)).toContain("Reed pole vertical 10.2 m");
    expect((await ada.post(here, { intent: "done", at: "2199-01-01T00:00" })).status).toBe(400);
    expect((await ada.post(here, { intent: "done", at: "2026-05-07T12:00" })).status).toBe(302);
    expect(await words(`${base}/antenna`)).toContain("Reed pole vertical 10 m");
  });
});
