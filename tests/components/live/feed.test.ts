import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { Feed } from "../../../app/components/live/feed.ts";
import type { LiveAnswer } from "../../../app/services/live-shape.ts";
import { event } from "./events.ts";

/** A stream whose other side is the test. */
class Source extends EventTarget {
  static all: Source[] = [];
  readonly CLOSED = 2;
  readyState = 0;
  readonly url: string;

  constructor(url: string) {
    super();
    this.url = url;
    Source.all.push(this);
  }

  close(): void {
    this.readyState = 2;
  }

  say(name: string, data: unknown = {}, lastEventId = ""): void {
    this.dispatchEvent(new MessageEvent(name, { data: JSON.stringify(data), lastEventId }));
  }

  lose(readyState: number): void {
    this.readyState = readyState;
    this.dispatchEvent(new Event("error"));
  }
}

const asked: string[] = [];
let answers: (Partial<LiveAnswer> | number | Error)[] = [];
let feed: Feed;

async function ask(url: RequestInfo | URL): Promise<Response> {
  asked.push(String(url));
  const answer = answers.shift() ?? {};
  if (answer instanceof Error) throw answer;
  if (typeof answer === "number") return new Response("", { status: answer });
  return Response.json({ events: [], looking: null, mark: "m0", more: false, behind: false, ...answer });
}

beforeEach(() => {
  vi.useFakeTimers();
  Source.all = [];
  asked.length = 0;
  answers = [];
  feed = new Feed("/projects/p1", "m0", { EventSource: Source as never, fetch: ask as typeof fetch });
});
afterEach(() => {
  feed.stop();
  vi.useRealTimers();
});

const ids = () => feed.state.events.map(({ id }) => id);
const newest = () => Source.all[Source.all.length - 1];

describe("a feed", () => {
  it("hears a stream from the page's mark on", () => {
    feed.start();
    expect(newest().url).toBe("/projects/p1/live?after=m0");
    newest().say("hello", {}, "m0");
    newest().say("happened", event(1, "note.added"), "m1");
    newest().say("looking", [{ name: "Cleo", userName: "cleo", kind: "dip", subject: "d1" }]);
    expect(feed.state).toMatchObject({ way: "stream", looking: [{ name: "Cleo" }] });
    expect(ids()).toEqual(["m1"]);
    feed.drawn("m1");
    expect(ids()).toEqual([]);
  });

  it("goes on from the last event after the window was out of sight", () => {
    feed.start();
    newest().say("happened", event(1, "note.added"), "m1");
    feed.stop();
    expect(newest().readyState).toBe(2);
    feed.start();
    expect(newest().url).toBe("/projects/p1/live?after=m1");
    newest().say("happened", event(1, "note.added"), "m1");
    newest().say("happened", event(2, "note.added"), "m2");
    expect(ids()).toEqual(["m1", "m2"]);
  });

  it("polls where nothing comes through, and tries the stream again later", async () => {
    feed.start();
    answers = [
      { events: [event(1, "note.added")], mark: "m1" },
      { events: [event(2, "note.added")], mark: "m2" },
    ];
    await vi.advanceTimersByTimeAsync(6000);
    expect(asked).toEqual(["/projects/p1/live.json?after=m0"]);
    expect(feed.state.way).toBe("polling");
    await vi.advanceTimersByTimeAsync(2000);
    expect(asked[1]).toBe("/projects/p1/live.json?after=m1");
    expect(ids()).toEqual(["m1", "m2"]);
    answers = Array.from({ length: 10 }, () => ({ mark: "m2" }));
    await vi.advanceTimersByTimeAsync(10_000);
    expect(Source.all).toHaveLength(2);
    expect(newest().url).toBe("/projects/p1/live?after=m2");
  });

  it("polls at once where the stream is refused, and ends where that is refused too", async () => {
    feed.start();
    answers = [404];
    newest().lose(2);
    await vi.advanceTimersByTimeAsync(0);
    expect(feed.state.way).toBe("ended");
    feed.start();
    await vi.advanceTimersByTimeAsync(60_000);
    expect([Source.all.length, asked.length]).toEqual([1, 1]);
  });

  it("says that it is lost while nothing answers, asks less and less often, and comes back", async () => {
    feed.start();
    newest().say("hello", {}, "m0");
    answers = [new Error("no network"), 502, new Error("no network")];
    newest().lose(0);
    await vi.advanceTimersByTimeAsync(6000);
    expect(asked).toHaveLength(1);
    await vi.advanceTimersByTimeAsync(4000);
    expect([asked.length, feed.state.way]).toEqual([2, "lost"]);
    answers = [{ events: [event(1, "sweep.added")], mark: "m1" }];
    await vi.advanceTimersByTimeAsync(30_000);
    expect(ids()).toEqual(["m1"]);
    expect(feed.state.way).not.toBe("lost");
  });

  it("leaves it to the browser where a stream merely breaks off", async () => {
    feed.start();
    newest().say("hello", {}, "m0");
    newest().lose(0);
    await vi.advanceTimersByTimeAsync(1000);
    newest().say("hello", {}, "m0");
    await vi.advanceTimersByTimeAsync(10_000);
    expect([asked.length, Source.all.length]).toEqual([0, 1]);
  });

  it("says that too much happened to be told", () => {
    feed.start();
    newest().say("behind", {}, "m900");
    expect(feed.state).toMatchObject({ behind: true, events: [] });
    newest().say("happened", event(901, "note.added"), "m901");
    feed.drawn("m901");
    expect(feed.state).toMatchObject({ behind: false, events: [] });
  });
});
