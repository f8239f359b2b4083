import { beforeAll, describe, expect, it } from "vitest";
import { db } from "~/db/client.server";
import { newPublicId } from "~/db/ids.server";
import { bundleRuns } from "~/db/schema/index";
import * as shapes from "~/routes/api/bundle-schemas";
import { bagOf, payload, zipOf } from "../services/bundle/bags.ts";
import { askApi } from "./browser.ts";
import { whenEnded } from "./poll.ts";
import { problemOf } from "./problem.ts";
import { type Crew, makeCrew, makePerson, makePlace, type Place, tokenOf } from "./world.ts";

/** Bundles over the API: made, downloaded in pieces, taken in, refused, and hidden from everybody else. */

let crew: Crew;
let place: Place;
let token: string;
const post = { method: "POST" };

beforeAll(async () => {
  crew = await makeCrew();
  place = await makePlace(crew, "private");
  token = await tokenOf(crew.owner);
});

describe("a project as one file", () => {
  it("is made, sent in pieces, and taken in by somebody else", async () => {
    const asked = await askApi(`/projects/${place.project}/bundles`, token, post);
    expect(asked.status).toBe(202);
    const bundle = shapes.bundleShape.parse(await asked.json());
    expect(asked.headers.get("Location")).toBe(`/api/v1/bundles/${bundle.id}`);
    expect(bundle).toMatchObject({ kind: "export", state: "waiting", project: place.project, file: null });
    const mine = await (await askApi("/my-data", token, post)).json();

    const done = shapes.bundleShape.parse(await whenEnded(`/bundles/${bundle.id}`, token));
    expect(done).toMatchObject({ state: "done", faults: [], records: null });
    const list = await (await askApi(`/projects/${place.project}/bundles`, token)).json();
    expect(shapes.bundleListShape.parse(list).items).toEqual([done]);

    const zip = await downloaded(bundle.id, done.file?.sizeBytes ?? 0);
    const other = await tokenOf(await makePerson("other"));
    const given = await give(zip, other);
    expect(given.status).toBe(202);
    const run = await given.json();
    expect(run).toMatchObject({ kind: "import", state: "waiting", project: null });
    await problemOf(await askApi(`/bundles/${run.id}`, token), 404);
    const taken = shapes.bundleShape.parse(await whenEnded(`/bundles/${run.id}`, other));
    expect(taken).toMatchObject({ state: "done", faults: [], file: null });
    expect(taken.records).toBeGreaterThan(0);
    const project = await (await askApi(`/projects/${taken.project}`, other)).json();
    expect(project).toMatchObject({
      title: place.title,
      sweepCount: 1,
      role: "owner",
      visibility: "private",
    });
    await problemOf(await askApi(`/bundles/${run.id}/file`, other), 404);

    const own = shapes.bundleShape.parse(await whenEnded(`/bundles/${mine.id}`, token));
    expect(own).toMatchObject({ kind: "mine", state: "done", project: null });
    const bytes = await (await askApi(`/bundles/${mine.id}/file`, token)).arrayBuffer();
    expect(bytes.byteLength).toBe(own.file?.sizeBytes);
    await problemOf(await askApi(`/bundles/${mine.id}/file`, other), 404);

    expect((await askApi(`/bundles/${bundle.id}`, token, { method: "DELETE" })).status).toBe(204);
    await problemOf(await askApi(`/bundles/${bundle.id}`, token), 404);
  });

  async function downloaded(id: string, sizeBytes: number): Promise<Buffer> {
    const path = `/bundles/${id}/file`;
    const whole = await askApi(path, token);
    expect(Object.fromEntries(whole.headers)).toMatchObject({
      "content-type": "application/zip",
      "content-length": String(sizeBytes),
      "accept-ranges": "bytes",
      "content-disposition": expect.stringContaining(".zip"),
    });
    const zip = Buffer.from(await whole.arrayBuffer());
    const etag = whole.headers.get("ETag") ?? "";
    const piece = await askApi(path, token, { headers: { Range: "bytes=10-29", "If-Range": etag } });
    expect([piece.status, piece.headers.get("Content-Range")]).toEqual([206, `bytes 10-29/${sizeBytes}`]);
    expect(Buffer.from(await piece.arrayBuffer())).toEqual(zip.subarray(10, 30));
    const beyond = await askApi(path, token, { headers: { Range: `bytes=${sizeBytes}-` } });
    expect([beyond.status, beyond.headers.get("Content-Range")]).toEqual([416, `bytes */${sizeBytes}`]);
    expect((await askApi(path, token, { headers: { "If-None-Match": etag } })).status).toBe(304);
    const head = await askApi(path, token, { method: "HEAD" });
    expect([head.status, head.headers.get("Content-Length")]).toEqual([200, String(sizeBytes)]);
    expect(await head.text()).toBe("");
    return zip;
  }
});

