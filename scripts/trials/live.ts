import { startSession } from "~/auth/session.server";
import * as events from "~/db/events.server";
import { newPublicId } from "~/db/ids.server";
import * as people from "~/db/people.server";
import * as projects from "~/db/projects.server";
import type { LiveEvent } from "~/services/live-shape";
import { writeNote } from "~/services/notes.server";
import { createProject } from "~/services/projects.server";
import { EventReader } from "./event-reader.ts";

export interface LiveTrial {
  /** Addresses of processes on one database; half of the connections begin at each. */
  servers: readonly [string, string];
  connections: number;
  notesPerSecond: number;
  seconds: number;
  /** Done half-way: the second server is lost. */
  lose: () => Promise<void>;
}

export interface LiveOutcome {
  notes: number;
  connections: number;
  /** Connections that had every note once and in the order of commits. */
  whole: number;
  /** Notes that were missing or came twice, over all connections. */
  missing: number;
  twice: number;
  /** Connections that came again elsewhere. */
  resumed: number;
  /** From the commit of a note until a connection had it, ms; of connections that lost no server. */
  p50Ms: number;
  p99Ms: number;
  mostMs: number;
  /** The same of those that lost theirs. */
  lostP50Ms: number;
  lostMostMs: number;
  /** How long a note took to be written, ms. */
  writtenP50Ms: number;
  writtenP99Ms: number;
}

interface Client {
  reader: EventReader;
  notes: string[];
  receivedMs: Map<string, number>;
}

/** Writes notes at a steady pace while connections listen, and loses one server half-way. */
export async function tryLive(trial: LiveTrial): Promise<LiveOutcome> {
  const { project, cookies, author } = await makeProject();
  const clients = Array.from({ length: trial.connections }, (_, i) => {
    const servers = i % 2 === 0 ? trial.servers : trial.servers.toReversed();
    return listenTo(servers, project.publicId, cookies[i % cookies.length]);
  });
  await until(() => clients.every(({ ready }) => ready()), 30_000);
  const sentMs = new Map<string, number>();
  const tookMs: number[] = [];
  const count = trial.notesPerSecond * trial.seconds;
  const startedMs = Date.now();
  const writing: Promise<void>[] = [];
  for (let n = 0; n < count; n++) {
    await sleep(startedMs + (n * 1000) / trial.notesPerSecond - Date.now());
    const beganMs = nowMs();
    const place = { projectId: project.id, sweepId: null, dipId: null };
    writing.push(
      writeNote({ project, author, place, body: `Note ${n}` }).then(({ publicId }) => {
        sentMs.set(publicId, nowMs());
        tookMs.push(nowMs() - beganMs);
      }),
    );
    if (n === count >> 1) writing.push(trial.lose());
  }
  await Promise.all(writing);
  await until(() => clients.every(({ client }) => client.notes.length >= count), 20_000);
  for (const { client } of clients) client.reader.close();
  const order = (await events.findAfter([{ projectId: project.id, after: 0 }], 2 * count)).flatMap(
    ({ about }) => about.note ?? [],
  );
  return judge(
    clients.map(({ client }) => client),
    order,
    sentMs,
    tookMs.sort((a, b) => a - b),
  );
}

function judge(
  clients: Client[],
  order: string[],
  sentMs: Map<string, number>,
  tookMs: number[],
): LiveOutcome {
  const all = order.join();
  const delays = (of: Client[]) =>
    of
      .flatMap(({ receivedMs }) =>
        [...receivedMs].map(([note, atMs]) => Math.max(0, atMs - (sentMs.get(note) ?? NaN))),
      )
      .sort((a, b) => a - b);
  const stayed = delays(clients.filter(({ reader }) => reader.connections === 1));
  const lost = delays(clients.filter(({ reader }) => reader.connections > 1));
  return {
    notes: order.length,
    connections: clients.length,
    whole: clients.filter(({ notes }) => notes.join() === all).length,
    missing: clients.reduce((sum, { receivedMs }) => sum + order.length - receivedMs.size, 0),
    twice: clients.reduce((sum, { notes, receivedMs }) => sum + notes.length - receivedMs.size, 0),
    resumed: clients.filter(({ reader }) => reader.connections > 1).length,
    p50Ms: share(stayed, 0.5),
    p99Ms: share(stayed, 0.99),
    mostMs: share(stayed, 1),
    lostP50Ms: share(lost, 0.5),
    lostMostMs: share(lost, 1),
    writtenP50Ms: share(tookMs, 0.5),
    writtenP99Ms: share(tookMs, 0.99),
  };
}

function listenTo(servers: readonly string[], project: string, cookie: string) {
  let greeted = false;
  const client: Client = {
    notes: [],
    receivedMs: new Map(),
    reader: new EventReader({
      servers,
      path: `/projects/${project}/live`,
      cookie,
      onEvent: ({ name, data }, receivedMs) => {
        greeted ||= name === "hello";
        if (name !== "happened") return;
        const { note } = (JSON.parse(data) as LiveEvent).about;
        if (!note) return;
        client.notes.push(note);
        client.receivedMs.set(note, client.receivedMs.get(note) ?? receivedMs);
      },
    }),
  };
  return { client, ready: () => greeted };
}

/** A private project with twenty members who are signed in. */
async function makeProject() {
  const members = await Promise.all(
    Array.from({ length: 20 }, () => {
      const userName = `listener-${newPublicId()}`;
      return people.insert({ userName, name: userName, email: null });
    }),
  );
  const about = { title: "Many listen (invented)", summary: "", visibility: "private" as const };
  const project = await createProject({ ...about, ituRegion: null }, members[0]);
  for (const id of members.slice(1)) await projects.insertMember(project.id, id, "reader");
  const cookies = await Promise.all(
    members.map(async (id) => (await startSession(new Request("http://localhost"), id)).split(";")[0]),
  );
  return { project, cookies, author: { id: members[0] } };
}

/** NaN of nothing. */
function share(sorted: number[], part: number): number {
  return sorted[Math.ceil(part * sorted.length) - 1] ?? NaN;
}

function nowMs(): number {
  return performance.timeOrigin + performance.now();
}

async function until(isSo: () => boolean, patienceMs: number): Promise<void> {
  const end = Date.now() + patienceMs;
  while (!isSo() && Date.now() < end) await sleep(50);
}

function sleep(ms: number): Promise<void> {
  return new Promise((resolve) => setTimeout(resolve, Math.max(0, ms)));
}
