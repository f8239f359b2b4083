/** Several sweeps over one another on one axis, as geometry: fractions of the plot's width across, px down. */
import { type FrequencyAxis, frequencyAxis, frequencyScale } from "./axis.ts";
import type { ChartBand, ChartView } from "./chart-types.ts";
import { type ChartPoints, decimate } from "./decimate.ts";
import { profilePaths } from "./paths.ts";
import { type RibbonBand, ribbonBands } from "./ribbon.ts";
import { type ValueTick, valueAxis } from "./value-axis.ts";

export interface Trace {
  /** Lasting and unique among the traces. */
  id: string;
  label: string;
  /** What stands at the line's end, where the label is long. */
  short?: string;
  points: ChartPoints;
}

/** A dip that is in two of the traces, or in one. */
export interface DipLink {
  id: string;
  stops: { traceId: string; frequencyHz: number; returnLossDb: number }[];
}

export interface OverlayInput {
  traces: readonly Trace[];
  links?: readonly DipLink[];
  bands: readonly ChartBand[];
  designBands: readonly ChartBand[];
  view: ChartView;
  plotHeightPx?: number;
  /** Fixed width of the plot; without it the drawing fits any width. */
  plotWidthPx?: number;
}

export interface PlacedTrace {
  id: string;
  label: string;
  short: string;
  /** Which of the trace styles. */
  style: number;
  line: string;
  /** Where its name stands, at its right end; null where it has no points in view. */
  end: { fraction: number; y: number } | null;
}

export interface OverlayScene {
  frequency: FrequencyAxis;
  ribbon: RibbonBand[];
  valueTicks: ValueTick[];
  traces: PlacedTrace[];
  links: { id: string; stops: { style: number; fraction: number; y: number }[] }[];
  plotHeightPx: number;
  pathWidth: number;
  /** A line straight across, of nothing changed; absent where there is none. */
  levelY?: number;
  remarks: string[];
}

const PATH_WIDTH = 1000;
const COLUMNS = 500;
const PLOT_HEIGHT_PX = 280;
const NAME_GAP_PX = 15;

export function buildOverlayScene(input: OverlayInput): OverlayScene {
  const { view, plotHeightPx = PLOT_HEIGHT_PX, links = [], plotWidthPx } = input;
  const pathWidth = plotWidthPx ?? PATH_WIDTH;
  const widths = plotWidthPx ? [plotWidthPx] : undefined;
  const scale = frequencyScale(view.scale, view.fromHz, view.toHz);
  const drawn = input.traces.map((trace) => ({ trace, runs: decimate(trace.points, scale, COLUMNS) }));
  const all = drawn.flatMap(({ runs }) => runs.flatMap(({ magnitudes }) => magnitudes));
  const depths = links.flatMap(({ stops }) => stops.map(({ returnLossDb }) => 10 ** (-returnLossDb / 20)));
  const axis = valueAxis(view.quantity, plotHeightPx, {
    lowestMagnitude: least([...all, ...depths]),
    highestMagnitude: all.reduce((high, value) => Math.max(high, value), Number.NEGATIVE_INFINITY),
  });
  const keep = (y: number) => Math.min(plotHeightPx, Math.max(0, y));
  const paths = drawn.map(({ runs }) =>
    profilePaths(runs, { width: pathWidth, heightPx: plotHeightPx, yOfMagnitude: axis.yOfMagnitude }),
  );
  const traces = drawn.map(({ trace, runs }, style): PlacedTrace => {
    const last = runs.at(-1);
    const end = last && {
      fraction: last.fractions[last.fractions.length - 1],
      y: keep(axis.yOfMagnitude(last.magnitudes[last.magnitudes.length - 1])),
    };
    const { line, offScale } = paths[style];
    const { id, label, short = label } = trace;
    return { id, label, short, style, line: line + offScale, end: end ?? null };
  });
  const styleOf = new Map(traces.map(({ id, style }) => [id, style]));
  return {
    frequency: frequencyAxis(scale, widths),
    ribbon: ribbonBands(scale, input.bands, input.designBands, widths),
    valueTicks: axis.ticks,
    traces: spreadNames(traces, plotHeightPx),
    links: links.map(({ id, stops }) => ({
      id,
      stops: stops
        .filter(({ frequencyHz: hz }) => hz >= scale.fromHz && hz <= scale.toHz)
        .map(({ traceId, frequencyHz, returnLossDb }) => ({
          style: styleOf.get(traceId) ?? 0,
          fraction: scale.fractionOf(frequencyHz),
          y: keep(axis.yOfMagnitude(10 ** (-returnLossDb / 20))),
        })),
    })),
    plotHeightPx,
    pathWidth,
    remarks: [
      paths.some(({ beyondTop }) => beyondTop) && axis.beyondTop,
      paths.some(({ beyondBottom }) => beyondBottom) && axis.beyondBottom,
    ].filter((remark): remark is string => Boolean(remark)),
  };
}

/** Names that would stand on one another move apart, the upper ones staying. */
export function spreadNames(traces: PlacedTrace[], heightPx: number): PlacedTrace[] {
  let free = 10;
  const moved = new Map<string, number>();
  const ends = traces.flatMap(({ id, end }) => (end ? [{ id, y: end.y }] : [])).sort((a, b) => a.y - b.y);
  for (const { id, y } of ends) {
    const at = Math.min(heightPx - 4, Math.max(free, y));
    moved.set(id, at);
    free = at + NAME_GAP_PX;
  }
  return traces.map((trace) =>
    trace.end ? { ...trace, end: { ...trace.end, y: moved.get(trace.id) ?? trace.end.y } } : trace,
  );
}

function least(values: readonly number[]): number {
  return values.reduce((low, value) => (value < low || Number.isNaN(low) ? value : low), Number.NaN);
}
