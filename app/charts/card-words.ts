/** What a hollow card says besides its numbers. */

import { formatWidth } from "../measurement/units.ts";
import type { ChartBand, ChartDip } from "./chart-types.ts";

export type CardTone = "moss" | "heather" | "clay" | "plain";

/** A dip this near (as a share of its frequency) to a design band is said to be beside it. */
const BESIDE_SHARE = 0.1;

/** The verdict in words, with the tone of its edge. */
export function cardVerdict(
  dip: ChartDip,
  designBands: readonly ChartBand[],
): { text: string; tone: CardTone } {
  if (dip.verdict !== "open") {
    const text = dip.verdictText ? `${dip.verdict}: ${dip.verdictText}` : dip.verdict;
    return { text, tone: dip.verdict === "settled" ? "moss" : "heather" };
  }
  if (dip.inDesignBand === false) {
    const beside = offsetFromBand(dip, designBands);
    return { text: beside ? `open, ${beside}` : "open, outside the design bands", tone: "clay" };
  }
  return { text: dip.inDesignBand ? "open, in its design band" : "open", tone: "plain" };
}

/** `36 kHz above 17 m` for a dip beside a design band; null when none is near. */
export function offsetFromBand(dip: ChartDip, designBands: readonly ChartBand[]): string | null {
  const hz = dip.frequencyHz;
  const near = nearestBand(hz, designBands);
  if (!near) return null;
  const off = hz < near.lowHz ? near.lowHz - hz : hz - near.highHz;
  if (off <= 0 || off > hz * BESIDE_SHARE) return null;
  return `${formatWidth(off)} ${hz < near.lowHz ? "below" : "above"} ${near.name}`;
}

export interface WidthBar {
  /** Shares of the bar; the design band is null where none is near. */
  band: { from: number; width: number } | null;
  dip: { from: number; width: number } | null;
  at: number;
}

/** The dip's width against its nearest design band, on one short scale that holds both. */
export function widthBar(dip: ChartDip, designBands: readonly ChartBand[]): WidthBar {
  const hz = dip.frequencyHz;
  const near = nearestBand(hz, designBands);
  const band = near && distance(hz, near) <= hz * BESIDE_SHARE ? near : null;
  const edges = dip.bandwidth && {
    lowHz: dip.bandwidth.lowHz ?? hz - dip.bandwidth.widthHz,
    highHz: dip.bandwidth.highHz ?? hz + dip.bandwidth.widthHz,
  };
  const lows = [hz, band?.lowHz, edges?.lowHz].filter((value) => value !== undefined && value !== null);
  const highs = [hz, band?.highHz, edges?.highHz].filter((value) => value !== undefined && value !== null);
  const [low, high] = [Math.min(...lows), Math.max(...highs)];
  const span = Math.max(high - low, hz * 1e-4);
  const pad = band ? span * 0.15 : span * 0.5;
  const from = (low + high - span) / 2 - pad;
  const share = (value: number) => (value - from) / (span + 2 * pad);
  const stretch = (range: { lowHz: number; highHz: number } | null) =>
    range && { from: share(range.lowHz), width: share(range.highHz) - share(range.lowHz) };
  return { band: stretch(band), dip: stretch(edges), at: share(hz) };
}

function nearestBand(hz: number, bands: readonly ChartBand[]): ChartBand | null {
  return bands.reduce<ChartBand | null>(
    (best, band) => (best === null || distance(hz, band) < distance(hz, best) ? band : best),
    null,
  );
}

function distance(hz: number, band: ChartBand): number {
  return Math.max(0, band.lowHz - hz, hz - band.highHz);
}
