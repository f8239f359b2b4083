import { findBlobs } from "./blobs.ts";
import type { Coverage } from "./coverage.ts";
import { followTrace } from "./path.ts";
import { type Run, runsByColumn } from "./strokes.ts";

/** One value per pixel column: rows of the picture, NaN where the trace was not seen. */
export interface Trace {
  /** Column of the first value. */
  left: number;
  row: Float64Array;
  /** Half-width in rows within which the trace's middle lies. */
  uncertainty: Float64Array;
  /** Thickness of the stroke, pixels. */
  thickness: number;
  /** Share of the columns in which ink was followed. */
  share: number;
  /** The same with the stretches in which the trace was outside the plot. */
  explained: number;
  /** Mean coverage on the crest of the stroke, 0 to 1: low where the colour is not quite the stroke's own. */
  fullness: number;
  /** Share of the columns in which the trace does not touch the one before: text and marks have many. */
  jumps: number;
  /** Rows between the lowest and highest half per cent of the columns. */
  extent: number;
}

/** Ink, in thicknesses, from which a run is a steep stretch rather than a smoothed stroke. */
const STEEP = 1.7;
/** Longest stretch over which a hidden trace is drawn on. */
const LONGEST_BRIDGE = 24;
const EDGE_REACH = 5;
/** Thickness, in pixels, from which a marker's thin edge can be told from the stroke. */
const THICK = 1.6;
/** Pixels between neighbouring runs that are no longer one stroke. */
const JUMP = 2;

/**
 * Follows a colour from column to column.
 *
 * In a flat stretch the value is the middle of the ink by intensity; in a steep one the middle of the
 * column's whole run, reckoned from both of its ends by the slope there; at the tip of a dip or crest the end of the run less half the stroke's thickness.
 * Short hidden stretches (markers) are bridged with the slopes at both sides and carry more uncertainty.
 */
export function readTrace(coverage: Coverage, top: number, bottom: number): Trace {
  const columns = runsByColumn(coverage);
  let path = followTrace(columns, top, bottom);
  const firstThickness = thicknessOf(path);
  const blobs = findBlobs(coverage, firstThickness);
  if (blobs || firstThickness > THICK) {
    const clear = blobs ? columns.map((runs) => runs.filter((r) => !touches(r, blobs, coverage))) : columns;
    path = followTrace(clear, top, bottom, firstThickness > THICK ? firstThickness : 0);
  }
  const width = path.length;
  const row = new Float64Array(width).fill(Number.NaN);
  const uncertainty = new Float64Array(width).fill(Number.NaN);
  const seen = path.filter((r) => r !== undefined).length;
  if (seen === 0)
    return {
      left: coverage.left,
      row,
      uncertainty,
      thickness: 0,
      share: 0,
      explained: 0,
      fullness: 0,
      jumps: 0,
      extent: 0,
    };
  const thickness = thicknessOf(path);
  path.forEach((run, x) => {
    if (!run) return;
    const [value, spread] = placeOf(path, x, run, thickness);
    row[x] = value;
    uncertainty[x] = spread;
  });
  const fullness = path.reduce((sum, run) => sum + (run?.peak ?? 0), 0) / seen;
  const accounted = bridge(row, uncertainty, path, top, bottom);
  const sorted = [...row].filter((v) => !Number.isNaN(v)).sort((a, b) => a - b);
  const extent = sorted[Math.floor(sorted.length * 0.995)] - sorted[Math.floor(sorted.length * 0.005)];
  return {
    left: coverage.left,
    row,
    uncertainty,
    thickness,
    share: seen / width,
    explained: accounted / width,
    fullness,
    jumps: jumpsOf(path) / seen,
    extent,
  };
}

/** A run that a filled area has merged with says nothing about the trace. */
function touches(run: Run, blobs: Uint8Array, coverage: Coverage): boolean {
  const { width, left, top } = coverage;
  for (let y = Math.ceil(run.upper); y <= Math.floor(run.lower); y++) {
    if (blobs[(y - top) * width + run.column - left]) return true;
  }
  return false;
}

function jumpsOf(path: (Run | undefined)[]): number {
  let jumps = 0;
  path.forEach((run, x) => {
    const before = path[x - 1];
    if (run && before && Math.max(run.upper - before.lower, before.upper - run.lower) > JUMP) jumps++;
  });
  return jumps;
}

