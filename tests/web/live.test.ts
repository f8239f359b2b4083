import { createServer, request, type Server } from "node:http";
import { afterEach, beforeAll, describe, expect, it } from "vitest";
import * as sessions from "~/db/sessions.server";
import type { LiveAnswer, LiveEvent } from "~/services/live-shape";
import { writeNote } from "~/services/notes.server";
import { removeMember } from "~/services/projects.server";
import { EventReader } from "../../scripts/trials/event-reader.ts";
import { tryLive } from "../../scripts/trials/live.ts";
import { startSecondServer } from "../../scripts/trials/second-server.ts";
import { type Browser, SERVER } from "./browser.ts";
import { type Crew, makeCrew, makePerson, makePlace, type Place, signIn } from "./world.ts";

let crew: Crew;
let place: Place;
const readers: EventReader[] = [];
const servers: Server[] = [];

beforeAll(async () => {
  crew = await makeCrew();
  place = await makePlace(crew, "private");
});
afterEach(() => {
  for (const reader of readers.splice(0)) reader.close();
  for (const server of servers.splice(0)) {
    server.closeAllConnections();
    server.close();
  }
});

const path = () => `/projects/${place.project}/live`;

function say(body: string): Promise<{ publicId: string }> {
  const on = { projectId: place.projectId, sweepId: null, dipId: null };
  return writeNote({ project: { id: place.projectId }, author: crew.owner, place: on, body });
}

/** Reads the stream as this browser; what it is told of notes comes into `notes`. */
function listen(browser: Browser, server = SERVER) {
  const cookie = `swale_session=${browser.cookie("swale_session") ?? ""}`;
  const heard = { names: [] as string[], notes: [] as string[] };
  const reader = new EventReader({
    servers: [server],
    path: path(),
    cookie,
    onEvent: ({ name, data }) => {
      heard.names.push(name);
      if (name === "happened") heard.notes.push((JSON.parse(data) as LiveEvent).about.note ?? "");
    },
  });
  readers.push(reader);
  return { ...heard, reader };
}

/** A proxy that hands on each byte as it comes, and may end a connection after so long. */
async function proxy(endAfterMs?: number): Promise<string> {
  const server = createServer((incoming, outgoing) => {
    const { hostname, port } = new URL(SERVER);
    const { method, url, headers } = incoming;
    const onward = request({ hostname, port, method, path: url, headers }, (answer) => {
      outgoing.writeHead(answer.statusCode ?? 502, answer.headers);
      answer.pipe(outgoing);
      answer.on("error", () => outgoing.destroy());
    });
    onward.on("error", () => outgoing.destroy());
    incoming.pipe(onward);
    outgoing.on("close", () => onward.destroy());
    if (endAfterMs) setTimeout(() => outgoing.destroy(), endAfterMs);
  });
  servers.push(server);
  await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
  const address = server.address();
  return `http://127.0.0.1:${typeof address === "object" ? address?.port : 0}`;
}

