import type { Sweep } from "../../measurement/sweep.ts";
import type { ScreenshotSpec } from "../reading.ts";
import type { Box } from "./picture.ts";
import { flatPlot } from "./rectify.ts";

/** Where a sweep's numbers lie in the picture they were read from, in pixels of the plot as it was read. */
export interface PlaceInPicture {
  frame: Box;
  /** Column of a frequency in Hz. */
  columnOf: (hz: number) => number;
  /** Row of an abs Γ; NaN for NaN, and for all where another trace is the 0 dB line. */
  rowOf: (magnitude: number) => number;
  /** Half a pixel column at the middle of the plot, Hz, and half a row in the axis' own unit. */
  halfColumnHz: number;
  halfRow: number;
}

/** The opposite of reading: null while the frame or an axis is not known. */
export function placeInPicture(spec: ScreenshotSpec): PlaceInPicture | null {
  const frame = spec.corners ? flatPlot(spec.corners)?.frame : spec.frame;
  const { startHz, stopHz, top, bottom, scale } = spec;
  if (!frame || startHz === undefined || stopHz === undefined || top === undefined || bottom === undefined)
    return null;
  const width = frame.right - frame.left;
  const height = frame.bottom - frame.top;
  const shareOf = (hz: number) =>
    scale === "log"
      ? Math.log(hz / startHz) / Math.log(stopHz / startHz)
      : (hz - startHz) / (stopHz - startHz);
  const perHz =
    scale === "log" ? 1 / (Math.sqrt(startHz * stopHz) * Math.log(stopHz / startHz)) : 1 / (stopHz - startHz);
  return {
    frame,
    columnOf: (hz) => frame.left + shareOf(hz) * width,
    rowOf: (magnitude) =>
      spec.zeroTrace
        ? Number.NaN
        : frame.top + ((axisValueOf(magnitude, spec) - top) / (bottom - top)) * height,
    halfColumnHz: 1 / (2 * width * perHz),
    halfRow: Math.abs(bottom - top) / (2 * height),
  };
}

/** The sweep's line in pieces, one for each stretch without a gap. */
export function lineInPicture(sweep: Sweep, place: PlaceInPicture): { x: number; y: number }[][] {
  const pieces: { x: number; y: number }[][] = [];
  let open: { x: number; y: number }[] | null = null;
  for (let i = 0; i < sweep.frequencyHz.length; i++) {
    const y = place.rowOf(sweep.magnitude[i]);
    if (!Number.isFinite(y)) {
      open = null;
      continue;
    }
    if (!open) {
      open = [];
      pieces.push(open);
    }
    const round = (value: number) => Math.round(value * 10) / 10;
    open.push({ x: round(place.columnOf(sweep.frequencyHz[i])), y: round(y) });
  }
  return pieces;
}

function axisValueOf(magnitude: number, { quantity, zeroDb = 0 }: ScreenshotSpec): number {
  const levelDb = 20 * Math.log10(magnitude);
  switch (quantity) {
    case "swr":
      return magnitude < 1 ? (1 + magnitude) / (1 - magnitude) : Number.POSITIVE_INFINITY;
    case "return-loss":
      return -levelDb;
    case "level":
      return zeroDb + levelDb;
    default:
      return levelDb;
  }
}
