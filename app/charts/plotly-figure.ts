/** What the zooming view is given: our line in our own coordinates, so that it lies exactly on the drawing. */
import { formatDb, formatFrequency, formatSwr } from "../measurement/units.ts";
import type { FrequencyScaleKind } from "./axis.ts";
import type { ChartPoints } from "./decimate.ts";
import type { Palette } from "./palette.ts";
import type { FrequencyRange } from "./ranges.ts";

export interface FigureLine {
  /** Hz, or its decimal logarithm on a logarithmic axis. */
  x: number[];
  /** px over the plot's bottom; null in gaps and beyond the first point off the scale. */
  y: (number | null)[];
  /** The same with what is off the scale at the edge, so that it can still be read out. */
  readY: (number | null)[];
  words: string[];
}

export function figureLine(
  points: ChartPoints,
  scale: FrequencyScaleKind,
  yOfMagnitude: (magnitude: number) => number,
  plotHeightPx: number,
): FigureLine {
  const line: FigureLine = { x: [], y: [], readY: [], words: [] };
  const count = points.frequencyHz.length;
  const overBottom = Array.from(
    { length: count },
    (_, index) => plotHeightPx - yOfMagnitude(points.magnitude[index]),
  );
  const onScale = (index: number) => overBottom[index] >= 0 && overBottom[index] <= plotHeightPx;
  for (let index = 0; index < count; index++) {
    const edge = Math.min(plotHeightPx, Math.max(0, overBottom[index]));
    const read = Number.isNaN(edge) ? null : edge;
    // The pen runs on to the first point beyond the edge, where the dashes take over.
    const drawn = onScale(index) || onScale(index - 1) || onScale(index + 1);
    line.x.push(axisValue(points.frequencyHz[index], scale));
    line.y.push(drawn ? read : null);
    line.readY.push(read);
    line.words.push(pointWords(points.frequencyHz[index], points.magnitude[index]));
  }
  return line;
}

/** `7.118 MHz`, `SWR 1.23`, `return loss 19.7 dB`, one under the other. */
export function pointWords(hz: number, magnitude: number): string {
  const swr = magnitude >= 1 ? Number.POSITIVE_INFINITY : (1 + magnitude) / (1 - magnitude);
  return `${formatFrequency(hz)}<br>SWR ${formatSwr(swr)}<br>return loss ${formatDb(-20 * Math.log10(magnitude))}`;
}

export function axisValue(hz: number, scale: FrequencyScaleKind): number {
  return scale === "log" ? Math.log10(hz) : hz;
}

export function axisHz(value: number, scale: FrequencyScaleKind): number {
  return scale === "log" ? 10 ** value : value;
}

export interface FigureLayoutInput {
  range: FrequencyRange;
  whole: FrequencyRange;
  scale: FrequencyScaleKind;
  plotHeightPx: number;
  drag: "zoom" | "pan";
  palette: Palette;
}

/** No margins, no ground, no axes of its own: those are the drawing's. */
export function figureLayout({ range, whole, scale, plotHeightPx, drag, palette }: FigureLayoutInput) {
  const bare = { showgrid: false, zeroline: false, showticklabels: false, ticks: "" } as const;
  return {
    autosize: true,
    height: plotHeightPx,
    margin: { l: 0, r: 0, t: 0, b: 0 },
    paper_bgcolor: "rgba(0,0,0,0)",
    plot_bgcolor: "rgba(0,0,0,0)",
    showlegend: false,
    dragmode: drag,
    hovermode: "x",
    hoverlabel: {
      bgcolor: palette.surface,
      bordercolor: palette.edge,
      align: "left",
      font: { family: "Sometype Mono Variable, monospace", size: 12.5, color: palette.ink },
    },
    xaxis: {
      ...bare,
      range: [axisValue(range.fromHz, scale), axisValue(range.toHz, scale)],
      minallowed: axisValue(whole.fromHz, scale),
      maxallowed: axisValue(whole.toHz, scale),
      showspikes: true,
      spikemode: "across",
      spikesnap: "data",
      spikethickness: 1,
      spikedash: "solid",
      spikecolor: palette.soft,
      hoverformat: "",
    },
    yaxis: { ...bare, range: [0, plotHeightPx], fixedrange: true },
  } as const;
}
