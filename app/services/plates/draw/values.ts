import type { ChartDip, ChartView } from "../../../charts/chart-types.ts";
import type { ChartPoints } from "../../../charts/decimate.ts";
import type { PlateDip, PlateFigure, PlateTrace } from "../record.ts";

/** A record's numbers as the charts take them: null is NaN there, and what is beyond every number Infinity. Pure. */

export function pointsOf({ frequencyHz, value }: Pick<PlateTrace, "frequencyHz" | "value">): ChartPoints {
  return { frequencyHz, magnitude: numbersOf(value) };
}

export function numbersOf(values: readonly (number | null)[]): number[] {
  return values.map((value) => value ?? Number.NaN);
}

export function viewOf({ frequency, quantity }: PlateFigure): ChartView {
  const { fromHz, toHz, scale } = frequency;
  return { quantity: quantity === "swr" ? "swr" : "rl", scale, fromHz, toHz };
}

export function chartDipOf(dip: PlateDip): ChartDip {
  const unlimited = {
    frequencyUncertaintyHz: dip.frequencyUncertaintyHz,
    minimumSwrNoiseLow: null,
    minimumSwrNoiseHigh: null,
    benchFrequencyHalfHz: null,
    qLimits: null,
    shares: [],
    unknown: [],
    sampleIndex: 0,
    advice: null,
  };
  return {
    ...dip,
    ...unlimited,
    minimumSwr: dip.minimumSwr ?? Number.POSITIVE_INFINITY,
    method: "sample",
    bandwidth: dip.bandwidth && {
      ...dip.bandwidth,
      widthUncertaintyHz: null,
      lowEdge: null,
      highEdge: null,
      fractional: null,
    },
    noteCount: 0,
    verdict: "open",
    verdictText: null,
    latestNote: null,
  };
}

export function bandsOf({ bands, show }: PlateFigure, design: boolean) {
  return show.bands ? bands.filter((band) => band.design === design) : [];
}

/** Those that are drawn and told apart by a letter: along the axis, or in a comparison row by row. */
export function drawnDips({ dips, focus, show }: PlateFigure): PlateDip[] {
  if (!show.dips) return [];
  return dips
    .filter(({ edge, id }) => !edge || id === focus)
    .sort((a, b) => a.frequencyHz - b.frequencyHz || (a.id < b.id ? -1 : 1));
}
