import { beforeAll, expect, it } from "vitest";
import { createProject } from "~/services/projects.server";
import { type Browser, SERVER } from "./browser.ts";
import { makePerson, signIn, unique } from "./world.ts";

/** What no page of this site sends is refused with a plain word, never answered as a fault of ours. */

let browser: Browser;
let page: string;

beforeAll(async () => {
  const owner = await makePerson("owner");
  browser = await signIn(owner);
  const about = {
    title: unique("Bad requests"),
    summary: "",
    visibility: "public" as const,
    ituRegion: null,
  };
  page = `/projects/${(await createProject(about, owner.id)).publicId}`;
});

it.each(["PUT", "PATCH", "DELETE"])("%s is no method of a page", async (method) => {
  const answer = await fetch(new URL(page, SERVER), { method, headers: { Origin: SERVER } });
  expect(answer.status).toBe(405);
  expect(answer.headers.get("Allow")).toBe("GET, HEAD, POST");
});

it.each(["application/json", "text/plain"])("a body of %s is no form", async (type) => {
  const answer = await fetch(new URL(`${page}/notes`, SERVER), {
    method: "POST",
    body: '{"body":"x"}',
    headers: { Origin: SERVER, "Content-Type": type },
  });
  expect(answer.status).toBe(415);
  expect(await answer.text()).toContain("Nothing was changed");
});

it("pages are not kept by caches, so that signing out ends their showing", async () => {
  for (const path of [page, "/projects", "/settings"]) {
    expect((await browser.get(path)).headers.get("Cache-Control"), path).toBe("private, no-cache");
  }
});

it("a form that is cut short is refused, and nothing is stored", async () => {
  const cut = '--cut\r\nContent-Disposition: form-data; name="files"; filename="a.csv"\r\n\r\n1,2\r\n';
  const answer = await browser.postBody(`${page}/sweeps/new`, cut, "multipart/form-data; boundary=cut");
  expect(answer.status).toBe(400);
  expect(await answer.text()).toContain("did not arrive whole");
});
