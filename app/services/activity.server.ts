import * as activity from "~/db/activity.server";
import * as events from "~/db/events.server";
import type { EventAbout } from "~/db/schema";
import { type ActivityDay, countWords, foldDays, type Happened } from "./activity-lines.ts";
import type { EventKind } from "./event-kinds.ts";
import { markOf, readMark } from "./live-marks.server.ts";

interface OfProject {
  id: number;
  publicId: string;
}

export interface Account {
  days: ActivityDay[];
  nextCursor: string | null;
  /** Of the newest event that is told: "I have seen this". Null where nothing happened. */
  mark: string | null;
}

/** The project's account, a page at a time; with `since` only what came after that mark. */
export async function accountOf(
  project: OfProject,
  { cursor, since }: { cursor?: string; since?: string } = {},
): Promise<Account> {
  const before = cursor ? readCursor(project.id, cursor) : undefined;
  const after = since ? readMark(project.id, since) : undefined;
  const rows = await activity.findPage(project.id, { limit: A_PAGE + 1, before, after });
  const shown = rows.slice(0, A_PAGE);
  const last = rows.length > A_PAGE ? shown[A_PAGE - 1] : undefined;
  const newest = Math.max(...shown.map(({ id }) => id));
  return {
    days: foldDays(shown.map(happened), await placesOf(project, shown)),
    nextCursor: last ? `${last.at.toISOString()}_${markOf(project.id, last.id)}` : null,
    mark: shown.length > 0 ? markOf(project.id, newest) : null,
  };
}

export interface SinceLast {
  /** "3 notes", "1 sweep"; what others did. */
  counts: string[];
  /** Where the member had come to, and where the project is now. */
  since: string;
  mark: string;
}

/** What others did since the member put it away last; null for nothing. Looking at a page changes nothing of it. */
export async function sinceLast(project: { id: number }, userId: number): Promise<SinceLast | null> {
  const seen = await activity.findSeen(project.id, userId);
  if (!seen) return null;
  const [counts, last] = await Promise.all([
    activity.countSince(project.id, userId, seen),
    events.findLast([project.id]),
  ]);
  if (counts.length === 0) return null;
  return {
    counts: counts.map(({ kind, n }) => countWords(kind as EventKind, n)),
    since: markOf(project.id, seen.eventId ?? 0),
    mark: markOf(project.id, last.get(project.id) ?? 0),
  };
}

/** Everything up to the mark is known to the member from now on. */
export async function putAway(project: { id: number }, userId: number, mark: string): Promise<void> {
  const eventId = readMark(project.id, mark);
  if (eventId !== undefined) await activity.setSeen(project.id, userId, eventId);
}

export function happened({ kind, about, at, by, former }: activity.ActivityRow): Happened {
  return { kind: kind as EventKind, about, at, by: former ? FORMER : by };
}

/** Answers the address of what an event is about; null for what is gone. */
export async function placesOf(project: OfProject, rows: { about: EventAbout }[]) {
  const named = rows.flatMap(({ about: { writeUp, plate, dip, trail, step, bench, sweep } }) =>
    [writeUp, plate, dip, trail, step, bench, sweep].filter((id) => id !== undefined),
  );
  const present = await activity.findPresent(project.id, [...new Set(named)]);
  const base = `/projects/${project.publicId}`;
  return (about: EventAbout): string | null => {
    if (about.writeUp) return present.has(about.writeUp) ? `/write-ups/${about.writeUp}` : null;
    if (about.plate) return present.has(about.plate) ? `/plates/${about.plate}` : null;
    const kinds = [
      ["dips", about.dip],
      ["trails", about.trail],
      ["steps", about.step],
      ["benches", about.bench],
      ["sweeps", about.sweep],
    ] as const;
    const there = kinds.find(([, id]) => id !== undefined && present.has(id));
    if (there) return `${base}/${there[0]}/${there[1]}`;
    return kinds.every(([, id]) => id === undefined) && about.note ? base : null;
  };
}

function readCursor(projectId: number, text: string): activity.Before | undefined {
  const [at, mark] = text.split("_", 1).concat(text.slice(text.indexOf("_") + 1));
  const date = new Date(at);
  const id = readMark(projectId, mark);
  return id === undefined || Number.isNaN(date.getTime()) ? undefined : { at: date, id };
}

const FORMER = "former member";
const A_PAGE = 100;
