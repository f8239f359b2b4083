import { beforeAll, describe, expect, it } from "vitest";
import * as tokens from "~/db/tokens.server";
import { hashOfToken } from "~/services/tokens.server";
import { askApi, SERVER } from "./browser.ts";
import { problemOf } from "./problem.ts";
import { flattenSiteMap } from "./site-map.ts";
import {
  type Crew,
  makeCrew,
  makePerson,
  makePlace,
  type Place,
  sendSweep,
  signIn,
  tokenOf,
  touchstone,
} from "./world.ts";

/** What holds for the whole API: tokens, methods, addresses, and the document that describes it. */

let crew: Crew;
let place: Place;
let token: string;

beforeAll(async () => {
  crew = await makeCrew();
  place = await makePlace(crew, "private");
  token = await tokenOf(crew.owner);
});

describe("tokens", () => {
  it("are asked for, and a wrong one is told from none", async () => {
    const none = await askApi("/projects", null);
    expect(none.headers.get("WWW-Authenticate")).toMatch(/^Bearer realm=/);
    await problemOf(none, 401);
    const wrong = await askApi("/projects", "swale_nothing");
    expect(wrong.headers.get("WWW-Authenticate")).toContain('error="invalid_token"');
    await problemOf(wrong, 401);
    const basic = { headers: { Authorization: "Basic eDp5" } };
    await problemOf(await fetch(`${SERVER}/api/v1/projects`, basic), 401);
  });

  it("take no cookie for a token", async () => {
    const browser = await signIn(crew.owner);
    await problemOf(await browser.get("/api/v1/projects"), 401);
  });

  it("of scope read write nothing", async () => {
    const reader = await tokenOf(crew.owner, "read");
    expect((await askApi("/projects", reader)).status).toBe(200);
    const answer = await sendSweep(place.project, reader, touchstone());
    expect(answer.headers.get("WWW-Authenticate")).toContain('error="insufficient_scope"');
    expect((await problemOf(answer, 403)).code).toBe("scope");
  });

  it("are made on the settings page, shown once, kept as a hash, and revoked", async () => {
    const person = await makePerson("scripter");
    const browser = await signIn(person);
    const made = await browser.post("/settings/tokens", { intent: "make", label: "shed", scope: "read" });
    expect(made.headers.get("Cache-Control")).toBe("no-store");
    const [text] = /swale_[\w-]{43}/.exec(await made.text()) ?? [];
    expect(text).toBeDefined();
    expect((await askApi("/projects", text ?? "")).status).toBe(200);
    expect(await (await browser.get("/settings/tokens")).text()).not.toContain(text);
    const [row] = await tokens.findAllByUser(person.id);
    expect(row).toMatchObject({ label: "shed", scope: "read" });
    expect(row.lastUsedAt).not.toBeNull();
    expect((await tokens.findByHash(hashOfToken(text ?? "")))?.token.tokenHash).not.toContain(text);
    await browser.post("/settings/tokens", { intent: "revoke", token: row.publicId });
    await problemOf(await askApi("/projects", text ?? ""), 401);
  });

  it("of a suspended account open nothing", async () => {
    const person = await makePerson("closed");
    const its = await tokenOf(person);
    const admin = await signIn(await makePerson("admin", { administrator: true }));
    await admin.post("/admin", { intent: "suspend", user: person.publicId });
    await problemOf(await askApi("/projects", its), 401);
  });

  it("that ask too often are told to wait, and others are not", async () => {
    const eager = await tokenOf(crew.owner);
    const path = `/dips/${place.dip}/notes`;
    let last = new Response();
    for (let i = 0; i < 121; i++) last = await askApi(path, eager, { method: "POST" });
    const waitS = Number(last.headers.get("Retry-After"));
    expect(waitS).toBeGreaterThan(0);
    expect(waitS).toBeLessThanOrEqual(60);
    await problemOf(last, 429);
    await problemOf(await askApi(path, token, { method: "POST" }), 415);
    expect((await askApi(path, eager)).status).toBe(200);
  });
});

describe("wrong methods and addresses", () => {
  it.each(["PUT", "PATCH", "DELETE", "OPTIONS"])(
    "%s is answered with 405 and what is allowed",
    async (method) => {
      for (const [path, allow] of [
        ["/projects", "GET"],
        [`/projects/${place.project}/sweeps`, "GET, POST"],
        ["/openapi.json", "GET"],
      ]) {
        const answer = await askApi(path, token, { method });
        expect(answer.headers.get("Allow")).toBe(allow);
        await problemOf(answer, 405);
      }
    },
  );

  it("those that nothing here knows are answered alike", async () => {
    await problemOf(await askApi("/projects", token, { method: "PROPFIND" }), 405);
    const page = await fetch(new URL("/projects", SERVER), { method: "PROPFIND" });
    expect(page.status).toBe(405);
  });

  it("unknown ones are 404, also without a token", async () => {
    await problemOf(await askApi("/no/such/thing", null), 404);
    await problemOf(await askApi("/sweeps/nothing", token), 404);
    await problemOf(await askApi("/dips/nothing/notes", token), 404);
    await problemOf(await askApi("/projects/nothing", token), 404);
  });

  it("HEAD is answered as GET without a body", async () => {
    const answer = await askApi(`/projects/${place.project}`, token, { method: "HEAD" });
    expect(answer.status).toBe(200);
    expect(await answer.text()).toBe("");
  });
});

describe("the OpenAPI document", () => {
  it("lists each route of the API with each method it answers, and no other", async () => {
    const document = await (await askApi("/openapi.json", null)).json();
    expect(document.openapi).toBe("3.1.0");
    const listed = Object.entries(document.paths as Record<string, object>)
      .filter(([path]) => path.startsWith("/api/v1/"))
      .flatMap(([path, item]) =>
        Object.keys(item).map((method) => `${method.toUpperCase()} ${path.replace("/api/v1", "")}`),
      );
    const answered: string[] = [];
    for (const { path } of flattenSiteMap().filter((route) => route.path.startsWith("/api/v1/"))) {
      if (path.endsWith("*")) continue;
      const short = path.replace("/api/v1", "");
      const refused = await askApi(short.replace(/:\w+/g, "x"), token, { method: "PUT" });
      for (const method of (refused.headers.get("Allow") ?? "").split(", ")) {
        answered.push(`${method} ${short.replace(/:(\w+)/g, "{$1}")}`);
      }
    }
    expect(listed.sort()).toEqual(answered.sort());
  });

  it("refers only to what it holds", async () => {
    const text = await (await askApi("/openapi.json", null)).text();
    const document = JSON.parse(text);
    const references = [...text.matchAll(/"\$ref":"#\/([^"]+)"/g)].map((match) => match[1]);
    expect(references.length).toBeGreaterThan(20);
    for (const reference of references) {
      const found = reference.split("/").reduce((at, key) => at?.[key], document);
      expect([reference, typeof found]).toEqual([reference, "object"]);
    }
  });
});
