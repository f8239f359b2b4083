import type { LiveAnswer, LiveEvent, Looker } from "~/services/live-shape";
import { Pending } from "./pending.ts";

export interface LiveState {
  /** Came in and is not on the page yet. */
  events: readonly LiveEvent[];
  /** Null until it is known, and for who is not a member. */
  looking: readonly Looker[] | null;
  /** So much happened while the page slept that it was not told one by one. */
  behind: boolean;
  /** "ended": this person may not read the project any more, or is signed out. */
  way: "opening" | "stream" | "polling" | "lost" | "ended";
}

/** What the feed takes from the browser. */
export interface FeedWorld {
  EventSource: typeof EventSource;
  fetch: typeof fetch;
}

/**
 * One window's connection to what happens in a project: a stream of events, else polling, each going on from the last mark.
 * `subscribe` and `state` are as React's `useSyncExternalStore` asks for.
 */
export class Feed {
  state: LiveState = { events: [], looking: null, behind: false, way: "opening" };
  readonly #base: string;
  readonly #world: FeedWorld;
  readonly #pending: Pending;
  readonly #told = new Set<() => void>();
  #mark: string;
  #source: EventSource | undefined;
  #timer: ReturnType<typeof setTimeout> | undefined;
  #streamWaitMs = STREAM_AGAIN_MS;
  #streamAtMs = 0;
  #failures = 0;
  #running = false;

  constructor(projectPath: string, mark: string, world: FeedWorld) {
    this.#base = `${projectPath}/live`;
    this.#mark = mark;
    this.#pending = new Pending(mark);
    this.#world = world;
  }

  subscribe = (tell: () => void): (() => void) => {
    this.#told.add(tell);
    return () => this.#told.delete(tell);
  };

  /** Begins, or goes on after `stop`. */
  start(): void {
    if (this.#running || this.state.way === "ended") return;
    this.#running = true;
    this.#openStream();
  }

  stop(): void {
    this.#running = false;
    this.#close();
  }

  /** The page was loaded, at this mark. */
  drawn(mark: string): void {
    this.#pending.draw(mark);
    this.#set({ events: this.#pending.events, behind: false });
  }

  #openStream(): void {
    this.#close();
    const source = new this.#world.EventSource(`${this.#base}?after=${this.#mark}`);
    this.#source = source;
    // Where nothing comes through, something on the way holds it back.
    this.#patience(HELLO_MS);
    source.addEventListener("hello", () => {
      this.#streamWaitMs = STREAM_AGAIN_MS;
      this.#failures = 0;
      this.#set({ way: "stream" });
      this.#patience(SILENCE_MS);
    });
    source.addEventListener("behind", (event) => {
      this.#skipTo(event.lastEventId);
      this.#set({ way: "stream" });
      this.#patience(SILENCE_MS);
    });
    source.addEventListener("happened", (event) => {
      this.#take([JSON.parse(event.data)]);
      this.#patience(SILENCE_MS);
    });
    source.addEventListener("looking", (event) => {
      this.#set({ looking: JSON.parse(event.data) });
      this.#patience(SILENCE_MS);
    });
    source.addEventListener("beat", () => this.#patience(SILENCE_MS));
    source.addEventListener("error", () => {
      if (source !== this.#source) return;
      if (source.readyState === source.CLOSED) this.#poll();
      else if (this.state.way === "stream") {
        // The browser comes again by itself, with the last id.
        this.#set({ way: "opening" });
        this.#patience(HELLO_MS);
      }
    });
  }

  #patience(ms: number): void {
    clearTimeout(this.#timer);
    this.#timer = setTimeout(() => this.#poll(), ms);
  }

  #poll = async (): Promise<void> => {
    if (this.#source) {
      this.#close();
      this.#streamAtMs = Date.now() + this.#streamWaitMs;
      this.#streamWaitMs = Math.min(2 * this.#streamWaitMs, STREAM_AGAIN_MOST_MS);
    }
    const response = await this.#world
      .fetch(`${this.#base}.json?after=${this.#mark}`, { headers: { Accept: "application/json" } })
      .catch(() => null);
    if (!this.#running) return;
    if (response && [401, 403, 404].includes(response.status)) {
      this.stop();
      this.#set({ way: "ended", looking: null });
      return;
    }
    const answer = response?.ok ? ((await response.json().catch(() => null)) as LiveAnswer | null) : null;
    if (!this.#running) return;
    if (!answer) {
      this.#failures += 1;
      if (this.#failures > 1) this.#set({ way: "lost" });
      this.#patience(Math.min(POLL_MS * 2 ** this.#failures, POLL_MOST_MS));
      return;
    }
    this.#failures = 0;
    if (answer.behind) this.#skipTo(answer.mark);
    this.#take(answer.events);
    this.#mark = answer.mark;
    this.#set({ way: "polling", looking: answer.looking });
    if (Date.now() >= this.#streamAtMs) this.#openStream();
    else this.#patience(POLL_MS);
  };

  #take(events: readonly LiveEvent[]): void {
    for (const event of events) {
      this.#pending.take(event);
      this.#mark = event.id;
    }
    if (events.length > 0) this.#set({ events: this.#pending.events });
  }

  #skipTo(mark: string): void {
    this.#pending.skipTo(mark);
    this.#mark = mark;
    this.#set({ events: [], behind: true });
  }

  #close(): void {
    clearTimeout(this.#timer);
    this.#source?.close();
    this.#source = undefined;
  }

  #set(change: Partial<LiveState>): void {
    this.state = { ...this.state, ...change };
    for (const tell of this.#told) tell();
  }
}

const HELLO_MS = 6000;
/** The server says something every 15 s. */
const SILENCE_MS = 40_000;
const POLL_MS = 2000;
const POLL_MOST_MS = 30_000;
const STREAM_AGAIN_MS = 10_000;
const STREAM_AGAIN_MOST_MS = 5 * 60 * 1000;
