import { inkRegion } from "./ink.ts";
import type { Box, Picture } from "./picture.ts";

/** Darkness of 255 that counts as print. */
const PRINT = 100;
const TALLEST_LABEL = 60;
const MOST_LABELS = 40;

/** Boxes of the labels in a strip left of a plot, each a row of print that ends near the strip's right edge. */
export function labelsBeside(picture: Picture, strip: Box): Box[] {
  const { ink, width, height, left, top } = inkOf(picture, strip);
  const near = Math.max(0, width - Math.round(Math.max(24, 0.05 * picture.width)));
  const rows = Array.from({ length: height }, (_, y) => countInk(ink, width, near, width - 1, y, y));
  const boxes: Box[] = [];
  for (const [y0, y1] of runsOf(rows, 1)) {
    if (y1 - y0 < 4 || y1 - y0 > TALLEST_LABEL) continue;
    const columns = Array.from({ length: width }, (_, x) => countInk(ink, width, x, x, y0, y1));
    const groups = runsOf(columns, Math.max(3, Math.round(0.9 * (y1 - y0))));
    const last = groups.filter(([a, b]) => b - a >= 1).at(-1);
    if (last) boxes.push({ left: left + last[0], right: left + last[1], top: top + y0, bottom: top + y1 });
  }
  return boxes.slice(0, MOST_LABELS);
}

/** Boxes of the labels in the first printed row of a strip below a plot. */
export function labelsBelow(picture: Picture, strip: Box): Box[] {
  const { ink, width, height, left, top } = inkOf(picture, strip);
  const rows = Array.from({ length: height }, (_, y) => countInk(ink, width, 0, width - 1, y, y));
  const first = runsOf(rows, 1).find(([a, b]) => b - a >= 5 && b - a <= TALLEST_LABEL);
  if (!first) return [];
  const columns = Array.from({ length: width }, (_, x) => countInk(ink, width, x, x, first[0], first[1]));
  return runsOf(columns, Math.max(4, Math.round(0.9 * (first[1] - first[0]))))
    .map(([a, b]) => ({ left: left + a, right: left + b, top: top + first[0], bottom: top + first[1] }))
    .slice(0, MOST_LABELS);
}

function inkOf(
  picture: Picture,
  strip: Box,
): { ink: Uint8Array; width: number; height: number; left: number; top: number } {
  const region = inkRegion(picture, strip, 1);
  return {
    ink: region.grey.data,
    width: region.grey.width,
    height: region.grey.height,
    left: region.left,
    top: region.top,
  };
}

function countInk(ink: Uint8Array, width: number, x0: number, x1: number, y0: number, y1: number): number {
  let count = 0;
  for (let y = y0; y <= y1; y++) for (let x = x0; x <= x1; x++) if (255 - ink[y * width + x] > PRINT) count++;
  return count;
}

/** Stretches with ink; gaps of up to `bridge` entries inside do not end one. */
function runsOf(counts: number[], bridge: number): [number, number][] {
  const runs: [number, number][] = [];
  counts.forEach((count, i) => {
    if (count === 0) return;
    const last = runs.at(-1);
    if (last && i - last[1] <= bridge + 1) last[1] = i;
    else runs.push([i, i]);
  });
  return runs;
}
