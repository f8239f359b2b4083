import type { ChartDip } from "../../app/charts/chart-types.ts";

/** Invented numbers for drawing tests. */

export function points(count: number, magnitude: (index: number) => number, fromHz = 1e6, toHz = 30e6) {
  const step = count > 1 ? (toHz - fromHz) / (count - 1) : 0;
  return {
    frequencyHz: Float64Array.from({ length: count }, (_, index) => fromHz + index * step),
    magnitude: Float64Array.from({ length: count }, (_, index) => magnitude(index)),
  };
}

export function chartDip(change: Partial<ChartDip> = {}): ChartDip {
  return {
    id: "dip-a",
    frequencyHz: 7.1e6,
    frequencyUncertaintyHz: 900,
    minimumSwr: 1.22,
    minimumSwrLow: 1.12,
    minimumSwrHigh: 1.31,
    minimumSwrNoiseLow: null,
    minimumSwrNoiseHigh: null,
    returnLossDb: 20,
    returnLossLowDb: null,
    returnLossHighDb: null,
    benchFrequencyHalfHz: null,
    prominenceDb: 18,
    bandwidth: {
      limitSwr: 2,
      lowHz: 7e6,
      highHz: 7.2e6,
      widthHz: 200e3,
      widthUncertaintyHz: null,
      widthLowHz: null,
      widthHighHz: null,
      lowEdge: null,
      highEdge: null,
      open: false,
      shared: false,
      fractional: 0.028,
    },
    q: 20,
    qLow: null,
    qHigh: null,
    qLimits: null,
    shares: [],
    unknown: [],
    method: "fit",
    edge: false,
    sampleIndex: 3,
    advice: null,
    noteCount: 0,
    verdict: "open",
    verdictText: null,
    latestNote: null,
    inDesignBand: null,
    ...change,
  };
}

/** Numbers of a path, pair by pair. */
export function pathNumbers(path: string): number[] {
  return (path.match(/-?\d+(\.\d+)?(e-?\d+)?/g) ?? []).map(Number);
}
