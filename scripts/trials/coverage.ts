import { analyse } from "../../app/measurement/analyse.ts";
import { trueLimits } from "../../app/measurement/limits/worst-case.ts";
import { gammaToSwr } from "../../app/measurement/reflection.ts";
import type { Dip } from "../../app/measurement/sweep.ts";
import { type Random, randomFrom } from "../screens/random.ts";
import { drawTrial, EVERYWHERE, type Kind, type Ranges, type Trial } from "./trial.ts";

/** What is claimed with 95 %, and what always. */
export const CLAIMS = ["frequency", "swr", "width"] as const;
export const WORST_CASES = ["swrLimits", "frequencyLimits", "widthLimits", "benchAlone"] as const;
type Claim = (typeof CLAIMS)[number] | (typeof WORST_CASES)[number];
/** How often a claim was made and how often it held. */
export type Count = Record<Claim, { made: number; held: number }>;

export interface Region {
  by: string;
  /** What its sweeps are drawn from; null where that can't be asked for (a method). */
  ranges: Partial<Ranges> | null;
  kind: Kind | null;
  range: string;
  sweeps: number;
  counts: Count;
}

/**
 * Simulated sweeps in regions: all, by one quantity each, all four crossed, and by the method that told the
 * lowest point. A region where a claim seems to hold in less than `least` gets sweeps of its own until `enough`
 * claims were made, so that chance does not decide.
 */
export function coverage(sweeps: number, start: number, least: number, enough: number): Region[] {
  const random = randomFrom(start);
  const regions = new Map<string, Region>();
  for (let k = 0; k < sweeps; k++) {
    const trial = drawTrial(random);
    const verdict = judge(trial);
    for (const place of placesOf(trial, verdict.method)) {
      const key = `${place.by}|${place.range}`;
      const region = regions.get(key) ?? { ...place, sweeps: 0, counts: nothing() };
      regions.set(key, region);
      add(region, verdict.claims);
    }
  }
  for (const region of regions.values()) if (region.ranges) repeatWeak(region, random, least, enough);
  const order = (region: Region) => BY.indexOf(region.by);
  return [...regions.values()].sort(
    (a, b) => order(a) - order(b) || a.range.localeCompare(b.range, "en", { numeric: true }),
  );
}

/** All the way to `enough` once begun: to stop as soon as the share is right would flatter it. */
function repeatWeak(region: Region, random: Random, least: number, enough: number): void {
  const weak = CLAIMS.filter((claim) => {
    const { made, held } = region.counts[claim];
    return made >= FEWEST && held < least * made;
  });
  while (weak.some((claim) => region.counts[claim].made < enough))
    for (let k = 0; k < BATCH; k++)
      add(region, judge(drawTrial(random, { ...EVERYWHERE, ...region.ranges }, region.kind)).claims);
}

function add(region: Region, claims: Claims): void {
  region.sweeps++;
  for (const [claim, held] of Object.entries(claims) as [Claim, boolean | null][]) {
    if (held === null) continue;
    region.counts[claim].made++;
    if (held) region.counts[claim].held++;
  }
}

type Claims = Record<Claim, boolean | null>;

/** For each claim whether it held; null where nothing was claimed. */
export function judge({ sweep, swrLimit, trace, antenna }: Trial): { method: string; claims: Claims } {
  const inner = analyse(sweep, { swrLimit }).dips.filter((dip) => !dip.edge);
  const off = (dip: Dip) => Math.abs(dip.frequencyHz - trace.hz);
  const dip = inner.sort((a, b) => off(a) - off(b)).at(0);
  if (!dip) return { method: "none", claims: NOTHING_CLAIMED };
  const { bandwidth: band, frequencyUncertaintyHz: half, benchFrequencyHalfHz: benchHalf } = dip;
  const width = trace.highHz - trace.lowHz;
  const bench = sweep.benchLimits as NonNullable<typeof sweep.benchLimits>;
  const errors = { directivity: bench.directivity[0], tracking: bench.tracking[0], match: bench.match[0] };
  const alone = trueLimits(trace.magnitude, errors);
  const claims = {
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
  return { method: dip.method, claims };
}

function within(value: number, low: number | null, high: number | null): boolean | null {
  return low === null || high === null ? null : value >= low && value <= high;
}

type Place = Pick<Region, "by" | "range" | "ranges" | "kind">;

function placesOf(trial: Trial, method: string): Place[] {
  const ranges: Ranges = {
    swr: rangeOf(trial.swr, [1.02, 1.1, 1.5, 3]),
    pointsPerBand: rangeOf(trial.pointsPerBand, [3, 10, 40, 200]),
    noiseDb: rangeOf(trial.noiseDb, [0.01, 0.05, 0.15, 0.5]),
    directivityDb: rangeOf(trial.directivityDb, [20, 28, 36, 45]),
  };
  const by = (name: string, ...keys: (keyof Ranges)[]): Place => ({
    by: name,
    range: keys.map((key) => ranges[key].join("–")).join(" × "),
    ranges: Object.fromEntries(keys.map((key) => [key, ranges[key]])),
    kind: null,
  });
  return [
    by("all"),
    by("lowest SWR", "swr"),
    by("points in the band", "pointsPerBand"),
    by("noise, dB", "noiseDb"),
    by("directivity, dB", "directivityDb"),
    { by: "scatter", range: trial.kind, ranges: {}, kind: trial.kind },
    { by: "method", range: method, ranges: null, kind: null },
    by("SWR × points × noise", "swr", "pointsPerBand", "noiseDb"),
    by("SWR × points × noise × directivity", "swr", "pointsPerBand", "noiseDb", "directivityDb"),
  ];
}

function rangeOf(value: number, borders: number[]): [number, number] {
  const i = Math.min(
    borders.length - 2,
    borders.findIndex((_, k) => value < borders[k + 1]),
  );
  return [borders[i], borders[i + 1]];
}

function nothing(): Count {
  const all = [...CLAIMS, ...WORST_CASES].map((claim) => [claim, { made: 0, held: 0 }]);
  return Object.fromEntries(all) as Count;
}

/** Regions with fewer claims are told and not judged: their share is chance. */
export const FEWEST = 50;
const BATCH = 50;
const BY = [
  "all",
  "lowest SWR",
  "points in the band",
  "noise, dB",
  "directivity, dB",
  "scatter",
  "method",
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
