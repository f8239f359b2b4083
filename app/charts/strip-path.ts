/** The profiles of many strips, as short as they can be written: whole numbers, step by step. */
import type { Run } from "./decimate.ts";
import { cornersOf } from "./paths.ts";

/** Units of a strip's own box: across its width, and down for each px. */
export const STRIP_UNITS = 4000;
export const UNITS_PER_PX = 10;

export interface StripPath {
  /** The land down to its foot: filled. Its sides lie outside the box where the sweep goes on to both edges. */
  land: string;
  /** The pen line; null where the land's own outline is it. */
  line: string | null;
}

/**
 * `yOfMagnitude` in px down from the box's top; what lies beyond the box runs along its edge. `footPx` is the land's
 * foot. A gap in the sweep is a gap in the land.
 */
export function stripPath(
  runs: readonly Run[],
  yOfMagnitude: (magnitude: number) => number,
  floorPx: number,
  footPx: number,
): StripPath {
  const foot = footPx * UNITS_PER_PX;
  const drawn = runs.map((run) => {
    const ys = run.magnitudes.map((m) => Math.min(floorPx, Math.max(0, yOfMagnitude(m))));
    const kept = cornersOf(
      run.fractions.map((fraction) => fraction * STRIP_UNITS),
      ys,
    );
    return {
      xs: kept.map((index) => Math.round(run.fractions[index] * STRIP_UNITS)),
      ys: kept.map((index) => Math.round(ys[index] * UNITS_PER_PX)),
    };
  });
  const [only] = drawn;
  if (drawn.length === 1 && only.xs[0] === 0 && only.xs[only.xs.length - 1] === STRIP_UNITS) {
    const y = only.ys[0];
    return {
      land: `M${-BEYOND} ${foot}V${y}h${BEYOND}${steps(only.xs, only.ys)}h${BEYOND}V${foot}`,
      line: null,
    };
  }
  const lines = drawn.map(({ xs, ys }) => ({ x: xs[0], y: ys[0], way: steps(xs, ys) }));
  return {
    land: lines.map(({ x, y, way }) => `M${x} ${foot}V${y}${way}V${foot}Z`).join(""),
    line: lines.map(({ x, y, way }) => `M${x} ${y}${way || "h.1"}`).join(""),
  };
}

/** From the first point on, each as its distance from the one before it. */
function steps(xs: readonly number[], ys: readonly number[]): string {
  let way = "";
  for (let i = 1; i < xs.length; i++) {
    const [dx, dy] = [xs[i] - xs[i - 1], ys[i] - ys[i - 1]];
    if (dx === 0 && dy === 0) continue;
    way += `${way === "" ? "l" : dx < 0 ? "" : " "}${dx}${dy < 0 ? "" : " "}${dy}`;
  }
  return way;
}

/** Farther out than a pen is wide on any screen. */
const BEYOND = 60;
