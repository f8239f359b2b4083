import { createServer, type RequestListener, type Server } from "node:http";
import type { AddressInfo } from "node:net";
import { eq } from "drizzle-orm";
import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { db } from "~/db/client.server";
import { newPublicId } from "~/db/ids.server";
import * as people from "~/db/people.server";
import * as plates from "~/db/plates.server";
import * as projects from "~/db/projects.server";
import { events, jobs } from "~/db/schema";
import * as sentMentions from "~/db/sent-mentions.server";
import * as webmentions from "~/db/webmentions.server";
import * as writeUps from "~/db/write-ups.server";
import { env } from "~/env.server";
import { inboxOf } from "~/services/inbox.server";
import { runDueJobs } from "~/services/jobs.server";
import { createProject } from "~/services/projects.server";
import { decide } from "~/services/webmention/moderate.server";
import { receive } from "~/services/webmention/receive.server";
import { retryAt } from "~/services/webmention/retries";
import { shownMentions } from "~/services/webmention/shown.server";
import { makeDraft } from "~/services/write-ups/drafts.server";
import { publish, revisionOf, takeBack } from "~/services/write-ups/publish.server";

/**
 * W3C Webmention, recommendation of 12 January 2017, by its sections: what a receiver and a sender must do, with the other
 * side as a server of this test.
 */

let server: Server;
let site = "";
/** Path → what it answers with. */
let pages: Record<string, RequestListener> = {};
let asked: { path: string; body: string }[] = [];
let ada: { id: number };
let project: projects.Project;
let plate: { id: number; address: string };

beforeAll(async () => {
  server = createServer((request, response) => {
    let body = "";
    request.on("data", (part) => {
      body += part;
    });
    request.on("end", () => {
      const path = request.url ?? "";
      asked.push({ path, body });
      const page = pages[path];
      if (page) page(request, response);
      else response.writeHead(404).end();
    });
  });
  await new Promise<void>((done) => void server.listen(0, "127.0.0.1", done));
  site = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
  env.WEBMENTION_TEST_ORIGIN = site;
});
afterAll(() => new Promise((done) => server.close(done)));

beforeEach(async () => {
  pages = {};
  asked = [];
  const userName = `ada-${newPublicId()}`;
  ada = { id: await people.insert({ userName, name: "Ada Marsh", email: `${userName}@fennmarsh.example` }) };
  project = await makeProject("public");
  plate = await makePlate();
});

