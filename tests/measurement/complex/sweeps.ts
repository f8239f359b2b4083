import { type Complex, impedanceToGamma } from "../../../app/measurement/reflection.ts";
import type { Sweep } from "../../../app/measurement/sweep.ts";
import { normals } from "../resonators.ts";

/** A sweep with phase from impedances in Ω; `sigma` adds even scatter to both parts of Γ, from a repeatable `start`. */
export function impedanceSweep(
  frequencyHz: ArrayLike<number>,
  impedance: (hz: number) => Complex,
  { referenceOhm = 50, sigma = 0, start = 1 } = {},
): Sweep {
  const draw = normals(start);
  const gamma = Array.from(frequencyHz, (hz) => {
    const { re, im } = impedanceToGamma(impedance(hz), referenceOhm);
    return { re: re + (sigma ? sigma * draw() : 0), im: im + (sigma ? sigma * draw() : 0) };
  });
  return {
    frequencyHz: Float64Array.from(frequencyHz),
    magnitude: Float64Array.from(gamma, ({ re, im }) => Math.hypot(re, im)),
    gammaRe: Float64Array.from(gamma, ({ re }) => re),
    gammaIm: Float64Array.from(gamma, ({ im }) => im),
    referenceOhm,
    plane: "port",
  };
}

export function even(fromHz: number, toHz: number, count: number): Float64Array {
  return Float64Array.from({ length: count }, (_, i) => fromHz + ((toHz - fromHz) * i) / (count - 1));
}

/** Series R-L-C. */
export function seriesResonator(r: number, q: number, f0Hz: number) {
  return (hz: number): Complex => ({ re: r, im: r * q * (hz / f0Hz - f0Hz / hz) });
}

/** Parallel R-L-C. */
export function parallelResonator(r: number, q: number, f0Hz: number) {
  return (hz: number): Complex => {
    const u = q * (hz / f0Hz - f0Hz / hz);
    return { re: r / (1 + u * u), im: (-r * u) / (1 + u * u) };
  };
}

/** `mhz,ohm,reactance` rows of the NEC-2 fixtures as a sweep. */
export function necSweep(csv: string, referenceOhm = 50): Sweep {
  const rows = csv
    .trim()
    .split("\n")
    .slice(1)
    .map((line) => line.split(",").map(Number));
  const at = new Map(rows.map(([mhz, re, im]) => [mhz * 1e6, { re, im }]));
  return impedanceSweep([...at.keys()], (hz) => at.get(hz) as Complex, { referenceOhm });
}
