import { gammaToReturnLossDb, gammaToSwr, swrToGamma } from "../reflection.ts";
import type { AnalysisSettings, Dip, Sweep, Warning } from "../sweep.ts";
import { combine, type Interval, swrInterval } from "../uncertainty.ts";
import { halfDepthWidthHz, sweepAgain } from "./advice.ts";
import { bandwidthOf, type Stretch, stretchAround } from "./bandwidth.ts";
import type { FoundDip } from "./find.ts";
import { type Fit, fitDip } from "./fit.ts";
import { parabolaDip } from "./parabola.ts";
import { qualityOf } from "./quality.ts";
import { fitWindow } from "./window.ts";

/** Where a dip stands among the found ones; `stretch` is the last one walked, kept so that no sample is walked twice. */
export interface Neighbours {
  at: number;
  found: readonly FoundDip[];
  stretch: Stretch | null;
}

export interface DescribeSettings extends AnalysisSettings {
  /** σ, dB of return loss. */
  noise: number;
  /** False where there are more dips than can be fitted. */
  mayFit: boolean;
}

/** The lowest point of a dip by one of the three methods; half-widths of 95 %, null where not known. */
interface Lowest {
  method: Dip["method"];
  frequencyHz: number;
  frequencyHalfHz: number | null;
  magnitude: number;
  swr: Interval | null;
  fit: Fit | null;
}

/** All numbers of one found dip. Adds a warning where its Q is not that of the antenna. */
export function describeDip(
  sweep: Sweep,
  found: FoundDip,
  neighbours: Neighbours,
  settings: DescribeSettings,
  notes: Warning[],
): Dip {
  const { magnitude, frequencyHz } = sweep;
  const { index, edge } = found;
  const lowest = edge ? sampleOnly(sweep, index) : lowestPoint(sweep, found, neighbours, settings);
  const stretch = stretchFor(sweep, index, neighbours, settings.swrLimit);
  const shared = stretch !== null && isShared(stretch, neighbours);
  const bandwidth = bandwidthOf({
    sweep,
    index,
    lowest: lowest.magnitude,
    swrLimit: settings.swrLimit,
    stretch,
    shared,
    fit: lowest.fit,
    noise: settings.noise,
  });
  const minimumSwr = gammaToSwr(lowest.magnitude);
  const { notOfAntenna, ...quality } = qualityOf({
    sweep,
    index,
    frequencyHz: lowest.frequencyHz,
    minimumSwr,
    bandwidth,
    fit: lowest.fit,
  });
  if (notOfAntenna) notes.push(qWarning(lowest.frequencyHz));
  const widthHz = Math.min(
    halfDepthWidthHz(frequencyHz, magnitude, index, found.prominenceDb),
    bandwidth && !bandwidth.open && !bandwidth.shared ? bandwidth.widthHz : Number.POSITIVE_INFINITY,
  );
  const pictured = withPicture(sweep, index, lowest);
  return {
    frequencyHz: lowest.frequencyHz,
    frequencyUncertaintyHz: pictured.frequencyHalfHz,
    minimumSwr,
    minimumSwrLow: null,
    minimumSwrHigh: null,
    minimumSwrNoiseLow: pictured.swr?.low ?? null,
    minimumSwrNoiseHigh: pictured.swr?.high ?? null,
    returnLossDb: Math.min(DEEPEST_DB, gammaToReturnLossDb(lowest.magnitude)),
    prominenceDb: Math.min(DEEPEST_DB, found.prominenceDb),
    bandwidth,
    ...quality,
    method: lowest.method,
    edge,
    sampleIndex: index,
    advice: edge ? null : sweepAgain(frequencyHz, index, lowest.frequencyHz, widthHz),
  };
}

