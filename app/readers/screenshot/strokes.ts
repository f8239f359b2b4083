import type { Coverage } from "./coverage.ts";

/** A vertical run of a colour in one column. Rows of the picture; edges are between pixels where ink ends. */
export interface Run {
  column: number;
  /** Upper and lower edge of the ink, a fraction of a pixel counts. */
  upper: number;
  lower: number;
  /** Middle by intensity. */
  middle: number;
  /** Pixels of ink. */
  ink: number;
  /** Largest coverage in the run. */
  peak: number;
}

/** Coverage that counts as ink. */
const INK = 0.22;
/** A run needs one pixel this much covered. */
const LEAST_PEAK = 0.32;
const MOST_RUNS = 10;
/** Rows from one with ink to the next of the same run: a single pixel without is passed over. */
const LARGEST_GAP = 2;

/** The runs of every column, strongest first where there are many. */
export function runsByColumn(coverage: Coverage): Run[][] {
  const { width, left, top } = coverage;
  const { rows, first } = inkByColumn(coverage);
  const columns: Run[][] = [];
  for (let x = 0; x < width; x++) {
    const runs: Run[] = [];
    const behind = first[x + 1];
    for (let k = first[x]; k < behind; k++) {
      const y = rows[k];
      while (k + 1 < behind && rows[k + 1] - rows[k] <= LARGEST_GAP) k++;
      const run = measure(coverage, x, y, rows[k]);
      if (run.peak >= LEAST_PEAK)
        runs.push({
          ...run,
          column: x + left,
          upper: run.upper + top,
          lower: run.lower + top,
          middle: run.middle + top,
        });
    }
    if (runs.length > MOST_RUNS) runs.sort((a, b) => b.ink * b.peak - a.ink * a.peak).length = MOST_RUNS;
    columns.push(runs);
  }
  return columns;
}

/** Rows with ink, column behind column: those of column x from `first[x]` up to `first[x + 1]`. */
function inkByColumn({ width, height, share }: Coverage): { rows: Uint32Array; first: Uint32Array } {
  const first = new Uint32Array(width + 1);
  const inked: number[] = [];
  for (let i = 0, y = 0; y < height; y++) {
    for (let x = 0; x < width; x++, i++) {
      if (share[i] < INK) continue;
      inked.push(i);
      first[x + 1]++;
    }
  }
  for (let x = 0; x < width; x++) first[x + 1] += first[x];
  const rows = new Uint32Array(inked.length);
  const next = first.slice();
  for (const i of inked) rows[next[i % width]++] = Math.floor(i / width);
  return { rows, first };
}

function measure(coverage: Coverage, x: number, first: number, last: number): Omit<Run, "column"> {
  const { width, height, share } = coverage;
  let ink = 0;
  let moment = 0;
  let peak = 0;
  const from = Math.max(0, first - 1);
  const to = Math.min(height - 1, last + 1);
  for (let y = from; y <= to; y++) {
    const s = share[y * width + x];
    ink += s;
    moment += s * y;
    if (s > peak) peak = s;
  }
  const edge = (y: number) => Math.min(1, share[y * width + x] / Math.max(peak, 0.5));
  return {
    upper: first + 0.5 - edge(first),
    lower: last - 0.5 + edge(last),
    middle: moment / ink,
    ink,
    peak,
  };
}
