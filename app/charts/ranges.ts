/** Stretches of the frequency axis: closer, further away, along it. All on the axis's own scale, inside the sweep. */
import { type FrequencyScaleKind, frequencyScale } from "./axis.ts";
import type { ChartPoints } from "./decimate.ts";

export interface FrequencyRange {
  fromHz: number;
  toHz: number;
}

/** No closer than this share of the whole axis. */
const SMALLEST_SHARE = 1e-4;

/**
 * `factor` times the stretch now shown around a frequency in it (its middle where that lies outside), moved
 * back inside the whole sweep where it would reach beyond.
 */
export function zoomRange(
  now: FrequencyRange,
  whole: FrequencyRange,
  kind: FrequencyScaleKind,
  factor: number,
  aroundHz?: number | null,
): FrequencyRange {
  const scale = frequencyScale(kind, whole.fromHz, whole.toHz);
  const [from, to] = [scale.fractionOf(now.fromHz), scale.fractionOf(now.toHz)];
  const width = Math.min(1, Math.max(SMALLEST_SHARE, (to - from) * factor));
  const asked = aroundHz ? scale.fractionOf(aroundHz) : Number.NaN;
  const middle = asked >= from && asked <= to ? asked : (from + to) / 2;
  return inside(scale, middle - width / 2, width);
}

/** The same width moved along by `share` of itself; negative is towards lower frequencies. */
export function shiftRange(
  now: FrequencyRange,
  whole: FrequencyRange,
  kind: FrequencyScaleKind,
  share: number,
): FrequencyRange {
  const scale = frequencyScale(kind, whole.fromHz, whole.toHz);
  const [from, to] = [scale.fractionOf(now.fromHz), scale.fractionOf(now.toHz)];
  return inside(scale, from + (to - from) * share, Math.min(1, to - from));
}

export function sameRange(a: FrequencyRange, b: FrequencyRange): boolean {
  const slack = (b.toHz - b.fromHz) * 1e-6;
  return Math.abs(a.fromHz - b.fromHz) <= slack && Math.abs(a.toHz - b.toHz) <= slack;
}

/** Fine points of one stretch laid into coarser ones of the whole sweep. */
export function mergePoints(whole: ChartPoints, fine: ChartPoints): ChartPoints {
  const count = fine.frequencyHz.length;
  if (count === 0 || whole === fine) return whole;
  const [first, last] = [fine.frequencyHz[0], fine.frequencyHz[count - 1]];
  const frequencyHz: number[] = [];
  const magnitude: number[] = [];
  const take = (points: ChartPoints, wanted: (hz: number) => boolean) => {
    for (let index = 0; index < points.frequencyHz.length; index++) {
      if (!wanted(points.frequencyHz[index])) continue;
      frequencyHz.push(points.frequencyHz[index]);
      magnitude.push(points.magnitude[index]);
    }
  };
  take(whole, (hz) => hz < first);
  take(fine, () => true);
  take(whole, (hz) => hz > last);
  return { frequencyHz, magnitude };
}

function inside(scale: ReturnType<typeof frequencyScale>, start: number, width: number): FrequencyRange {
  const from = Math.min(Math.max(0, start), Math.max(0, 1 - width));
  const to = Math.min(1, from + width);
  return {
    fromHz: from <= 0 ? scale.fromHz : scale.hzAt(from),
    toHz: to >= 1 ? scale.toHz : scale.hzAt(to),
  };
}
