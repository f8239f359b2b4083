import { completeDip, type StoredDip } from "../../measurement/dips/complete.ts";
import type { Bandwidth, Dip } from "../../measurement/sweep.ts";
import { DEFAULT_SETTINGS } from "../../measurement/sweep.ts";
import {
  formatDbLimits,
  formatFrequency,
  formatRange,
  formatSwr,
  formatWidth,
  formatWidthLimits,
} from "../../measurement/units.ts";

/** The numbers under a figure, in words: with their limits, and "unknown" for what is not known. Pure. */

export interface Numbers {
  columns: string[];
  rows: string[][];
}

export function dipTable(numbers: StoredDip, swrLimit: number = DEFAULT_SETTINGS.swrLimit): Numbers {
  const dip = completeDip(numbers);
  return {
    columns: ["Of the dip", "Number", "Limits"],
    rows: [
      [
        "Frequency",
        formatFrequency(dip.frequencyHz, dip.frequencyUncertaintyHz),
        halfWidth(dip.frequencyUncertaintyHz),
      ],
      [
        "Lowest SWR",
        formatSwr(dip.minimumSwr, dip.minimumSwrLow, dip.minimumSwrHigh).split(" ")[0],
        limits(dip.minimumSwrLow, dip.minimumSwrHigh, formatRange(dip.minimumSwrLow, dip.minimumSwrHigh)),
      ],
      [
        "Return loss",
        formatDbLimits(dip.returnLossDb, dip.returnLossLowDb, dip.returnLossHighDb).split(" (")[0],
        inBrackets(formatDbLimits(dip.returnLossDb, dip.returnLossLowDb, dip.returnLossHighDb)),
      ],
      [
        `${Number((dip.bandwidth?.limitSwr ?? swrLimit).toFixed(2))}:1 bandwidth`,
        widthWords(dip.bandwidth),
        widthLimits(dip.bandwidth),
      ],
    ],
  };
}

export function sweepTable(
  dips: readonly Dip[],
  swrLimit: number = DEFAULT_SETTINGS.swrLimit,
): Numbers | null {
  if (dips.length === 0) return null;
  return {
    columns: ["Dip", "Lowest SWR (limits)", `${Number(swrLimit.toFixed(2))}:1 bandwidth`],
    rows: dips.map((dip) => [
      formatFrequency(dip.frequencyHz, dip.frequencyUncertaintyHz),
      swrWords(dip),
      widthWords(dip.bandwidth),
    ]),
  };
}

function swrWords({ minimumSwr, minimumSwrLow, minimumSwrHigh }: Dip): string {
  const unknown = minimumSwrLow === null && minimumSwrHigh === null;
  return `${formatSwr(minimumSwr, minimumSwrLow, minimumSwrHigh)}${unknown ? " (limits unknown)" : ""}`;
}

function widthWords(bandwidth: Bandwidth | null): string {
  if (!bandwidth) return "none: the SWR does not get as low";
  const width = formatWidth(bandwidth.widthHz, bandwidth.widthUncertaintyHz);
  const shared = bandwidth.shared ? ", shared with another dip" : "";
  return `${bandwidth.open ? "at least " : ""}${width}${shared}`;
}

function widthLimits(bandwidth: Bandwidth | null): string {
  if (!bandwidth) return "";
  const { widthHz, widthLowHz, widthHighHz, widthUncertaintyHz } = bandwidth;
  if (widthLowHz !== null && widthHighHz !== null) {
    return inBrackets(formatWidthLimits(widthHz, widthLowHz, widthHighHz));
  }
  return halfWidth(widthUncertaintyHz);
}

function halfWidth(hz: number | null): string {
  return hz === null ? "unknown" : `± ${formatWidth(hz, hz)} (95 %)`;
}

function limits(low: number | null, high: number | null, words: string): string {
  return low === null || high === null ? "unknown" : words;
}

function inBrackets(words: string): string {
  return /\(([^)]*)\)/.exec(words)?.[1] ?? "unknown";
}
