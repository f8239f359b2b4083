import * as events from "~/db/events.server";
import type { EventKind } from "./event-kinds.ts";
import { markOf, readMark } from "./live-marks.server.ts";
import type { LiveAnswer, LiveEvent } from "./live-shape.ts";
import { lookersOf } from "./presence.server.ts";

export function liveEvent({ id, projectId, kind, at, by, about }: events.FoundEvent): LiveEvent {
  return { id: markOf(projectId, id), kind: kind as EventKind, at: at.toISOString(), by, about };
}

interface CaughtUp {
  rows: events.FoundEvent[];
  /** Row id up to which everything is told now. */
  readTo: number;
  behind: boolean;
}

/** Everything since a row id; where that is too much to tell one by one, only how far it goes. */
export async function catchUp(projectId: number, after: number | undefined): Promise<CaughtUp> {
  if (after !== undefined) {
    const rows = await events.findAfter([{ projectId, after }], MOST_BEHIND + 1);
    if (rows.length <= MOST_BEHIND) return { rows, readTo: rows.at(-1)?.id ?? after, behind: false };
  }
  const last = (await events.findLast([projectId])).get(projectId) ?? 0;
  return { rows: [], readTo: last, behind: true };
}

/** The answer to one poll: what happened since the mark, or with none, where to go on from. */
export async function pollLive(
  projectId: number,
  mark: string | null,
  now: { lastEventId: number; member: boolean },
): Promise<LiveAnswer> {
  const [{ rows, readTo, behind }, looking] = await Promise.all([
    mark === null
      ? { rows: [], readTo: now.lastEventId, behind: false }
      : catchUp(projectId, readMark(projectId, mark)),
    now.member ? lookersOf([projectId]) : null,
  ]);
  return {
    events: rows.map(liveEvent),
    looking: looking?.get(projectId) ?? null,
    mark: markOf(projectId, readTo),
    more: false,
    behind,
  };
}

/** A page that slept through more than this is loaded anew instead. */
const MOST_BEHIND = 2000;
