import type { Picture } from "../../../app/readers/screenshot/picture.ts";

export type Color = [number, number, number];

/** A small painter for tests: what it paints is known to the fraction of a pixel. */
export interface Paper extends Picture {
  data: Uint8ClampedArray;
}

export function paper(width: number, height: number, color: Color): Paper {
  const data = new Uint8ClampedArray(4 * width * height);
  for (let i = 0; i < width * height; i++) data.set([...color, 255], 4 * i);
  return { width, height, data };
}

/** Lays a colour on a pixel; `share` of it is covered. */
export function dab(to: Paper, x: number, y: number, color: Color, share = 1): void {
  if (x < 0 || y < 0 || x >= to.width || y >= to.height || share <= 0) return;
  const j = 4 * (y * to.width + x);
  for (let c = 0; c < 3; c++) to.data[j + c] = to.data[j + c] * (1 - share) + color[c] * share;
}

export function fill(
  to: Paper,
  left: number,
  top: number,
  right: number,
  bottom: number,
  color: Color,
): void {
  for (let y = top; y <= bottom; y++) for (let x = left; x <= right; x++) dab(to, x, y, color);
}

/** An upright rectangle of one-pixel strokes. */
export function outline(
  to: Paper,
  left: number,
  top: number,
  right: number,
  bottom: number,
  color: Color,
): void {
  fill(to, left, top, right, top, color);
  fill(to, left, bottom, right, bottom, color);
  fill(to, left, top, left, bottom, color);
  fill(to, right, top, right, bottom, color);
}

/** Even grid lines inside a rectangle; with `dot` only every so many pixels of them. */
export function grid(
  to: Paper,
  box: [number, number, number, number],
  columns: number,
  rows: number,
  color: Color,
  dot = 1,
): void {
  const [left, top, right, bottom] = box;
  for (let i = 1; i < rows; i++) {
    const y = Math.round(top + (i * (bottom - top)) / rows);
    for (let x = left + 1; x < right; x += dot) dab(to, x, y, color);
  }
  for (let i = 1; i < columns; i++) {
    const x = Math.round(left + (i * (right - left)) / columns);
    for (let y = top + 1; y < bottom; y += dot) dab(to, x, y, color);
  }
}

/** A stroke of one row's height per column, spread by intensity over two rows; steep stretches are joined. */
export function curve(
  to: Paper,
  left: number,
  right: number,
  rowAt: (x: number) => number,
  color: Color,
): void {
  for (let x = left; x <= right; x++) {
    const near = [rowAt(x - 0.5), rowAt(x), rowAt(x + 0.5)];
    const upper = Math.min(...near) - 0.5;
    const lower = Math.max(...near) + 0.5;
    for (let y = Math.floor(upper); y <= Math.ceil(lower); y++) {
      dab(to, x, y, color, Math.min(lower, y + 0.5) - Math.max(upper, y - 0.5));
    }
  }
}
