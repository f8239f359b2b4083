import type { VerdictState } from "~/charts/chart-types";
import type { TrailTone } from "~/charts/placed-trail";
import type { Ghost, Trail } from "~/charts/strip-trails";
import { movementWords, stopWords, type TrailNumbers } from "~/charts/trail-words";
import type { DesignBand } from "~/db/projects.server";
import type { ListedStep } from "~/db/steps.server";
import type { StripDip, StripRow } from "~/db/story.server";
import type { TrailRow } from "~/db/trails.server";
import { formatFrequency } from "~/measurement/units";

interface MapOf {
  /** Oldest first. */
  rows: readonly StripRow[];
  dips: readonly StripDip[];
  trails: readonly TrailRow[];
  members: readonly { dipId: number; trailId: number }[];
  designBands: readonly DesignBand[];
  steps: readonly ListedStep[];
}

/** The trails that have dips in the strips, as they are drawn and spoken. */
export function trailsOfMap({ rows, dips, trails, members, designBands, steps }: MapOf): Trail[] {
  const dipOf = new Map(dips.map((dip) => [dip.id, dip]));
  const rowOf = new Map(rows.map((row, index) => [row.id, { row, index }]));
  const byTrail = new Map<number, { dip: StripDip; row: StripRow; index: number }[]>();
  for (const { dipId, trailId } of members) {
    const dip = dipOf.get(dipId);
    const place = dip && rowOf.get(dip.sweepId);
    if (dip && place) byTrail.set(trailId, [...(byTrail.get(trailId) ?? []), { dip, ...place }]);
  }
  return trails.flatMap((trail): Trail[] => {
    const way = (byTrail.get(trail.id) ?? []).sort((a, b) => a.index - b.index);
    const [first, last] = [way[0], way[way.length - 1]];
    if (!first) return [];
    const verdict = verdictOf(
      trail,
      way.map(({ dip }) => dip),
    );
    const inside = designBands.some(
      ({ lowHz, highHz }) => lowHz <= last.dip.frequencyHz && last.dip.frequencyHz <= highHz,
    );
    const numbers = ({ dip, row }: typeof first): TrailNumbers => ({ ...dip, at: row.takenAt });
    const gone = last.index < rows.length - 1;
    return [
      {
        id: trail.publicId,
        label: trail.name || formatFrequency(last.dip.frequencyHz, last.dip.frequencyUncertaintyHz),
        detail: shorten(verdict.text) || (gone ? "" : movementWords(numbers(first), numbers(last))),
        tone: toneOf(inside || designBands.length === 0, verdict.state),
        stops: way.map(({ dip, row }) => ({
          stripId: row.publicId,
          dipId: dip.publicId,
          words: `${stopWords({ ...dip, at: null })}, ${row.title}`,
        })),
        ghosts: ghostsOf(trail.publicId, steps, rows),
      },
    ];
  });
}

/** The strip that came after a step: the one that a person put there, else the first taken after it. */
export function stepBefore(step: ListedStep["step"], rows: readonly StripRow[]): string | null {
  if (step.state === "planned") return null;
  const said = rows.find(({ id }) => id === step.afterSweepId);
  if (said) return said.publicId;
  const at = step.at ?? step.createdAt;
  return rows.find(({ takenAt, createdAt }) => (takenAt ?? createdAt) > at)?.publicId ?? null;
}

function ghostsOf(trail: string, steps: readonly ListedStep[], rows: readonly StripRow[]): Ghost[] {
  return steps.flatMap(({ step }) =>
    step.expected
      .filter((place) => place.trail === trail)
      .flatMap(({ frequencyHz, lowHz, highHz, how }): Ghost[] => {
        const stripId = stepBefore(step, rows);
        // Done and not swept yet: it is still only expected, but no longer planned.
        if (step.state === "done" && stripId === null) return [];
        const interval =
          lowHz !== null && highHz !== null
            ? `, ${formatFrequency(lowHz)} to ${formatFrequency(highHz)}`
            : "";
        const words = `Expected after “${step.title}”: ${formatFrequency(frequencyHz)}${interval}. ${how}`;
        return [{ stepId: step.publicId, stripId, frequencyHz, lowHz, highHz, words }];
      }),
  );
}

/** The trail's own verdict; while it has none, the newest one that was given on a dip of it. */
function verdictOf(trail: TrailRow, dips: readonly StripDip[]): { state: VerdictState; text: string } {
  if (trail.verdict !== "open") return { state: trail.verdict, text: trail.verdictText };
  const judged = dips.findLast(({ verdict }) => verdict !== "open");
  return judged ? { state: judged.verdict, text: judged.verdictText } : { state: "open", text: "" };
}

function toneOf(inside: boolean, verdict: VerdictState): TrailTone {
  if (inside) return "heather";
  return verdict === "settled" ? "moss" : "clay";
}

function shorten(text: string): string {
  const plain = text.replace(/\s+/g, " ").trim();
  return plain.length <= MOST_DETAIL ? plain : `${plain.slice(0, MOST_DETAIL - 1).trimEnd()}…`;
}

const MOST_DETAIL = 44;
