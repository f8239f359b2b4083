import { beforeAll, describe, expect, it } from "vitest";
import { makeFeedToken } from "~/services/feed.server";
import { askApi, Browser } from "./browser.ts";
import { type Crew, makeCrew, makePlace, type Place, signIn, tokenOf, unique } from "./world.ts";

/** Write-ups as plain forms send them, without scripts, from a private project to readers outside. */

let crew: Crew;
let place: Place;
let writer: Browser;
const visitor = new Browser();

beforeAll(async () => {
  crew = await makeCrew();
  place = await makePlace(crew, "private");
  writer = await signIn(crew.experimenter);
});

const base = () => `/projects/${place.project}/write-ups`;
const textOf = async (response: Response | Promise<Response>) => (await response).text();

/** A draft with this text; the path that it is written at. */
async function begin(body: string, title = unique("The third dip")): Promise<string> {
  const made = await writer.post(`${base()}/new`, { title });
  const edit = made.headers.get("Location") ?? "";
  const was = JSON.stringify({ title, body: "" });
  const kept = await writer.post(edit, { intent: "keep", title, body, was });
  expect(kept.status).toBe(302);
  return edit;
}

/** Looks at it and publishes it; where it is read. */
async function publish(edit: string, remark = ""): Promise<string> {
  const page = edit.replace(/\/edit$/, "/publish");
  const revision = /name="revision" value="([0-9a-f]+)"/.exec(await textOf(writer.get(page)))?.[1] ?? "";
  const done = await writer.post(page, { intent: "publish", revision, remark });
  expect(done.status).toBe(302);
  return done.headers.get("Location") ?? "";
}

describe("a write-up of a private project", () => {
  it("is looked at, published by one press that says who reads it, and read by anyone with its address", async () => {
    const edit = await begin(`## Found\n\nSee #dip:${place.dip}.\n\n![Near](#dip:${place.dip})`);
    expect((await visitor.get(edit)).status).toBe(404);
    const looked = await textOf(writer.post(edit, { intent: "look", title: "T", body: "Some *new* words" }));
    expect(looked).toContain("Some <em>new</em> words");
    const asked = await textOf(writer.get(edit.replace(/\/edit$/, "/publish")));
    expect(asked).toContain("although this project is private");
    const path = await publish(edit);
    const answer = await visitor.get(path);
    const html = await answer.text();
    expect(answer.status).toBe(200);
    expect(html).toContain("<svg");
    expect(html).toMatch(/7\.1\d*\sMHz/);
    expect(html).not.toContain(`/projects/${place.project}`);
    expect(html).not.toContain("now:");
    expect(await textOf(writer.get(path))).toContain(`/projects/${place.project}/dips/${place.dip}`);
  });

  it("tells programs what it is, where it is for good and where mentions go", async () => {
    const path = await publish(await begin("Words for a summary.\n\n# Head"));
    const answer = await visitor.get(path);
    const html = await answer.text();
    const address = `${process.env.SWALE_URL}${path}`;
    expect(answer.headers.get("Link")).toContain('/webmention>; rel="webmention"');
    expect(html).toContain(`<link rel="canonical" href="${address}"/>`);
    expect(html).toMatch(/<link rel="webmention" href="[^"]*\/webmention"\/>/);
    expect(html).toContain('<meta property="og:type" content="article"/>');
    expect(html).toContain('<meta property="og:description" content="Words for a summary."/>');
  });

  it("keeps every version, and points from an old one to the newest", async () => {
    const edit = await begin("The first words.");
    const path = await publish(edit);
    await writer.post(edit, { intent: "keep", title: "Put right", body: "The second words.", was: "{}" });
    await publish(edit, "A wrong number was put right.");
    expect(await textOf(visitor.get(path))).toContain("The second words.");
    const old = await textOf(visitor.get(`${path}?version=1`));
    expect(old).toContain("The first words.");
    expect(old).toContain("There is a newer one");
    expect(old).toContain('<meta name="robots" content="noindex"/>');
    expect((await visitor.get(`${path}?version=7`)).status).toBe(404);
  });

  it("is taken along as PDF and as HTML that asks nobody for anything, and not sent twice", async () => {
    const path = await publish(
      await begin(`![Near](#dip:${place.dip})\n\n$\\lambda/4$ and a note[^1].\n\n[^1]: Here.`),
    );
    const pdf = await visitor.get(`${path}.pdf`);
    expect(pdf.headers.get("Content-Type")).toBe("application/pdf");
    expect(
      Buffer.from(await pdf.arrayBuffer())
        .subarray(0, 5)
        .toString(),
    ).toBe("%PDF-");
    const html = await visitor.get(`${path}.html`);
    const text = await html.text();
    expect(html.headers.get("Content-Disposition")).toMatch(/^attachment;.*-v1\.html$/);
    expect(
      text.match(/(?:src|href)="(?!#|data:|https?:\/\/(?:creativecommons|[^"]*\/write-ups\/))[^"]*"/g),
    ).toBeNull();
    expect(text.replace(/<svg[\s\S]*?<\/svg>/g, "")).not.toMatch(
      /<script|<link rel="stylesheet|url\((?!data:)/,
    );
    const etag = html.headers.get("ETag") ?? "";
    expect((await visitor.get(`${path}.html`, { "If-None-Match": etag })).status).toBe(304);
  });

  it("that was taken back says so in each of its forms", async () => {
    const edit = await begin("Words that were wrong.");
    const path = await publish(edit);
    await writer.post(edit.replace(/\/edit$/, "/publish"), { intent: "take-back" });
    for (const form of ["", "?version=1", ".pdf", ".html"]) {
      const answer = await visitor.get(`${path}${form}`);
      expect(answer.status, form).toBe(410);
      expect(await answer.text()).not.toContain("Words that were wrong.");
    }
    expect(await textOf(visitor.get(path))).toContain("was taken back");
    await publish(edit);
    expect((await visitor.get(path)).status).toBe(200);
  });
});

