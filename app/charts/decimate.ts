/**
 * The points that a line of a given number of columns can show: in each column the first, the lowest, the
 * highest and the last, in their order, so that no dip and no spike is lost. A gap (NaN) ends a run.
 */
import type { FrequencyScale } from "./axis.ts";

export interface ChartPoints {
  /** Hz, ascending. */
  frequencyHz: ArrayLike<number>;
  /** abs Γ; NaN is a gap. */
  magnitude: ArrayLike<number>;
}

export interface Run {
  /** 0 to 1 of the plot's width, ascending. */
  fractions: number[];
  magnitudes: number[];
}

export function decimate(points: ChartPoints, scale: FrequencyScale, columns: number): Run[] {
  const { frequencyHz, magnitude } = points;
  const from = lowerBound(frequencyHz, scale.fromHz);
  const to = upperBound(frequencyHz, scale.toHz);
  const runs: Run[] = [];
  let run: Run | null = null;
  const push = (hz: number, value: number) => {
    if (Number.isNaN(value)) {
      run = null;
      return;
    }
    if (!run) {
      run = { fractions: [], magnitudes: [] };
      runs.push(run);
    }
    run.fractions.push(Math.min(1, Math.max(0, scale.fractionOf(hz))));
    run.magnitudes.push(value);
  };
  if (from > 0 && from < frequencyHz.length && frequencyHz[from] > scale.fromHz) {
    push(scale.fromHz, between(points, from, scale.fromHz));
  }
  const keepAll = to - from <= columns * 4;
  let index = from;
  while (index < to) {
    const end = keepAll ? index + 1 : columnEnd(frequencyHz, scale, columns, index, to);
    for (const kept of columnPoints(magnitude, index, end)) push(frequencyHz[kept], magnitude[kept]);
    index = end;
  }
  if (to > 0 && to < frequencyHz.length && frequencyHz[to - 1] < scale.toHz) {
    push(scale.toHz, between(points, to, scale.toHz));
  }
  return runs;
}

/** Index after the last point of the column that `start` lies in. */
function columnEnd(
  frequencyHz: ArrayLike<number>,
  scale: FrequencyScale,
  columns: number,
  start: number,
  to: number,
): number {
  const column = Math.floor(scale.fractionOf(frequencyHz[start]) * columns);
  const edgeHz = scale.hzAt((column + 1) / columns);
  let end = start + 1;
  while (end < to && frequencyHz[end] < edgeHz) end++;
  return end;
}

function columnPoints(magnitude: ArrayLike<number>, start: number, end: number): number[] {
  if (end - start <= 4) return Array.from({ length: end - start }, (_, offset) => start + offset);
  const kept = new Set([start, end - 1]);
  let lowest = -1;
  let highest = -1;
  let gap = -1;
  for (let index = start; index < end; index++) {
    const value = magnitude[index];
    if (Number.isNaN(value)) {
      gap = index;
      continue;
    }
    if (lowest < 0 || value < magnitude[lowest]) lowest = index;
    if (highest < 0 || value > magnitude[highest]) highest = index;
  }
  for (const index of [lowest, highest, gap]) if (index >= 0) kept.add(index);
  return [...kept].sort((a, b) => a - b);
}

/** abs Γ at `hz` on the straight line between the points `index - 1` and `index`. */
function between({ frequencyHz, magnitude }: ChartPoints, index: number, hz: number): number {
  const share = (hz - frequencyHz[index - 1]) / (frequencyHz[index] - frequencyHz[index - 1]);
  return magnitude[index - 1] + share * (magnitude[index] - magnitude[index - 1]);
}

export function lowerBound(values: ArrayLike<number>, target: number): number {
  let low = 0;
  let high = values.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (values[middle] < target) low = middle + 1;
    else high = middle;
  }
  return low;
}

function upperBound(values: ArrayLike<number>, target: number): number {
  let low = 0;
  let high = values.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (values[middle] <= target) low = middle + 1;
    else high = middle;
  }
  return low;
}
