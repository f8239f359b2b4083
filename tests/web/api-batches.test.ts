import { beforeAll, describe, expect, it } from "vitest";
import * as shapes from "~/routes/api/batch-schemas";
import { zipOf } from "../services/batch/mixed.ts";
import { askApi } from "./browser.ts";
import { whenEnded } from "./poll.ts";
import { problemOf } from "./problem.ts";
import { type Crew, makeCrew, makePerson, makePlace, type Place, tokenOf, touchstone } from "./world.ts";

/** Batches over the API: checked before anything is written, mended, taken in, given up. */

let crew: Crew;
let place: Place;
let token: string;

beforeAll(async () => {
  crew = await makeCrew();
  place = await makePlace(crew, "private", true);
  token = await tokenOf(crew.owner);
});

describe("a batch", () => {
  it("says what would be written and what stands in its way, line by line, and writes nothing", async () => {
    const files = { "reeds/dry.s1p": touchstone(), "wet.s1p": touchstone(), "torn.s1p": TORN };
    const table =
      "file,title,taken at,bench\ndry.s1p,Dry,2026-05-31,\nwet.s1p,Wet,31.5.2026,Barn\nice.s1p,,,\n";
    const answer = await send({ files, table });
    expect(answer.status).toBe(201);
    const first = shapes.batchShape.parse(await answer.json());
    expect(answer.headers.get("Location")).toBe(first.links.self);
    const batch = shapes.batchShape.parse(await whenEnded(`/batches/${first.id}`, token));
    expect(batch).toMatchObject({
      phase: "checked",
      ready: false,
      table: { name: "sweeps.csv", problem: null },
    });
    const told = batch.rows.map(({ file, line, problems }) => [
      file,
      line,
      ...problems.map(({ code }) => code),
    ]);
    expect(told).toEqual([
      ["dry.s1p", 2],
      ["wet.s1p", 3, "bad-date", "unknown-bench"],
      ["ice.s1p", 4, "missing-file"],
      ["torn.s1p", null, "unreadable"],
    ]);
    expect(batch.rows[0]).toMatchObject({
      title: "Dry",
      check: { kind: "read", points: 201, dips: 1 },
      result: null,
    });
    expect(batch.rows[3].check).toMatchObject({ kind: "unreadable", line: 3 });
    const refused = await problemOf(await take(batch.id), 409);
    expect([refused.code, await sweepCount()]).toEqual(["not-ready", 0]);
  });

  it("is mended by its table, taken in once, and closed then", async () => {
    const files = { "a.s1p": touchstone(), "b.s1p": touchstone() };
    const { id } = await (await send({ files, table: "title\nno file\n" })).json();
    const unusable = shapes.batchShape.parse(await whenEnded(`/batches/${id}`, token));
    expect(unusable).toMatchObject({ ready: false, table: { problem: expect.stringContaining("Line 1") } });
    expect((await problemOf(await take(id), 409)).detail).toContain("The table could not be used");
    const mended = await send({ table: "file,title\na.s1p,First\nb.s1p,Second\n", batch: id });
    expect(mended.status).toBe(201);
    expect(await whenEnded(`/batches/${id}`, token)).toMatchObject({ id, ready: true, all: 2 });
    const before = await sweepCount();
    expect((await take(id)).status).toBe(202);
    const done = shapes.batchShape.parse(await whenEnded(`/batches/${id}`, token));
    expect(done).toMatchObject({ phase: "done", done: 2, all: 2, ready: false });
    expect(done.rows.map(({ result }) => [result?.kind, result?.title])).toEqual([
      ["read", "First"],
      ["read", "Second"],
    ]);
    const sweep = await (await askApi(`/sweeps/${done.rows[0].result?.sweep}`, token)).json();
    expect(sweep.title).toBe("First");
    // The answer may get lost: asked again, nothing is written twice.
    expect((await take(id)).status).toBe(202);
    expect(await sweepCount()).toBe(before + 2);
    expect((await problemOf(await send({ files, batch: id }), 409)).code).toBe("taken");
    const list = await (await askApi(`/projects/${place.project}/batches`, token)).json();
    const listed = shapes.batchListShape.parse(list).items.find((item) => item.id === id);
    expect(listed).toMatchObject({ phase: "done", done: 2, all: 2 });
    expect((await askApi(`/batches/${id}`, token, { method: "DELETE" })).status).toBe(204);
    await problemOf(await askApi(`/batches/${id}`, token), 404);
    expect(await sweepCount()).toBe(before + 2);
  });

  it("of a ZIP with a climbing path and a broken one leaves those out", async () => {
    const before = await sweepCount();
    const zip = zipOf([
      { name: "../../climbing.s1p", text: touchstone() },
      { name: "fine.s1p", text: touchstone() },
    ]);
    const { id } = await (await send({ files: { "all.zip": zip, "torn.zip": zip.slice(0, -40) } })).json();
    const batch = shapes.batchShape.parse(await whenEnded(`/batches/${id}`, token));
    expect(batch.rows.map(({ file, problems }) => [file, problems[0]?.words ?? ""])).toEqual([
      ["../../climbing.s1p", expect.stringContaining("climbs out")],
      ["fine.s1p", ""],
      ["torn.zip", expect.stringContaining("cut short or damaged")],
    ]);
    await problemOf(await take(id), 409);
    expect((await take(id, { problems: "leave-out" })).status).toBe(202);
    const done = shapes.batchShape.parse(await whenEnded(`/batches/${id}`, token));
    expect(done.rows.map(({ leftOut, result }) => [leftOut, result?.kind])).toEqual([
      [true, undefined],
      [false, "read"],
      [true, undefined],
    ]);
    expect(await sweepCount()).toBe(before + 1);
  });
});

