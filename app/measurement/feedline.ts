import type { CableEntry } from "./cable-entry.ts";
import { cableNamed } from "./cables.ts";
import { lineWarnings, otherImpedance, scaleLimits, scalePicture } from "./feedline-effects.ts";
import { gammaToSwr, swrToGamma } from "./reflection.ts";
import { renormalise } from "./renormalise.ts";
import type { Sweep, Warning } from "./sweep.ts";

/** A length of line between the port and the antenna. */
export interface Feedline {
  /** Name of the cable's entry, or "own values". */
  name: string;
  /** dB per metre: k1·√f + k2·f with f in MHz. */
  k1: number;
  k2: number;
  lengthM: number;
  velocityFactor: number;
  /** MHz; where the loss is known, for a cable of points of one's own. Absent: as the table has it, else everywhere. */
  rangeMhz?: { low: number; high: number };
}

/** Matched loss of the whole line, one way, dB, at `hz` (Hz). */
export function matchedLossDb(
  { k1, k2, lengthM }: Pick<Feedline, "k1" | "k2" | "lengthM">,
  hz: number,
): number {
  const mhz = hz / 1e6;
  return lengthM * (k1 * Math.sqrt(mhz) + k2 * mhz);
}

/**
 * The sweep as it is at the far end of the line: abs Γ times 10^(A/10) with A the matched loss one way in dB, and for
 * complex sweeps Γ times e^(2(α+jβ)l), β = 2πf/(c·VF). NaN stays NaN. Above the last point of
 * the cable's sheet the loss is not known, and the value becomes NaN; below the first it follows the law of the skin
 * effect as far as that holds (`lowestMhz`), which is said; points of one's own hold from the first to the last
 * (`rangeMhz`), own k1 and k2 everywhere. abs Γ over
 * 1 is kept and said. A cable of another impedance than the sweep's reference is taken out in its own (complex sweeps
 * only; a scalar one can't be, and that is said). Limits go along: with g = 10^(A/10), d' = g·d, M' = M/g, T' = T plus
 * what the cable's own uncertainty makes of g; so abs Γ' ± (d' + T'·abs Γ' + M'·abs Γ'²) is g times the old interval.
 * Impossible lines (a length or loss under 0, a velocity factor outside 0 to 1) give the sweep as it was, with a
 * warning.
 * Source: wave on a line with small loss, D. M. Pozar, Microwave Engineering, ch. 2 (from memory, not seen).
 */
export function removeFeedline(sweep: Sweep, line: Feedline): { sweep: Sweep; warnings: Warning[] } {
  const fault = faultOf(line);
  if (fault) return { sweep, warnings: [{ code: "feedline-impossible", message: fault }] };
  const cable = cableNamed(line.name);
  const warnings: Warning[] = [];
  const seenOhm = sweep.referenceOhm;
  const ownOhm = cable?.impedanceOhm ?? seenOhm;
  if (ownOhm !== seenOhm)
    warnings.push(otherImpedance(line.name, ownOhm, seenOhm, sweep.gammaRe !== undefined));
  const inLine = renormalise(sweep, ownOhm);
  const gain = gainsOf(sweep.frequencyHz, line, cable);
  const moved: Sweep = { ...inLine, plane: "antenna", magnitude: times(inLine.magnitude, gain) };
  if (inLine.gammaRe && inLine.gammaIm) {
    const turned = turn(inLine.gammaRe, inLine.gammaIm, sweep.frequencyHz, gain, line);
    Object.assign(moved, { gammaRe: turned.re, gammaIm: turned.im });
  }
  if (sweep.benchLimits)
    moved.benchLimits = scaleLimits(sweep.benchLimits, gain, cable?.lossUncertainty ?? 0);
  if (sweep.pictureLimits) moved.pictureLimits = scalePicture(sweep.pictureLimits, gain);
  const out = renormalise(moved, seenOhm);
  if (ownOhm !== seenOhm) delete out.benchLimits;
  warnings.push(...lineWarnings(sweep, out, gain, line, cable));
  return { sweep: out, warnings };
}

/**
 * What a mismatch adds to the loss of a line, dB: 10 log((a² − ρ²)/(a(1 − ρ²))) less the matched loss, a = 10^(ML/10),
 * ρ = abs Γ at the load. `matchedDb` ≥ 0 and `swr` ≥ 1 at the load; SWR Infinity gives Infinity on a lossy line; NaN
 * for anything else. ARRL Antenna Book, "additional loss due to SWR" (from memory, not seen); it is net power in over
 * net power out of a line whose Z0 is real, at any length. Where Z0 has a reactive part (long lossy lines at low
 * frequencies) it is an approximation.
 */
export function addedLossDb(matchedDb: number, swr: number): number {
  if (!(matchedDb >= 0)) return Number.NaN;
  if (matchedDb === 0) return swr >= 1 ? 0 : Number.NaN;
  const reflected = swrToGamma(swr) ** 2;
  const a = 10 ** (matchedDb / 10);
  return 10 * Math.log10((a * a - reflected) / (a * (1 - reflected))) - matchedDb;
}

/** SWR at the far end of a line from that at the near end; Infinity where the two can't belong together. */
export function swrBeyond(swrHere: number, matchedDb: number): number {
  return gammaToSwr(swrToGamma(swrHere) * 10 ** (matchedDb / 10));
}

function faultOf({ k1, k2, lengthM, velocityFactor }: Feedline): string | null {
  if (!(lengthM >= 0) || !Number.isFinite(lengthM))
    return "The feedline's length is no number of metres: nothing was removed.";
  if (!(velocityFactor > 0 && velocityFactor <= 1))
    return "A velocity factor lies above 0 and at most at 1: the feedline was not removed.";
  if (!(k1 >= 0 && k2 >= 0) || !Number.isFinite(k1 + k2))
    return "A feedline can't have a negative loss: nothing was removed.";
  return null;
}

/** abs Γ at the far end over that at the near end, per point; NaN where the sheet has no figures. */
function gainsOf(frequencyHz: Float64Array, line: Feedline, cable: CableEntry | null): Float64Array {
  const fromHz = (cable?.lowestMhz ?? line.rangeMhz?.low ?? 0) * 1e6;
  const last = cable?.points[cable.points.length - 1].mhz ?? line.rangeMhz?.high;
  const toHz = (last ?? Number.POSITIVE_INFINITY) * 1e6;
  return Float64Array.from(frequencyHz, (hz) =>
    hz >= fromHz && hz <= toHz ? 10 ** (matchedLossDb(line, hz) / 10) : Number.NaN,
  );
}

function times(values: Float64Array, gain: Float64Array): Float64Array {
  return Float64Array.from(values, (value, i) => value * gain[i]);
}

function turn(
  re: Float64Array,
  im: Float64Array,
  frequencyHz: Float64Array,
  gain: Float64Array,
  line: Feedline,
) {
  const out = { re: new Float64Array(re.length), im: new Float64Array(re.length) };
  for (let i = 0; i < re.length; i++) {
    const angle = (4 * Math.PI * frequencyHz[i] * line.lengthM) / (SPEED_OF_LIGHT * line.velocityFactor);
    const [c, s] = [gain[i] * Math.cos(angle), gain[i] * Math.sin(angle)];
    out.re[i] = re[i] * c - im[i] * s;
    out.im[i] = re[i] * s + im[i] * c;
  }
  return out;
}

/** m/s, exact by definition of the metre (BIPM, SI brochure). */
export const SPEED_OF_LIGHT = 299_792_458;
