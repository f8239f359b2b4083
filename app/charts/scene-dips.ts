/** The dips of a scene: where each stands, its cairn, how it hangs off the ribbon, and its spoken words. */

import { formatSwr, formatWidth } from "../measurement/units.ts";
import type { FrequencyScale } from "./axis.ts";
import type { ChartBand, ChartDip } from "./chart-types.ts";
import type { Run } from "./decimate.ts";
import { type Hang, hangOf } from "./ribbon.ts";
import type { ValueAxis } from "./value-axis.ts";
import { formatNoteCount, speakFrequency } from "./words.ts";

export interface SceneDip {
  id: string;
  dip: ChartDip;
  fraction: number;
  /** The lowest point, px from the plot's top, on the axis. */
  y: number;
  /** Where the drawn line ends over it: a fitted dip can lie deeper than any of its samples. */
  lineY: number;
  /** Top of the cairn. */
  cairnY: number;
  stones: number;
  hang: Hang | null;
  spoken: string;
}

/** More notes than stones: the heap stays this high and its card says how many. */
export const MOST_STONES = 5;
export const STONE_HEIGHT_PX = 6;
const CAIRN_GAP_PX = 8;

export function sceneDips(
  dips: readonly ChartDip[],
  { bands, designBands }: { bands: readonly ChartBand[]; designBands: readonly ChartBand[] },
  scale: FrequencyScale,
  axis: ValueAxis,
  runs: readonly Run[],
): SceneDip[] {
  return dips.map((dip) => {
    const stones = Math.min(MOST_STONES, dip.noteCount);
    const raw = axis.yOfMagnitude(10 ** (-dip.returnLossDb / 20));
    const y = Math.min(axis.heightPx, Math.max(0, Number.isNaN(raw) ? 0 : raw));
    const fraction = scale.fractionOf(dip.frequencyHz);
    const highest = axis.heightPx - Math.max(1, stones) * STONE_HEIGHT_PX - 2;
    return {
      id: dip.id,
      dip,
      fraction,
      y,
      lineY: Math.min(y, deepestNear(runs, fraction, axis) ?? y),
      cairnY: Math.min(y + CAIRN_GAP_PX, highest),
      stones,
      hang: hangOf(dip, bands, designBands),
      spoken: speakDip(dip),
    };
  });
}

/** The lowest place of the line beside a dip; null where nothing is drawn there. */
function deepestNear(runs: readonly Run[], fraction: number, axis: ValueAxis): number | null {
  let lowest = Number.POSITIVE_INFINITY;
  for (const run of runs) {
    for (const [index, at] of run.fractions.entries()) {
      if (Math.abs(at - fraction) <= BESIDE) lowest = Math.min(lowest, run.magnitudes[index]);
    }
  }
  const y = axis.yOfMagnitude(lowest);
  return Number.isFinite(y) ? Math.min(axis.heightPx, Math.max(0, y)) : null;
}

/** How far from a dip, as a share of the plot, its own samples are looked for. */
const BESIDE = 0.006;

/** `Dip at 7.118 megahertz, lowest SWR 1.23, under SWR 2 over 410 kHz, open, 2 notes` */
export function speakDip(dip: ChartDip): string {
  const { bandwidth } = dip;
  const width = bandwidth
    ? `under SWR ${bandwidth.limitSwr} over ${bandwidth.open ? "at least " : ""}${formatWidth(bandwidth.widthHz)}`
    : "never under the SWR limit";
  return [
    `Dip at ${speakFrequency(dip.frequencyHz, dip.frequencyUncertaintyHz)}`,
    `lowest SWR ${formatSwr(dip.minimumSwr)}`,
    width,
    dip.inDesignBand === false && "outside the design bands",
    dip.verdictText ? `${dip.verdict}: ${dip.verdictText}` : dip.verdict,
    formatNoteCount(dip.noteCount),
  ]
    .filter(Boolean)
    .join(", ");
}
