import sharp from "sharp";
import { beforeAll, describe, expect, it } from "vitest";
import * as projects from "~/db/projects.server";
import { benchFile, GOOD_BRIDGE, POOR_BRIDGE } from "../bench-files.ts";
import type { Browser } from "./browser.ts";
import { type Crew, makeCrew, makePlace, type Place, signIn, unique } from "./world.ts";

/** Benches as plain forms send them, without scripts, and who may see and change whose. */

let crew: Crew;
let place: Place;
let experimenter: Browser;

beforeAll(async () => {
  crew = await makeCrew();
  place = await makePlace(crew, "public", true);
  experimenter = await signIn(crew.experimenter);
});

function fileOf(kind: "open" | "short" | "load" | "through", truth = GOOD_BRIDGE, salt = unique(kind)) {
  return new File([benchFile(truth, kind, ` ${salt}`)], `${kind}.csv`);
}

async function makeBench(fields: Record<string, string | Blob> = {}, project = place.project) {
  const answer = await experimenter.post(`/projects/${project}/benches/new`, {
    name: unique("Bridge"),
    validFrom: "2026-05-03",
    open: fileOf("open"),
    short: fileOf("short"),
    load: fileOf("load"),
    through: fileOf("through"),
    ...fields,
  });
  return { answer, page: answer.headers.get("Location") ?? "" };
}

const textOf = async (browser: Browser, path: string) => (await browser.get(path)).text();

async function countBenches(): Promise<number> {
  const html = await textOf(experimenter, `/projects/${place.project}/benches`);
  return html.split('class="panel').length;
}

describe("a bench sent as one form", () => {
  it("leads to its page, which says what it can do", async () => {
    const { answer, page } = await makeBench({
      "parts[0].kind": "cable",
      "parts[0].text": "0.5 m of thin cable",
      "standards.loadReturnLossDb": "40,5",
    });
    expect(answer.status).toBe(302);
    const html = await textOf(experimenter, page);
    expect(html).toContain("0.5 m of thin cable");
    expect(html).toMatch(/Load’s own return loss<\/dt><dd[^>]*>40\.5/);
    expect(html).toMatch(/An SWR of 1\.5 is known to ±0\.1 from 1(\.0+)?\sMHz/);
    expect(html.match(/class="bench-strip"/g)).toHaveLength(6);
    expect(await textOf(experimenter, `${page}?swr=1,1&tolerance=0.005`)).toContain(
      "An SWR of 1.1 is known to ±0.005 nowhere yet.",
    );
  });

  it.each([
    ["no name", { name: "" }, "Give the bench a name."],
    ["a day to come", { validFrom: "2999-01-01" }, "This day is yet to come."],
    ["a day that is none", { validFrom: "2026-02-31x" }, "Give the day as 2026-09-14."],
    ["a figure that is none", { "given.directivityDb": "forty" }, "a number of dB from 0 to 100"],
  ])("is refused with %s, in words, and nothing is stored", async (_, fields, words) => {
    const before = await countBenches();
    const { answer } = await makeBench(fields);
    expect(answer.status).toBe(400);
    expect(await answer.text()).toContain(words);
    expect(await countBenches()).toBe(before);
  });

  it("is refused where open and short are one file", async () => {
    const one = benchFile(GOOD_BRIDGE, "open", unique("one"));
    const { answer } = await makeBench({ open: new File([one], "a.csv"), short: new File([one], "b.csv") });
    expect(answer.status).toBe(400);
    expect(await answer.text()).toContain("The open and the short are the same file.");
  });

  it("is kept without a file that can't be read", async () => {
    const { page, answer } = await makeBench({ short: new File(["dear diary\n"], "short.csv") });
    expect(answer.status).toBe(302);
    const html = await textOf(experimenter, page);
    expect(html).toMatch(/to be read|Add short/);
  });
});