describe("whoever asks", () => {
  it("meets the roles of the project and the scope of the token", async () => {
    const { id } = await (await send({ files: { "a.s1p": touchstone() } })).json();
    const stranger = await tokenOf(await makePerson("stranger"));
    const reader = await tokenOf(crew.reader);
    const reads = await tokenOf(crew.owner, "read");
    for (const method of ["GET", "POST", "DELETE"]) {
      await problemOf(await askApi(`/batches/${id}`, stranger, { method }), 404);
      expect((await problemOf(await askApi(`/batches/${id}`, reader, { method }), 403)).code).toBe("role");
    }
    expect((await problemOf(await take(id, undefined, reads), 403)).code).toBe("scope");
    await problemOf(await send({ files: { "a.s1p": touchstone() } }, stranger), 404);
    expect((await problemOf(await send({ files: { "a.s1p": "" } }, reads), 403)).code).toBe("scope");
    await problemOf(await askApi(`/projects/${place.project}/batches`, reader), 403);
    // Another project of the same person has no such batch.
    const elsewhere = await makePlace(crew, "private", true);
    const wrong = await send({ files: { "b.s1p": touchstone() }, batch: id }, token, elsewhere.project);
    expect((await problemOf(wrong, 422)).errors?.[0].field).toBe("batch");
  });

  it("is told what is wrong with a form", async () => {
    const fieldsOf = async (response: Response) =>
      (await problemOf(response, 422)).errors?.map(({ field }) => field);
    expect(await fieldsOf(await send({}))).toEqual(["files"]);
    expect(await fieldsOf(await send({ batch: "no id" }))).toEqual(["batch"]);
    const path = `/projects/${place.project}/batches`;
    const form = new FormData();
    form.set("files", "no file");
    expect(await fieldsOf(await askApi(path, token, { method: "POST", body: form }))).toEqual(["files"]);
    form.set("bench", "shed");
    expect(await fieldsOf(await askApi(path, token, { method: "POST", body: form }))).toHaveLength(1);
    await problemOf(await askApi(path, token, { method: "POST", body: "file" }), 415);
    const { id } = await (await send({ files: { "c.s1p": touchstone() } })).json();
    expect(await fieldsOf(await take(id, { problems: "ignore" }))).toEqual(["problems"]);
  });
});

interface Sent {
  files?: Record<string, string | Uint8Array>;
  table?: string;
  batch?: string;
}

function send({ files = {}, table, batch }: Sent, its = token, project = place.project): Promise<Response> {
  const form = new FormData();
  for (const [name, content] of Object.entries(files)) {
    form.append("files", new File([typeof content === "string" ? content : new Uint8Array(content)], name));
  }
  if (table !== undefined) form.set("table", new File([table], "sweeps.csv"));
  if (batch !== undefined) form.set("batch", batch);
  return askApi(`/projects/${project}/batches`, its, { method: "POST", body: form });
}

function take(id: string, json?: unknown, its = token): Promise<Response> {
  const headers = { "Content-Type": "application/json" };
  const body = json === undefined ? {} : { body: JSON.stringify(json), headers };
  return askApi(`/batches/${id}`, its, { method: "POST", ...body });
}

async function sweepCount(): Promise<number> {
  return (await (await askApi(`/projects/${place.project}`, token)).json()).sweepCount;
}

/** Its third line lacks a number. */
const TORN = "# MHz S RI R 50\n7.0 0.1 0.2\n7.1 0.1\n7.2 0.1 0.2\n";
