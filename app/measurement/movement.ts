import type { Dip } from "./sweep.ts";
import { findTrails } from "./trails.ts";
import { combine } from "./uncertainty.ts";

/** One dip in two sweeps, or in one of them. */
export interface Movement<D extends Dip = Dip> {
  before: D | null;
  after: D | null;
  /**
   * "moved": by more than both limits together; "still": not beyond them; "unsure": the limits are not known;
   * "appeared", "vanished": the other sweep reaches there and shows none; "unseen": it does not reach there.
   */
  kind: "moved" | "still" | "unsure" | "appeared" | "vanished" | "unseen";
  /** Hz, after less before; null where there is only one. */
  byHz: number | null;
  /** Hz, half-width of its 95 % interval; null where one of the two is not known. */
  uncertaintyHz: number | null;
}

export interface SideOfStep<D extends Dip> {
  startHz: number;
  stopHz: number;
  dips: readonly D[];
}

/**
 * How far each dip moved between two sweeps, ascending in frequency. `trailOf` names the trail a dip is on, null where
 * none is known; dips of one trail are one dip, the rest are paired as trails are (trails.ts). Dips at a sweep's end
 * never pair: where they lie is not known. The half-widths of the two sweeps are independent and add as squares
 * (JCGM 100:2008, 5.1.2; from memory, not seen).
 */
export function movementsBetween<D extends Dip>(
  before: SideOfStep<D>,
  after: SideOfStep<D>,
  trailOf: (dip: D) => string | null = () => null,
): Movement<D>[] {
  const [from, to] = [before, after].map(({ dips }) => dips.filter(({ edge }) => !edge));
  const pairs = pairUp(before, after, from, to, trailOf);
  const found = new Set(pairs.values());
  return [
    ...from.map((dip) => movementOf(dip, pairs.get(dip) ?? null, after)),
    ...to.filter((dip) => !found.has(dip)).map((dip) => movementOf(null, dip, before)),
  ].sort((a, b) => placeOf(a) - placeOf(b));
}

/** @param other the sweep that a lone dip might have been in */
function movementOf<D extends Dip>(before: D | null, after: D | null, other: SideOfStep<D>): Movement<D> {
  if (!before || !after) {
    const hz = (before ?? after)?.frequencyHz ?? Number.NaN;
    const reached = hz > other.startHz && hz < other.stopHz;
    const kind = !reached ? "unseen" : before ? "vanished" : "appeared";
    return { before, after, kind, byHz: null, uncertaintyHz: null };
  }
  const byHz = after.frequencyHz - before.frequencyHz;
  const uncertaintyHz = combine(before.frequencyUncertaintyHz, after.frequencyUncertaintyHz);
  const kind = uncertaintyHz === null ? "unsure" : Math.abs(byHz) > uncertaintyHz ? "moved" : "still";
  return { before, after, kind, byHz, uncertaintyHz };
}

function pairUp<D extends Dip>(
  before: SideOfStep<D>,
  after: SideOfStep<D>,
  from: D[],
  to: D[],
  trailOf: (dip: D) => string | null,
): Map<D, D> {
  const pairs = new Map<D, D>();
  for (const dip of from) {
    const trail = trailOf(dip);
    const same = trail === null ? undefined : to.find((other) => trailOf(other) === trail);
    if (same) pairs.set(dip, same);
  }
  // Both on trails, but not on one: that is an answer too.
  const open = (dip: D) => trailOf(dip) === null;
  const [left, right] = [from.filter(open), to.filter(open)];
  const sides = [
    { ...before, id: "before", dips: left.map((dip, i) => traced(`b${i}`, dip)) },
    { ...after, id: "after", dips: right.map((dip, i) => traced(`a${i}`, dip)) },
  ];
  for (const { stops } of findTrails(sides).trails) {
    if (stops.length === 2)
      pairs.set(left[Number(stops[0].dip.id.slice(1))], right[Number(stops[1].dip.id.slice(1))]);
  }
  return pairs;
}

function traced(id: string, { frequencyHz, returnLossDb, bandwidth }: Dip) {
  return { id, frequencyHz, returnLossDb, widthHz: bandwidth && !bandwidth.open ? bandwidth.widthHz : null };
}

function placeOf({ before, after }: Movement): number {
  return (before ?? after)?.frequencyHz ?? 0;
}
