/** Trails across the strips, their ghosts, and what is said beside them. */
import type { FrequencyScale } from "./axis.ts";
import type { PlacedSteps, PlacedStrip } from "./placed-strip.ts";
import type { PlacedGhost, PlacedTrail, TrailStop, TrailTone } from "./placed-trail.ts";
import { nameTrails } from "./trail-names.ts";

export interface Trail {
  id: string;
  /** Its name, else its frequency. */
  label: string;
  /** What else is to be said of it, in a few words. */
  detail: string;
  tone: TrailTone;
  /** One dip of some of the strips, in any order. */
  stops: readonly { stripId: string; dipId: string; words: string }[];
  ghosts: readonly Ghost[];
}

/** Where a step should put the trail. */
export interface Ghost {
  stepId: string;
  /** The strip that came after the step; null while it is planned. */
  stripId: string | null;
  frequencyHz: number;
  lowHz: number | null;
  highHz: number | null;
  words: string;
}

/** Units across of the trails' paths. */
export const TRAIL_UNITS = 1000;

export function placeTrails(
  trails: readonly Trail[],
  strips: readonly PlacedStrip[],
  steps: readonly PlacedSteps[],
  scale: FrequencyScale,
): PlacedTrail[] {
  const placed = trails.map((trail) => placeTrail(trail, strips, steps, scale));
  return nameTrails(placed, strips);
}

function placeTrail(
  trail: Trail,
  strips: readonly PlacedStrip[],
  steps: readonly PlacedSteps[],
  scale: FrequencyScale,
): PlacedTrail {
  const found = strips.flatMap((strip, row) => {
    const stop = trail.stops.find(({ stripId }) => stripId === strip.id);
    const dip = stop && strip.dips.find(({ id }) => id === stop.dipId);
    return stop && dip
      ? [
          {
            row,
            stop: { dipId: dip.id, stripId: strip.id, fraction: dip.fraction, y: dip.y, words: stop.words },
          },
        ]
      : [];
  });
  let [way, gaps] = ["", ""];
  for (const [i, { row, stop }] of found.slice(1).entries()) {
    const from = found[i];
    const leg = `M${at(from.stop)}L${at(stop)}`;
    if (row - from.row > 1) gaps += leg;
    else way += i > 0 && row - from.row === 1 && way.endsWith(at(from.stop)) ? `L${at(stop)}` : leg;
  }
  const stops = found.map(({ stop }) => stop);
  const ghosts = trail.ghosts.flatMap((ghost) => placeGhost(ghost, strips, steps, stops, scale));
  const next = ghosts.find(({ planned }) => planned);
  const ahead = next && stops[0] ? `M${at(stops[0])}L${at(next)}` : "";
  const { id, label, detail, tone } = trail;
  return { id, label, detail, tone, way, gaps, ahead, stops, ghosts, name: null };
}

function placeGhost(
  ghost: Ghost,
  strips: readonly PlacedStrip[],
  steps: readonly PlacedSteps[],
  stops: readonly TrailStop[],
  scale: FrequencyScale,
): PlacedGhost[] {
  if (!(ghost.frequencyHz >= scale.fromHz && ghost.frequencyHz <= scale.toHz)) return [];
  const planned = ghost.stripId === null;
  const row = steps.find((one) => one.planned && one.steps.some(({ id }) => id === ghost.stepId));
  const strip = strips.find(({ id }) => id === ghost.stripId);
  const y = planned ? row && row.y + row.heightPx - GHOST_FOOT_PX : strip && ghostY(strip, stops);
  if (y === undefined) return [];
  const inView = (hz: number | null) =>
    hz === null ? null : round(Math.min(1, Math.max(0, scale.fractionOf(hz))));
  return [
    {
      key: `${ghost.stepId} ${ghost.frequencyHz}`,
      fraction: round(scale.fractionOf(ghost.frequencyHz)),
      low: inView(ghost.lowHz),
      high: inView(ghost.highHz),
      y,
      planned,
      words: ghost.words,
    },
  ];
}

/** As deep as the dip that came, so that the two stand side by side. */
function ghostY(strip: PlacedStrip, stops: readonly TrailStop[]): number {
  return stops.find(({ stripId }) => stripId === strip.id)?.y ?? (strip.landY + strip.footY) / 2;
}

function at({ fraction, y }: { fraction: number; y: number }): string {
  return `${Math.round(fraction * TRAIL_UNITS * 10) / 10} ${y}`;
}

function round(fraction: number): number {
  return Math.round(fraction * 1e5) / 1e5;
}

/** From the foot of the planned steps' row. */
const GHOST_FOOT_PX = 12;
