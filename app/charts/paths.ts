/** SVG paths of a profile, in units of its own box: x from 0 to `width`, y in px down from the plot's top. */
import type { Run } from "./decimate.ts";

export interface ProfileBox {
  width: number;
  heightPx: number;
  yOfMagnitude: (magnitude: number) => number;
}

export interface ProfilePaths {
  /** The filled land under the line. */
  land: string;
  line: string;
  /** Where the line runs along the edge because the value lies beyond the axis. */
  offScale: string;
  beyondTop: boolean;
  beyondBottom: boolean;
}

export function profilePaths(runs: readonly Run[], box: ProfileBox): ProfilePaths {
  const paths = { land: "", line: "", offScale: "", beyondTop: false, beyondBottom: false };
  for (const run of runs) {
    const all = run.magnitudes.map(box.yOfMagnitude);
    paths.beyondTop ||= all.some((y) => y < -SLACK_PX);
    paths.beyondBottom ||= all.some((y) => y > box.heightPx + SLACK_PX);
    const kept = cornersOf(run.fractions, all);
    const xs = kept.map((index) => run.fractions[index] * box.width);
    const raw = kept.map((index) => all[index]);
    addLand(paths, xs, raw, box);
    addLine(paths, xs, raw, box);
  }
  return paths;
}

/** Water in a hollow: what lies under the level `levelY` between two fractions, down to the land. */
export function waterPath(
  runs: readonly Run[],
  box: ProfileBox,
  levelY: number,
  from: number,
  to: number,
): string {
  const shore: string[] = [];
  for (const run of runs) {
    for (const [index, fraction] of run.fractions.entries()) {
      if (fraction <= from || fraction >= to) continue;
      const y = clamp(box.yOfMagnitude(run.magnitudes[index]), box.heightPx);
      if (y > levelY) shore.push(at(fraction * box.width, y));
    }
  }
  if (shore.length === 0) return "";
  return `M${at(from * box.width, levelY)}L${shore.join("L")}L${at(to * box.width, levelY)}Z`;
}

/** The space between two profiles of the same frequencies, for limits. */
export function betweenPath(upper: readonly Run[], lower: readonly Run[], box: ProfileBox): string {
  let path = "";
  for (const [index, run] of upper.entries()) {
    const under = lower[index];
    if (!under) break;
    const there = pointsOf(run, box);
    const back = pointsOf(under, box).reverse();
    path += `M${there.concat(back).join("L")}Z`;
  }
  return path;
}

const SLACK_PX = 0.5;
/** A sixth of a pixel: no eye sees it, and a smooth sweep needs a tenth of its points. */
const STRAIGHT_PX = 0.16;
/** A point alone is drawn as a dot: a line too short to see, with round ends. */
const DOT = "h0.01";

/**
 * Which points a pen needs: those left out lie within `STRAIGHT_PX` of the straight line between kept ones. From
 * each kept point the cone that passes all later ones is narrowed until the next point falls outside it.
 */
export function cornersOf(xs: readonly number[], ys: readonly number[]): number[] {
  const kept = [0];
  let anchor = 0;
  let [steepest, flattest] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (let i = 1; i < xs.length; i++) {
    const dx = xs[i] - xs[anchor];
    const slope = (ys[i] - ys[anchor]) / dx;
    if (i > anchor + 1 && !(slope >= flattest && slope <= steepest)) {
      anchor = i - 1;
      kept.push(anchor);
      [steepest, flattest] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
    }
    const reach = xs[i] - xs[anchor];
    steepest = Math.min(steepest, (ys[i] + STRAIGHT_PX - ys[anchor]) / reach);
    flattest = Math.max(flattest, (ys[i] - STRAIGHT_PX - ys[anchor]) / reach);
  }
  if (xs.length > 1) kept.push(xs.length - 1);
  return kept;
}

function addLand(paths: ProfilePaths, xs: number[], raw: number[], box: ProfileBox) {
  if (xs.length < 2) return;
  const edge = xs.map((x, index) => at(x, clamp(raw[index], box.heightPx)));
  const bottom = box.heightPx;
  paths.land += `M${at(xs[0], bottom)}L${edge.join("L")}L${at(xs[xs.length - 1], bottom)}Z`;
}

function addLine(paths: ProfilePaths, xs: number[], raw: number[], box: ProfileBox) {
  const isOff = (y: number) => y < -SLACK_PX || y > box.heightPx + SLACK_PX;
  let pen: "line" | "offScale" | null = null;
  const go = (to: "line" | "offScale", x: number, y: number) => {
    paths[to] += `${pen === to ? "L" : "M"}${at(x, clamp(y, box.heightPx))}`;
    pen = to;
  };
  for (let index = 0; index < xs.length; index++) {
    const off = isOff(raw[index]);
    const wasOff = index > 0 && isOff(raw[index - 1]);
    if (index > 0 && off !== wasOff) {
      const crossing = crossingX(xs[index - 1], raw[index - 1], xs[index], raw[index], box.heightPx);
      go(wasOff ? "offScale" : "line", crossing.x, crossing.y);
      pen = null;
      go(off ? "offScale" : "line", crossing.x, crossing.y);
    }
    go(off ? "offScale" : "line", xs[index], raw[index]);
  }
  if (xs.length === 1) paths[isOff(raw[0]) ? "offScale" : "line"] += DOT;
}

/** Where the straight line between a point on the scale and one off it meets the edge. */
function crossingX(x0: number, y0: number, x1: number, y1: number, heightPx: number) {
  const outside = y0 < 0 || y0 > heightPx ? y0 : y1;
  const edge = outside < 0 ? 0 : heightPx;
  if (!Number.isFinite(outside) || y1 === y0) return { x: outside === y0 ? x0 : x1, y: edge };
  const share = Math.min(1, Math.max(0, (edge - y0) / (y1 - y0)));
  return { x: x0 + share * (x1 - x0), y: edge };
}

function pointsOf(run: Run, box: ProfileBox): string[] {
  return run.fractions.map((fraction, index) =>
    at(fraction * box.width, clamp(box.yOfMagnitude(run.magnitudes[index]), box.heightPx)),
  );
}

function clamp(y: number, heightPx: number): number {
  return Math.min(heightPx, Math.max(0, y));
}

function at(x: number, y: number): string {
  return `${round(x)} ${round(y)}`;
}

function round(value: number): number {
  return Math.round(value * 100) / 100;
}