describe("3.2 receiving", () => {
  it("refuses at once what is no mention (3.2.1), and asks nobody", async () => {
    const source = `${site}/a`;
    const target = plate.address;
    const draft = await makeDraft(project, ada, { title: "Draft", body: "x" });
    for (const [why, wrong] of Object.entries({
      "the same page": { source: target, target },
      "the same page at another place": { source: `${target}#top`, target },
      "no address": { source: "nothing", target },
      "another scheme": { source: "ftp://notes.example/", target },
      "a private host": { source: "http://10.0.0.1/", target },
      "a target elsewhere": { source, target: "https://notes.example/" },
      "a target that is no page of ours": { source, target: `${env.BASE_URL}/plates/nothing` },
      "a target that takes none": { source, target: `${env.BASE_URL}/projects/${project.publicId}` },
      "a draft": { source, target: `${env.BASE_URL}/write-ups/${draft}` },
    })) {
      expect((await send(wrong)).kind, why).toBe("refused");
    }
    const withdrawn = { withdrawnAt: new Date(), withdrawnReason: "wrong", withdrawnBy: ada.id };
    await plates.setWithdrawn(plate.id, withdrawn, db);
    expect((await send({ source, target })).kind).toBe("refused");
    expect(asked).toEqual([]);
  });

  it("is queued, then looked at (3.2.2), and waits for an owner, who is told", async () => {
    pages["/a"] = html(`<title>Reeds</title><a href="${plate.address}">x</a>`);
    expect(await send({ source: `${site}/a`, target: plate.address })).toEqual({ kind: "queued" });
    expect(asked).toEqual([]);
    expect((await mention()).state).toBe("queued");
    await work();
    expect(asked.map(({ path }) => path)).toEqual(["/a"]);
    expect(await mention()).toMatchObject({ state: "verified", title: "Reeds" });
    expect(await webmentions.countWaiting(project.id)).toBe(1);
    expect(await shownMentions({ plateId: plate.id })).toEqual([]);
    await work();
    const { threads } = await inboxOf(ada.id, {});
    expect(threads[0].items[0].words).toBe(
      "A page elsewhere cites Plate 1, Under the reeds; it waits for your word",
    );
    // Nothing that the other page says of itself is told before an owner has looked.
    const told = await db.select().from(events).where(eq(events.projectId, project.id));
    expect(JSON.stringify(told)).not.toContain("Reeds");
  });

  it("is shown when an owner says so, hidden when not, and not by another project's owner", async () => {
    pages["/a"] = html(`<a href="${plate.address}">x</a>`);
    const id = await received("/a");
    expect(await decide(id, "show", await makeProject("public"), ada)).toBe(false);
    expect(await decide(id, "show", project, ada)).toBe(true);
    const host = site.replace("http://", "");
    expect(await shownMentions({ plateId: plate.id })).toMatchObject([
      { source: `${site}/a`, title: host, host },
    ]);
    expect(await decide(id, "show", project, ada)).toBe(false);
    expect(await decide(id, "hide", project, ada)).toBe(true);
    expect(await shownMentions({ plateId: plate.id })).toEqual([]);
    // Sent again, it stays hidden.
    await received("/a");
    expect((await mention()).state).toBe("hidden");
  });

  it("is refused where the page does not link to it, is absent, or can't be had", async () => {
    pages["/none"] = html(`<p>${plate.address}</p>`);
    pages["/to-private"] = (_, response) =>
      void response.writeHead(302, { Location: "http://10.0.0.1/" }).end();
    pages["/picture"] = (_, response) => void response.setHeader("Content-Type", "image/png").end("x");
    await received("/none");
    expect(await mention()).toMatchObject({ state: "refused", reason: "The page does not link to it." });
    await received("/absent");
    expect(await mention()).toMatchObject({ state: "refused", reason: "The page is no longer there." });
    await received("/to-private");
    expect(await mention()).toMatchObject({
      state: "refused",
      reason: expect.stringContaining("public network"),
    });
  });

  it("sent again is looked at again, and no second one (3.2.4): the title changes, the link goes and comes back", async () => {
    pages["/a"] = html(`<title>One</title><a href="${plate.address}">x</a>`);
    const id = await received("/a");
    await decide(id, "show", project, ada);
    pages["/a"] = html(`<title>Two</title><a href="${plate.address}">x</a>`);
    expect(await received("/a")).toBe(id);
    expect(await mention()).toMatchObject({ state: "shown", title: "Two" });
    pages["/a"] = html("<title>Two</title>");
    await received("/a");
    expect((await mention()).state).toBe("gone");
    expect(await shownMentions({ plateId: plate.id })).toEqual([]);
    pages["/a"] = html(`<a href="${plate.address}">x</a>`);
    await received("/a");
    expect((await mention()).state).toBe("verified");
    expect(await rows()).toHaveLength(1);
  });

  it.each([404, 410])("a source that answers with %i takes it away (3.2.4)", async (status) => {
    pages["/a"] = html(`<a href="${plate.address}">x</a>`);
    await decide(await received("/a"), "show", project, ada);
    pages["/a"] = (_, response) => void response.writeHead(status).end();
    await received("/a");
    expect((await mention()).state).toBe("gone");
  });

  it("a source that fails is asked again, and leaves what is shown as it is", async () => {
    pages["/a"] = html(`<a href="${plate.address}">x</a>`);
    await decide(await received("/a"), "show", project, ada);
    pages["/a"] = (_, response) => void response.writeHead(503).end();
    const id = await received("/a");
    expect(await mention()).toMatchObject({ state: "shown", reason: "The page answered with 503." });
    expect(await due("check-mention")).toMatchObject([{ payload: { mention: id, attempt: 2 } }]);
  });

  it("takes a published write-up for a target, and is gone with it", async () => {
    const { publicId, id } = await published("x");
    const target = `${env.BASE_URL}/write-ups/${publicId}?version=1#s-end`;
    pages["/a"] = html(`<a href="${target}">x</a>`);
    await send({ source: `${site}/a`, target });
    await work();
    const [row] = await webmentions.findAllByProject(project.id, ["verified"], 10);
    expect(row).toMatchObject({ writeUp: { publicId }, plate: null });
    await writeUps.deleteById(id);
    expect(await rows()).toEqual([]);
  });

  it("is counted by who sends, so that nobody floods", async () => {
    const from = newPublicId();
    const wrong = { source: "x", target: "y" };
    for (let i = 0; i < 60; i++) expect((await receive(wrong, from)).kind).toBe("refused");
    expect(await receive(wrong, from)).toEqual({ kind: "too-many", waitSeconds: expect.any(Number) });
  });
});

