import type { Box, Line } from "./picture.ts";

/** Division counts that grids have, in the order of search. */
const COUNTS = [2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12, 14, 15, 16, 18, 20];
/** Grid lines needed inside a plot before they correct its outer lines, and by how many pixels they may. */
const LEAST_INNER = 4;
const LARGEST_CORRECTION = 4;
/** One end at least must lie on the even grid as it is. */
const SURE_END = 1.2;
/** Share of the inner grid lines that must be seen. */
const SEEN_SHARE = 0.8;

/**
 * Counts the equal divisions between the first and last row of a plot by its horizontal grid lines.
 *
 * `grey` is row by row; for columns give the transposed numbers and an exchanged box. Lines that were
 * found one by one count fully; else the mean row profile is combed, which also shows grids that are too
 * faint to be found as single lines. Null where there is no such grid.
 */
export function countDivisions(grey: Float32Array, width: number, box: Box, lines: Line[]): number | null {
  const height = box.bottom - box.top;
  const inner = lines.filter((l) => l.position > box.top + 3 && l.position < box.bottom - 3);
  const byLines = largestComb(
    (y) => Math.min(...inner.map((l) => Math.abs(l.position - y))) <= 1.6,
    box.top,
    height,
  );
  if (byLines && fitsLines(inner, box.top, height, byLines)) return byLines;
  const profile = ridgeProfile(grey, width, box);
  const noise = medianOf(profile.map(Math.abs)) + 0.02;
  for (const sign of [1, -1]) {
    const hit = (y: number) => {
      const i = Math.round(y - box.top);
      return (
        Math.max(sign * (profile[i] ?? 0), sign * (profile[i - 1] ?? 0), sign * (profile[i + 1] ?? 0)) >
        4 * noise
      );
    };
    const found = largestComb(hit, box.top, height);
    if (found && found >= 4 && isSparse(profile, sign, 4 * noise, found)) return found;
  }
  return byLines;
}

/**
 * First and last line of an even grid by all of its lines: least squares over place against number, lines
 * that miss it left out. The outer lines as they were where the grid is not even or has few lines.
 */
export function evenEnds(lines: number[], first: number, last: number): [number, number] {
  const inner = lines.filter((p) => p > first + 3 && p < last - 3).sort((a, b) => a - b);
  if (inner.length < LEAST_INNER) return [first, last];
  const steps = inner
    .slice(1)
    .map((p, i) => p - inner[i])
    .filter((d) => d > 4);
  const step = medianOf(steps);
  if (!(step > 8)) return [first, last];
  const origin = inner[inner.length >> 1];
  const points = [first, ...inner, last].map((place) => ({
    place,
    number: Math.round((place - origin) / step),
  }));
  let kept = points.filter((p) => Math.abs(p.place - origin - p.number * step) < 2 + 0.02 * step);
  for (const limit of [0.9, 0.5]) {
    const line = straightLine(kept);
    kept = kept.filter((p) => Math.abs(line.at(p.number) - p.place) < limit);
    if (kept.length < LEAST_INNER) return [first, last];
  }
  const line = straightLine(kept);
  const ends = [first, last].map((end) => line.at(line.numberAt(end)));
  const misses = [Math.abs(ends[0] - first), Math.abs(ends[1] - last)];
  const sound = Math.min(...misses) < SURE_END && Math.max(...misses) < LARGEST_CORRECTION;
  const even = distinct(kept) >= 0.7 * distinct(points);
  return sound && even ? [ends[0], ends[1]] : [first, last];
}

function distinct(points: { number: number }[]): number {
  return new Set(points.map((p) => p.number)).size;
}

function straightLine(points: { place: number; number: number }[]) {
  const n = points.length;
  const meanX = points.reduce((s, p) => s + p.number, 0) / n;
  const meanY = points.reduce((s, p) => s + p.place, 0) / n;
  const xx = points.reduce((s, p) => s + (p.number - meanX) ** 2, 0);
  const slope = points.reduce((s, p) => s + (p.number - meanX) * (p.place - meanY), 0) / (xx || 1);
  return {
    at: (number: number) => meanY + slope * (number - meanX),
    numberAt: (place: number) => Math.round(meanX + (place - meanY) / slope),
  };
}

function largestComb(hit: (y: number) => boolean, top: number, height: number): number | null {
  let best: number | null = null;
  for (const count of COUNTS) {
    if (height / count < 8) break;
    let seen = 0;
    for (let i = 1; i < count; i++) if (hit(top + (i * height) / count)) seen++;
    if (seen >= SEEN_SHARE * (count - 1)) best = count;
  }
  return best;
}

/** Most lines that were found must lie on the comb: else the grid has another offset or scale. */
function fitsLines(inner: Line[], top: number, height: number, count: number): boolean {
  const on = inner.filter((l) => {
    const place = ((l.position - top) / height) * count;
    return Math.abs(place - Math.round(place)) * (height / count) <= 1.6;
  });
  return on.length >= 0.7 * inner.length && on.length >= 0.7 * (count - 1);
}

/** The comb must be special: far fewer rows than all may show a line. */
function isSparse(profile: number[], sign: number, limit: number, count: number): boolean {
  const rows = profile.filter((p) => sign * p > limit).length;
  return rows <= count * 4;
}

/** How far each row's mean brightness stands out from the rows three above and below. */
function ridgeProfile(grey: Float32Array, width: number, box: Box): number[] {
  const left = Math.ceil(box.left) + 3;
  const right = Math.floor(box.right) - 3;
  const top = Math.round(box.top);
  const bottom = Math.round(box.bottom);
  const mean: number[] = [];
  for (let y = top - 3; y <= bottom + 3; y++) {
    let sum = 0;
    for (let x = left; x <= right; x++) sum += grey[y * width + x] || 0;
    mean.push(sum / (right - left + 1));
  }
  const profile: number[] = [];
  for (let i = 3; i + 3 < mean.length; i++) {
    const up = mean[i] - mean[i - 3];
    const down = mean[i] - mean[i + 3];
    profile.push(up * down > 0 ? Math.sign(up) * Math.min(Math.abs(up), Math.abs(down)) : 0);
  }
  return profile;
}

function medianOf(values: number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.floor(sorted.length / 2)] ?? 0;
}
