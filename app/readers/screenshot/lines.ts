import type { Line } from "./picture.ts";

/** Pixels that are averaged along a line: dotted lines have several dots in one. */
const BLOCK = 16;
/** Smallest mean step across a line, brightness of 255; grids of printed screens have 3 to 100. */
const SMALLEST_STEP = 1.1;
/** Blocks without the line that a chain survives: a crossing trace, a marker with its number. */
const BLOCK_GAP = 2;
/** Share of a side that a line must have at least. */
const SHORTEST_SHARE = 0.08;
/** Pixels in which a line's end must show it as regularly as its middle, for solid and for dotted lines. */
const END_WINDOW_SOLID = 24;
const END_WINDOW_DOTTED = 32;
/** Pixels without the step that count as a long hole, and the share of them that a line may have. */
const LONG_HOLE = 9;
const MOST_HOLES = 0.35;
/** Pixels of a line that are looked at for its place. */
const SAMPLES = 150;
/** Pixels beside a line in which one so many times fainter is taken for its echo. */
const RINGING_REACH = 10;
const RINGING_RATIO = 8;
/** Rows that one stroke's edges may lie apart: strokes are up to 4 pixels thick. */
const THICKEST = 4;

interface Chain {
  row: number;
  from: number;
  to: number;
  step: number;
}

/**
 * Finds straight horizontal strokes and edges, also dotted and faint ones.
 *
 * `grey` is row by row, `width` wide and `height` high, 0 to 255. For vertical lines give the
 * transposed numbers with the sides exchanged. Sorted by position.
 */
export function findLines(grey: Float32Array, width: number, height: number): Line[] {
  const chains: Chain[] = [];
  for (let y = 0; y + 1 < height; y++) chainsOfRow(grey, width, y, chains);
  const lines = groupChains(chains, width)
    .flatMap((group) => [group, ...partsOf(group)])
    .map((group) => measureLine(group, grey, width, height));
  const long = lines.filter((l) => l.to - l.from >= SHORTEST_SHARE * width);
  return long
    .filter((l) => !long.some((other) => isRinging(l, other)))
    .sort((a, b) => a.position - b.position);
}

/** Compression and sharpening draw faint lines beside strong ones. */
function isRinging(line: Line, other: Line): boolean {
  const near = Math.abs(line.position - other.position) <= RINGING_REACH;
  const beside = Math.min(line.to, other.to) - Math.max(line.from, other.from) > 0.7 * (line.to - line.from);
  return near && beside && line.contrast * RINGING_RATIO < other.contrast;
}

function chainsOfRow(grey: Float32Array, width: number, row: number, chains: Chain[]): void {
  const blocks = Math.floor(width / BLOCK);
  const upper = row * width;
  const lower = upper + width;
  let first = -1;
  let last = -1;
  let sign = 0;
  let sum = 0;
  let hits = 0;
  const close = () => {
    if (first >= 0 && hits >= 3 && hits >= 0.6 * (last - first + 1)) {
      const chain = { row, from: first * BLOCK, to: last * BLOCK + BLOCK - 1, step: sum / hits };
      const share = refineEnds(chain, grey, width);
      if (share < MOST_HOLES && chain.to - chain.from >= SHORTEST_SHARE * width * 0.8) chains.push(chain);
    }
    first = -1;
  };
  for (let b = 0; b < blocks; b++) {
    let mean = 0;
    for (let x = b * BLOCK; x < b * BLOCK + BLOCK; x++) mean += grey[lower + x] - grey[upper + x];
    mean /= BLOCK;
    const strong = Math.abs(mean) >= SMALLEST_STEP;
    const fits =
      strong && first >= 0 && Math.sign(mean) === sign && Math.abs(mean) > 0.25 * Math.abs(sum / hits);
    if (fits && b - last <= BLOCK_GAP + 1) {
      last = b;
      sum += mean;
      hits++;
    } else if (first >= 0 && b - last > BLOCK_GAP) {
      close();
    }
    if (first < 0 && strong) {
      first = b;
      last = b;
      sign = Math.sign(mean);
      sum = mean;
      hits = 1;
    }
  }
  close();
}

/**
 * Moves both ends to where the step is as regularly present as in the middle; text beside a line is not.
 * Returns the share of long holes: a column of printed labels has many, a dotted line none.
 */
function refineEnds(chain: Chain, grey: Float32Array, width: number): number {
  const upper = chain.row * width;
  const lower = upper + width;
  const sign = Math.sign(chain.step);
  const at = (x: number) => sign * (grey[lower + x] - grey[upper + x]);
  const sample: number[] = [];
  for (let x = chain.from; x <= chain.to; x += 3) sample.push(at(x));
  sample.sort((a, b) => a - b);
  const enough = 0.4 * Math.max(sample[Math.floor(sample.length * 0.6)], Math.abs(chain.step));
  const first = Math.max(0, chain.from - BLOCK);
  const last = Math.min(width - 1, chain.to + BLOCK);
  const seen = new Int32Array(last - first + 2);
  for (let x = first; x <= last; x++) seen[x - first + 1] = seen[x - first] + (at(x) >= enough ? 1 : 0);
  const share = (a: number, b: number) => (seen[b - first] - seen[a - first]) / (b - a);
  const usual = share(chain.from, chain.to + 1);
  const window = usual > 0.7 ? END_WINDOW_SOLID : END_WINDOW_DOTTED;
  const near = Math.round(window / 4);
  const regular = (a: number, b: number) => share(a, b) >= 0.7 * usual;
  let from = first;
  while (
    from + window < last &&
    !(at(from) >= enough && regular(from, from + near) && regular(from, from + window))
  )
    from++;
  let to = last;
  while (
    to - window > first &&
    !(at(to) >= enough && regular(to + 1 - near, to + 1) && regular(to + 1 - window, to + 1))
  )
    to--;
  chain.from = from;
  chain.to = to;
  let holes = 0;
  let absent = 0;
  for (let x = from; x <= to; x++) {
    absent = at(x) >= enough ? 0 : absent + 1;
    if (absent === LONG_HOLE) holes += LONG_HOLE;
    else if (absent > LONG_HOLE) holes++;
  }
  return holes / (to - from + 1);
}

