import { returnLossDbToGamma, swrToGamma } from "../../measurement/reflection.ts";
import type { Sweep } from "../../measurement/sweep.ts";
import type { Axes } from "./axes.ts";
import type { Frame } from "./frame.ts";
import type { Trace } from "./trace.ts";
import type { PictureQuantity } from "./value-axis.ts";

/** Axes of which nothing is missing. */
export type KnownAxes = Axes & { startHz: number; stopHz: number; top: number; bottom: number };

/** A trace in the axes' own units; length n, one entry a pixel column, ascending in frequency. */
export interface ReadPoints {
  frequencyHz: Float64Array;
  /** dB or SWR as on the axis; NaN where the trace was not seen. */
  value: Float64Array;
}

/** Rows and columns of a trace to frequency and axis value. */
export function toPoints(trace: Trace, frame: Frame, axes: KnownAxes): ReadPoints {
  const value = trace.row.map((row) => valueAt(row, frame, axes));
  const frequencyHz = trace.row.map((_, i) => frequencyAt(trace.left + i, frame, axes));
  return { frequencyHz, value };
}

/**
 * The sweep that a trace stands for: abs Γ with the half-pixel and stroke limits of every column.
 *
 * `zeroDb` is the level of full reflection (0 for all but raw levels). An SWR nearer to 1 than a quarter of
 * a pixel is not told apart from 1 and is set there, so that no return loss becomes infinite.
 */
export function toSweep(
  trace: Trace,
  frame: Frame,
  axes: KnownAxes,
  zeroDb: number,
  referenceOhm: number,
): Sweep {
  const { frequencyHz, value } = toPoints(trace, frame, axes);
  const pixel = Math.abs(axes.bottom - axes.top) / (frame.bottom - frame.top);
  const gamma = (v: number) => magnitudeOf(v, axes.quantity, zeroDb, pixel);
  const low = new Float64Array(value.length);
  const high = new Float64Array(value.length);
  value.forEach((v, i) => {
    const spread = trace.uncertainty[i] * pixel;
    const ends = [boundary(v - spread, axes.quantity, zeroDb), boundary(v + spread, axes.quantity, zeroDb)];
    low[i] = Math.min(...ends);
    high[i] = Math.max(...ends);
  });
  const half = frequencyHz.map(
    (_, i) =>
      (frequencyAt(trace.left + i + 0.5, frame, axes) - frequencyAt(trace.left + i - 0.5, frame, axes)) / 2,
  );
  return {
    frequencyHz,
    magnitude: value.map(gamma),
    referenceOhm,
    plane: "instrument",
    pictureLimits: { frequencyHz: half, magnitudeLow: low, magnitudeHigh: high },
  };
}

function frequencyAt(x: number, frame: Frame, axes: KnownAxes): number {
  const share = (x - frame.left) / (frame.right - frame.left);
  if (axes.scale === "log") return axes.startHz * (axes.stopHz / axes.startHz) ** share;
  return axes.startHz + share * (axes.stopHz - axes.startHz);
}

function valueAt(row: number, frame: Frame, axes: KnownAxes): number {
  return axes.top + ((row - frame.top) / (frame.bottom - frame.top)) * (axes.bottom - axes.top);
}

function magnitudeOf(value: number, quantity: PictureQuantity, zeroDb: number, pixel: number): number {
  if (quantity !== "swr") return boundary(value, quantity, zeroDb);
  return Number.isNaN(value) ? Number.NaN : swrToGamma(Math.max(value, 1 + pixel / 4));
}

function boundary(value: number, quantity: PictureQuantity, zeroDb: number): number {
  switch (quantity) {
    case "swr":
      return Number.isNaN(value) ? Number.NaN : swrToGamma(Math.max(1, value));
    case "return-loss":
      return returnLossDbToGamma(value);
    case "level":
      return returnLossDbToGamma(zeroDb - value);
    case "s11-db":
      return returnLossDbToGamma(-value);
  }
}
