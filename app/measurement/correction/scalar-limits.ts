import type { BenchGiven, BenchStandards } from "../bench.ts";
import { returnLossDbToGamma } from "../reflection.ts";
import type { BenchLimits, Sweep } from "../sweep.ts";
import { envelope } from "./envelope.ts";
import { magnitudeAt } from "./references.ts";
import type { ZeroLine } from "./zero-line.ts";

/**
 * Worst-case limits of a sweep that was divided by a 0 dB line, from Γm = D + T·Γ/(1 − M·Γ), all relative to that line; linear, one value a
 * point, NaN where nothing is known.
 * - Directivity: what the load leaves, plus what the load itself is known to return. With a load that is not described its own
 *   error is inside what it leaves; a notch where the two cancel proves nothing, so the largest value within LOAD_REACH counts.
 *   Without a load the given directivity.
 * - Match: as given; else from the ripple between open and short, whose half is at most abs M + abs D: its largest value within
 *   RIPPLE_REACH plus the directivity. That sees errors in phase with the reflection somewhere in the reach; an error that is in quadrature all
 *   over is not seen, and for a hard limit the test port's match must be given.
 * - Tracking: after the mean of both references only second-order terms are left, M² + (M + D)²/2; with one reference, or a number, the
 *   first-order ones are too, M + D and the square. What is given is a floor, as a drift that no reference shows.
 * Sources: the error model of scalar reflectometers (HP application notes 183 and 1287-3, from memory, not seen); the cancelling of the first
 * order: Keysight N9000B Spectrum Analyzer Mode reference, p. 547; second order by own derivation, checked against a
 * nodal solution of a bridge.
 */
export function scalarLimits(
  atHz: Float64Array,
  line: Omit<ZeroLine, "from"> & { from: ZeroLine["from"] | "number" },
  load: Sweep | undefined,
  standards: BenchStandards,
  given: BenchGiven,
): BenchLimits {
  const directivity = directivityOf(atHz, line, load, standards, given);
  const match = matchOf(atHz, line, directivity, given);
  const floor = given.trackingDb === null ? 0 : 10 ** (given.trackingDb / 20) - 1;
  const both = line?.from === "open-and-short";
  const tracking = Float64Array.from(match, (m, i) => {
    const sum = m + directivity[i];
    const own = both ? m * m + (sum * sum) / 2 : sum + sum * sum;
    if (Number.isNaN(own)) return line || given.trackingDb === null ? Number.NaN : floor;
    return Math.max(floor, own);
  });
  return { directivity, tracking, match };
}

/** Highest abs Γ that the load may have, in place of none; null where that is not known. */
export function loadGamma(standards: BenchStandards, referenceOhm: number): number | null {
  if (standards.loadReturnLossDb !== null) return returnLossDbToGamma(standards.loadReturnLossDb);
  if (standards.loadOhm === null) return null;
  return Math.abs((standards.loadOhm - referenceOhm) / (standards.loadOhm + referenceOhm));
}

function directivityOf(
  atHz: Float64Array,
  line: Pick<ZeroLine, "amplitude"> | null,
  load: Sweep | undefined,
  standards: BenchStandards,
  { directivityDb }: BenchGiven,
): Float64Array {
  const n = atHz.length;
  const stated = directivityDb === null ? Number.NaN : returnLossDbToGamma(directivityDb);
  if (!load || !line) return new Float64Array(n).fill(stated);
  const own = loadGamma(standards, load.referenceOhm);
  const left = magnitudeAt(load, atHz);
  for (let i = 0; i < n; i++) left[i] /= line.amplitude[i];
  const sure = own === null ? envelope(atHz, left, LOAD_REACH) : left;
  return sure.map((value) => (Number.isNaN(value) ? stated : value + (own ?? 0)));
}

function matchOf(
  atHz: Float64Array,
  line: Pick<ZeroLine, "ripple"> | null,
  directivity: Float64Array,
  { testPortMatchDb }: BenchGiven,
): Float64Array {
  if (testPortMatchDb !== null)
    return new Float64Array(atHz.length).fill(returnLossDbToGamma(testPortMatchDb));
  if (!line) return new Float64Array(atHz.length).fill(Number.NaN);
  return envelope(atHz, line.ripple, RIPPLE_REACH).map((value, i) => value + directivity[i]);
}

/** Notches of a load against a bridge were seen to be narrower than a tenth of their frequency (common practice, no source). */
const LOAD_REACH = 1.1;
/** Half a turn of the phase between a bridge and its port, at most a metre of cable, within an octave above 50 MHz. */
const RIPPLE_REACH = 1.5;