describe("3.1 sending", () => {
  it("tells every page that a published write-up links to, once a version (3.1.1 to 3.1.3)", async () => {
    pages["/plain"] = html("<p>nothing here</p>");
    pages["/linked"] = html('<a rel="webmention" href="/tell?me=1">');
    pages["/tell?me=1"] = (_, response) => void response.writeHead(202).end();
    const { publicId } = await published(`[a](${site}/plain) and <${site}/linked>, [again](${site}/linked)`);
    await work();
    const source = encodeURIComponent(`${env.BASE_URL}/write-ups/${publicId}`);
    const told = `source=${source}&target=${encodeURIComponent(`${site}/linked`)}`;
    expect(posts()).toEqual([{ path: "/tell?me=1", body: told }]);
    expect(await states()).toEqual({ [`${site}/plain`]: "none", [`${site}/linked`]: "sent" });
  });

  it("tells again what is linked to no more, of the next version and when it is taken back (3.1.4)", async () => {
    pages["/one"] = pages["/two"] = html('<link rel="webmention" href="/tell">');
    pages["/tell"] = (_, response) => void response.writeHead(200).end();
    const writeUp = await published(`[1](${site}/one) [2](${site}/two)`);
    await work();
    expect(posts()).toHaveLength(2);
    asked = [];
    await publishAgain(writeUp, `[2](${site}/two)`);
    await work();
    expect(
      posts()
        .map(({ body }) => body.split("target=")[1])
        .sort(),
    ).toEqual(["/one", "/two"].map((path) => encodeURIComponent(site + path)));
    expect(await states()).toEqual({ [`${site}/two`]: "sent" });
    asked = [];
    await takeBack({ id: writeUp.id, projectId: project.id }, ada);
    await work();
    expect(posts()).toHaveLength(1);
    expect(await states()).toEqual({});
  });

  it("a put-off try to tell that a link is gone does nothing once the link is back", async () => {
    pages["/one"] = html('<link rel="webmention" href="/tell">');
    pages["/tell"] = (_, response) => void response.writeHead(asked.length < 3 ? 200 : 503).end();
    const writeUp = await published(`[1](${site}/one)`);
    await work();
    await publishAgain(writeUp, "nothing");
    await work();
    const late = await due("send-mention");
    expect(late).toMatchObject([{ payload: { removed: true, attempt: 2 } }]);
    pages["/tell"] = (_, response) => void response.writeHead(200).end();
    await publishAgain(writeUp, `[1](${site}/one)`);
    await work();
    asked = [];
    await db.update(jobs).set({ runAt: new Date() }).where(eq(jobs.id, late[0].id));
    await work();
    expect(asked).toEqual([]);
    expect(await states()).toEqual({ [`${site}/one`]: "sent" });
  });

  it("finds the endpoint after redirects, relative to where they end", async () => {
    pages["/old"] = (_, response) => void response.writeHead(301, { Location: "/new/page" }).end();
    pages["/new/page"] = (_, response) => {
      response.setHeader("Link", "<tell>; rel=webmention").setHeader("Content-Type", "image/png").end("x");
    };
    pages["/new/tell"] = (_, response) => void response.writeHead(201).end();
    await published(`<${site}/old>`);
    await work();
    expect(posts().map(({ path }) => path)).toEqual(["/new/tell"]);
    expect(posts()[0].body).toContain(encodeURIComponent(`${site}/old`));
  });

  it("tells no private endpoint, and tries a failing one again", async () => {
    pages["/private"] = html('<link rel="webmention" href="http://169.254.169.254/">');
    pages["/failing"] = html('<link rel="webmention" href="/down">');
    pages["/down"] = (_, response) => void response.writeHead(500).end();
    pages["/no"] = html('<link rel="webmention" href="/never">');
    pages["/never"] = (_, response) => void response.writeHead(400).end();
    await published(["private", "failing", "no"].map((path) => `<${site}/${path}>`).join("\n"));
    await work();
    expect(await states()).toEqual({
      [`${site}/private`]: "failed",
      [`${site}/failing`]: "queued",
      [`${site}/no`]: "failed",
    });
    expect(await due("send-mention")).toMatchObject([{ payload: { attempt: 2, removed: false } }]);
  });

  it.each(["private", "linked"] as const)(
    "gives the address of a %s project to nobody",
    async (visibility) => {
      project = await makeProject(visibility);
      pages["/linked"] = html('<a rel="webmention" href="/tell">');
      await published(`<${site}/linked>`);
      await work();
      expect(asked).toEqual([]);
      expect(await states()).toEqual({});
    },
  );

  it("ends after five attempts within a day", () => {
    const now = new Date("2026-05-01T00:00Z");
    expect(retryAt(1, now)).toEqual(new Date("2026-05-01T00:01Z"));
    expect(retryAt(4, now)?.getTime()).toBeLessThan(now.getTime() + 6 * 3.6e6);
    expect(retryAt(5, now)).toBeNull();
  });
});

