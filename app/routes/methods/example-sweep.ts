import { type Complex, impedanceToGamma } from "~/measurement/reflection";
import type { Sweep } from "~/measurement/sweep";

/** An invented antenna for the worked examples: a series resonator, R in Ω, in a 50 Ω system. */
export interface ExampleResonator {
  resistanceOhm: number;
  q: number;
  frequencyHz: number;
  points: number;
  /** Of abs Γ, in dB of its own size: a detector's. */
  noiseDb?: number;
  /** Another draw of the same noise. */
  draw?: number;
}

/** Its sweep over SPAN widths around the resonance. */
export function exampleSweep(resonator: ExampleResonator): Sweep {
  const { resistanceOhm, q, frequencyHz: f0, points, noiseDb = 0, draw = 1 } = resonator;
  const half = (f0 / q) * SPAN;
  const frequencyHz = Float64Array.from(
    { length: points },
    (_, i) => Math.max(f0 * 0.05, f0 - half) + ((2 * half) / (points - 1)) * i,
  );
  const normal = normals(draw);
  const gammas = Array.from(frequencyHz, (hz): Complex => {
    const impedance = { re: resistanceOhm, im: resistanceOhm * q * (hz / f0 - f0 / hz) };
    const { re, im } = impedanceToGamma(impedance, REFERENCE_OHM);
    const factor = noiseDb > 0 ? 10 ** ((noiseDb * normal()) / 20) : 1;
    return { re: re * factor, im: im * factor };
  });
  return {
    frequencyHz,
    magnitude: Float64Array.from(gammas, ({ re, im }) => Math.hypot(re, im)),
    gammaRe: Float64Array.from(gammas, ({ re }) => re),
    gammaIm: Float64Array.from(gammas, ({ im }) => im),
    referenceOhm: REFERENCE_OHM,
    plane: "port",
  };
}

/** The same without phase. */
export function scalar(sweep: Sweep): Sweep {
  return { ...sweep, gammaRe: undefined, gammaIm: undefined };
}

/** Repeatable normal numbers: a linear congruence (from memory, not seen) and G. E. P. Box & M. E. Muller 1958. */
function normals(draw: number): () => number {
  let state = (draw * 2_654_435_761) >>> 0;
  const uniform = () => {
    state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0;
    return (state + 0.5) / 4_294_967_296;
  };
  for (let i = 0; i < 8; i++) uniform();
  return () => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform());
}

const REFERENCE_OHM = 50;
/** In f0/Q: far enough out that the dip's shape is whole. */
const SPAN = 2.5;