describe("a bundle that is no good", () => {
  it("is refused in words, and nothing becomes of it", async () => {
    const files = bagOf(payload());
    const entries = Object.entries(files);
    const sound = await zipOf(entries);
    const cases: [string, Buffer, RegExp][] = [
      ["cut short", sound.subarray(0, sound.length - 40), /not a ZIP file, or it is cut short/],
      ["climbing", await zipOf([...entries, ["../../etc/reeds", "x"]]), /leads out of the bundle/],
      [
        "changed",
        await zipOf(Object.entries({ ...files, "data/records/people.json": "{}" })),
        /its sum differs/,
      ],
    ];
    const look = async ([name, zip, words]: (typeof cases)[number]) => {
      const its = await tokenOf(await makePerson("giver"));
      const given = await give(zip, its);
      expect([name, given.status]).toEqual([name, 202]);
      const { id } = await given.json();
      const ended = shapes.bundleShape.parse(await whenEnded(`/bundles/${id}`, its));
      expect(ended).toMatchObject({ state: "failed", project: null, records: null });
      expect(ended.faults.join(" ")).toMatch(words);
      expect((await (await askApi("/projects", its)).json()).items).toEqual([]);
      const list = await (await askApi("/bundles/take-in", its)).json();
      expect(shapes.bundleListShape.parse(list).items).toEqual([ended]);
    };
    await Promise.all(cases.map(look));
  });

  it("and what is no file at all is refused at once", async () => {
    await problemOf(await askApi("/bundles/take-in", token, { ...post, body: "PK" }), 415);
    const form = new FormData();
    form.set("bundle", "no file");
    const refused = await problemOf(await askApi("/bundles/take-in", token, { ...post, body: form }), 422);
    expect(refused.errors?.[0].field).toBe("bundle");
    const cut = `--b\r\nContent-Disposition: form-data; name="bundle"; filename="a.zip"\r\n\r\nPK`;
    const headers = { "Content-Type": "multipart/form-data; boundary=b" };
    const answer = await askApi("/bundles/take-in", token, { ...post, headers, body: cut });
    expect((await problemOf(answer, 400)).code).toBe("cut-short");
  });
});

describe("whoever asks", () => {
  it("meets the roles of the project, the scope of the token, and no other's run", async () => {
    const path = `/projects/${place.project}/bundles`;
    const stranger = await tokenOf(await makePerson("stranger"));
    const reads = await tokenOf(crew.owner, "read");
    const commenter = await tokenOf(crew.commenter);
    for (const init of [{}, post]) {
      await problemOf(await askApi(path, stranger, init), 404);
      expect((await problemOf(await askApi(path, commenter, init), 403)).code).toBe("role");
    }
    expect((await problemOf(await askApi(path, reads, post), 403)).code).toBe("scope");
    expect((await problemOf(await askApi("/my-data", reads, post), 403)).code).toBe("scope");
    expect((await problemOf(await give(Buffer.from("PK"), reads), 403)).code).toBe("scope");
    const run = await insertRun({ state: "running" });
    for (const end of ["", "/file"]) {
      await problemOf(await askApi(`/bundles/${run}${end}`, stranger), 404);
      await problemOf(await askApi(`/bundles/${run}${end}`, commenter), 403);
    }
    await problemOf(await askApi(`/bundles/${run}`, stranger, { method: "DELETE" }), 404);
    const own = await insertRun({ kind: "mine", projectId: null, userId: crew.owner.id });
    await problemOf(await askApi(`/bundles/${own}`, await tokenOf(crew.experimenter)), 404);
    await problemOf(await askApi(`/bundles/${place.batch}`, token), 404);
  });

  it("is told where there is no file yet, or none any more", async () => {
    const open = await insertRun({ state: "running", doneParts: 1, allParts: 4 });
    const shaped = shapes.bundleShape.parse(await (await askApi(`/bundles/${open}`, token)).json());
    expect(shaped).toMatchObject({ state: "running", share: 0.25, links: { file: null } });
    expect((await problemOf(await askApi(`/bundles/${open}/file`, token), 409)).code).toBe("not-done");
    const removing = await askApi(`/bundles/${open}`, token, { method: "DELETE" });
    expect((await problemOf(removing, 409)).code).toBe("under-way");
    // Who asks while one is made is led to that.
    const again = await (await askApi(`/projects/${place.project}/bundles`, token, post)).json();
    expect(again.state).toMatch(/running/);
    const gone = await insertRun({ state: "done", expiresAt: new Date(Date.now() - 1000) });
    expect((await (await askApi(`/bundles/${gone}`, token)).json()).state).toBe("gone");
    expect((await problemOf(await askApi(`/bundles/${gone}/file`, token), 410)).code).toBe("gone");
  });
});

function give(zip: Buffer, its: string): Promise<Response> {
  const form = new FormData();
  form.set("bundle", new File([new Uint8Array(zip)], "reeds.zip"));
  return askApi("/bundles/take-in", its, { ...post, body: form });
}

/** A run of the place that nobody works on: one that runs is somebody else's for a minute. */
async function insertRun(values: Partial<typeof bundleRuns.$inferInsert>): Promise<string> {
  const publicId = newPublicId();
  const now = new Date();
  await db.insert(bundleRuns).values({
    ...{ publicId, kind: "export", state: "done", projectId: place.projectId, userId: crew.owner.id },
    ...{ createdAt: now, updatedAt: now, expiresAt: new Date(now.getTime() + 60_000) },
    ...values,
  });
  return publicId;
}
