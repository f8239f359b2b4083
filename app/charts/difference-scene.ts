/** Differences from one sweep over one another, as geometry: fractions of the plot's width across, px down. */
import { type FrequencyScale, frequencyAxis } from "./axis.ts";
import { decimate } from "./decimate.ts";
import { differenceTicks } from "./difference-path.ts";
import { type OverlayScene, type PlacedTrace, spreadNames } from "./overlay-scene.ts";
import { profilePaths } from "./paths.ts";

export interface DifferenceLine {
  id: string;
  label: string;
  /** What stands at the line's end. */
  short: string;
  /** Which of the trace styles. */
  style: number;
  /** Hz, ascending, and dB; NaN is a gap. */
  frequencyHz: ArrayLike<number>;
  db: ArrayLike<number>;
}

/** Drawn as an overlay is, around a level line at 0 dB. */
export function buildDifferenceScene(lines: readonly DifferenceLine[], scale: FrequencyScale): OverlayScene {
  const plotHeightPx = Math.max(LEAST_HEIGHT_PX, lines.length * PX_EACH + 20);
  const runs = lines.map(({ frequencyHz, db }) => decimate({ frequencyHz, magnitude: db }, scale, COLUMNS));
  const all = runs.flatMap((own) => own.flatMap(({ magnitudes }) => magnitudes));
  const { ticks, yOf } = differenceTicks(all, plotHeightPx);
  const traces = lines.map(({ id, label, short, style }, i): PlacedTrace => {
    const box = { width: PATH_WIDTH, heightPx: plotHeightPx, yOfMagnitude: yOf };
    const { line, offScale } = profilePaths(runs[i], box);
    const last = runs[i].at(-1);
    const end = last && {
      fraction: last.fractions[last.fractions.length - 1],
      y: yOf(last.magnitudes[last.magnitudes.length - 1]),
    };
    return { id, label, short, style, line: line + offScale, end: end ?? null };
  });
  return {
    frequency: frequencyAxis(scale),
    ribbon: [],
    valueTicks: ticks,
    traces: spreadNames(traces, plotHeightPx),
    links: [],
    plotHeightPx,
    pathWidth: PATH_WIDTH,
    levelY: yOf(0),
    remarks: [],
  };
}

const PATH_WIDTH = 1000;
const COLUMNS = 400;
const LEAST_HEIGHT_PX = 130;
const PX_EACH = 16;
