/** Dips of several sweeps side by side: which of them are one and the same. */
import { assign } from "./trails/assignment.ts";
import { GATE, type TrailDip, unlikeness } from "./trails/likeness.ts";

/** A dip with the trail that it is known to be on; null where none is known. */
export interface RowDip extends TrailDip {
  trail: string | null;
}

export interface RowSweep<D extends RowDip> {
  /** Whose trails its dips are on: trails of two projects say nothing of one another. */
  project: string;
  /** Any order; no edge dips. */
  dips: readonly D[];
}

/**
 * One dip in every sweep that shows it, in the order of the sweeps; null where a sweep shows none. Ascending in mean log
 * frequency. Every dip of every sweep is in exactly one row.
 *
 * Dips of one trail are in one row, dips of two trails of one project never: people may have corrected that. The others go sweep by sweep
 * to the rows by least total distance in log frequency inside the gate of trails, to the nearest of a row's dips
 * (`trails/likeness.ts`, `trails/assignment.ts`). Dips whose frequency is none are left out.
 */
export function dipRows<D extends RowDip>(sweeps: readonly RowSweep<D>[]): (D | null)[][] {
  const rows: Member<D>[][] = [];
  for (const [sweep, { project, dips }] of sweeps.entries()) {
    const fresh = dips
      .filter(({ frequencyHz }) => frequencyHz > 0 && Number.isFinite(frequencyHz))
      .map((dip) => ({ sweep, project, dip }));
    const place = placesOf(fresh, rows);
    for (const member of fresh) {
      const row = place.get(member);
      if (row) row.push(member);
      else rows.push([member]);
    }
  }
  return rows
    .sort((a, b) => middleOf(a) - middleOf(b))
    .map((row) => sweeps.map((_, i) => row.find(({ sweep }) => sweep === i)?.dip ?? null));
}

interface Member<D> {
  sweep: number;
  project: string;
  dip: D;
}

function placesOf<D extends RowDip>(fresh: Member<D>[], rows: Member<D>[][]): Map<Member<D>, Member<D>[]> {
  const places = new Map<Member<D>, Member<D>[]>();
  for (const member of fresh) {
    const own = rows.find((row) => row.some((one) => sameTrail(one, member)));
    if (own && ![...places.values()].includes(own)) places.set(member, own);
  }
  const left = fresh.filter((member) => !places.has(member));
  const free = rows.filter((row) => ![...places.values()].includes(row));
  if (left.length === 0 || free.length === 0) return places;
  // A dip that finds no row begins one, for as much as the gate is wide.
  const cost = left.map((member, i) => [
    ...free.map((row) => farness(member, row)),
    ...left.map((_, j) => (i === j ? GATE : Number.POSITIVE_INFINITY)),
  ]);
  for (const [i, column] of assign(cost).entries())
    if (column < free.length) places.set(left[i], free[column]);
  return places;
}

function farness<D extends RowDip>(member: Member<D>, row: Member<D>[]): number {
  const barred = row.some(
    ({ project, dip }) =>
      project === member.project &&
      dip.trail !== null &&
      member.dip.trail !== null &&
      dip.trail !== member.dip.trail,
  );
  if (barred) return Number.POSITIVE_INFINITY;
  return Math.min(...row.map(({ dip }) => unlikeness(dip, member.dip)));
}

function sameTrail<D extends RowDip>(a: Member<D>, b: Member<D>): boolean {
  return a.project === b.project && a.dip.trail !== null && a.dip.trail === b.dip.trail;
}

function middleOf<D extends RowDip>(row: Member<D>[]): number {
  return row.reduce((sum, { dip }) => sum + Math.log(dip.frequencyHz), 0) / row.length;
}
