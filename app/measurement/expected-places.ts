import type { ElementKind, ExpectedPlace, StepQuantity } from "./antenna.ts";
import { fitLengthLine, followsOf, frequencyAt, isCredible, type LengthPair } from "./length-line.ts";
import { formatLength, type LengthUnit } from "./lengths.ts";
import { formatFrequency } from "./units.ts";

/** A trail before a planned step. */
export interface TrailAtStep {
  /** Its public id. */
  trail: string;
  /** Where its last dip lies. */
  frequencyHz: number;
  frequencyUncertaintyHz: number | null;
  /** The part of its cause: an element's key or "feedline"; null where no cause is agreed on. */
  part: string | null;
  /** That part's kind, which says how closely a trail follows it. */
  kind?: ElementKind | null;
  /** What earlier steps showed: for each part whose length changed, lengths and this trail's frequencies. */
  history: { part: string; pairs: LengthPair[] }[];
}

/**
 * The place of every trail after a planned step, in the order given. Of the step's quantities those count that point at a length
 * and have both numbers. With a history of two or more of its lengths a trail follows their line, with its 95 % interval; else it
 * follows in proportion if the part is its cause, within what such proportions are off by (`followsOf`); else it stays, and says so.
 * Several lengths at once: one after the other. Nothing is known of trails whose frequency is none: they are left out.
 */
export function expectedPlaces(
  trails: readonly TrailAtStep[],
  quantities: readonly StepQuantity[],
  unit: LengthUnit = "metres",
): ExpectedPlace[] {
  const changes = quantities.flatMap(({ target, from, to }) =>
    target?.field === "lengthM" && isLength(from) && isLength(to) && from !== to
      ? [{ part: target.part, from, to }]
      : [],
  );
  return trails
    .filter(({ frequencyHz }) => isLength(frequencyHz))
    .map((trail) => placeOf(trail, changes, unit));
}

interface Change {
  part: string;
  from: number;
  to: number;
}

/** A shift as a factor, with its ends. */
interface Factor {
  value: number;
  low: number | null;
  high: number | null;
  how: string;
}

function placeOf(trail: TrailAtStep, changes: readonly Change[], unit: LengthUnit): ExpectedPlace {
  const factors = changes.flatMap((change) => factorOf(trail, change, unit) ?? []);
  const { frequencyHz, frequencyUncertaintyHz } = trail;
  const at = formatFrequency(frequencyHz, frequencyUncertaintyHz);
  if (factors.length === 0)
    return {
      trail: trail.trail,
      frequencyHz,
      lowHz: null,
      highHz: null,
      how: `not known to move: ${stays(changes)}`,
    };
  const product = (of: (factor: Factor) => number | null) =>
    factors.reduce<number | null>((all, factor) => {
      const one = of(factor);
      return all === null || one === null ? null : all * one;
    }, 1);
  const value = frequencyHz * (product((f) => f.value) ?? 1);
  const [low, high] = [product((f) => f.low), product((f) => f.high)];
  return {
    trail: trail.trail,
    frequencyHz: value,
    lowHz: low === null ? null : frequencyHz * low - own(trail),
    highHz: high === null ? null : frequencyHz * high + own(trail),
    how: `${at} × ${factors.map(({ how }) => how).join(" × ")} = ${formatFrequency(Number(value.toPrecision(5)))}`,
  };
}

/** What is known of the present frequency, Hz; a place without it is as wide as its factor alone. */
function own({ frequencyUncertaintyHz }: TrailAtStep): number {
  return frequencyUncertaintyHz ?? 0;
}

function factorOf(trail: TrailAtStep, { part, from, to }: Change, unit: LengthUnit): Factor | null {
  const ratio = `${formatLength(from, unit)}/${formatLength(to, unit)}`;
  const line = fitLengthLine(trail.history.find((one) => one.part === part)?.pairs ?? []);
  if (line && isCredible(line)) {
    const [before, after] = [frequencyAt(line, from), frequencyAt(line, to)];
    const share = (hz: number | null) => (hz === null ? null : hz / before.value);
    const steepness = (-line.slope).toFixed(2);
    const how = `(${ratio})^${steepness}, the line through ${line.count} earlier lengths`;
    return { value: after.value / before.value, low: share(after.low), high: share(after.high), how };
  }
  if (trail.part !== part) return null;
  const ends = followsOf(trail.kind).map((s) => (from / to) ** s);
  return {
    value: from / to,
    low: Math.min(...ends),
    high: Math.max(...ends),
    how: `${ratio}, in proportion`,
  };
}

function stays(changes: readonly Change[]): string {
  return changes.length === 0
    ? "the step changes no length that is known before and after"
    : "neither its cause nor its history has to do with what the step changes";
}

function isLength(value: number | null): value is number {
  return value !== null && value > 0 && Number.isFinite(value);
}
