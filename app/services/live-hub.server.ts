import * as events from "~/db/events.server";
import { catchUp, liveEvent } from "./live.server.ts";
import { markOf } from "./live-marks.server.ts";
import { type Ear, type Hearing, hearingOf } from "./live-standing.server.ts";
import { log } from "./log.server.ts";
import { forgetOldLooks, lookersOf } from "./presence.server.ts";

/** One open connection. What it is sent are whole messages of a stream of events. */
interface Listener extends Ear {
  send: (message: string) => void;
  close: () => void;
}

interface Open extends Listener {
  /** Row id of the last event that it was sent; undefined while it is still being caught up. */
  sentTo: number | undefined;
  /** Came in while it was being caught up. */
  waiting: events.FoundEvent[];
  hearing: Hearing;
  looking: string;
  sentAtMs: number;
}

interface Watched {
  /** Row id of the last event that was read; undefined until it is known where to begin. */
  readTo: number | undefined;
  /** Who looked when it was last asked, as it is sent. */
  looking: string;
  open: Set<Open>;
}

const projects = new Map<number, Watched>();
let ticking = false;
let checkedAtMs = 0;
let lookedAtMs = 0;
let tidiedAtMs = 0;

/**
 * Tells a connection everything that happens in a project, beginning after a row id (undefined: none that is ours). It
 * hears nothing once its session ended or its project is not for it any more. The answer ends it.
 */
export async function listen(listener: Listener, after: number | undefined): Promise<() => void> {
  const one: Open = {
    ...listener,
    sentTo: undefined,
    waiting: [],
    hearing: "reader",
    looking: "",
    sentAtMs: Date.now(),
  };
  // In the set before anything is asked: what comes in meanwhile waits for it.
  const watched = projects.get(one.projectId) ?? { readTo: undefined, looking: "", open: new Set() };
  projects.set(one.projectId, watched);
  watched.open.add(one);
  if (!ticking) {
    ticking = true;
    setTimeout(tick, EVERY_MS);
  }
  try {
    if (watched.readTo === undefined) {
      const last = (await events.findLast([one.projectId])).get(one.projectId) ?? 0;
      watched.readTo ??= last;
    }
    const { rows, readTo, behind } = await catchUp(one.projectId, after);
    const [hearing, looking] = await Promise.all([hearingOf([one]), lookersOf([one.projectId])]);
    const heard = hearing.get(one);
    if (!heard) {
      drop(one);
      return () => undefined;
    }
    one.hearing = heard;
    const from = behind || after === undefined ? readTo : after;
    say(
      one,
      `retry: ${RETRY_MS}\n${message(behind ? "behind" : "hello", "{}", markOf(one.projectId, from))}`,
    );
    one.sentTo = from;
    deliver(one, rows);
    deliver(one, one.waiting.splice(0));
    tellLooking(one, JSON.stringify(looking.get(one.projectId) ?? []));
  } catch (error) {
    drop(one);
    throw error;
  }
  return () => forget(one);
}

/** How many connections this process has open. */
export function countListeners(): number {
  return [...projects.values()].reduce((sum, { open }) => sum + open.size, 0);
}

/** One look at the database for everybody; none while nobody listens. */
async function tick(): Promise<void> {
  try {
    await round();
  } catch (error) {
    log.warn({ err: error }, "live events could not be looked for; it is tried again");
  }
  ticking = projects.size > 0;
  if (ticking) setTimeout(tick, EVERY_MS);
}

async function round(): Promise<void> {
  const now = Date.now();
  const marks = [...projects].flatMap(([projectId, { readTo }]) =>
    readTo === undefined ? [] : [{ projectId, after: readTo }],
  );
  const looksDue = now - lookedAtMs >= LOOK_EVERY_MS;
  const [rows, lookers] = await Promise.all([
    events.findAfter(marks, AT_ONCE),
    looksDue ? lookersOf([...projects.keys()]) : undefined,
  ]);
  if (looksDue) lookedAtMs = now;
  const checkAll = now - checkedAtMs >= CHECK_EVERY_MS;
  const happened = new Map<number, events.FoundEvent[]>();
  for (const row of rows) {
    const news = happened.get(row.projectId);
    if (news) news.push(row);
    else happened.set(row.projectId, [row]);
  }
  const moved = new Set<number>();
  for (const [projectId, list] of lookers ?? []) {
    const watched = projects.get(projectId);
    const looking = JSON.stringify(list);
    if (!watched || watched.looking === looking) continue;
    watched.looking = looking;
    moved.add(projectId);
  }
  // Chosen after reading: who comes later is caught up with all of this by its own reading. Asked after reading, too: who
  // was let go before something happened does not hear of it.
  const concerned = [...projects].flatMap(([id, { open }]) =>
    checkAll || moved.has(id) || happened.has(id) ? [...open] : [],
  );
  const hearing = await hearingOf(concerned);
  if (checkAll) checkedAtMs = now;
  for (const [projectId, watched] of projects) {
    const news = happened.get(projectId) ?? [];
    watched.readTo = news.at(-1)?.id ?? watched.readTo;
  }
  for (const one of concerned) {
    const heard = hearing.get(one);
    if (!heard) {
      drop(one);
      continue;
    }
    one.hearing = heard;
    deliver(one, happened.get(one.projectId) ?? []);
    if (moved.has(one.projectId)) tellLooking(one, projects.get(one.projectId)?.looking ?? "[]");
    if (now - one.sentAtMs >= BEAT_MS) say(one, message("beat", "{}"));
  }
  if (now - tidiedAtMs >= TIDY_EVERY_MS) {
    tidiedAtMs = now;
    await forgetOldLooks();
  }
}

function deliver(one: Open, rows: events.FoundEvent[]): void {
  if (one.sentTo === undefined) {
    one.waiting.push(...rows);
    return;
  }
  const { sentTo } = one;
  const news = rows.filter(({ id }) => id > sentTo);
  if (news.length === 0) return;
  one.sentTo = news[news.length - 1].id;
  say(one, news.map(messageOf).join(""));
}

/** Each event is written out once, for however many hear it. */
const written = new WeakMap<events.FoundEvent, string>();

function messageOf(row: events.FoundEvent): string {
  let text = written.get(row);
  if (text === undefined) {
    const event = liveEvent(row);
    text = message("happened", JSON.stringify(event), event.id);
    written.set(row, text);
  }
  return text;
}

function tellLooking(one: Open, looking: string): void {
  if (one.hearing !== "member" || one.sentTo === undefined || one.looking === looking) return;
  one.looking = looking;
  say(one, message("looking", looking));
}

function message(event: string, data: string, id?: string): string {
  return `${id === undefined ? "" : `id: ${id}\n`}event: ${event}\ndata: ${data}\n\n`;
}

function say(one: Open, text: string): void {
  one.sentAtMs = Date.now();
  one.send(text);
}

function drop(one: Open): void {
  forget(one);
  one.close();
}

function forget(one: Open): void {
  const watched = projects.get(one.projectId);
  watched?.open.delete(one);
  if (watched?.open.size === 0) projects.delete(one.projectId);
}

const EVERY_MS = 150;
/** How long a connection may live on after it lost its right, while nothing happens. Where something happens, it is asked first. */
const CHECK_EVERY_MS = 2000;
const LOOK_EVERY_MS = 400;
/** Proxies end what is silent for a minute or less (common practice, no source). */
const BEAT_MS = 15_000;
/** What a browser waits before it comes again. */
const RETRY_MS = 1000;
const AT_ONCE = 1000;
const TIDY_EVERY_MS = 5 * 60 * 1000;