/** The strongest chains take their weaker neighbours: other side of the stroke, ringing, a continuation. */
function groupChains(chains: Chain[], width: number): Chain[][] {
  const order = [...chains].sort((a, b) => Math.abs(b.step) - Math.abs(a.step));
  const byRow = new Map<number, Chain[]>();
  for (const chain of chains) byRow.set(chain.row, [...(byRow.get(chain.row) ?? []), chain]);
  const taken = new Set<Chain>();
  const groups: Chain[][] = [];
  for (const head of order) {
    if (taken.has(head)) continue;
    const group = [head];
    taken.add(head);
    for (let row = head.row - THICKEST; row <= head.row + THICKEST; row++) {
      for (const chain of byRow.get(row) ?? []) {
        if (taken.has(chain) || (Math.abs(row - head.row) > 2 && chain.step * head.step > 0)) continue;
        if (!sameLine(head, chain, width)) continue;
        taken.add(chain);
        group.push(chain);
      }
    }
    groups.push(group);
  }
  return groups;
}

function sameLine(a: Chain, b: Chain, width: number): boolean {
  const both = Math.min(a.to, b.to) - Math.max(a.from, b.from);
  const shorter = Math.min(a.to - a.from, b.to - b.from);
  if (both > 0.6 * shorter) return true;
  const alike =
    Math.abs(a.row - b.row) <= 1 && a.step * b.step > 0 && a.step / b.step > 0.5 && a.step / b.step < 2;
  return alike && both > -0.4 * width;
}

/** A line that goes on behind a gap may be two: a plot's outline and, in the same row, a button's. */
function partsOf(group: Chain[]): Chain[][] {
  const head = group[0];
  const alike = group.filter((c) => Math.abs(c.row - head.row) <= 1 && c.step * head.step > 0);
  const apart = alike.filter((a) => alike.some((b) => a.from > b.to || b.from > a.to));
  return apart.map((part) =>
    group.filter((c) => Math.min(c.to, part.to) - Math.max(c.from, part.from) > 0.6 * (c.to - c.from)),
  );
}

function measureLine(group: Chain[], grey: Float32Array, width: number, height: number): Line {
  const strongest = group.reduce((a, b) => (Math.abs(b.step) > Math.abs(a.step) ? b : a));
  const opposite = group
    .filter((c) => c.step * strongest.step < 0 && Math.abs(c.step) > 0.3 * Math.abs(strongest.step))
    .sort((a, b) => Math.abs(b.step) - Math.abs(a.step))[0];
  const partner = opposite ?? strongest;
  const first = Math.min(strongest.row, partner.row) - 2;
  const last = Math.max(strongest.row, partner.row) + 3;
  const alike = group.filter((c) => Math.abs(c.step) > 0.3 * Math.abs(strongest.step));
  const from = Math.min(...alike.map((c) => c.from));
  const to = Math.max(...alike.map((c) => c.to));
  const rows = Array.from({ length: last - first + 1 }, (_, i) =>
    Math.min(Math.max(first + i, 0), height - 1),
  );
  const profile = rowLevels(grey, width, rows, from, to);
  const above = profile[0];
  const below = profile[profile.length - 1];
  const kind = opposite ? "stroke" : "edge";
  return {
    position: first + (opposite ? strokeCentre(profile) : edgeCentre(profile)),
    from,
    to,
    kind,
    contrast: contrastOf(profile, above, below),
  };
}

/** Brightness of a row along a line: the median, which crossing traces leave alone; of dotted lines the mean. */
function rowLevels(grey: Float32Array, width: number, rows: number[], from: number, to: number): number[] {
  const step = Math.max(1, Math.floor((to - from) / SAMPLES));
  const means: number[] = [];
  const medians: number[] = [];
  for (const y of rows) {
    const values: number[] = [];
    for (let x = from; x <= to; x += step) values.push(grey[y * width + x]);
    means.push(values.reduce((a, v) => a + v, 0) / values.length);
    medians.push(values.sort((a, b) => a - b)[values.length >> 1]);
  }
  const range = (v: number[]) => Math.max(...v) - Math.min(...v);
  return range(medians) > 0.6 * range(means) ? medians : means;
}

/** Centre of what stands out from both sides. */
function strokeCentre(profile: number[]): number {
  const n = profile.length;
  const low = Math.min(profile[0], profile[n - 1]);
  const high = Math.max(profile[0], profile[n - 1]);
  let weight = 0;
  let moment = 0;
  for (let i = 0; i < n; i++) {
    const out = profile[i] > high ? profile[i] - high : profile[i] < low ? low - profile[i] : 0;
    weight += out;
    moment += out * i;
  }
  return weight > 0 ? moment / weight : (n - 1) / 2;
}

/** Where a clean step with the same sum would lie. */
function edgeCentre(profile: number[]): number {
  const n = profile.length;
  const above = profile[0];
  const below = profile[n - 1];
  if (above === below) return (n - 1) / 2;
  let covered = 0;
  for (const level of profile) covered += Math.min(1, Math.max(0, (level - below) / (above - below)));
  return covered - 0.5;
}

function contrastOf(profile: number[], above: number, below: number): number {
  let most = Math.abs(above - below);
  for (const level of profile)
    most = Math.max(most, Math.min(Math.abs(level - above), Math.abs(level - below)));
  return most;
}
