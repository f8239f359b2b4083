import type { Box } from "./picture.ts";

/** Rows beside an axis line in which short tick marks stand, nearest and farthest. */
const NEAREST = 2;
const FARTHEST = 4;
/** Brightness by which a mark differs from what is beside it, of 255. */
const SEEN = 18;
/** Widest mark, pixels. */
const WIDEST = 3;
/** Pixels to each side whose median is the ground a mark stands on. */
const REACH = 7;

/**
 * Columns of the tick marks along the bottom line of a plot, inside or outside, whichever side has more.
 *
 * `grey` is row by row, `width` wide; for marks along the left line give the transposed numbers and an
 * exchanged box (its bottom is then the left line, see `inward`: -1 where the plot lies above the line).
 */
export function tickMarks(grey: Float32Array, width: number, box: Box, inward: 1 | -1): number[] {
  const height = grey.length / width;
  const sides = [inward, -inward].map((direction) => {
    const rows: number[] = [];
    for (let d = NEAREST; d <= FARTHEST; d++) {
      const y = Math.round(box.bottom) + direction * d;
      if (y >= 0 && y < height) rows.push(y);
    }
    return marksIn(grey, width, rows, box);
  });
  return sides[0].length >= sides[1].length ? sides[0] : sides[1];
}

function marksIn(grey: Float32Array, width: number, rows: number[], box: Box): number[] {
  if (rows.length === 0) return [];
  const from = Math.max(0, Math.round(box.left) - 2);
  const to = Math.min(width - 1, Math.round(box.right) + 2);
  const level: number[] = [];
  for (let x = from; x <= to; x++)
    level.push(rows.reduce((sum, y) => sum + grey[y * width + x], 0) / rows.length);
  const marks: number[] = [];
  let x = 0;
  while (x < level.length) {
    const around = level.slice(Math.max(0, x - REACH), x + REACH + 1).sort((a, b) => a - b);
    const ground = around[around.length >> 1];
    if (Math.abs(level[x] - ground) < SEEN) {
      x++;
      continue;
    }
    let weight = 0;
    let moment = 0;
    let end = x;
    while (end < level.length && Math.abs(level[end] - ground) >= SEEN / 2) {
      weight += Math.abs(level[end] - ground);
      moment += Math.abs(level[end] - ground) * end;
      end++;
    }
    if (end - x <= WIDEST) marks.push(from + moment / weight);
    x = end;
  }
  return marks;
}
