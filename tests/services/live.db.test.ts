import { randomBytes } from "node:crypto";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { inTransaction } from "~/db/client.server";
import { newPublicId } from "~/db/ids.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import * as sessions from "~/db/sessions.server";
import { record } from "~/services/events.server";
import { pollLive } from "~/services/live.server";
import { countListeners } from "~/services/live-hub.server";
import { markOf, readMark } from "~/services/live-marks.server";
import type { LiveEvent } from "~/services/live-shape";
import { openStream } from "~/services/live-stream.server";
import { look, lookAway } from "~/services/presence.server";
import { createProject, removeMember } from "~/services/projects.server";

interface Message {
  id?: string;
  event?: string;
  data?: string;
}

interface Member {
  id: number;
  userName: string;
  sessionId: string;
}

let ada: Member;
let bram: Member;
let project: { id: number; publicId: string };
const streams: Stream[] = [];

/** Reads one stream to its end and keeps all it was sent. */
class Stream {
  readonly messages: Message[] = [];
  ended = false;
  readonly #leave = new AbortController();

  static async open(ear: { projectId: number; sessionId: string | null }, after: number | undefined) {
    const stream = new Stream();
    const response = await openStream(ear, after, stream.#leave.signal);
    if (!response?.body) throw new Error("No stream.");
    streams.push(stream);
    void stream.#read(response.body);
    return stream;
  }

  get titles(): string[] {
    return this.messages
      .filter(({ event }) => event === "happened")
      .map(({ data }) => (JSON.parse(data ?? "") as LiveEvent).about.title);
  }

  last(event: string): Message | undefined {
    return this.messages.findLast((one) => one.event === event);
  }

  leave(): void {
    this.#leave.abort();
  }

  async #read(body: ReadableStream<Uint8Array>): Promise<void> {
    let text = "";
    const decoder = new TextDecoder();
    for await (const chunk of body) {
      text += decoder.decode(chunk, { stream: true });
      const whole = text.split("\n\n");
      text = whole.pop() ?? "";
      for (const block of whole) {
        const fields = block.split("\n").map((line) => line.split(/: (.*)/, 2) as [string, string]);
        this.messages.push(Object.fromEntries(fields));
      }
    }
    this.ended = true;
  }
}

async function member(name: string): Promise<Member> {
  const userName = `${name}-${newPublicId()}`;
  const id = await people.insert({ userName, name, email: null });
  const sessionId = randomBytes(32).toString("hex");
  const now = new Date();
  const expiresAt = new Date(now.getTime() + 3.6e6);
  const times = { createdAt: now, lastSeenAt: now, expiresAt };
  await sessions.insert({ id: sessionId, userId: id, data: {}, userAgent: null, ...times });
  return { id, userName, sessionId };
}

function happen(title: string, projectId = project.id): Promise<number> {
  const event = { projectId, kind: "note.added" as const, actorId: ada.id, about: { title } };
  return inTransaction((tx) => record(event, tx));
}

function earOf({ sessionId }: Member, projectId = project.id) {
  return { projectId, sessionId };
}

beforeEach(async () => {
  ada = await member("Ada");
  bram = await member("Bram");
  project = await createProject(
    { title: "Reeds", summary: "", visibility: "private", ituRegion: null },
    ada.id,
  );
  await projects.insertMember(project.id, bram.id, "reader");
});

afterEach(async () => {
  for (const stream of streams.splice(0)) stream.leave();
  await expect.poll(countListeners).toBe(0);
});

describe("a stream of events", () => {
  it("tells everything after the mark once and in order, also what happens while it is caught up", async () => {
    const before = await happen("before");
    const early = Promise.all(Array.from({ length: 30 }, (_, i) => happen(`early ${i}`)));
    const opened = await Promise.all([1, 2, 3].map(() => Stream.open(earOf(ada), before)));
    await early;
    for (let i = 0; i < 20; i++) await happen(`late ${i}`);
    for (const stream of opened) {
      await expect.poll(() => stream.titles.length).toBe(50);
      expect(new Set(stream.titles).size).toBe(50);
      expect(stream.titles.slice(30)).toEqual(Array.from({ length: 20 }, (_, i) => `late ${i}`));
      const ids = stream.messages.flatMap(({ id }) => (id ? [readMark(project.id, id)] : []));
      expect(ids).toEqual([...ids].sort((a, b) => Number(a) - Number(b)));
    }
  });

  it("goes on where another one ended, with nothing missed and nothing twice", async () => {
    const first = await Stream.open(earOf(ada), 0);
    await happen("one");
    await expect.poll(() => first.titles).toEqual(["one"]);
    const mark = first.last("happened")?.id ?? "";
    first.leave();
    await happen("two");
    const second = await Stream.open(earOf(ada), readMark(project.id, mark));
    await happen("three");
    await expect.poll(() => second.titles).toEqual(["two", "three"]);
  });

  it("begins with where it stands, and says where a mark was none of its own", async () => {
    const id = await happen("one");
    const stream = await Stream.open(earOf(ada), id);
    expect(stream.messages[0] ?? (await firstOf(stream))).toMatchObject({
      event: "hello",
      id: markOf(project.id, id),
    });
    const lost = await Stream.open(earOf(ada), undefined);
    expect(await firstOf(lost)).toMatchObject({ event: "behind", id: markOf(project.id, id) });
  });

  it("tells nothing of other projects", async () => {
    const other = await createProject(
      { title: "Hers alone", summary: "", visibility: "private", ituRegion: null },
      ada.id,
    );
    const own = await Stream.open(earOf(ada, other.id), 0);
    const stream = await Stream.open(earOf(bram), 0);
    await happen("a secret", other.id);
    await happen("for all");
    await expect.poll(() => stream.titles).toEqual(["for all"]);
    expect(own.titles).toEqual(["a secret"]);
  });
});