describe("the stream of a project's events", () => {
  it("is sent as one that no proxy holds back, and a note is there within a second", async () => {
    const browser = await signIn(crew.reader);
    const leave = new AbortController();
    const response = await fetch(new URL(path(), SERVER), {
      headers: {
        Accept: "text/event-stream",
        "Accept-Encoding": "gzip, br",
        Cookie: `swale_session=${browser.cookie("swale_session")}`,
      },
      signal: leave.signal,
    });
    expect(Object.fromEntries(response.headers)).toMatchObject({
      "content-type": "text/event-stream; charset=utf-8",
      "cache-control": "no-store, no-transform",
      "x-accel-buffering": "no",
    });
    expect(response.headers.get("Content-Encoding")).toBeNull();
    leave.abort();
    const { notes, names } = listen(browser);
    await expect.poll(() => names).toContain("hello");
    const { publicId } = await say("Soon there");
    // Within a second, which live-load.ts measures; two suites side by side are slower.
    await expect.poll(() => notes, { timeout: 3000, interval: 20 }).toEqual([publicId]);
  });

  it("answers who does not read streams with a poll", async () => {
    const browser = await signIn(crew.reader);
    const response = await browser.get(path());
    expect(response.headers.get("Location")).toBe(`${path()}.json`);
    const start = (await (await browser.get(`${path()}.json`)).json()) as LiveAnswer;
    const { publicId } = await say("Asked for");
    const next = await (await browser.get(`${path()}.json?after=${start.mark}`)).json();
    expect(next.events.map(({ about }: LiveEvent) => about.note)).toEqual([publicId]);
  });

  it("comes through a proxy, and goes on through one that ends every connection after a while", async () => {
    const browser = await signIn(crew.reader);
    const plain = listen(browser, await proxy());
    const short = listen(browser, await proxy(1500));
    await expect.poll(() => plain.names.includes("hello") && short.names.includes("hello")).toBe(true);
    const written: string[] = [];
    for (let i = 0; i < 20; i++) {
      written.push((await say(`Through ${i}`)).publicId);
      await new Promise((resolve) => setTimeout(resolve, 250));
    }
    await expect.poll(() => plain.notes).toEqual(written);
    await expect.poll(() => short.notes).toEqual(written);
    expect(short.reader.connections).toBeGreaterThan(1);
  });
});

describe("who may hear it", () => {
  it.each(["", "live.json", "looking"])(
    "is no stranger, visitor or owner of something else: %s",
    async (which) => {
      const stranger = await makePerson("stranger");
      const elsewhere = await makeCrew();
      await makePlace(elsewhere, "private", true);
      for (const browser of [await signIn(stranger), await signIn(elsewhere.owner)]) {
        const at = which === "live.json" ? `${path()}.json` : path();
        const response =
          which === "looking"
            ? await browser.post(`${path()}/looking`, { window: "0123456789abcdef" })
            : await browser.get(at, { Accept: "text/event-stream" });
        expect(response.status).toBe(404);
        expect(await response.text()).not.toContain(place.title);
      }
    },
  );

  it("is no former member: the stream ends, nothing comes after it, and none begins anew", async () => {
    const own = await makePlace(crew, "private");
    const leaver = await signIn(crew.commenter);
    const heard: string[] = [];
    const reader = new EventReader({
      servers: [SERVER],
      path: `/projects/${own.project}/live`,
      cookie: `swale_session=${leaver.cookie("swale_session")}`,
      onEvent: ({ name }) => heard.push(name),
    });
    readers.push(reader);
    await expect.poll(() => heard).toContain("hello");
    await removeMember(own.projectId, crew.commenter.userName);
    const on = { projectId: own.projectId, sweepId: null, dipId: null };
    await writeNote({ project: { id: own.projectId }, author: crew.owner, place: on, body: "A secret" });
    await expect.poll(() => reader.refused).toBe(404);
    expect(heard).not.toContain("happened");
  });

  it("is nobody whose session ended", async () => {
    const browser = await signIn(crew.reader);
    const { names, reader } = listen(browser);
    await expect.poll(() => names).toContain("hello");
    await sessions.deleteAllByUser(crew.reader.id);
    await expect.poll(() => reader.refused).toBe(404);
  });
});

describe("two processes on one database", () => {
  it("tell every note once and in order, and where one is killed its listeners go on at the other", async () => {
    const second = await startSecondServer();
    const outcome = await tryLive({
      servers: [SERVER, second.address],
      connections: 40,
      notesPerSecond: 20,
      seconds: 10,
      lose: second.kill,
    });
    expect(outcome).toMatchObject({ notes: 200, connections: 40, whole: 40, missing: 0, twice: 0 });
    expect(outcome.resumed).toBe(20);
    expect(outcome.p50Ms).toBeLessThan(1000);
  });
});
