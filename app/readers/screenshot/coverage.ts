import type { Ground } from "./ground.ts";
import { lookApart, type Rgb } from "./oklab.ts";
import { type Picture, pixelsOf } from "./picture.ts";

/** Difference below which a line's colour may be the trace's own. */
const OWN_COLOR = 0.045;

/** Coverage that a grid line's colour may seem to have of the trace's, and the colour error of its dots, of 255. */
const GRID_AT_MOST = 0.6;
const GRID_TOLERANCE = 14;

/** How much of each pixel inside the plot a colour covers, 0 to 1, row by row. */
export interface Coverage {
  width: number;
  height: number;
  /** Picture place of the first number. */
  left: number;
  top: number;
  share: Float32Array;
}

/** Part of the way from ground to colour from which a pixel may be covered. */
const LEAST_ALONG = 0.12;
/** Colour error, in parts of the distance from ground to trace, at which a pixel counts to a third. */
const COLOR_TOLERANCE = 0.35;
/** The same, in steps of 255, for what compression adds. */
const WEAR_TOLERANCE = 14;

/**
 * Share of every pixel that is covered by a colour: the place between ground and colour on which the
 * pixel falls, less what lies off that line. On grid lines the line's own colour is the ground.
 */
export function coverageOf(picture: Picture, ground: Ground, color: Rgb): Coverage {
  const width = ground.right - ground.left + 1;
  const height = ground.bottom - ground.top + 1;
  const share = new Float32Array(width * height);
  const base = difference(ground.color, color);
  const told = ground.grid && lookApart(ground.grid, color) >= OWN_COLOR;
  const grid = told && ground.grid ? difference(ground.color, ground.grid) : null;
  const outer = ground.outline && difference(ground.outline, color);
  const rowBase = ground.rows.map(
    (g, y) =>
      usable(g, color, base, grid) ?? (g && outer && ground.outerRows.includes(y) ? outer : undefined),
  );
  const columnBase = ground.columns.map((g) => g && difference(g, color));
  const { data } = picture;
  const pixels = pixelsOf(picture);
  for (let y = 0; y < height; y++) {
    const rowGround = rowBase[y + ground.top];
    let j = 4 * ((y + ground.top) * picture.width + ground.left);
    // Most pixels are as the one before them, which was not covered.
    let bare = -1;
    let bareOf: Difference | null = null;
    for (let x = 0; x < width; x++, j += 4) {
      const d = rowGround ?? columnBase[x + ground.left] ?? base;
      const pixel = pixels[j >> 2];
      if (pixel === bare && d === bareOf) continue;
      const red = data[j] - d.from[0];
      const green = data[j + 1] - d.from[1];
      const blue = data[j + 2] - d.from[2];
      const along = (red * d.to[0] + green * d.to[1] + blue * d.to[2]) / d.square;
      if (along < LEAST_ALONG) {
        bare = pixel;
        bareOf = d;
        continue;
      }
      const off =
        (red - along * d.to[0]) ** 2 + (green - along * d.to[1]) ** 2 + (blue - along * d.to[2]) ** 2;
      const covered = Math.min(1, along) * Math.exp(-off / d.tolerance);
      if (covered < GRID_AT_MOST && grid && isGrid(data, j, grid)) continue;
      share[y * width + x] = covered;
    }
  }
  return { width, height, left: ground.left, top: ground.top, share };
}

/** A dot or dash of the grid, in full or smoothed: on the line from the ground to the grid's colour. */
function isGrid(data: ArrayLike<number>, j: number, grid: Difference): boolean {
  const red = data[j] - grid.from[0];
  const green = data[j + 1] - grid.from[1];
  const blue = data[j + 2] - grid.from[2];
  const along = (red * grid.to[0] + green * grid.to[1] + blue * grid.to[2]) / grid.square;
  if (along > 1.3) return false;
  const off =
    (red - along * grid.to[0]) ** 2 + (green - along * grid.to[1]) ** 2 + (blue - along * grid.to[2]) ** 2;
  return off < GRID_TOLERANCE ** 2;
}

interface Difference {
  from: Rgb;
  to: Rgb;
  square: number;
  tolerance: number;
}

function difference(from: Rgb, color: Rgb): Difference {
  const to: Rgb = [color[0] - from[0], color[1] - from[1], color[2] - from[2]];
  const square = Math.max(1, to[0] ** 2 + to[1] ** 2 + to[2] ** 2);
  return { from, to, square, tolerance: COLOR_TOLERANCE ** 2 * square + WEAR_TOLERANCE ** 2 };
}

/** A line's colour serves as ground unless it may be the trace itself, in full or paler, running along it. */
function usable(
  line: Rgb | undefined,
  color: Rgb,
  base: Difference,
  grid: Difference | null,
): Difference | undefined {
  if (!line) return undefined;
  if (grid && isGrid(line, 0, grid)) return difference(line, color);
  const along = line.reduce((sum, v, i) => sum + (v - base.from[i]) * base.to[i], 0) / base.square;
  const paler = base.from.map((v, i) => v + Math.min(1, along) * base.to[i]) as Rgb;
  if (along > 0 && along < 1.1 && lookApart(line, paler) < OWN_COLOR) return undefined;
  return difference(line, color);
}