/** Ink across the stroke: a steep stroke leaves more in a column by the slope. */
function thicknessOf(path: (Run | undefined)[]): number {
  const across: number[] = [];
  path.forEach((run, x) => {
    const before = path[x - 1];
    const after = path[x + 1];
    if (!run || !before || !after) return;
    across.push(run.ink / Math.hypot(1, (after.middle - before.middle) / 2));
  });
  across.sort((a, b) => a - b);
  return Math.max(0.8, across[Math.floor(across.length * 0.4)] ?? 1);
}

function placeOf(path: (Run | undefined)[], x: number, run: Run, thickness: number): [number, number] {
  const half = Math.max(0.5, thickness / 2);
  if (run.ink <= STEEP * thickness + 0.7) return [run.middle, half];
  const below = tipExcess(path, x, (r) => r.lower);
  const above = tipExcess(path, x, (r) => -r.upper);
  const needed = 0.75 * thickness;
  if (below > needed && below >= above) return [run.lower - thickness / 2, half + 0.5];
  if (above > needed) return [run.upper + thickness / 2, half + 0.5];
  const before = path[x - 1] ?? run;
  const after = path[x + 1] ?? run;
  const fromUpper = run.upper + halfExtent(after.upper - before.upper, thickness);
  const fromLower = run.lower - halfExtent(after.lower - before.lower, thickness);
  const middle = (fromUpper + fromLower) / 2;
  const value = Math.min(Math.max(middle, run.upper + thickness / 2), run.lower - thickness / 2);
  return [value, half + Math.abs(after.middle - before.middle) / 4 + Math.abs(fromUpper - fromLower) / 2];
}

/** Half of what a straight stroke covers of a column, by the fall of its edge over two columns. */
function halfExtent(fall: number, thickness: number): number {
  const slope = Math.abs(fall) / 2;
  return (slope + thickness * Math.hypot(1, slope)) / 2;
}

/** How far a run's end stands out beyond both sides; columns with the same end count as one tip. */
function tipExcess(path: (Run | undefined)[], x: number, end: (run: Run) => number): number {
  const run = path[x];
  if (!run) return 0;
  const own = end(run);
  const side = (step: number): number => {
    for (let i = 1; i <= 3; i++) {
      const other = path[x + step * i];
      if (!other) return 0;
      const fall = own - end(other);
      if (fall > 1) return fall;
      if (fall < -0.75) return 0;
    }
    return 0;
  };
  return Math.min(side(1), side(-1));
}

/** Draws the trace on through short gaps; returns the number of columns that are accounted for. */
function bridge(
  row: Float64Array,
  uncertainty: Float64Array,
  path: (Run | undefined)[],
  top: number,
  bottom: number,
): number {
  const width = path.length;
  let explained = 0;
  let last = -1;
  const leaves = (run: Run | undefined) =>
    run !== undefined && (run.upper <= top + EDGE_REACH || run.lower >= bottom - EDGE_REACH);
  for (let x = 0; x <= width; x++) {
    if (x < width && !path[x]) continue;
    const gap = x - last - 1;
    if (gap > 0) {
      const outside = (last < 0 || leaves(path[last])) && (x === width || leaves(path[x]));
      if (outside) explained += gap;
      else if (last >= 0 && x < width && gap <= LONGEST_BRIDGE) {
        drawOn(row, uncertainty, last, x);
        explained += gap;
      }
    }
    if (x < width) explained++;
    last = x;
  }
  return explained;
}

/** Cubic Hermite curve from one side of a gap to the other. */
function drawOn(row: Float64Array, uncertainty: Float64Array, from: number, to: number): void {
  const length = to - from;
  const slopeBefore = slopeAt(row, from, -1);
  const slopeAfter = slopeAt(row, to, 1);
  for (let x = from + 1; x < to; x++) {
    const t = (x - from) / length;
    const straight = row[from] + (row[to] - row[from]) * t;
    const h10 = t * (1 - t) ** 2;
    const h11 = t * t * (t - 1);
    const h01 = t * t * (3 - 2 * t);
    const curve = row[from] * (1 - h01) + row[to] * h01 + length * (h10 * slopeBefore + h11 * slopeAfter);
    row[x] = curve;
    uncertainty[x] = Math.max(uncertainty[from], uncertainty[to]) + 0.5 + Math.abs(curve - straight) / 2;
  }
}

function slopeAt(row: Float64Array, x: number, side: number): number {
  const reach = 4;
  const other = row[x + side * reach];
  if (other === undefined || Number.isNaN(other)) return 0;
  return ((other - row[x]) / (side * reach)) as number;
}
