import { analyse } from "../../app/measurement/analyse.ts";
import { trueLimits } from "../../app/measurement/limits/worst-case.ts";
import { gammaToSwr } from "../../app/measurement/reflection.ts";
import type { Dip } from "../../app/measurement/sweep.ts";
import { randomFrom } from "../screens/random.ts";
import { drawTrial, type Trial } from "./trial.ts";

/** What is claimed with 95 %, and what always. */
export const CLAIMS = ["frequency", "swr", "width"] as const;
export const WORST_CASES = ["swrLimits", "frequencyLimits", "widthLimits", "benchAlone"] as const;
type Claim = (typeof CLAIMS)[number] | (typeof WORST_CASES)[number];
/** How often a claim was made and how often it held. */
export type Count = Record<Claim, { made: number; held: number }>;

export interface Region {
  by: string;
  range: string;
  sweeps: number;
  counts: Count;
}

/** Simulated sweeps in regions: all, by one quantity each, and all four crossed. */
export function coverage(sweeps: number, start: number): Region[] {
  const random = randomFrom(start);
  const regions = new Map<string, Region>();
  for (let k = 0; k < sweeps; k++) {
    const trial = drawTrial(random);
    const claims = judge(trial);
    for (const [by, range] of placesOf(trial)) {
      const key = `${by}|${range}`;
      const region = regions.get(key) ?? { by, range, sweeps: 0, counts: nothing() };
      regions.set(key, region);
      region.sweeps++;
      for (const [claim, held] of Object.entries(claims) as [Claim, boolean | null][]) {
        if (held === null) continue;
        region.counts[claim].made++;
        if (held) region.counts[claim].held++;
      }
    }
  }
  const order = (region: Region) => BY.indexOf(region.by);
  return [...regions.values()].sort(
    (a, b) => order(a) - order(b) || a.range.localeCompare(b.range, "en", { numeric: true }),
  );
}

/** For each claim whether it held; null where nothing was claimed. */
export function judge({ sweep, swrLimit, trace, antenna }: Trial): Record<Claim, boolean | null> {
  const inner = analyse(sweep, { swrLimit }).dips.filter((dip) => !dip.edge);
  const off = (dip: Dip) => Math.abs(dip.frequencyHz - trace.hz);
  const dip = inner.sort((a, b) => off(a) - off(b)).at(0);
  if (!dip) return NOTHING_CLAIMED;
  const { bandwidth: band, frequencyUncertaintyHz: half, benchFrequencyHalfHz: benchHalf } = dip;
  const width = trace.highHz - trace.lowHz;
  const bench = sweep.benchLimits as NonNullable<typeof sweep.benchLimits>;
  const errors = { directivity: bench.directivity[0], tracking: bench.tracking[0], match: bench.match[0] };
  const alone = trueLimits(trace.magnitude, errors);
  return {
    frequency: half === null ? null : off(dip) <= half,
    swr: within(gammaToSwr(trace.magnitude), dip.minimumSwrNoiseLow, dip.minimumSwrNoiseHigh),
    width:
      !band || band.widthUncertaintyHz === null || Number.isNaN(width)
        ? null
        : Math.abs(band.widthHz - width) <= band.widthUncertaintyHz,
    swrLimits: within(gammaToSwr(antenna.magnitude), dip.minimumSwrLow, dip.minimumSwrHigh),
    frequencyLimits:
      half === null || benchHalf === null ? null : Math.abs(dip.frequencyHz - antenna.hz) <= half + benchHalf,
    widthLimits: within(antenna.highHz - antenna.lowHz, band?.widthLowHz ?? null, band?.widthHighHz ?? null),
    benchAlone: within(antenna.magnitude, alone.low, alone.high),
  };
}

function within(value: number, low: number | null, high: number | null): boolean | null {
  return low === null || high === null ? null : value >= low && value <= high;
}

function placesOf(trial: Trial): [string, string][] {
  const swr = rangeOf(trial.swr, [1.02, 1.1, 1.5, 3]);
  const points = rangeOf(trial.pointsPerBand, [3, 10, 40, 200]);
  const noise = rangeOf(trial.noiseDb, [0.01, 0.05, 0.15, 0.5]);
  const directivity = rangeOf(trial.directivityDb, [20, 28, 36, 45]);
  return [
    ["all", ""],
    ["lowest SWR", swr],
    ["points in the band", points],
    ["noise, dB", noise],
    ["directivity, dB", directivity],
    ["scatter", trial.kind],
    ["SWR × points × noise", `${swr} × ${points} × ${noise}`],
    ["SWR × points × noise × directivity", `${swr} × ${points} × ${noise} × ${directivity}`],
  ];
}

function rangeOf(value: number, borders: number[]): string {
  const i = Math.min(
    borders.length - 2,
    borders.findIndex((_, k) => value < borders[k + 1]),
  );
  return `${borders[i]}–${borders[i + 1]}`;
}

function nothing(): Count {
  const all = [...CLAIMS, ...WORST_CASES].map((claim) => [claim, { made: 0, held: 0 }]);
  return Object.fromEntries(all) as Count;
}

const BY = [
  "all",
  "lowest SWR",
  "points in the band",
  "noise, dB",
  "directivity, dB",
  "scatter",
  "SWR × points × noise",
  "SWR × points × noise × directivity",
];
const NOTHING_CLAIMED: Record<Claim, null> = {
  frequency: null,
  swr: null,
  width: null,
  swrLimits: null,
  frequencyLimits: null,
  widthLimits: null,
  benchAlone: null,
};
