import type { MaskedStretch, PicturePoint } from "~/readers/reading";
import { type FlatPlot, flatPlot, mapPoint } from "~/readers/screenshot/rectify";
import { CORNER_FIELDS, type PictureFields } from "../../picture.schema";

/** Places of the plot's corners while they are being moved, in pixels of the picture. */

export interface Size {
  width: number;
  height: number;
}

/** The corners of the form; where it has none yet, well inside the picture, to be taken hold of. */
export function cornersIn(fields: PictureFields, { width, height }: Size): PicturePoint[] {
  const numbers = CORNER_FIELDS.map((name) => Number(fields[name].replace(",", ".") || Number.NaN));
  const inset = [0.15, 0.15, 0.85, 0.15, 0.85, 0.85, 0.15, 0.85];
  const known = numbers.every(Number.isFinite);
  return [0, 1, 2, 3].map((i) => {
    const at = (k: number, side: number) => (known ? numbers[2 * i + k] : inset[2 * i + k] * side);
    return { x: at(0, width), y: at(1, height) };
  });
}

/** The fields with one corner elsewhere; on a straight picture the two sides at it go along. */
export function withCorner(
  fields: PictureFields,
  size: Size,
  index: number,
  to: PicturePoint,
): Partial<PictureFields> {
  const x = Math.min(size.width - 1, Math.max(0, to.x));
  const y = Math.min(size.height - 1, Math.max(0, to.y));
  const corners = cornersIn(fields, size);
  corners[index] = { x, y };
  if (fields.seenAs === "straight") {
    corners[[3, 2, 1, 0][index]].x = x;
    corners[[1, 0, 3, 2][index]].y = y;
  }
  const entries = corners.flatMap((corner, i) => [
    [`x${i}`, corner.x.toFixed(2)],
    [`y${i}`, corner.y.toFixed(2)],
  ]);
  return Object.fromEntries(entries);
}

/** The plot laid flat while the picture is seen at an angle. */
export function plotOf(fields: PictureFields, size: Size): FlatPlot | null {
  return fields.seenAs === "angle" ? flatPlot(cornersIn(fields, size)) : null;
}

/** The stretch that a box drawn in the picture means; without `boxed` its columns from top to bottom. */
export function stretchDrawn(
  a: PicturePoint,
  b: PicturePoint,
  plot: FlatPlot | null,
  boxed: boolean,
): MaskedStretch {
  const ends = [a, b].map((point) => (plot ? mapPoint(plot.toFlat, point) : point));
  const sorted = (pick: (point: PicturePoint) => number) =>
    ends.map((point) => Math.max(0, Math.round(pick(point)))).sort((p, q) => p - q);
  const [fromX, toX] = sorted((point) => point.x);
  const [top, bottom] = sorted((point) => point.y);
  return boxed ? { fromX, toX, top, bottom } : { fromX, toX };
}

/** The outline of a stretch in the picture, as the points of an SVG polygon. */
export function stretchOutline(
  stretch: MaskedStretch,
  corners: readonly PicturePoint[],
  plot: FlatPlot | null,
): string {
  const frame = plot?.frame ?? { top: corners[0].y, bottom: corners[2].y };
  const top = stretch.top ?? frame.top;
  const bottom = stretch.bottom ?? frame.bottom;
  return [
    { x: stretch.fromX, y: top },
    { x: stretch.toX + 1, y: top },
    { x: stretch.toX + 1, y: bottom },
    { x: stretch.fromX, y: bottom },
  ]
    .map((point) => (plot ? mapPoint(plot.toPicture, point) : point))
    .map(({ x, y }) => `${x.toFixed(1)},${y.toFixed(1)}`)
    .join(" ");
}