it("two who write at once are asked, and nothing is lost", async () => {
  const edit = await begin("Words.", "Title");
  const owner = await signIn(crew.owner);
  const was = JSON.stringify({ title: "Title", body: "Words." });
  expect((await writer.post(edit, { intent: "keep", title: "Title", body: "Mine.", was })).status).toBe(302);
  const second = await owner.post(edit, { intent: "keep", title: "Title", body: "Theirs.", was });
  const html = await second.text();
  expect(second.status).toBe(409);
  expect(html).toContain("Somebody else changed this while you did");
  expect(html).toContain("Mine.");
  expect(html).toContain("Theirs.");
});

it("what nobody looked at is not published", async () => {
  const edit = await begin("Words.");
  const answer = await writer.post(edit.replace(/\/edit$/, "/publish"), {
    intent: "publish",
    revision: "0123456789abcdef0123",
    remark: "",
  });
  expect(answer.status).toBe(409);
  expect((await visitor.get(edit.replace(/^.*(\/write-ups\/[a-z0-9]+)\/edit$/, "$1"))).status).toBe(404);
});

it("the feed of a private project is for members and for their keys", async () => {
  const path = await publish(await begin("For the feed."));
  await begin("A draft that stays one.");
  const feed = `${base()}.atom`;
  expect((await visitor.get(feed)).status).toBe(404);
  const token = await makeFeedToken(crew.reader.id, place.projectId);
  const answer = await visitor.get(`${feed}?token=${token}`);
  const text = await answer.text();
  expect(answer.headers.get("Content-Type")).toContain("application/atom+xml");
  expect(text).toContain(`${path}"/>`);
  expect(text).toContain("<summary>For the feed.</summary>");
  expect(text).not.toContain("A draft that stays one.");
});

it("readers of the project see what is published and no draft", async () => {
  const title = unique("Only a draft");
  await begin("Words.", title);
  const reader = await signIn(crew.reader);
  expect(await textOf(reader.get(base()))).not.toContain(title);
  expect(await textOf(writer.get(base()))).toContain(title);
});

describe("by the API", () => {
  const send = async (path: string, who: keyof Crew, body: unknown) =>
    askApi(path, await tokenOf(crew[who]), {
      method: "POST",
      headers: { "Content-Type": "application/json" },
      body: JSON.stringify(body),
    });

  it("a draft is begun, changed by whoever knows what it says, and published by a person", async () => {
    const made = await send(`/projects/${place.project}/write-ups`, "experimenter", {
      title: "By script",
      body: "One.",
    });
    const draft = await made.json();
    expect(made.status).toBe(201);
    expect(draft).toMatchObject({ title: "By script", body: "One.", state: "draft", version: null });
    const changed = await send(`/write-ups/${draft.id}`, "experimenter", {
      body: "Two.",
      revision: draft.revision,
    });
    expect(await changed.json()).toMatchObject({ title: "By script", body: "Two." });
    const late = await send(`/write-ups/${draft.id}`, "owner", { body: "Three.", revision: draft.revision });
    expect(late.status).toBe(409);
    expect((await send(`/write-ups/${draft.id}`, "reader", { body: "X", revision: "y" })).status).toBe(403);
    const stranger = await tokenOf((await makeCrew()).reader);
    expect((await askApi(`/write-ups/${draft.id}`, stranger)).status).toBe(404);
    await publish(`${base()}/${draft.id}/edit`);
    const read = await askApi(`/write-ups/${draft.id}`, stranger);
    expect(await read.json()).toMatchObject({ body: "Two.", state: "published", version: 1 });
    const list = await askApi(`/projects/${place.project}/write-ups`, await tokenOf(crew.reader));
    const { items } = await list.json();
    expect(items.map(({ id }: { id: string }) => id)).toContain(draft.id);
    expect(items.every(({ state }: { state: string }) => state === "published")).toBe(true);
  });
});
