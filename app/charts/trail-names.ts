/** Trails across the strips, and where their names stand without running into each other. */
import type { PlacedStrip, Trail } from "./strip-scene.ts";
import { TIER_PLOT_WIDTHS_PX } from "./tiers.ts";

export interface PlacedTrail {
  trail: Trail;
  path: string;
  /** Newest first. */
  stops: { dipId: string; fraction: number; y: number; words: string }[];
  /** Beside the newest stop; null where it fits at no width. */
  name: TrailName | null;
}

export interface TrailName {
  side: "left" | "right";
  /** px under the stop, negative over it. */
  shiftY: number;
  /** Narrowest tier at which it is shown. */
  tier: number;
}

const CHARACTER_PX = 7;
const OFFSET_PX = 12;
const HALF_HEIGHT_PX = 8;
const DOT_PX = 7;
const PLACES = [0, -16, 16].flatMap((shiftY) => [
  { side: "right" as const, shiftY },
  { side: "left" as const, shiftY },
]);

export function placeTrails(
  trails: readonly Trail[],
  strips: readonly PlacedStrip[],
  pathWidth: number,
): PlacedTrail[] {
  const placed = trails.map((trail) => placeTrail(trail, strips, pathWidth));
  for (const [tier, plotWidthPx] of TIER_PLOT_WIDTHS_PX.entries()) {
    for (const trail of placed) {
      if (trail.name !== null || trail.stops.length === 0) continue;
      const place = PLACES.find((candidate) =>
        isClear(boxOf(trail, candidate, plotWidthPx), trail, placed, plotWidthPx),
      );
      if (place) trail.name = { ...place, tier };
    }
  }
  return placed;
}

function placeTrail(trail: Trail, strips: readonly PlacedStrip[], pathWidth: number): PlacedTrail {
  const stops = strips.flatMap((placed) => {
    const stop = trail.stops.find(({ stripId }) => stripId === placed.strip.id);
    const dip = stop && placed.dips.find(({ id }) => id === stop.dipId);
    return stop && dip ? [{ dipId: dip.id, fraction: dip.fraction, y: dip.y, words: stop.words }] : [];
  });
  const path = stops.map(({ fraction, y }) => `${round(fraction * pathWidth)} ${round(y)}`).join("L");
  return { trail, path: path && `M${path}`, stops, name: null };
}

interface Box {
  left: number;
  right: number;
  top: number;
  bottom: number;
}

function boxOf({ trail, stops }: PlacedTrail, place: Omit<TrailName, "tier">, plotWidthPx: number): Box {
  const at = stops[0].fraction * plotWidthPx;
  const length = OFFSET_PX + trail.label.length * CHARACTER_PX;
  const y = stops[0].y + place.shiftY;
  const [left, right] = place.side === "left" ? [at - length, at - DOT_PX] : [at + DOT_PX, at + length];
  return { left, right, top: y - HALF_HEIGHT_PX, bottom: y + HALF_HEIGHT_PX };
}

function isClear(box: Box, own: PlacedTrail, all: readonly PlacedTrail[], plotWidthPx: number): boolean {
  if (box.left < 0 || box.right > plotWidthPx) return false;
  return all.every((other) => {
    if (other === own) return true;
    if (other.name && overlap(box, boxOf(other, other.name, plotWidthPx))) return false;
    return other.stops.every(({ fraction, y }) => {
      const x = fraction * plotWidthPx;
      return !overlap(box, { left: x - DOT_PX, right: x + DOT_PX, top: y - DOT_PX, bottom: y + DOT_PX });
    });
  });
}

function overlap(a: Box, b: Box): boolean {
  return a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom;
}

function round(value: number): number {
  return Math.round(value * 100) / 100;
}
