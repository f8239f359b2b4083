/** Where the names of trails stand without running into each other. */
import type { PlacedStrip } from "./placed-strip.ts";
import type { PlacedTrail, TrailName } from "./placed-trail.ts";
import { TIER_PLOT_WIDTHS_PX } from "./tiers.ts";

const CHARACTER_PX = 7;
const OFFSET_PX = 12;
const HALF_HEIGHT_PX = 8;
const DOT_PX = 7;
const CAPTION_PX = 20;
type Place = Pick<TrailName, "side" | "shiftY">;
/** Beside and a little under the stop, where the land is; over it last. */
const PLACES: Place[] = [12, 26, 0, -14].flatMap((shiftY) => [
  { side: "right" as const, shiftY },
  { side: "left" as const, shiftY },
]);

/** Longest trails first; a label stays where its narrowest width puts it, and takes its detail along where that fits. */
export function nameTrails(placed: PlacedTrail[], strips: readonly PlacedStrip[]): PlacedTrail[] {
  const captions = strips.map(captionOf);
  const order = [...placed].sort((a, b) => b.stops.length - a.stops.length).filter(isNamed);
  for (const [tier, plotWidthPx] of TIER_PLOT_WIDTHS_PX.entries()) {
    for (const trail of order) {
      if (trail.name !== null) continue;
      const place = PLACES.find((candidate) => {
        const box = boxOf(trail, candidate, trail.label, plotWidthPx);
        return isClear(box, trail, placed, tier, plotWidthPx) && !captions.some((one) => overlap(box, one));
      });
      if (place) trail.name = { ...place, tier, detailTier: null };
    }
    for (const trail of order) {
      const { name } = trail;
      if (!name || name.detailTier !== null || trail.detail === "" || tier === 0) continue;
      const box = boxOf(trail, name, `${trail.label}, ${trail.detail}`, plotWidthPx);
      const clear = isClear(box, trail, placed, tier, plotWidthPx);
      if (clear && !captions.some((one) => overlap(box, one))) name.detailTier = tier;
    }
  }
  return placed;
}

/** A dip that was there once and never again needs no name on the map. */
function isNamed({ stops, detail, label }: PlacedTrail): boolean {
  return stops.length > 1 || (stops.length === 1 && (detail !== "" || !/^\d/.test(label)));
}

interface Box {
  left: number;
  right: number;
  top: number;
  bottom: number;
}

function boxOf({ stops }: PlacedTrail, place: Place, text: string, plotWidthPx: number): Box {
  const at = stops[0].fraction * plotWidthPx;
  const length = OFFSET_PX + text.length * CHARACTER_PX;
  const y = stops[0].y + place.shiftY;
  const [left, right] = place.side === "left" ? [at - length, at - DOT_PX] : [at + DOT_PX, at + length];
  return { left, right, top: y - HALF_HEIGHT_PX, bottom: y + HALF_HEIGHT_PX };
}

/** Date and title at the left of a strip's ground. */
function captionOf({ caption, title, footY }: PlacedStrip): Box {
  const characters = caption.length + 2 + title.length;
  return { left: 0, right: characters * CHARACTER_PX, top: footY - CAPTION_PX, bottom: footY };
}

function isClear(
  box: Box,
  own: PlacedTrail,
  all: readonly PlacedTrail[],
  tier: number,
  plotWidthPx: number,
): boolean {
  if (box.left < 0 || box.right > plotWidthPx || box.top < 0) return false;
  return all.every((other) => {
    if (other === own) return true;
    if (other.name) {
      const { detailTier } = other.name;
      const text =
        detailTier !== null && detailTier <= tier ? `${other.label}, ${other.detail}` : other.label;
      if (overlap(box, boxOf(other, other.name, text, plotWidthPx))) return false;
    }
    return other.stops.every(({ fraction, y }) => {
      const x = fraction * plotWidthPx;
      return !overlap(box, { left: x - DOT_PX, right: x + DOT_PX, top: y - DOT_PX, bottom: y + DOT_PX });
    });
  });
}

function overlap(a: Box, b: Box): boolean {
  return a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom;
}
