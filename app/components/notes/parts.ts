import type { PictureRegion } from "~/services/note-parts";

export type { PictureRegion } from "~/services/note-parts";

/** A part of a sweep that a note speaks of: a stretch of frequency or a region of its picture; null for all of it. */
export interface SweepPart {
  stretch: { fromHz: number; toHz: number } | null;
  region: PictureRegion | null;
}

/** What of a sweep notes can speak of a part of. */
export interface PartsOffered {
  /** The sweep's own ends. */
  fromHz: number;
  toHz: number;
  /** It was read from a picture. */
  picture: boolean;
}

/** A rectangle between two corners in any order, kept inside the picture. */
export function regionBetween(a: { x: number; y: number }, b: { x: number; y: number }): PictureRegion {
  const inside = (share: number) => Math.min(1, Math.max(0, share));
  const [left, right] = [Math.min(inside(a.x), inside(b.x)), Math.max(inside(a.x), inside(b.x))];
  const [top, bottom] = [Math.min(inside(a.y), inside(b.y)), Math.max(inside(a.y), inside(b.y))];
  return { x: left, y: top, width: right - left, height: bottom - top };
}

/** `7.0–7.2 MHz`. */
export function stretchWords({ fromHz, toHz }: { fromHz: number; toHz: number }): string {
  return `${mhzOf(fromHz)}–${mhzOf(toHz)} MHz`;
}

/** MHz for a field: as many digits as tell 100 Hz apart. */
export function mhzOf(hz: number): string {
  return String(Number((hz / 1e6).toFixed(4)));
}

export function percentOf(share: number): string {
  return String(Number((share * 100).toFixed(1)));
}
