import { execFile } from "node:child_process";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { promisify } from "node:util";
import { beforeAll, describe, expect, it } from "vitest";
import * as shapes from "~/routes/api/schemas";
import { askApi } from "./browser.ts";
import { addBareSweeps } from "./in-a-place.ts";
import { problemOf } from "./problem.ts";
import { type Crew, makeCrew, makePlace, type Place, sendSweep, tokenOf, touchstone } from "./world.ts";

/** The API as its own OpenAPI document says. */

let crew: Crew;
let place: Place;
let token: string;

beforeAll(async () => {
  crew = await makeCrew();
  place = await makePlace(crew, "private");
  token = await tokenOf(crew.owner);
});

describe("reading", () => {
  it("lists projects, and one with its bands", async () => {
    const list = shapes.projectListShape.parse(await (await askApi("/projects", token)).json());
    expect(list.items.map((item) => item.id)).toContain(place.project);
    const one = await askApi(`/projects/${place.project}`, token);
    const project = shapes.projectWithBandsShape.parse(await one.json());
    expect(project).toMatchObject({ title: place.title, role: "owner", sweepCount: 1 });
  });

  it("gives a sweep with its analysis in the words of the command line", async () => {
    const sweep = shapes.sweepShape.parse(await (await askApi(`/sweeps/${place.sweep}`, token)).json());
    expect(sweep.format).toBe("touchstone");
    expect(sweep.sweep).toEqual({
      points: 201,
      startHz: 6e6,
      stopHz: expect.closeTo(8.2e6, 3),
      referenceOhm: 50,
      complex: true,
    });
    expect(sweep.reading?.quantity).toBe("gamma");
    expect(sweep.dips[0].frequencyHz).toBeCloseTo(7.1e6, -4);
    expect(sweep.analysis?.settings).toEqual({ swrLimit: 2, minimumProminenceDb: 3 });
  });

  it("says of a file what the command line says of it", async () => {
    const folder = mkdtempSync(path.join(tmpdir(), "swale-"));
    const file = path.join(folder, "same.s1p");
    const text = touchstone();
    writeFileSync(file, text);
    const command = ["scripts/run.mjs", "analyse.ts", file, "--json"];
    const { stdout } = await promisify(execFile)(process.execPath, command);
    rmSync(folder, { recursive: true });
    const said = JSON.parse(stdout);
    const answer = await sendSweep(place.project, token, text, {}, "same.s1p");
    const sweep = await answer.json();
    expect(sweep).toMatchObject(said);
    expect(sweep.dips[0].noteCount).toBe(0);
  });

  it("gives points, all or a stretch, never more than asked, the dip kept", async () => {
    const all = await points("");
    expect(all.total).toBe(201);
    expect(all.points.frequencyHz).toHaveLength(201);
    expect(all.points.gammaRe).toHaveLength(201);
    const few = await points("?max=20&fromHz=6500000&toHz=7500000");
    expect(few.points.frequencyHz.length).toBeLessThanOrEqual(20);
    expect(Math.min(...few.points.frequencyHz)).toBeGreaterThanOrEqual(6.4e6);
    const deepest = Math.min(...(few.points.magnitude as number[]));
    expect(deepest).toBeCloseTo(Math.min(...(all.points.magnitude as number[])), 12);
    await problemOf(await askApi(`/sweeps/${place.sweep}/points?max=1`, token), 422);
    await problemOf(await askApi(`/sweeps/${place.sweep}/points?fromHz=8e6&toHz=7e6`, token), 422);
    await problemOf(await askApi(`/sweeps/${place.sweep}/points?fromHz=x`, token), 422);

    async function points(query: string) {
      const answer = await askApi(`/sweeps/${place.sweep}/points${query}`, token);
      return shapes.pointsShape.parse(await answer.json());
    }
  });

  it("pages through sweeps with a cursor, each once", async () => {
    const own = await makePlace(crew, "linked");
    await addBareSweeps(own.projectId, 101);
    const seen: string[] = [];
    let cursor: string | null = "";
    let pages = 0;
    while (cursor !== null) {
      const answer = await askApi(`/projects/${own.project}/sweeps?cursor=${cursor}`, token);
      const list = shapes.sweepListShape.parse(await answer.json());
      expect(list.items.length).toBeLessThanOrEqual(100);
      seen.push(...list.items.map((item) => item.id));
      cursor = list.nextCursor;
      pages += 1;
    }
    expect(pages).toBe(2);
    expect(seen).toHaveLength(102);
    expect(new Set(seen).size).toBe(102);
  });
});

