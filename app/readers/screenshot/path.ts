import type { Run } from "./strokes.ts";

/** Columns that a path may leave out in one go: a marker with its number on top of the trace. */
const LONGEST_BRIDGE = 24;
/** Price of a column left out, and of a pixel between two runs that do not touch. */
const BRIDGE_PRICE = 0.12;
const JUMP_PRICE = 0.14;
const DEAREST_JUMP = 6;
/** Price of a pixel between the middles of two runs, up to so many: small, for steep stretches are no fault. */
const WANDER_PRICE = 0.02;
const MOST_WANDER = 15;
/** Price of beginning anew elsewhere, in columns; cheap where the trace left the plot through an edge. */
const RESTART_PRICE = 25;
const EDGE_RESTART_PRICE = 2;
/** Pixels from the plot's limit at which a trace counts as leaving. */
const EDGE_REACH = 4;

interface Node {
  run: Run;
  score: number;
  from: Node | null;
}

/**
 * The run of each column that a trace follows, by dynamic programming: ink is worth its coverage, gaps and
 * jumps cost. Undefined where the trace was not seen. `top` and `bottom` are the plot's limits in rows;
 * `thickness` of the stroke in pixels, 0 while it is not known.
 *
 * Method: R. Bellman's dynamic programming over columns, as commonly used for following lines in pictures
 * (common practice, no source).
 */
export function followTrace(
  columns: Run[][],
  top: number,
  bottom: number,
  thickness = 0,
): (Run | undefined)[] {
  const nodes: Node[][] = [];
  let best: Node | null = null;
  let bestLeaving: Node | null = null;
  const leaves = (run: Run) => run.upper <= top + EDGE_REACH || run.lower >= bottom - EDGE_REACH;
  columns.forEach((runs, x) => {
    const here = runs.map((run) => {
      const begin = leaves(run) ? EDGE_RESTART_PRICE : Math.min(RESTART_PRICE, BRIDGE_PRICE * x);
      const node: Node = { run, score: -Math.min(begin, BRIDGE_PRICE * x), from: null };
      for (let back = 1; back <= LONGEST_BRIDGE && back <= x; back++) {
        for (const before of nodes[x - back]) {
          const jump = Math.min(
            DEAREST_JUMP,
            JUMP_PRICE * Math.max(0, gapBetween(before.run, run) - 1.5 * (back - 1)),
          );
          offer(node, before, before.score - BRIDGE_PRICE * (back - 1) - jump - wander(before.run, run));
        }
      }
      if (best) offer(node, best, best.score - RESTART_PRICE);
      if (bestLeaving && leaves(run)) offer(node, bestLeaving, bestLeaving.score - EDGE_RESTART_PRICE);
      node.score += worth(run, thickness);
      return node;
    });
    nodes.push(here);
    for (const node of here) {
      if (!best || node.score > best.score) best = node;
      if (leaves(node.run) && (!bestLeaving || node.score > bestLeaving.score)) bestLeaving = node;
    }
  });
  const path: (Run | undefined)[] = new Array(columns.length).fill(undefined);
  const offset = columns.find((runs) => runs.length > 0)?.[0].column ?? 0;
  const firstColumn = offset - columns.findIndex((runs) => runs.length > 0);
  for (let node = best as Node | null; node; node = node.from) path[node.run.column - firstColumn] = node.run;
  return path;
}

function offer(node: Node, from: Node, score: number): void {
  if (score > node.score) {
    node.score = score;
    node.from = from;
  }
}

/** Of two runs that both touch the last one, the one that goes on as before. */
function wander(a: Run, b: Run): number {
  return WANDER_PRICE * Math.min(MOST_WANDER, Math.abs(a.middle - b.middle));
}

/** Ink of the stroke's own thickness is worth most: the edge of a hollow marker is thinner. */
function worth(run: Run, thickness: number): number {
  const full = thickness > 0 ? Math.min(1, 0.4 + (0.6 * run.ink) / thickness) : 1;
  return Math.min(1, run.peak * 1.2) * full;
}

function gapBetween(a: Run, b: Run): number {
  return Math.max(0, b.upper - a.lower, a.upper - b.lower);
}
