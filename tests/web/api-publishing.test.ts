import { beforeAll, describe, expect, it } from "vitest";
import { askApi } from "./browser.ts";
import { freezePlate, waitingMention } from "./in-a-place.ts";
import { problemOf } from "./problem.ts";
import { type Crew, makeCrew, makePlace, type Place, tokenOf } from "./world.ts";

/** By script what the pages of plates, write-ups, mentions and the table of dips offer. */

let crew: Crew;
let place: Place;
const tokens: Partial<Record<keyof Crew, string>> = {};

beforeAll(async () => {
  crew = await makeCrew();
  place = await makePlace(crew, "private");
  for (const role of ["owner", "experimenter", "reader"] as const) tokens[role] = await tokenOf(crew[role]);
});

function send(path: string, who: keyof Crew, body?: unknown, method = "POST"): Promise<Response> {
  const headers = new Headers(body === undefined ? [] : [["Content-Type", "application/json"]]);
  const init: RequestInit = { method, headers };
  if (body !== undefined) init.body = JSON.stringify(body);
  return askApi(path, tokens[who] ?? null, init);
}

describe("a write-up", () => {
  let id = "";
  let revision = "";

  it("is published as it was looked at, once, and taken back; then it has no reader", async () => {
    const made = await send(`/projects/${place.project}/write-ups`, "experimenter", {
      title: "T",
      body: "B",
    });
    ({ id, revision } = await made.json());
    const path = `/write-ups/${id}/publication`;
    await problemOf(await send(path, "reader", { revision }), 403);
    expect(await problemOf(await send(path, "owner", { revision: "another" }), 409)).toMatchObject({
      code: "changed-since",
    });
    const first = await (await send(path, "owner", { revision, remark: "First" })).json();
    expect(first).toMatchObject({ state: "published", version: 1, body: "B" });
    expect(first.versions).toMatchObject([{ version: 1, remark: "First", publishedBy: crew.owner.userName }]);
    expect((await problemOf(await send(path, "owner", { revision }), 409)).code).toBe("same-as-published");
    expect((await askApi(`/write-ups/${id}?version=2`, tokens.owner ?? "")).status).toBe(404);
    expect((await problemOf(await send(`/write-ups/${id}`, "owner", undefined, "DELETE"), 409)).code).toBe(
      "published-once",
    );
    await problemOf(await send(path, "reader", undefined, "DELETE"), 403);
    expect((await send(path, "experimenter", undefined, "DELETE")).status).toBe(204);
    expect((await problemOf(await send(path, "owner", undefined, "DELETE"), 409)).code).toBe("not-published");
    expect((await send(`/write-ups/${id}`, "reader", undefined, "GET")).status).toBe(403);
  });

  it("that never was published is deleted by who may write it", async () => {
    const made = await send(`/projects/${place.project}/write-ups`, "owner", { title: "False" });
    const path = `/write-ups/${(await made.json()).id}`;
    await problemOf(await send(path, "reader", undefined, "DELETE"), 403);
    expect((await send(path, "owner", undefined, "DELETE")).status).toBe(204);
    await problemOf(await send(path, "owner", undefined, "DELETE"), 404);
  });
});

describe("a mention", () => {
  it("is an owner's alone until it is shown, and stands in the write-up's JSON then", async () => {
    const mention = await waitingMention(place);
    const list = `/projects/${place.project}/mentions`;
    const itemsOf = async (who: keyof Crew, query = "") =>
      (await (await send(list + query, who, undefined, "GET")).json()).items;
    expect((await itemsOf("owner", "?state=verified")).map(({ id }: { id: string }) => id)).toEqual([
      mention,
    ]);
    expect(await itemsOf("reader")).toEqual([]);
    await problemOf(await send(`${list}?state=verified`, "reader", undefined, "GET"), 403);
    await problemOf(await send(`/mentions/${mention}`, "experimenter", { decision: "show" }), 403);
    await problemOf(await send(`/mentions/${mention}`, "owner", { decision: "praise" }), 422);
    const shown = await (await send(`/mentions/${mention}`, "owner", { decision: "show" })).json();
    expect(shown).toMatchObject({ state: "shown", decidedBy: crew.owner.userName });
    expect(await itemsOf("reader")).toMatchObject([{ id: mention, state: "shown", decidedBy: null }]);
    const article = await send(`/write-ups/${place.writeUp}`, "reader", undefined, "GET");
    expect((await article.json()).mentions).toMatchObject([{ title: "Reeds and radials" }]);
    expect(
      (await problemOf(await send(`/mentions/${mention}`, "owner", { decision: "show" }), 409)).code,
    ).toBe("not-now");
  });
});

describe("a plate", () => {
  it("is withdrawn with a reason by who may make one, once", async () => {
    const path = `/plates/${await freezePlate(place, crew.owner)}`;
    const stranger = await tokenOf((await makeCrew()).reader);
    const init = { method: "POST", headers: { "Content-Type": "application/json" } };
    const refused = await askApi(`${path}/withdrawal`, stranger, { ...init, body: '{"reason":"Mine"}' });
    await problemOf(refused, 403);
    await problemOf(await send(`${path}/withdrawal`, "owner", { reason: " " }), 422);
    expect(await (await send(`${path}/check`, "reader", undefined, "GET")).json()).toEqual({
      same: true,
      differences: [],
    });
    const gone = await (await send(`${path}/withdrawal`, "owner", { reason: "The wrong mast" })).json();
    expect(gone).toMatchObject({ number: 1, reason: "The wrong mast", newer: null });
    for (const ending of ["", "/check"]) {
      await problemOf(await send(path + ending, "owner", undefined, "GET"), 410);
    }
    await problemOf(await send(`${path}/withdrawal`, "owner", { reason: "Again" }), 410);
  });
});

describe("the table of dips", () => {
  const ask = (query: string, accept = "*/*") =>
    askApi(`/projects/${place.project}/dips${query}`, tokens.reader ?? "", { headers: { Accept: accept } });

  it("is filtered as its page is, and refuses what would filter nothing", async () => {
    const all = await (await ask("?under=2")).json();
    expect(all).toMatchObject({ total: 1, nextCursor: null });
    expect(all.items).toMatchObject([
      { id: place.dip, sweep: { id: place.sweep }, trail: { id: place.trail } },
    ]);
    expect((await (await ask("?from=8")).json()).items).toEqual([]);
    const wrong = ["?from=7,1", "?under=2000000", "?band=in:nowhere", "?verdict=no", "?sort=x", "?cursor=y"];
    for (const query of wrong) {
      const [name] = query.slice(1).split("=");
      expect((await problemOf(await ask(query), 422)).errors?.map(({ field }) => field)).toEqual([name]);
    }
  });

  it("is CSV for who asks for that", async () => {
    const csv = await ask("?under=2", "text/csv");
    expect(csv.headers.get("Content-Type")).toBe("text/csv; charset=utf-8");
    const [head, row, end] = (await csv.text()).split("\r\n");
    expect([head?.split(",")[0], row?.split(",")[0], end]).toEqual(["dip", place.dip, ""]);
  });
});

it("the licence of what is new in a project is an owner's choice", async () => {
  await problemOf(await send(`/projects/${place.project}`, "experimenter", { licence: "CC0-1.0" }), 403);
  await problemOf(await send(`/projects/${place.project}`, "owner", { licence: "none" }), 422);
  const changed = await (await send(`/projects/${place.project}`, "owner", { licence: "CC0-1.0" })).json();
  expect(changed.licence).toBe("CC0-1.0");
});