describe("taking a sweep in", () => {
  it("answers 201 with the sweep, its title and time as given", async () => {
    const answer = await sendSweep(place.project, token, touchstone(), {
      title: "Radials trimmed",
      takenAt: "2026-09-14T17:20:00+02:00",
    });
    expect(answer.status).toBe(201);
    const sweep = shapes.sweepShape.parse(await answer.json());
    expect(sweep).toMatchObject({ title: "Radials trimmed", takenAt: "2026-09-14T15:20:00.000Z" });
    expect(answer.headers.get("Location")).toBe(sweep.links.self);
    expect((await askApi(sweep.links.self.replace("/api/v1", ""), token)).status).toBe(200);
  });

  it("takes a reading as JSON", async () => {
    const rows = Array.from(
      { length: 30 },
      (_, i) => `${7 + i / 100};${3 - 2 * Math.exp(-((i - 15) ** 2) / 40)}`,
    );
    const reading = JSON.stringify({ text: { quantity: "swr", frequencyUnit: "MHz" } });
    const answer = await sendSweep(place.project, token, `${rows.join("\n")}\n`, { reading }, "plain.csv");
    expect(answer.status).toBe(201);
    const sweep = shapes.sweepShape.parse(await answer.json());
    expect(sweep.reading?.quantity).toBe("swr");
    expect(sweep.sweep?.startHz).toBe(7e6);
  });

  it("answers 409 for the same file, with the first sweep", async () => {
    const text = touchstone();
    const first = await (await sendSweep(place.project, token, text)).json();
    const problem = await problemOf(await sendSweep(place.project, token, text, {}, "other.s1p"), 409);
    expect(problem).toMatchObject({ code: "twice", sweep: `/api/v1/sweeps/${first.id}` });
  });

  it("answers 409 to one of two who send it at the same moment", async () => {
    const text = touchstone();
    const answers = await Promise.all([1, 2].map(() => sendSweep(place.project, token, text)));
    expect(answers.map((answer) => answer.status).sort()).toEqual([201, 409]);
  });

  it("answers 422 with line and column for a file with something wrong in it", async () => {
    const broken = touchstone().replace(/^7\.0010.*$/m, "7.0010 zero 0.5");
    const problem = await problemOf(await sendSweep(place.project, token, broken), 422);
    expect(problem.line).toBeGreaterThan(2);
    expect(problem.column).toBeGreaterThan(0);
    expect(problem.detail).toContain("Nothing was stored");
  });

  it("answers 415 for what no reader reads", async () => {
    const pages = "%PDF-1.4\n1 0 obj\n<< /Type /Catalog >>\nendobj\n";
    const answer = await sendSweep(place.project, token, pages, {}, "sweep.pdf");
    await problemOf(answer, 415);
  });

  it("answers 413 above the limit, whether its length is told or not", async () => {
    const form = new FormData();
    form.set("file", new File([new Uint8Array(66 * 1024 * 1024)], "big.csv"));
    const answer = await askApi(`/projects/${place.project}/sweeps`, token, { method: "POST", body: form });
    await problemOf(answer, 413);
  });

  it.each([
    [{ takenAt: "yesterday" }, "takenAt"],
    [{ reading: "{" }, "reading"],
    [{ reading: '{"text":{"quantity":"volts"}}' }, "reading.text.quantity"],
    [{ reading: '{"colour":1}' }, "reading"],
    [{ bench: "abc" }, "bench"],
    [{ step: "abc" }, "step"],
    [{ title: "x".repeat(161) }, "title"],
    [{ surprise: "1" }, "body"],
  ])("answers 422 and the field for %j", async (fields, field) => {
    const answer = await sendSweep(place.project, token, touchstone(), fields as Record<string, string>);
    const problem = await problemOf(answer, 422);
    expect(problem.errors?.[0].field).toBe(field);
  });

  it("answers 415 or 400 for a body that is no form, 422 for one without a file", async () => {
    const path = `/projects/${place.project}/sweeps`;
    const json = { method: "POST", body: "{}", headers: { "Content-Type": "application/json" } };
    await problemOf(await askApi(path, token, json), 415);
    const torn = {
      method: "POST",
      body: "--x\r\n",
      headers: { "Content-Type": "multipart/form-data; boundary=x" },
    };
    await problemOf(await askApi(path, token, torn), 400);
    const form = new FormData();
    form.set("title", "nothing");
    await problemOf(await askApi(path, token, { method: "POST", body: form }), 422);
  });
});

describe("notes", () => {
  const send = (body: unknown, as = token) =>
    askApi(`/dips/${place.dip}/notes`, as, {
      method: "POST",
      body: typeof body === "string" ? body : JSON.stringify(body),
      headers: { "Content-Type": "application/json" },
    });

  it("are written, answered and listed oldest first", async () => {
    const first = shapes.noteShape.parse(await (await send({ body: "One." })).json());
    const answer = await send({ body: "Two.", parent: first.id });
    expect(answer.status).toBe(201);
    const second = shapes.noteShape.parse(await answer.json());
    expect(second.parent).toBe(first.id);
    const listed = await askApi(`/dips/${place.dip}/notes`, token);
    const { items } = shapes.noteListShape.parse(await listed.json());
    expect(items.map((note) => note.id).slice(-2)).toEqual([first.id, second.id]);
    expect(items.at(-1)?.author?.userName).toBe(crew.owner.userName);
    const { dips } = shapes.sweepShape.parse(await (await askApi(`/sweeps/${place.sweep}`, token)).json());
    expect(dips[0].noteCount).toBe(items.length);
  });

  it("sent again with one key are written once", async () => {
    const note = { body: "Once.", clientKey: "a-key-of-this-test" };
    const ids = [await (await send(note)).json(), await (await send(note)).json()].map(({ id }) => id);
    expect(ids[0]).toBe(ids[1]);
  });

  it("that are wrong are refused with the reason", async () => {
    await problemOf(await send("{"), 400);
    await problemOf(await send({ body: " " }), 422);
    await problemOf(await send({ body: "x".repeat(20_001) }), 422);
    await problemOf(await send({ body: "x", parent: "nothing" }), 422);
    await problemOf(await send({ body: "x", loud: true }), 422);
    const plain = { method: "POST", body: "x", headers: { "Content-Type": "text/plain" } };
    await problemOf(await askApi(`/dips/${place.dip}/notes`, token, plain), 415);
  });
});
