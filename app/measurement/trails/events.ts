/** What happens to a trail on its way, beside moving. */
import type { FoundTrail, TrailStop, TrailSweep } from "../trails.ts";

export interface TrailEvent {
  kind: "appears" | "vanishes" | "missed" | "not-covered" | "splits-from" | "merges-into";
  /** The sweep in which it shows: of "vanishes" and "merges-into" the first one without the dip. */
  sweepIndex: number;
  /** Index of the other trail, for splits and merges only. */
  otherTrail: number | null;
}

/**
 * Events of each trail in order of time. A trail that is there in the first sweep that reaches it does not appear, one
 * that is in the last sweep that reaches it does not vanish. One that begins within `NEAR` (ln f) of a dip of a trail
 * that was there before splits from it; one that ends within `NEAR` of a dip of a trail that goes on merges into it.
 */
export function trailEvents(trails: readonly FoundTrail[], sweeps: readonly TrailSweep[]): TrailEvent[][] {
  return trails.map((trail) => {
    const first = trail.stops[0];
    const last = trail.stops[trail.stops.length - 1];
    const events = gapsOf(trail, sweeps);
    const before = sweeps.findLastIndex((sweep, i) => i < first.sweepIndex && covers(sweep, first));
    if (before >= 0) {
      const other = neighbour(trails, trail, first, first.sweepIndex, before);
      events.unshift({
        kind: other === null ? "appears" : "splits-from",
        sweepIndex: first.sweepIndex,
        otherTrail: other,
      });
    }
    const after = sweeps.findIndex((sweep, i) => i > last.sweepIndex && covers(sweep, last));
    if (after >= 0) {
      const other = neighbour(trails, trail, last, after, last.sweepIndex);
      events.push({
        kind: other === null ? "vanishes" : "merges-into",
        sweepIndex: after,
        otherTrail: other,
      });
    }
    return events;
  });
}

/** Sweeps between two stops: not reaching the dip, or reaching it and not showing it. */
function gapsOf({ stops }: FoundTrail, sweeps: readonly TrailSweep[]): TrailEvent[] {
  return stops.slice(1).flatMap((stop, i) => {
    const events: TrailEvent[] = [];
    for (let sweepIndex = stops[i].sweepIndex + 1; sweepIndex < stop.sweepIndex; sweepIndex++) {
      const kind = covers(sweeps[sweepIndex], stops[i]) ? "missed" : "not-covered";
      events.push({ kind, sweepIndex, otherTrail: null });
    }
    return events;
  });
}

/** The trail nearest to `stop` that has a dip in the sweep `at` and had one at or before the sweep `since`. */
function neighbour(
  trails: readonly FoundTrail[],
  own: FoundTrail,
  { dip }: TrailStop,
  at: number,
  since: number,
): number | null {
  let best: { index: number; apart: number } | null = null;
  for (const [index, trail] of trails.entries()) {
    const there = trail.stops.find(({ sweepIndex }) => sweepIndex === at);
    if (trail === own || !there || trail.stops[0].sweepIndex > since) continue;
    const apart = Math.abs(Math.log(there.dip.frequencyHz / dip.frequencyHz));
    if (apart <= NEAR && (best === null || apart < best.apart)) best = { index, apart };
  }
  return best?.index ?? null;
}

function covers({ startHz, stopHz }: TrailSweep, { dip }: TrailStop): boolean {
  return dip.frequencyHz > startHz && dip.frequencyHz < stopHz;
}

/** Two dips closer than 4 % share a hollow at the Q of 10 to 40 that wires have (common practice, no source). */
const NEAR = 0.04;