function lowestPoint(
  sweep: Sweep,
  found: FoundDip,
  neighbours: Neighbours,
  settings: DescribeSettings,
): Lowest {
  const { frequencyHz, magnitude } = sweep;
  const { index, prominenceDb } = found;
  if (settings.mayFit) {
    const before = neighbours.found[neighbours.at - 1]?.index ?? 0;
    const after = neighbours.found[neighbours.at + 1]?.index ?? magnitude.length - 1;
    const window = fitWindow(magnitude, index, prominenceDb, before, after);
    const fit = fitDip(frequencyHz, magnitude, index, window, settings.noise);
    if (fit) {
      return {
        method: "fit",
        frequencyHz: fit.resonator.f0Hz,
        frequencyHalfHz: fit.frequencyHalfHz,
        magnitude: Math.sqrt(fit.power),
        swr: swrInterval(fit.power, fit.powerHalf),
        fit,
      };
    }
  }
  if (pointsOf(magnitude, index, prominenceDb) < FEWEST_FOR_PARABOLA) return sampleOnly(sweep, index);
  const top = parabolaDip(frequencyHz, magnitude, index, settings.noise);
  if (!top) return sampleOnly(sweep, index);
  const gamma = 10 ** (-top.returnLossDb / 20);
  const swr = (db: number) => gammaToSwr(10 ** (-(top.returnLossDb + db) / 20));
  return {
    method: "parabola",
    frequencyHz: top.frequencyHz,
    frequencyHalfHz: top.frequencyHalfHz,
    magnitude: gamma,
    swr: { low: swr(top.returnLossHalfDb), high: swr(-top.returnLossHalfDb) },
    fit: null,
  };
}

/** The lowest sample, or the middle of its plateau. Between it and its neighbours the dip may go anywhere. */
function sampleOnly({ frequencyHz, magnitude }: Sweep, index: number): Lowest {
  const value = magnitude[index];
  let from = index;
  let to = index;
  while (from > 0 && magnitude[from - 1] === value) from--;
  while (to < magnitude.length - 1 && magnitude[to + 1] === value) to++;
  const inside = from > 0 && to < magnitude.length - 1;
  const centre = inside ? (frequencyHz[from] + frequencyHz[to]) / 2 : frequencyHz[index];
  return {
    method: "sample",
    frequencyHz: centre,
    frequencyHalfHz: inside ? (frequencyHz[to + 1] - frequencyHz[from - 1]) / 2 : null,
    magnitude: value,
    swr: null,
    fit: null,
  };
}

/** Samples below half of the dip's depth in dB. */
function pointsOf(magnitude: Float64Array, index: number, prominenceDb: number): number {
  const half = magnitude[index] * 10 ** (prominenceDb / 40);
  let count = 1;
  for (let i = index - 1; magnitude[i] <= half && count < FEWEST_FOR_PARABOLA; i--) count++;
  for (let i = index + 1; magnitude[i] <= half && count < FEWEST_FOR_PARABOLA; i++) count++;
  return count;
}

function stretchFor(sweep: Sweep, index: number, neighbours: Neighbours, swrLimit: number): Stretch | null {
  const known = neighbours.stretch;
  if (known && index >= known.from && index <= known.to) return known;
  const stretch = stretchAround(sweep.magnitude, index, swrToGamma(swrLimit));
  if (stretch) neighbours.stretch = stretch;
  return stretch;
}

function isShared({ from, to }: Stretch, { found, at }: Neighbours): boolean {
  return [found[at - 1], found[at + 1]].some((other) => other && other.index >= from && other.index <= to);
}

/** Half a pixel of each axis and the trace's width, combined with the rest as independent parts. */
function withPicture({ pictureLimits: limits, magnitude }: Sweep, index: number, lowest: Lowest) {
  if (!limits || lowest.frequencyHalfHz === null) return lowest;
  const half = (limits.magnitudeHigh[index] - limits.magnitudeLow[index]) / 2;
  const middle = lowest.magnitude;
  const from = (swr: number | undefined) =>
    swr === undefined ? 0 : Math.abs((swr - 1) / (swr + 1) - middle);
  const low = combine(from(lowest.swr?.low), half) ?? Number.NaN;
  const high = combine(from(lowest.swr?.high), half) ?? Number.NaN;
  const known = Number.isFinite(low) && Number.isFinite(high) && Number.isFinite(magnitude[index]);
  return {
    frequencyHalfHz: combine(lowest.frequencyHalfHz, limits.frequencyHz[index]),
    swr: known ? { low: gammaToSwr(Math.max(0, middle - low)), high: gammaToSwr(middle + high) } : lowest.swr,
  };
}

function qWarning(frequencyHz: number): Warning {
  return {
    code: "q-not-of-antenna",
    message: `The Q of the dip at ${(frequencyHz / 1e6).toFixed(3)} MHz is not that of the antenna alone: there is loss or a length of line between it and the port.`,
  };
}

/** Three points make a parabola. */
const FEWEST_FOR_PARABOLA = 3;
/** A return loss that no instrument sees; a computed 0 of abs Γ is told as this deep, as no file holds an infinity. */
const DEEPEST_DB = 200;
