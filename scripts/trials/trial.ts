import type { BenchErrors } from "../../app/measurement/limits/worst-case.ts";
import { type Complex, swrToGamma } from "../../app/measurement/reflection.ts";
import type { BenchLimits, Sweep } from "../../app/measurement/sweep.ts";
import type { Random } from "../screens/random.ts";
import { antennaGamma, benchGamma, type Hollow, hollowOf, type Scene } from "./bench.ts";

export const KINDS = ["detector", "receiver", "with phase"] as const;
/** Scatter even in decibels; even in complex Γ of which the magnitude is kept; the same with phase. */
export type Kind = (typeof KINDS)[number];

/** One simulated sweep with its truth. */
export interface Trial {
  kind: Kind;
  swr: number;
  directivityDb: number;
  noiseDb: number;
  pointsPerBand: number;
  swrLimit: number;
  sweep: Sweep;
  /** The antenna itself: what worst-case limits must hold. */
  antenna: Hollow;
  /** What the bench shows without noise: what 95 % intervals must hold. */
  trace: Hollow;
}

/** From where to where a trial's quantities are drawn. */
export interface Ranges {
  swr: [number, number];
  directivityDb: [number, number];
  noiseDb: [number, number];
  pointsPerBand: [number, number];
}

/** Lowest SWR 1.02 to 3, directivity 20 to 45 dB, noise 0.01 to 0.5 dB, 3 to 200 points in the band. */
export const EVERYWHERE: Ranges = {
  swr: [1.02, 3],
  directivityDb: [20, 45],
  noiseDb: [0.01, 0.5],
  pointsPerBand: [3, 200],
};

/** One sweep from `ranges`, with a scatter of any kind where `given` is null. */
export function drawTrial(random: Random, ranges = EVERYWHERE, given: Kind | null = null): Trial {
  const kind = given ?? random.pick(KINDS);
  const swr = 1 + logBetween(random, ranges.swr[0] - 1, ranges.swr[1] - 1);
  const directivityDb = random.between(...ranges.directivityDb);
  const noiseDb = logBetween(random, ...ranges.noiseDb);
  const pointsPerBand = logBetween(random, ...ranges.pointsPerBand);
  const swrLimit = swr < HIGHEST_AT_TWO ? 2 : 5;
  const level = swrToGamma(swrLimit);
  const worst = {
    directivity: 10 ** (-directivityDb / 20),
    tracking: logBetween(random, 0.003, 0.03),
    match: logBetween(random, 0.01, 0.1),
  };
  const scene = drawScene(random, swr, worst);
  const { f0Hz } = scene;
  const reachHz = f0Hz / scene.q;
  const antenna = hollowOf((hz) => size(antennaGamma(scene, hz)), f0Hz, reachHz, level);
  const trace = hollowOf((hz) => size(benchGamma(scene, hz)), f0Hz, reachHz, level);
  const widthHz = antenna.highHz - antenna.lowHz;
  const bands = Math.min(random.between(5, 10), (MOST_SPAN * f0Hz) / widthHz);
  const points = Math.max(FEWEST_POINTS, Math.round(bands * pointsPerBand));
  const stepHz = (bands * widthHz) / points;
  const startHz = f0Hz - (Math.floor(points / 2) + random.next()) * stepHz;
  const frequencyHz = Float64Array.from({ length: points }, (_, i) => startHz + i * stepHz);
  const sweep = measured(scene, frequencyHz, kind, noiseDb, random);
  sweep.benchLimits = limitsOf(worst, points);
  return { kind, swr, directivityDb, noiseDb, pointsPerBand, swrLimit, sweep, antenna, trace };
}

function drawScene(random: Random, swr: number, worst: BenchErrors): Scene {
  const loss = random.between(0.97, 1);
  const rho = swrToGamma(swr) / loss;
  const ratio = (1 + rho) / (1 - rho);
  const q = logBetween(random, 5, 100);
  const turning = (limit: number) => ({
    size: limit * random.between(LEAST_OF_LIMIT, 1),
    phase: random.between(0, 2 * Math.PI),
    turn: random.between(-MOST_TURN, MOST_TURN) * q,
  });
  return {
    f0Hz: 14.15e6,
    r: random.chance(0.5) ? ratio : 1 / ratio,
    q,
    loss,
    directivity: turning(worst.directivity),
    tracking: turning(worst.tracking),
    match: turning(worst.match),
  };
}

function measured(
  scene: Scene,
  frequencyHz: Float64Array,
  kind: Kind,
  noiseDb: number,
  random: Random,
): Sweep {
  const nepers = (noiseDb * Math.LN10) / 20;
  const gammaRe = new Float64Array(frequencyHz.length);
  const gammaIm = new Float64Array(frequencyHz.length);
  for (let i = 0; i < frequencyHz.length; i++) {
    const { re, im } = benchGamma(scene, frequencyHz[i]);
    const [a, b] = normalPair(random);
    const factor = kind === "detector" ? Math.exp(nepers * a) : 1;
    const spread = kind === "detector" ? 0 : nepers;
    gammaRe[i] = re * factor + spread * a;
    gammaIm[i] = im * factor + spread * b;
  }
  const magnitude = gammaRe.map((re, i) => Math.hypot(re, gammaIm[i]));
  const sweep: Sweep = { frequencyHz, magnitude, referenceOhm: 50, plane: "port" };
  return kind === "with phase" ? { ...sweep, gammaRe, gammaIm } : sweep;
}

function limitsOf(worst: BenchErrors, points: number): BenchLimits {
  const even = (value: number) => new Float64Array(points).fill(value);
  return { directivity: even(worst.directivity), tracking: even(worst.tracking), match: even(worst.match) };
}

/** G. E. P. Box & M. E. Muller, Ann. Math. Stat. 29, 610-611, 1958; from memory, not seen. */
function normalPair(random: Random): [number, number] {
  const length = Math.sqrt(-2 * Math.log(1 - random.next()));
  const angle = 2 * Math.PI * random.next();
  return [length * Math.cos(angle), length * Math.sin(angle)];
}

function logBetween(random: Random, low: number, high: number): number {
  return low * (high / low) ** random.next();
}

function size({ re, im }: Complex): number {
  return Math.hypot(re, im);
}

/** A dip must go clearly under the limit to have a band there. */
const HIGHEST_AT_TWO = 1.7;
/** Of the limit: an error that is nearly nothing would test nothing. */
const LEAST_OF_LIMIT = 0.3;
/** Radians over one bandwidth of f0/Q: a few metres of line at 14 MHz. */
const MOST_TURN = 1;
/** Of f0: no sweep begins at 0. */
const MOST_SPAN = 1.2;
const FEWEST_POINTS = 11;
