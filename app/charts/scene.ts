/**
 * Everything a sweep's chart shows, as geometry: fractions of the plot's width across, px down. The same scene
 * is drawn on a page of any width, at a fixed width for mails and plates, and under the zooming view.
 */
import { type FrequencyAxis, type FrequencyScale, frequencyAxis, frequencyScale } from "./axis.ts";
import type { ChartBand, ChartDip, ChartView } from "./chart-types.ts";
import { type ChartPoints, decimate, type Run } from "./decimate.ts";
import { betweenPath, type ProfileBox, profilePaths, waterPath } from "./paths.ts";
import { type RibbonBand, ribbonBands } from "./ribbon.ts";
import { type SceneDip, sceneDips } from "./scene-dips.ts";
import { type ValueTick, valueAxis } from "./value-axis.ts";

export interface SceneInput {
  points: ChartPoints;
  /** Limits per point, as abs Γ, drawn as a band around the line. */
  limits?: { low: ArrayLike<number>; high: ArrayLike<number> };
  /** abs Γ as measured at the same points where a correction does not hold, NaN elsewhere; drawn in grey. */
  measured?: ArrayLike<number>;
  dips: readonly ChartDip[];
  bands: readonly ChartBand[];
  designBands: readonly ChartBand[];
  view: ChartView;
  swrLimit: number;
  /** Height of the plot alone. */
  plotHeightPx?: number;
  /** Fixed width of the plot; without it the drawing fits any width. */
  plotWidthPx?: number;
}

export interface Scene {
  view: ChartView;
  scale: FrequencyScale;
  /** px from the plot's top for an abs Γ, not kept inside the plot. */
  yOfMagnitude: (magnitude: number) => number;
  plotHeightPx: number;
  /** Null when the drawing fits any width. */
  plotWidthPx: number | null;
  /** Width of the box the paths are in. */
  pathWidth: number;
  land: string;
  line: string;
  offScale: string;
  limits: string;
  /** The line as measured, outside the correction. */
  measured: string;
  valueTicks: ValueTick[];
  /** The SWR limit; null where it lies beyond the axis. */
  limit: { y: number; label: string } | null;
  frequency: FrequencyAxis;
  ribbon: RibbonBand[];
  waters: Water[];
  dips: SceneDip[];
  /** What is off the scale, in words. */
  remarks: string[];
  empty: boolean;
}

export interface Water {
  key: string;
  path: string;
  y: number;
  from: number;
  to: number;
  lowOpen: boolean;
  highOpen: boolean;
}

const FLUID_PATH_WIDTH = 1000;
const COLUMNS = 500;
const DEFAULT_PLOT_HEIGHT_PX = 300;

export function buildSweepScene(input: SceneInput): Scene {
  const { points, view, plotHeightPx = DEFAULT_PLOT_HEIGHT_PX, plotWidthPx } = input;
  const scale = frequencyScale(view.scale, view.fromHz, view.toHz);
  const columns = plotWidthPx ? Math.max(50, Math.round(plotWidthPx / 2)) : COLUMNS;
  const runs = decimate(points, scale, columns);
  const dips = input.dips.filter(({ frequencyHz: hz }) => hz >= scale.fromHz && hz <= scale.toHz);
  const grey = input.measured
    ? decimate({ frequencyHz: points.frequencyHz, magnitude: input.measured }, scale, columns)
    : [];
  const axis = valueAxis(view.quantity, plotHeightPx, rangeOf([...runs, ...grey], input.dips));
  const pathWidth = plotWidthPx ?? FLUID_PATH_WIDTH;
  const box: ProfileBox = { width: pathWidth, heightPx: plotHeightPx, yOfMagnitude: axis.yOfMagnitude };
  const paths = profilePaths(runs, box);
  const levelY = axis.yOfMagnitude(magnitudeOfSwr(input.swrLimit));
  const limitShown = levelY > 0 && levelY < plotHeightPx;
  const widths = plotWidthPx ? [plotWidthPx] : undefined;
  return {
    view,
    scale,
    yOfMagnitude: axis.yOfMagnitude,
    plotHeightPx,
    plotWidthPx: plotWidthPx ?? null,
    pathWidth,
    land: paths.land,
    line: paths.line,
    offScale: paths.offScale,
    limits: input.limits ? limitsPath(input, scale, columns, box) : "",
    measured: grey.length > 0 ? profilePaths(grey, box).line : "",
    valueTicks: axis.ticks,
    limit: limitShown ? { y: levelY, label: `SWR ${Number(input.swrLimit.toFixed(2))}` } : null,
    frequency: frequencyAxis(scale, widths),
    ribbon: ribbonBands(scale, input.bands, input.designBands, widths),
    waters: limitShown ? watersOf(dips, runs, box, levelY, scale) : [],
    dips: sceneDips(dips, input, scale, axis, runs),
    remarks: [paths.beyondTop && axis.beyondTop, paths.beyondBottom && axis.beyondBottom].filter(
      (remark): remark is string => Boolean(remark),
    ),
    empty: runs.length === 0 && grey.length === 0,
  };
}

function rangeOf(runs: readonly Run[], dips: readonly ChartDip[]) {
  let lowestMagnitude = Number.NaN;
  let highestMagnitude = Number.NaN;
  for (const { magnitudes } of runs) {
    for (const magnitude of magnitudes) {
      if (!(magnitude >= lowestMagnitude)) lowestMagnitude = magnitude;
      if (!(magnitude <= highestMagnitude)) highestMagnitude = magnitude;
    }
  }
  // Dips outside the view count, so that the axis stays as it is when the view moves.
  for (const dip of dips) {
    const magnitude = 10 ** (-dip.returnLossDb / 20);
    if (!(magnitude >= lowestMagnitude)) lowestMagnitude = magnitude;
  }
  return { lowestMagnitude, highestMagnitude };
}

function watersOf(
  dips: readonly ChartDip[],
  runs: readonly Run[],
  box: ProfileBox,
  levelY: number,
  scale: FrequencyScale,
): Water[] {
  const waters = new Map<string, Water>();
  for (const { bandwidth } of dips) {
    if (!bandwidth) continue;
    const from = bandwidth.lowHz === null ? 0 : Math.max(0, scale.fractionOf(bandwidth.lowHz));
    const to = bandwidth.highHz === null ? 1 : Math.min(1, scale.fractionOf(bandwidth.highHz));
    const key = `${bandwidth.lowHz} ${bandwidth.highHz}`;
    if (to <= from || waters.has(key)) continue;
    const [lowOpen, highOpen] = [bandwidth.lowHz === null, bandwidth.highHz === null];
    waters.set(key, {
      key,
      path: waterPath(runs, box, levelY, from, to),
      y: levelY,
      from,
      to,
      lowOpen,
      highOpen,
    });
  }
  return [...waters.values()];
}

function limitsPath(input: SceneInput, scale: FrequencyScale, columns: number, box: ProfileBox): string {
  const { limits, points } = input;
  if (!limits) return "";
  const high = decimate({ frequencyHz: points.frequencyHz, magnitude: limits.high }, scale, columns);
  const low = decimate({ frequencyHz: points.frequencyHz, magnitude: limits.low }, scale, columns);
  return betweenPath(high, low, box);
}

function magnitudeOfSwr(swr: number): number {
  return (swr - 1) / (swr + 1);
}
