/** What the zooming view over the plane of Γ is given: an unseen line to read out, in Γ's own coordinates. */
import { formatImpedance } from "../measurement/complex/format.ts";
import { gammaToImpedance, gammaToSwr } from "../measurement/reflection.ts";
import { formatFrequency, formatSwr } from "../measurement/units.ts";
import type { Palette } from "./palette.ts";
import type { SmithWindow } from "./SmithChart";
import type { ComplexPoints } from "./smith-trace.ts";

export interface SmithFigureInput {
  points: ComplexPoints;
  referenceOhm: number;
  window: SmithWindow;
  drag: "zoom" | "pan";
  palette: Palette;
}

export function smithFigure({ points, referenceOhm, window, drag, palette }: SmithFigureInput) {
  const { re, im, half } = window;
  const bare = { showgrid: false, zeroline: false, showticklabels: false, ticks: "" } as const;
  const bounds = { minallowed: -FARTHEST, maxallowed: FARTHEST };
  return {
    data: [
      {
        type: "scatter",
        mode: "lines",
        connectgaps: false,
        x: Array.from(points.re),
        y: Array.from(points.im),
        text: Array.from(points.re, (_, i) => spotWords(points, i, referenceOhm)),
        line: { color: "rgba(0,0,0,0)", width: 1 },
        hovertemplate: "%{text}<extra></extra>",
      },
    ],
    layout: {
      autosize: true,
      margin: { l: 0, r: 0, t: 0, b: 0 },
      paper_bgcolor: "rgba(0,0,0,0)",
      plot_bgcolor: "rgba(0,0,0,0)",
      showlegend: false,
      dragmode: drag,
      hovermode: "closest",
      hoverdistance: 24,
      hoverlabel: {
        bgcolor: palette.surface,
        bordercolor: palette.edge,
        align: "left",
        font: { family: "Sometype Mono Variable, monospace", size: 12.5, color: palette.ink },
      },
      xaxis: { ...bare, ...bounds, range: [re - half, re + half] },
      yaxis: { ...bare, ...bounds, range: [im - half, im + half], scaleanchor: "x" },
    },
  } as const;
}

/** The square that holds what a change of the view asks for, inside the whole; null where it asks for none. */
export function windowIn(event: Record<string, unknown>): SmithWindow | null {
  const [left, right] = [event["xaxis.range[0]"], event["xaxis.range[1]"]];
  const [bottom, top] = [event["yaxis.range[0]"], event["yaxis.range[1]"]];
  if ([left, right, bottom, top].some((edge) => typeof edge !== "number" || !Number.isFinite(edge)))
    return null;
  const [a, b, c, d] = [left, right, bottom, top] as number[];
  const half = Math.min(FARTHEST, Math.max(SMALLEST, Math.abs(b - a) / 2, Math.abs(d - c) / 2));
  const inside = (middle: number) => Math.min(FARTHEST - half, Math.max(half - FARTHEST, middle));
  return { re: inside((a + b) / 2), im: inside((c + d) / 2), half };
}

/** `14.2 MHz`, `35.7 + j4.2 Ω`, `SWR 1.42`, one under the other. */
function spotWords({ frequencyHz, re, im }: ComplexPoints, i: number, referenceOhm: number): string {
  const z = gammaToImpedance({ re: re[i], im: im[i] }, referenceOhm);
  const swr = gammaToSwr(Math.hypot(re[i], im[i]));
  return `${formatFrequency(frequencyHz[i])}<br>${formatImpedance(z)}<br>SWR ${formatSwr(swr)}`;
}

/** The whole drawing's half side. */
const FARTHEST = 1.18;
/** Fifty times closer than the whole. */
const SMALLEST = 0.024;
