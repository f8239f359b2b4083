import { dipLimits } from "../limits/dip-limits.ts";
import type { Noise } from "../noise.ts";
import { gammaToReturnLossDb, gammaToSwr, swrToGamma } from "../reflection.ts";
import type { AnalysisSettings, Dip, Sweep, Warning } from "../sweep.ts";
import { combine } from "../uncertainty.ts";
import { halfDepthWidthHz, sweepAgain } from "./advice.ts";
import { bandwidthOf, type Stretch, stretchAround } from "./bandwidth.ts";
import type { FoundDip } from "./find.ts";
import { type Lowest, lowestOf, sampleOnly } from "./lowest.ts";
import { qLimitsOf, qualityOf } from "./quality.ts";

/**
 * Where a dip stands among the found ones; `stretch` is the last one walked, kept so that no sample is
 * walked twice.
 */
export interface Neighbours {
  at: number;
  found: readonly FoundDip[];
  stretch: Stretch | null;
}

export interface DescribeSettings extends AnalysisSettings {
  noise: Noise;
  /** False where there are more dips than can be fitted. */
  mayFit: boolean;
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
  const lowest = edge
    ? sampleOnly(sweep, index, 0)
    : lowestOf(sweep, found, between(sweep, neighbours), settings.noise, settings.mayFit);
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
  const limits = dipLimits({
    sweep,
    index,
    lowest,
    swr: edge ? null : pictured.swr,
    pixelHalf: pictured.pixelHalf,
    bandwidth: edge ? null : bandwidth,
    sigma: settings.noise.gamma,
  });
  return {
    frequencyHz: lowest.frequencyHz,
    frequencyUncertaintyHz: pictured.frequencyHalfHz,
    minimumSwr,
    minimumSwrNoiseLow: pictured.swr?.low ?? null,
    minimumSwrNoiseHigh: pictured.swr?.high ?? null,
    returnLossDb: Math.min(DEEPEST_DB, gammaToReturnLossDb(lowest.magnitude)),
    prominenceDb: Math.min(DEEPEST_DB, found.prominenceDb),
    ...limits,
    ...(edge && { bandwidth, unknown: [] }),
    ...quality,
    qLimits: qLimitsOf(limits, quality, minimumSwr),
    method: lowest.method,
    edge,
    sampleIndex: index,
    advice: edge ? null : sweepAgain(frequencyHz, index, lowest.frequencyHz, widthHz),
  };
}

/** The dips on each side, or the ends of the sweep. */
function between({ magnitude }: Sweep, { found, at }: Neighbours): Stretch {
  return { from: found[at - 1]?.index ?? 0, to: found[at + 1]?.index ?? magnitude.length - 1 };
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
  if (!limits || lowest.frequencyHalfHz === null) return { ...lowest, pixelHalf: 0 };
  const half = (limits.magnitudeHigh[index] - limits.magnitudeLow[index]) / 2;
  const middle = lowest.magnitude;
  const from = (swr: number | undefined) =>
    swr === undefined ? 0 : Math.abs((swr - 1) / (swr + 1) - middle);
  const low = combine(from(lowest.swr?.low), half) ?? Number.NaN;
  const high = combine(from(lowest.swr?.high), half) ?? Number.NaN;
  const known = Number.isFinite(low) && Number.isFinite(high) && Number.isFinite(magnitude[index]);
  return {
    pixelHalf: known ? half : 0,
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

/**
 * A return loss that no instrument sees; a computed 0 of abs Γ is told as this deep, as no file holds an
 * infinity.
 */
const DEEPEST_DB = 200;
