/**
 * A small drawing of an antenna's conductors from their numbers: one slot a conductor, side by side on one ground and at
 * one scale, not where they stand (nobody has said that in numbers). Metres in, px out; y grows downwards.
 */
import type { Antenna, AntennaElement } from "../measurement/antenna.ts";

export interface SketchSlot {
  key: string;
  widthPx: number;
  /** An SVG path; dashed where its length is not known. */
  path: string;
  dashed: boolean;
  /** Where the feed is, for what is fed; null else. */
  feed: { x: number; y: number } | null;
  /** A conductor by intent, or something that takes part without it. */
  meant: boolean;
  /** Lies on the ground: drawn thick, so that it shows beside the ground's line. */
  flat: boolean;
  /** Its height is not known: drawn where such a thing usually is. */
  heightGuessed: boolean;
}

export interface Sketch {
  slots: SketchSlot[];
  heightPx: number;
  groundY: number;
  /** Null where no length is known: then nothing is to scale. */
  scale: { metres: number; px: number } | null;
}

export function sketchOf({ elements }: Antenna): Sketch | null {
  if (elements.length === 0) return null;
  const known = elements.filter(({ lengthM }) => lengthM !== null);
  const perMetre = known.length > 0 ? scaleFor(known) : null;
  const drawn = elements.map((element) => draw(element, perMetre));
  const above = Math.max(...drawn.map(({ top }) => top), 40);
  const groundY = TOP_PX + above;
  return {
    heightPx: groundY + FOOT_PX,
    groundY,
    scale: perMetre === null ? null : scaleBar(perMetre),
    slots: drawn.map(({ element, spanPx, path, feed, heightGuessed }) => {
      const widthPx = Math.max(SLOT_PX, spanPx + 24);
      return {
        key: element.key,
        widthPx,
        path: path(widthPx / 2, groundY),
        dashed: element.lengthM === null,
        feed: feed === null ? null : { x: widthPx / 2, y: groundY - feed },
        meant: ["vertical", "dipole", "loop", "wire"].includes(element.kind),
        flat: element.kind === "radial" && !element.heightM,
        heightGuessed,
      };
    }),
  };
}

interface Drawn {
  element: AntennaElement;
  spanPx: number;
  /** px above ground of its highest place. */
  top: number;
  path: (middleX: number, groundY: number) => string;
  feed: number | null;
  heightGuessed: boolean;
}

function draw(element: AntennaElement, perMetre: number | null): Drawn {
  const px = (metres: number | null, unknownPx: number) =>
    metres === null || perMetre === null ? unknownPx : Math.min(metres * perMetre, MOST_PX);
  const { kind, heightM } = element;
  const length = px(element.lengthM, UNKNOWN_PX);
  const heightGuessed = heightM === null && kind !== "vertical" && kind !== "mast" && kind !== "radial";
  switch (kind) {
    case "vertical":
    case "mast": {
      const foot = px(heightM ?? 0, 0);
      const path = (x: number, y: number) => `M${n(x)} ${n(y - foot)}V${n(y - foot - length)}`;
      return {
        element,
        spanPx: 8,
        top: foot + length,
        path,
        feed: kind === "vertical" ? foot : null,
        heightGuessed,
      };
    }
    case "loop": {
      const radius = length / (2 * Math.PI);
      const middle = Math.max(radius + 6, px(heightM, radius + 24));
      const path = (x: number, y: number) =>
        `M${n(x)} ${n(y - middle + radius)}a${n(radius)} ${n(radius)} 0 1 1 .01 0Z`;
      return {
        element,
        spanPx: 2 * radius,
        top: middle + radius,
        path,
        feed: middle - radius,
        heightGuessed,
      };
    }
    case "guy": {
      const top = px(heightM, length * Math.SQRT1_2);
      const rise = Math.min(top, length);
      const reach = Math.sqrt(Math.max(0, length * length - rise * rise));
      const path = (x: number, y: number) =>
        `M${n(x - reach / 2)} ${n(y - top)}L${n(x + reach / 2)} ${n(y - top + rise)}`;
      return { element, spanPx: reach, top, path, feed: null, heightGuessed };
    }
    default: {
      const up = kind === "radial" ? px(heightM ?? 0, 0) : px(heightM, 40);
      const path = (x: number, y: number) => `M${n(x - length / 2)} ${n(y - up)}h${n(length)}`;
      return { element, spanPx: length, top: up, path, feed: kind === "dipole" ? up : null, heightGuessed };
    }
  }
}

/** The largest scale at which everything known fits. */
function scaleFor(known: readonly AntennaElement[]): number {
  const tall = known.map(({ kind, lengthM, heightM }) => {
    const length = lengthM ?? 0;
    if (kind === "vertical" || kind === "mast") return (heightM ?? 0) + length;
    return (heightM ?? 0) + (kind === "loop" ? length / (2 * Math.PI) : 0);
  });
  const wide = known.map(({ kind, lengthM }) => {
    if (kind === "vertical" || kind === "mast") return 0;
    return kind === "loop" ? (lengthM ?? 0) / Math.PI : (lengthM ?? 0);
  });
  return Math.min(TALLEST_PX / Math.max(...tall, 1e-3), WIDEST_PX / Math.max(...wide, 1e-3));
}

/** A round length of about 60 px. */
function scaleBar(perMetre: number) {
  const aim = 60 / perMetre;
  const step = 10 ** Math.floor(Math.log10(aim));
  const metres = [5, 2, 1].map((factor) => factor * step).find((size) => size <= aim) ?? step;
  return { metres, px: metres * perMetre };
}

function n(value: number): number {
  return Math.round(value * 10) / 10;
}

const TALLEST_PX = 190;
/** Fits a phone. */
const WIDEST_PX = 300;
const MOST_PX = 400;
const SLOT_PX = 104;
const UNKNOWN_PX = 80;
const TOP_PX = 12;
const FOOT_PX = 10;
