import type { Ground } from "./ground.ts";
import { lookApart, oklab, type Rgb } from "./oklab.ts";
import type { Picture } from "./picture.ts";

/** A colour that a trace may have. */
export interface ColorCandidate {
  color: Rgb;
  /** Columns of the plot in which it occurs off the grid lines, as a share. */
  columnShare: number;
}

/** Least difference from the ground that can be a trace. */
const FAINTEST_TRACE = 0.08;
/** Side of a box in the perceptual space in which pixels are counted together. */
const BIN = 0.04;
/** Colours closer than this are one. */
const ONE_COLOR = 0.1;
/** Cosine of the angle, seen from the ground, within which a paler colour is the same one thinly drawn. */
const SAME_DIRECTION = 0.985;
const MOST_CANDIDATES = 6;
/** A colour in fewer columns is text or a marker; a single narrow dip below a clipped trace has about 0.02. */
const LEAST_SHARE = 0.012;

interface Bin {
  count: number;
  sum: Rgb;
  columns: Set<number>;
}

/**
 * Colours inside the plot that are neither ground nor grid, by the share of columns they occur in.
 *
 * Pixels on the crest of a stroke are gathered in boxes of Oklab; neighbouring boxes and paler shades of
 * the same colour (thin, smoothed strokes) join the strongest.
 */
export function findColors(picture: Picture, ground: Ground): ColorCandidate[] {
  const bins = crestBins(picture, ground);
  const sorted = [...bins.values()].map(meanOf).sort((a, b) => b.count - a.count);
  const groups: { color: Rgb; weight: number; columns: Set<number> }[] = [];
  for (const bin of sorted) {
    const home = groups.find((g) => isSameTrace(g.color, bin.color, ground.color));
    if (!home) {
      groups.push({ color: bin.color, weight: bin.count, columns: new Set(bin.columns) });
      continue;
    }
    const stronger =
      lookApart(bin.color, ground.color) > lookApart(home.color, ground.color) &&
      bin.count > 0.15 * home.weight;
    if (stronger) home.color = bin.color;
    home.weight += bin.count;
    for (const x of bin.columns) home.columns.add(x);
  }
  const width = ground.right - ground.left + 1;
  return groups
    .map((g) => ({ color: g.color, columnShare: g.columns.size / width }))
    .filter((c) => c.columnShare >= LEAST_SHARE)
    .sort((a, b) => b.columnShare - a.columnShare)
    .slice(0, MOST_CANDIDATES);
}

function crestBins(picture: Picture, ground: Ground): Map<number, Bin> {
  const { data, width } = picture;
  const bins = new Map<number, Bin>();
  const off = (j: number) =>
    Math.abs(data[j] - ground.color[0]) +
    Math.abs(data[j + 1] - ground.color[1]) +
    Math.abs(data[j + 2] - ground.color[2]);
  const row = 4 * width;
  const outer = (y: number) => ground.outerRows.some((o) => Math.abs(o - y) <= 2);
  const skipRow = (y: number) =>
    ground.rows[y] !== undefined && (outer(y) || isGridColor(ground.rows[y], ground));
  const skipColumn = (x: number) => ground.columns[x] !== undefined && isGridColor(ground.columns[x], ground);
  for (let y = ground.top + 1; y < ground.bottom; y++) {
    if (skipRow(y)) continue;
    for (let x = ground.left; x <= ground.right; x++) {
      const j = 4 * (y * width + x);
      const own = off(j);
      if (own < 24 || skipColumn(x)) continue;
      const crest = (own >= off(j - row) && own >= off(j + row)) || (own >= off(j - 4) && own >= off(j + 4));
      if (!crest) continue;
      const rgb: Rgb = [data[j], data[j + 1], data[j + 2]];
      const [l, a, b] = oklab(rgb);
      const key = Math.round(l / BIN) * 10000 + Math.round(a / BIN + 50) * 100 + Math.round(b / BIN + 50);
      let bin = bins.get(key);
      if (!bin) {
        bin = { count: 0, sum: [0, 0, 0], columns: new Set() };
        bins.set(key, bin);
      }
      bin.count++;
      for (let c = 0; c < 3; c++) bin.sum[c] += rgb[c];
      bin.columns.add(x);
    }
  }
  for (const [key, bin] of bins)
    if (lookApart(meanOf(bin).color, ground.color) < FAINTEST_TRACE) bins.delete(key);
  return bins;
}

/** A line of another colour than the grid's may be a flat trace. */
function isGridColor(line: Rgb | undefined, ground: Ground): boolean {
  if (!line || !ground.grid) return false;
  return lookApart(line, ground.grid) < ONE_COLOR || isSameTrace(ground.grid, line, ground.color);
}

function meanOf(bin: Bin): { color: Rgb; count: number; columns: Set<number> } {
  return { color: bin.sum.map((s) => s / bin.count) as Rgb, count: bin.count, columns: bin.columns };
}

/** Mixtures of ground and trace lie on the straight line between them in the picture's own numbers. */
function isSameTrace(a: Rgb, b: Rgb, ground: Rgb): boolean {
  if (lookApart(a, b) < ONE_COLOR) return true;
  const p = a.map((v, i) => v - ground[i]);
  const q = b.map((v, i) => v - ground[i]);
  const size = Math.hypot(...p) * Math.hypot(...q);
  return (p[0] * q[0] + p[1] * q[1] + p[2] * q[2]) / size > SAME_DIRECTION;
}
