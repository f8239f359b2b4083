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

/** The runs of every column, strongest first where there are many. */
export function runsByColumn(coverage: Coverage): Run[][] {
  const { width, height, share, left, top } = coverage;
  const columns: Run[][] = [];
  for (let x = 0; x < width; x++) {
    const runs: Run[] = [];
    let y = 0;
    while (y < height) {
      if (share[y * width + x] < INK) {
        y++;
        continue;
      }
      let end = y;
      while (
        end + 1 < height &&
        (share[(end + 1) * width + x] >= INK || (end + 2 < height && share[(end + 2) * width + x] >= INK))
      )
        end++;
      const run = measure(coverage, x, y, end);
      if (run.peak >= LEAST_PEAK)
        runs.push({
          ...run,
          column: x + left,
          upper: run.upper + top,
          lower: run.lower + top,
          middle: run.middle + top,
        });
      y = end + 1;
    }
    if (runs.length > MOST_RUNS) runs.sort((a, b) => b.ink * b.peak - a.ink * a.peak).length = MOST_RUNS;
    columns.push(runs);
  }
  return columns;
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
