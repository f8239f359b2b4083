import { findPoints, findPointsOfAll } from "~/db/sweeps.server";
import type { Sweep } from "~/measurement/sweep";
import { decodePoints } from "./points.server.ts";

/**
 * The points of a reading. They never change once written, so the last few are kept in memory; a process that
 * has none of them reads them again.
 */
export async function loadPoints(readingId: number): Promise<Sweep> {
  const kept = cache.get(readingId);
  if (kept) {
    cache.delete(readingId);
    cache.set(readingId, kept);
    return kept;
  }
  return keep(readingId, decodePoints(await findPoints(readingId)));
}

/** The points of many readings, those that are not kept in one query. */
export async function loadManyPoints(readingIds: readonly number[]): Promise<Map<number, Sweep>> {
  const found = new Map<number, Sweep>();
  const missing: number[] = [];
  for (const id of readingIds) {
    const kept = cache.get(id);
    if (kept) found.set(id, kept);
    else missing.push(id);
  }
  for (const [id, parts] of await findPointsOfAll(missing)) found.set(id, keep(id, decodePoints(parts)));
  return found;
}

function keep(readingId: number, sweep: Sweep): Sweep {
  cache.set(readingId, sweep);
  keptPoints += sweep.frequencyHz.length;
  for (const [id, old] of cache) {
    if (keptPoints <= MOST_POINTS || id === readingId) break;
    cache.delete(id);
    keptPoints -= old.frequencyHz.length;
  }
  return sweep;
}

const cache = new Map<number, Sweep>();
let keptPoints = 0;
/** About 64 MB of complex points. */
const MOST_POINTS = 2_000_000;
