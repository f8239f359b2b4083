import type { Fit } from "../dips/fit.ts";
import { edgesAt, hzAt } from "../dips/resonator.ts";
import type { Sweep } from "../sweep.ts";

/** A dip as its flanks are followed: from sample `index` on, at `hz`; `sigma` of abs Γ. */
export interface Flanks {
  sweep: Sweep;
  index: number;
  hz: number;
  fit: Fit | null;
  sigma: number;
}

/**
 * The farthest (or nearest) frequency on one side of a dip at which the trace may pass abs Γ = `level`, with
 * 95 % where a fit says so; null where the samples end before. Below the dip's lowest it is the dip itself.
 *
 * On the fit inside its window; else whole steps between samples that stand clear of the level by the
 * scatter.
 */
export function reachHz(flanks: Flanks, level: number, side: -1 | 1, end: "nearest" | "farthest") {
  return fromFit(flanks, level, side, end) ?? fromSamples(flanks, level, side, end);
}

function fromFit({ sweep, fit, hz }: Flanks, level: number, side: -1 | 1, end: "nearest" | "farthest") {
  if (!fit) return null;
  const at = side < 0 ? 0 : 1;
  const edges = edgesAt(fit.resonator, level * level);
  if (!edges) return end === "nearest" && level * level < fit.power + fit.powerHalf ? hz : null;
  const edge = hzAt(fit.resonator, edges[at]);
  const { from, to } = fit.window;
  if (edge < sweep.frequencyHz[from] || edge > sweep.frequencyHz[to]) return null;
  const half = fit.halfOf((resonator) => {
    const moved = edgesAt(resonator, level * level);
    return moved ? hzAt(resonator, moved[at]) : Number.NaN;
  });
  if (end === "farthest") return half === null ? null : edge + side * half;
  return half === null || (edge - side * half - hz) * side < 0 ? hz : edge - side * half;
}

function fromSamples({ sweep, index, hz, sigma }: Flanks, level: number, side: -1 | 1, end: string) {
  const { frequencyHz, magnitude } = sweep;
  const clear = end === "farthest" ? level + CLEAR_SIGMAS * sigma : level - CLEAR_SIGMAS * sigma;
  let i = index;
  while (magnitude[i] <= clear) i += side;
  if (end === "nearest") {
    const inner = frequencyHz[i === index ? index : i - side];
    return (inner - hz) * side > 0 ? inner : hz;
  }
  return Number.isNaN(magnitude[i] ?? Number.NaN) ? null : frequencyHz[i];
}

/** As for the vagueness of a lowest sample: higher by this is higher in truth. */
const CLEAR_SIGMAS = 4;
