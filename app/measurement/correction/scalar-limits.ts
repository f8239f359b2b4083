import type { BenchGiven, BenchStandards } from "../bench.ts";
import { returnLossDbToGamma } from "../reflection.ts";
import type { BenchLimits, Sweep } from "../sweep.ts";
import { envelope } from "./envelope.ts";
import { magnitudeAt } from "./references.ts";
import type { ZeroLine } from "./zero-line.ts";

/**
 * Worst-case limits of a sweep that was divided by a 0 dB line, from Γm = D + T·Γ/(1 − M·Γ), all relative to that
 * line; linear, one value a point, NaN where nothing is known.
 * - Directivity: what the load leaves, plus what the load itself is known to return. With a load that is not described
 *   its own error is inside what it leaves; a notch where the two cancel proves nothing, so the largest value within
 *   LOAD_REACH counts. Without a load the given directivity.
 * - Match: as given; else from the ripple between open and short, whose half is the part of M + D that is in phase
 *   with the reflection, so its largest value up to RIPPLE_REACH times the frequency, plus the directivity (bridges
 *   grow worse upwards; the phase between them and their port turns). An error in quadrature all over is not seen, and
 *   for a hard limit the test port's match must be given. With only one reference, or a number, POOR_PORT is taken, and
 *   the caller says so.
 * - Tracking: after the mean of both references only second-order terms are left, M² + (M + D)²/2; with one reference,
 *   or a number, the first-order ones are too, M + D and its square. What is given is a floor, as for a drift that no
 *   reference shows.
 * Sources: the error model of scalar reflectometers (HP application notes 183 and 1287-3, from memory, not seen); the
 * cancelling of the first order: Keysight N9000B Spectrum Analyzer Mode reference, p. 547; second order by own
 * derivation, checked against a nodal solution of a bridge.
 */
export function scalarLimits(
  atHz: Float64Array,
  line: Pick<ZeroLine, "amplitude" | "ripple">,
  load: Sweep | undefined,
  standards: BenchStandards,
  given: BenchGiven,
): BenchLimits {
  const directivity = directivityOf(atHz, line, load, standards, given);
  const seen = portMatch(atHz, line, directivity, given);
  const match = seen.map((m, i) => (Number.isNaN(m) && !Number.isNaN(directivity[i]) ? POOR_PORT : m));
  const floor = given.trackingDb === null ? 0 : 10 ** (given.trackingDb / 20) - 1;
  const tracking = match.map((m, i) => {
    const sum = m + directivity[i];
    const own = Number.isNaN(line.ripple[i]) ? sum + sum * sum : m * m + (sum * sum) / 2;
    return Number.isNaN(own) ? own : Math.max(floor, own);
  });
  return { directivity, tracking, match };
}

/** The test port's match as far as it is known: given, or from the ripple of open and short; NaN where it is not. */
export function portMatch(
  atHz: Float64Array,
  line: Pick<ZeroLine, "ripple">,
  directivity: Float64Array,
  { testPortMatchDb }: BenchGiven,
): Float64Array {
  if (testPortMatchDb !== null)
    return new Float64Array(atHz.length).fill(returnLossDbToGamma(testPortMatchDb));
  return envelope(atHz, line.ripple, Infinity, RIPPLE_REACH).map((value, i) => value + directivity[i]);
}

/** Highest abs Γ that the load may have, in place of none; null where that is not known. */
export function loadGamma(standards: BenchStandards, referenceOhm: number): number | null {
  if (standards.loadReturnLossDb !== null) return returnLossDbToGamma(standards.loadReturnLossDb);
  if (standards.loadOhm === null) return null;
  return Math.abs((standards.loadOhm - referenceOhm) / (standards.loadOhm + referenceOhm));
}

function directivityOf(
  atHz: Float64Array,
  line: Pick<ZeroLine, "amplitude">,
  load: Sweep | undefined,
  standards: BenchStandards,
  { directivityDb }: BenchGiven,
): Float64Array {
  const stated = directivityDb === null ? Number.NaN : returnLossDbToGamma(directivityDb);
  if (!load) return new Float64Array(atHz.length).fill(stated);
  const own = loadGamma(standards, load.referenceOhm);
  const left = magnitudeAt(load, atHz).map((value, i) => value / line.amplitude[i]);
  const sure = own === null ? envelope(atHz, left, LOAD_REACH, LOAD_REACH) : left;
  return sure.map((value) => (Number.isNaN(value) ? stated : value + (own ?? 0)));
}

/**
 * Notches of a load against a bridge were seen to be narrower than a tenth of their frequency (common practice, no
 * source).
 */
const LOAD_REACH = 1.1;
/** A quarter turn between a bridge and its port, half a metre of cable away, within this factor from 75 MHz on. */
const RIPPLE_REACH = 1.5;
/** 14 dB, an SWR of 1.5: the poorest test port that is still called one (common practice, no source). */
const POOR_PORT = 0.2;
