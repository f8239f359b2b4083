import { beforeAll, describe, expect, it } from "vitest";
import { Browser, SERVER } from "./browser.ts";
import { waitingMention } from "./in-a-place.ts";
import { type Crew, makeCrew, makePlace, type Place, signIn } from "./world.ts";

/** W3C Webmention over HTTP, as other sites meet it, and what an owner does with what came. */

let crew: Crew;
let place: Place;
let target: string;

beforeAll(async () => {
  crew = await makeCrew();
  place = await makePlace(crew, "public");
  target = `${SERVER}/write-ups/${place.writeUp}`;
});

/** As another server sends it: no cookie, no origin, no page. */
function send(fields: Record<string, string> | string, type?: string): Promise<Response> {
  const body = typeof fields === "string" ? fields : new URLSearchParams(fields);
  return fetch(`${SERVER}/webmention`, {
    method: "POST",
    body,
    headers: type ? { "Content-Type": type } : {},
  });
}

describe("the endpoint", () => {
  it("is said by what can be mentioned, in the header (3.1.2)", async () => {
    const page = await fetch(target);
    expect(page.headers.get("Link")).toContain(`<${SERVER}/webmention>; rel="webmention"`);
  });

  it("answers 202 to what it will look up (3.2)", async () => {
    const answer = await send({ source: "https://notes.example/over-http", target });
    expect(answer.status).toBe(202);
    expect(await answer.text()).toContain("https://notes.example/over-http");
  });

  it.each([
    ["no source", { target: "T" }, "one source and one target"],
    ["no target", { source: "https://notes.example/" }, "one source and one target"],
    ["the same page", { source: "T", target: "T" }, "not accepted"],
    [
      "a private source",
      { source: "http://169.254.169.254/", target: "T" },
      "not an address of the public network",
    ],
    ["a source with a port", { source: "https://notes.example:8443/", target: "T" }, "ports 80 and 443"],
    [
      "a target of nobody",
      { source: "https://notes.example/", target: "https://other.example/" },
      "no plate",
    ],
    ["two sources", "source=https://a.example/&source=https://b.example/&target=T", "one source"],
  ])("answers 400 to %s (3.2.1)", async (_, fields, words) => {
    const text = JSON.stringify(fields).replaceAll('"T"', `"${target}"`).replace("=T", `=${target}`);
    const type = typeof fields === "string" ? "application/x-www-form-urlencoded" : undefined;
    const answer = await send(JSON.parse(text), type);
    expect(answer.status).toBe(400);
    expect(await answer.text()).toContain(words);
  });

  it("takes a form and nothing else, and shows one to people", async () => {
    expect(
      (await send(JSON.stringify({ source: "https://notes.example/", target }), "application/json")).status,
    ).toBe(415);
    const page = await (await new Browser().get(`/webmention?target=${encodeURIComponent(target)}`)).text();
    expect(page).toContain(`value="${target}"`);
  });

  it("writes what a stranger sent as text", async () => {
    const answer = await send({ source: "https://notes.example/<script>alert(1)</script>", target: "<b>" });
    expect(await answer.text()).not.toContain("<script>alert(1)");
  });
});

describe("what came", () => {
  it("is shown to readers once an owner says so, as a link that vouches for nothing, and no more when hidden", async () => {
    const owner = await signIn(crew.owner);
    const page = `/projects/${place.project}/mentions`;
    const mention = await waitingMention(place);
    expect(await (await owner.get(page)).text()).toContain("Reeds and radials");
    expect(await (await fetch(target)).text()).not.toContain("Reeds and radials");
    expect((await owner.post(page, { intent: "show", mention })).status).toBe(302);
    const shown = await (await fetch(target)).text();
    const [link] = /<a [^>]*>Reeds and radials<\/a>/.exec(shown) ?? [""];
    expect(link).toMatch(/rel="nofollow ugc noopener noreferrer external"/);
    expect(link).toMatch(/href="https:\/\/notes\.example\//);
    await owner.post(page, { intent: "hide", mention });
    expect(await (await fetch(target)).text()).not.toContain("Reeds and radials");
    expect((await owner.post(page, { intent: "check", mention })).status).toBe(404);
  });
});