describe("a rebuilt bench", () => {
  it("leaves the version before as it was, and can be compared with it", async () => {
    const { page } = await makeBench();
    const first = await textOf(experimenter, page);
    const answer = await experimenter.post(`${page}/rebuild`, {
      validFrom: "2026-07-01",
      remark: "A worse arm",
      open: fileOf("open", POOR_BRIDGE),
      short: fileOf("short", POOR_BRIDGE),
      load: fileOf("load", POOR_BRIDGE),
    });
    expect(answer.headers.get("Location")).toBe(page);
    const now = await textOf(experimenter, page);
    expect(now).toContain("version 2 of 2");
    expect(now).toContain("sweep straight from the source to the detector");
    const old = /href="[^"]*\?version=([a-z0-9]{10})"[^>]*>Version (?:<!-- -->)?1</.exec(now)?.[1];
    const html = await textOf(experimenter, `${page}?version=${old}`);
    expect(html).toContain("it has been rebuilt since");
    const known = /An SWR of 1\.5 is known[^<]*/;
    expect(known.exec(html)?.[0]).toBe(known.exec(first)?.[0]);
    const compared = await textOf(experimenter, `${page}/compare`);
    expect(compared).toMatch(/The directivity is \d+\.\d dB worse/);
    const refused = await experimenter.post(`${page}/rebuild`, { validFrom: "2026-07-02" });
    expect(refused.status).toBe(400);
  });
});

describe("somebody's own bench", () => {
  it("is changed by that person alone, and lent where that person may add sweeps", async () => {
    const name = unique("Own bridge");
    const { page } = await makeBench({ name, own: "yes" });
    const owner = await signIn(crew.owner);
    expect((await owner.get(page)).status).toBe(200);
    expect((await owner.post(page, { intent: "retire" })).status).toBe(403);
    expect((await experimenter.get(`${page}/edit`)).status).toBe(200);

    const elsewhere = await makePlace(await makeCrew(), "public", true);
    const there = page.replace(place.project, elsewhere.project);
    expect((await experimenter.get(there)).status).toBe(404);
    await projects.insertMember(elsewhere.projectId, crew.experimenter.id, "experimenter");
    expect(await textOf(experimenter, `/projects/${elsewhere.project}/benches`)).toContain(name);
    const lent = await textOf(experimenter, there);
    expect(lent).toContain("kept in another project");
    expect(lent).not.toContain(place.title);
    // Its reference sweeps are of the other project: no way leads there.
    expect(lent).not.toContain(`/projects/${place.project}/`);
    const visitor = await signIn(crew.reader);
    expect((await visitor.get(there)).status).toBe(404);
    expect((await experimenter.post(there, { intent: "retire" })).status).toBe(403);
  });
});

describe("a photograph of a bench", () => {
  it("is shown to readers without its place, and its original to those who may change it", async () => {
    const { page } = await makeBench();
    const picture = await sharp({ create: { width: 60, height: 40, channels: 3, background: "#556f2a" } })
      .withExif({ IFD0: { Make: "Fennmarsh" } })
      .jpeg()
      .toBuffer();
    const form = {
      intent: "add",
      bench: page.split("/").at(-1) ?? "",
      caption: "The arm",
      photographs: new File([new Uint8Array(picture)], "arm.jpg"),
    };
    const photographs = `/projects/${place.project}/photographs`;
    const answer = await experimenter.post(photographs, form);
    expect(answer.headers.get("Location")).toBe(`${page}#photographs`);
    const html = await textOf(experimenter, page);
    const id = /photographs\/([a-z0-9]{10})\/small/.exec(html)?.[1] ?? "";
    expect(html).toContain('alt="The arm"');
    const reader = await signIn(crew.reader);
    const small = await reader.get(`${photographs}/${id}/small`);
    expect(small.headers.get("Content-Type")).toBe("image/jpeg");
    expect(Buffer.from(await small.arrayBuffer()).includes("Fennmarsh")).toBe(false);
    expect((await reader.get(`${photographs}/${id}/original`)).status).toBe(404);
    const original = await experimenter.get(`${photographs}/${id}/original`);
    expect(Buffer.from(await original.arrayBuffer()).equals(picture)).toBe(true);
    expect((await reader.post(photographs, form)).status).toBe(403);
    await experimenter.post(photographs, { intent: "delete", photograph: id });
    expect((await experimenter.get(`${photographs}/${id}/small`)).status).toBe(404);
  });
});