async function makeProject(visibility: "private" | "linked" | "public"): Promise<projects.Project> {
  const about = { title: "Reeds", summary: "", visibility, ituRegion: null };
  const made = await createProject(about, ada.id);
  return (await projects.findWithRoleById(made.id, ada.id))?.project as projects.Project;
}

async function makePlate() {
  const publicId = newPublicId();
  const row = {
    publicId,
    projectId: project.id,
    number: 1,
    version: 1,
    kind: "sweep" as const,
    title: "Under the reeds",
    caption: "",
    licence: "CC-BY-4.0",
    record: "{}",
    recordSha256: "0".repeat(64),
    createdBy: ada.id,
    createdAt: new Date(),
  };
  const id = await plates.insert(row, [], [], db);
  return { id, address: `${env.BASE_URL}/plates/${publicId}` };
}

async function published(body: string) {
  const publicId = await makeDraft(project, ada, { title: "Where it comes from", body });
  const row = (await writeUps.findByPublicId(publicId))?.writeUp as writeUps.WriteUpRow;
  await publish(row, project, ada, { revision: revisionOf(row), remark: "" });
  return { publicId, id: row.id };
}

async function publishAgain({ publicId, id }: { publicId: string; id: number }, body: string) {
  await writeUps.update(id, { body });
  const row = (await writeUps.findByPublicId(publicId))?.writeUp as writeUps.WriteUpRow;
  const outcome = await publish(row, project, ada, { revision: revisionOf(row), remark: "" });
  expect(outcome.kind).toBe("published");
}

/** Each test sends from an address of its own, so that none counts for another. */
const send = (one: { source: string; target: string }) => receive(one, newPublicId());

/** Sent, and looked at; its public id. */
async function received(path: string): Promise<string> {
  expect(await send({ source: site + path, target: plate.address })).toEqual({ kind: "queued" });
  await work();
  return (await mention()).publicId;
}

const rows = () => webmentions.findAllByProject(project.id, ALL, 100);
async function mention() {
  return (await rows())[0].mention;
}

/** What a job makes due is done too. */
async function work() {
  while ((await runDueJobs()) > 0);
}

const posts = () => asked.filter(({ body }) => body !== "");
const due = (kind: string) => db.select().from(jobs).where(eq(jobs.kind, kind));

async function states() {
  const found = await Promise.all(
    (await writeUps.findAllByProject(project.id, { drafts: true })).map(async ({ publicId }) => {
      const row = await writeUps.findByPublicId(publicId);
      return sentMentions.findAllByWriteUp(row?.writeUp.id ?? 0);
    }),
  );
  return Object.fromEntries(found.flat().map(({ target, state }) => [target, state]));
}

function html(text: string): RequestListener {
  return (_, response) => void response.setHeader("Content-Type", "text/html").end(text);
}

const ALL: webmentions.MentionState[] = ["queued", "verified", "shown", "hidden", "refused", "gone"];
