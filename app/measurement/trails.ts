/**
 * Trails: one dip followed from sweep to sweep (MEASUREMENT section 7).
 *
 * Sweeps come in order of time; each one's dips are assigned to the trails alive then by least total distance in log
 * frequency inside a gate, depth and width being weak evidence (`likeness.ts`, `assignment.ts`). A trail waits through
 * sweeps whose range does not reach it, and through `MOST_MISSED` that reach it and do not show it. A person's
 * decisions outrank the distance for ever.
 */
import { assign } from "./trails/assignment.ts";
import { type Agreed, agree, type TrailDecision } from "./trails/decisions.ts";
import { GATE, type TrailDip, unlikeness } from "./trails/likeness.ts";

export interface TrailSweep {
  id: string;
  /** Hz, the ends of the sweep. */
  startHz: number;
  stopHz: number;
  /** Dips inside the sweep, any order; no edge dips. */
  dips: readonly TrailDip[];
}

export interface TrailStop {
  sweepIndex: number;
  dip: TrailDip;
  /** What led here: null for the first stop. */
  by: "distance" | "person" | null;
}

export interface FoundTrail {
  /** In order of time, at most one a sweep. */
  stops: TrailStop[];
}

/** Every dip of every sweep on exactly one trail; trails in order of their first dip's sweep and frequency. */
export function findTrails(
  sweeps: readonly TrailSweep[],
  decisions: readonly TrailDecision[] = [],
): { trails: FoundTrail[]; overruled: TrailDecision[] } {
  const sweepIndexOf = new Map(sweeps.flatMap((sweep, i) => sweep.dips.map(({ id }) => [id, i] as const)));
  const agreed = agree(decisions, (id) => sweepIndexOf.get(id)?.toString());
  const tracks: Track[] = [];
  for (const [sweepIndex, sweep] of sweeps.entries()) {
    const dips = sweep.dips
      .filter((dip) => dip.frequencyHz > 0)
      .sort((a, b) => a.frequencyHz - b.frequencyHz);
    const alive = tracks.filter((track) => track.missed <= MOST_MISSED);
    const taken = decided(tracks, dips, agreed);
    const free = dips.filter((dip) => !taken.has(dip));
    const waiting = alive.filter((track) => ![...taken.values()].includes(track));
    const barred = (track: Track, dip: TrailDip) => isBarred(track, dip, agreed, sweepIndexOf, sweepIndex);
    for (const [dip, track] of nearest(waiting, free, barred)) taken.set(dip, track);
    const forced = new Set(dips.filter((dip) => !free.includes(dip)));
    for (const track of tracks) track.missed += reaches(sweep, track) ? 1 : 0;
    for (const dip of dips) {
      const track = taken.get(dip);
      const by = forced.has(dip) ? "person" : "distance";
      if (track) stop(track, { sweepIndex, dip, by });
      else tracks.push({ stops: [{ sweepIndex, dip, by: null }], missed: 0 });
    }
  }
  return { trails: tracks.map(({ stops }) => ({ stops })), overruled: agreed.overruled };
}

interface Track extends FoundTrail {
  /** Sweeps in a row that reach it and do not show it. */
  missed: number;
}

function stop(track: Track, next: TrailStop): void {
  track.stops.push(next);
  track.missed = 0;
}

/** The dips that a decision puts on a trail, however long ago that was last seen. */
function decided(tracks: Track[], dips: TrailDip[], agreed: Agreed): Map<TrailDip, Track> {
  const found = new Map<TrailDip, Track>();
  for (const dip of dips) {
    const group = agreed.groupOf(dip.id);
    if (group.size === 1) continue;
    const track = tracks.findLast(({ stops }) => stops.some((one) => group.has(one.dip.id)));
    if (track) found.set(dip, track);
  }
  return found;
}

/** Whether a decision keeps the dip off the trail, or will put another dip of one of their sweeps there. */
function isBarred(
  track: Track,
  dip: TrailDip,
  agreed: Agreed,
  sweepIndexOf: ReadonlyMap<string, number>,
  now: number,
): boolean {
  const mine = [...agreed.groupOf(dip.id)];
  const later = new Set<number>();
  for (const one of track.stops) {
    if (agreed.isApart(one.dip.id, dip.id)) return true;
    for (const id of agreed.groupOf(one.dip.id)) later.add(sweepIndexOf.get(id) ?? -1);
  }
  return mine.some((id) => {
    const index = sweepIndexOf.get(id) ?? -1;
    return index >= now && later.has(index);
  });
}

/** Pairs of least total unlikeness; a trail that finds nothing costs as much as the gate is wide. */
function nearest(
  tracks: Track[],
  dips: TrailDip[],
  barred: (track: Track, dip: TrailDip) => boolean,
): [TrailDip, Track][] {
  if (tracks.length === 0 || dips.length === 0) return [];
  const cost = tracks.map((track, i) => {
    const last = track.stops[track.stops.length - 1].dip;
    const pairs = dips.map((dip) => (barred(track, dip) ? Number.POSITIVE_INFINITY : unlikeness(last, dip)));
    return [...pairs, ...tracks.map((_, j) => (i === j ? MISS_COST : Number.POSITIVE_INFINITY))];
  });
  return assign(cost).flatMap((j, i) => (j < dips.length ? [[dips[j], tracks[i]] as [TrailDip, Track]] : []));
}

/** Whether the sweep would show the trail's last dip if it were still there. */
function reaches({ startHz, stopHz }: TrailSweep, { stops }: Track): boolean {
  const { frequencyHz } = stops[stops.length - 1].dip;
  return frequencyHz * (1 - RIM) > startHz && frequencyHz * (1 + RIM) < stopHz;
}

/**
 * Something is added, swept a few times and taken away again: the dip that was away is the same one. Tried from 1 to 5
 * on generated histories: each one more mends trails that return and leads a few astray where dips cross.
 */
const MOST_MISSED = 3;
/** Leaving a trail without a dip costs as much as the farthest step, so that what can be paired is. */
const MISS_COST = GATE;
/** This close to a sweep's end a dip may have moved beyond it. */
const RIM = 0.02;