describe("whoever may not listen any more", () => {
  it("hears nothing of what happens after membership was lost, though it happens at once", async () => {
    const stream = await Stream.open(earOf(bram), 0);
    const stays = await Stream.open(earOf(ada), 0);
    await happen("while a member");
    await expect.poll(() => stream.titles).toEqual(["while a member"]);
    await removeMember(project.id, bram.userName, ada.id);
    await happen("a secret");
    await expect.poll(() => stays.titles).toContain("a secret");
    await expect.poll(() => stream.ended).toBe(true);
    expect(stream.titles).toEqual(["while a member"]);
  });

  it.each([
    ["the session ends", () => sessions.deleteById(bram.sessionId)],
    ["the person is suspended", () => people.update(bram.id, { suspendedAt: new Date() })],
    ["the project is deleted", () => projects.deleteById(project.id)],
  ])("is let go within seconds when %s, though nothing happens", async (_, end) => {
    const stream = await Stream.open(earOf(bram), 0);
    await end();
    await expect.poll(() => stream.ended).toBe(true);
  });

  it("is let go when a public project is made private", async () => {
    await projects.update(project.id, { visibility: "public" });
    const stream = await Stream.open({ projectId: project.id, sessionId: null }, 0);
    await happen("seen by all");
    await expect.poll(() => stream.titles).toEqual(["seen by all"]);
    await projects.update(project.id, { visibility: "private" });
    await happen("a secret");
    await expect.poll(() => stream.ended).toBe(true);
    expect(stream.titles).toEqual(["seen by all"]);
  });

  it("never gets a stream that begins", async () => {
    const stranger = await member("Cleo");
    await happen("a secret");
    const stream = await Stream.open(earOf(stranger), 0);
    await expect.poll(() => stream.ended).toBe(true);
    expect(stream.messages).toEqual([]);
  });
});

describe("who is looking", () => {
  const lookers = (stream: Stream) =>
    (JSON.parse(stream.last("looking")?.data ?? "[]") as { name: string; kind: string }[]).map(
      ({ name, kind }) => `${name}: ${kind}`,
    );

  it("is told to members within a second, and taken back", async () => {
    const stream = await Stream.open(earOf(ada), 0);
    const window = { by: bram, window: "aa" };
    await look({ ...window, project, kind: "sweep", subject: "abc" });
    await expect.poll(() => lookers(stream)).toEqual(["Bram: sweep"]);
    await look({ ...window, project, kind: "dip", subject: "abc" });
    await expect.poll(() => lookers(stream)).toEqual(["Bram: dip"]);
    await lookAway(window);
    await expect.poll(() => lookers(stream)).toEqual([]);
  });

  it("is told to nobody who merely may read, and of nobody who is not a member", async () => {
    await projects.update(project.id, { visibility: "public" });
    const stream = await Stream.open({ projectId: project.id, sessionId: null }, 0);
    const inside = await Stream.open(earOf(ada), 0);
    const stranger = await member("Cleo");
    await look({ project, by: stranger, window: "cc", kind: "project", subject: "abc" });
    await look({ project, by: bram, window: "bb", kind: "project", subject: "abc" });
    await expect.poll(() => lookers(inside)).toEqual(["Bram: project"]);
    expect(stream.last("looking")).toBeUndefined();
    expect((await pollLive(project.id, null, { lastEventId: 0, member: false })).looking).toBeNull();
    expect((await pollLive(project.id, null, { lastEventId: 0, member: true })).looking).toHaveLength(1);
  });

  it("moves no window of somebody else's", async () => {
    const stream = await Stream.open(earOf(ada), 0);
    await look({ project, by: bram, window: "bb", kind: "project", subject: "abc" });
    await lookAway({ by: ada, window: "bb" });
    await expect.poll(() => lookers(stream)).toEqual(["Bram: project"]);
  });
});

describe("a poll", () => {
  it("answers what the stream would have told", async () => {
    const from = await happen("before");
    await happen("one");
    await happen("two");
    const now = { lastEventId: from, member: true };
    const start = await pollLive(project.id, null, now);
    expect(start).toMatchObject({ events: [], mark: markOf(project.id, from), behind: false });
    const next = await pollLive(project.id, start.mark, now);
    expect(next.events.map(({ about, by }) => [about.title, by?.name])).toEqual([
      ["one", "Ada"],
      ["two", "Ada"],
    ]);
    expect(next.mark).toBe(next.events.at(-1)?.id);
    expect(await pollLive(project.id, next.mark, now)).toMatchObject({ events: [], mark: next.mark });
    expect((await pollLive(project.id, "nonsense", now)).behind).toBe(true);
  });
});

describe("a mark", () => {
  it("is read by its own project alone", () => {
    const mark = markOf(7, 123_456);
    expect(readMark(7, mark)).toBe(123_456);
    expect(readMark(8, mark)).toBeUndefined();
    for (const text of ["", "abc", "123456", mark.slice(1), "A".repeat(22)]) {
      expect(readMark(7, text)).toBeUndefined();
    }
    expect(markOf(7, 123_456)).toBe(mark);
    expect(markOf(7, 123_457).slice(0, 8)).not.toBe(mark.slice(0, 8));
  });
});

async function firstOf(stream: Stream): Promise<Message> {
  await expect.poll(() => stream.messages.length).toBeGreaterThan(0);
  return stream.messages[0];
}
