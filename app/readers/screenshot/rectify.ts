import type { PicturePoint } from "../reading.ts";
import type { Box, Picture } from "./picture.ts";

/** A plot seen at an angle, laid flat. */
export interface FlatPlot {
  width: number;
  height: number;
  /** Where the plot lies in the flat picture. */
  frame: Box;
  /** From places in the flat picture to places in the one it was taken from, and back. */
  toPicture: Homography;
  toFlat: Homography;
}

/** Row by row, nine numbers; the last is 1. */
export type Homography = Float64Array;

/** Room around the plot for what is printed there, as shares of the plot's sides. */
const MARGIN = { left: 0.24, right: 0.1, top: 0.16, bottom: 0.22 };
/** Longest side of the plot laid flat; a photograph holds no finer trace. */
const LONGEST_SIDE = 1600;
const SHORTEST_SIDE = 40;
/** Most samples a side that are averaged for one pixel where the photograph is finer. */
const MOST_SAMPLES = 3;

/**
 * The projective map that takes four points to four others; null where three of them are in one line.
 *
 * Method: the direct linear transformation for four pairs with the last element set to 1 (R. Hartley and
 * A. Zisserman, Multiple View Geometry in Computer Vision, 2nd ed., chapter 4; from memory, not seen).
 */
export function homography(from: readonly PicturePoint[], to: readonly PicturePoint[]): Homography | null {
  const rows: number[][] = [];
  for (let i = 0; i < 4; i++) {
    const { x, y } = from[i];
    const { x: u, y: v } = to[i];
    rows.push([x, y, 1, 0, 0, 0, -u * x, -u * y, u], [0, 0, 0, x, y, 1, -v * x, -v * y, v]);
  }
  const solved = solve(rows);
  return solved && Float64Array.from([...solved, 1]);
}

export function mapPoint(h: Homography, { x, y }: PicturePoint): PicturePoint {
  const w = h[6] * x + h[7] * y + h[8];
  return { x: (h[0] * x + h[1] * y + h[2]) / w, y: (h[3] * x + h[4] * y + h[5]) / w };
}

export function cornersOf({ left, top, right, bottom }: Box): PicturePoint[] {
  return [
    { x: left, y: top },
    { x: right, y: top },
    { x: right, y: bottom },
    { x: left, y: bottom },
  ];
}

/**
 * How a plot with these corners (top left, top right, bottom right, bottom left) is laid flat: as large as it is
 * in the picture. Null where the corners are no convex four-sided figure in this order, or it is too small.
 */
export function flatPlot(corners: readonly PicturePoint[]): FlatPlot | null {
  if (corners.length !== 4 || !isConvex(corners)) return null;
  const side = (a: number, b: number) => Math.hypot(corners[a].x - corners[b].x, corners[a].y - corners[b].y);
  const across = (side(0, 1) + side(3, 2)) / 2;
  const down = (side(0, 3) + side(1, 2)) / 2;
  const scale = Math.min(1, LONGEST_SIDE / Math.max(across, down));
  const plotWidth = Math.round(across * scale);
  const plotHeight = Math.round(down * scale);
  if (Math.min(plotWidth, plotHeight) < SHORTEST_SIDE) return null;
  const left = Math.round(MARGIN.left * plotWidth);
  const top = Math.round(MARGIN.top * plotHeight);
  const frame = { left, top, right: left + plotWidth, bottom: top + plotHeight };
  const toPicture = homography(cornersOf(frame), corners);
  const toFlat = homography(corners, cornersOf(frame));
  if (!toPicture || !toFlat) return null;
  return {
    width: frame.right + Math.round(MARGIN.right * plotWidth),
    height: frame.bottom + Math.round(MARGIN.bottom * plotHeight),
    frame,
    toPicture,
    toFlat,
  };
}

/**
 * Lays a plot flat: bilinear samples, averaged where the picture is finer than the result. What lies outside the
 * picture takes the nearest pixel's colour. Null as for `flatPlot`.
 */
export function rectify(
  picture: Picture,
  corners: readonly PicturePoint[],
): { picture: Picture; plot: FlatPlot } | null {
  const plot = flatPlot(corners);
  if (!plot) return null;
  const { width, height, toPicture: h } = plot;
  const side = Math.hypot(corners[0].x - corners[1].x, corners[0].y - corners[1].y);
  const finer = side / (plot.frame.right - plot.frame.left);
  const samples = Math.max(1, Math.min(MOST_SAMPLES, Math.round(finer)));
  const data = new Uint8ClampedArray(4 * width * height);
  const sum = new Float64Array(4);
  for (let y = 0, to = 0; y < height; y++) {
    for (let x = 0; x < width; x++, to += 4) {
      sum.fill(0);
      for (let i = 0; i < samples * samples; i++) {
        const fx = x + ((i % samples) + 0.5) / samples - 0.5;
        const fy = y + (Math.floor(i / samples) + 0.5) / samples - 0.5;
        const w = Math.max(1e-6, h[6] * fx + h[7] * fy + h[8]);
        addSample(picture, (h[0] * fx + h[1] * fy + h[2]) / w, (h[3] * fx + h[4] * fy + h[5]) / w, sum);
      }
      for (let c = 0; c < 4; c++) data[to + c] = sum[c] / (samples * samples);
    }
  }
  return { picture: { width, height, data }, plot };
}

function addSample({ data, width, height }: Picture, atX: number, atY: number, sum: Float64Array): void {
  const x = Math.min(width - 1, Math.max(0, atX));
  const y = Math.min(height - 1, Math.max(0, atY));
  const x0 = Math.min(width - 2, Math.floor(x));
  const y0 = Math.min(height - 2, Math.floor(y));
  const dx = x - x0;
  const dy = y - y0;
  const at = 4 * (y0 * width + x0);
  const below = at + 4 * width;
  for (let c = 0; c < 4; c++) {
    const upper = data[at + c] * (1 - dx) + data[at + 4 + c] * dx;
    const lower = data[below + c] * (1 - dx) + data[below + 4 + c] * dx;
    sum[c] += upper * (1 - dy) + lower * dy;
  }
}

/** Turns the same way, clockwise on the screen, at every corner. */
function isConvex(corners: readonly PicturePoint[]): boolean {
  return corners.every((corner, i) => {
    const next = corners[(i + 1) % 4];
    const after = corners[(i + 2) % 4];
    const turn = (next.x - corner.x) * (after.y - next.y) - (next.y - corner.y) * (after.x - next.x);
    return turn > 0;
  });
}

/** Gauss elimination with partial pivoting; rows carry the right side last. Null for a singular system. */
function solve(rows: number[][]): number[] | null {
  const n = rows.length;
  for (let column = 0; column < n; column++) {
    let pivot = column;
    for (let r = column + 1; r < n; r++)
      if (Math.abs(rows[r][column]) > Math.abs(rows[pivot][column])) pivot = r;
    if (!(Math.abs(rows[pivot][column]) > 1e-9)) return null;
    [rows[column], rows[pivot]] = [rows[pivot], rows[column]];
    for (let r = 0; r < n; r++) {
      if (r === column) continue;
      const factor = rows[r][column] / rows[column][column];
      for (let c = column; c <= n; c++) rows[r][c] -= factor * rows[column][c];
    }
  }
  return rows.map((row, i) => row[n] / row[i]);
}
