import type { Sweep } from "../../app/measurement/sweep.ts";

/**
 * Resonators in closed form: abs Γ² = a²·((r−1)²+u²)/((r+1)²+u²), u = r·Q·(f/f0 − f0/f): a series R-L-C
 * with R = r·Z0 behind a constant loss a. Γ = a·(r−1+ju)/(r+1+ju). At SWR limit s: u_s² = ((r+1)²g² −
 * (r−1)²)/(1−g²), g = (s−1)/(s+1)/a, width f0·u_s/(r·Q).
 */
export interface Shape {
  r: number;
  q: number;
  a?: number;
  f0Hz?: number;
  points: number;
  /** One of the two. */
  spanHz?: number;
  stepHz?: number;
  /** Where f0 lies between two samples, 0 to 1. */
  offset?: number;
  complex?: boolean;
}

export function resonatorSweep(shape: Shape): Sweep {
  const { r, q, a = 1, f0Hz = 14.15e6, points, offset = 0.37 } = shape;
  const stepHz = shape.stepHz ?? (shape.spanHz as number) / (points - 1);
  const startHz = f0Hz - (Math.floor(points / 2) + offset) * stepHz;
  const frequencyHz = Float64Array.from({ length: points }, (_, i) => startHz + i * stepHz);
  const gammaRe = new Float64Array(points);
  const gammaIm = new Float64Array(points);
  for (let i = 0; i < points; i++) {
    const u = r * q * (frequencyHz[i] / f0Hz - f0Hz / frequencyHz[i]);
    const power = (r + 1) ** 2 + u * u;
    gammaRe[i] = (a * ((r - 1) * (r + 1) + u * u)) / power;
    gammaIm[i] = (a * 2 * u) / power;
  }
  const magnitude = gammaRe.map((re, i) => Math.hypot(re, gammaIm[i]));
  const sweep: Sweep = { frequencyHz, magnitude, referenceOhm: 50, plane: "port" };
  return shape.complex ? { ...sweep, gammaRe, gammaIm } : sweep;
}

export interface Truth {
  swr: number;
  /** Null where the SWR never gets to the limit. */
  lowHz: number | null;
  highHz: number | null;
  widthHz: number | null;
}

export function truthOf(
  { r, q, a = 1, f0Hz = 14.15e6 }: Pick<Shape, "r" | "q" | "a" | "f0Hz">,
  s = 2,
): Truth {
  const lowest = (a * Math.abs(r - 1)) / (r + 1);
  const g = (s - 1) / (s + 1) / a;
  const square = ((r + 1) ** 2 * g * g - (r - 1) ** 2) / (1 - g * g);
  const swr = (1 + lowest) / (1 - lowest);
  if (!(square > 0) || g >= 1) return { swr, lowHz: null, highHz: null, widthHz: null };
  const half = Math.sqrt(square) / (2 * r * q);
  const [lowHz, highHz] = [f0Hz * (Math.hypot(1, half) - half), f0Hz * (Math.hypot(1, half) + half)];
  return { swr, lowHz, highHz, widthHz: 2 * half * f0Hz };
}

/** A sweep with evenly spaced frequencies from plain values of abs Γ. */
export function sweepOf(magnitude: number[], startHz = 1e6, stepHz = 1e4): Sweep {
  return {
    frequencyHz: Float64Array.from(magnitude, (_, i) => startHz + i * stepHz),
    magnitude: Float64Array.from(magnitude),
    referenceOhm: 50,
    plane: "port",
  };
}

/** Repeatable numbers in 0..1 (multiply with carry, G. Marsaglia; from memory, not seen). */
export function uniforms(start: number): () => number {
  let high = 362_436_069 ^ start;
  let low = 521_288_629 + start;
  return () => {
    high = Math.imul(36_969, high & 65_535) + (high >>> 16);
    low = Math.imul(18_000, low & 65_535) + (low >>> 16);
    return (((high << 16) + (low & 65_535)) >>> 0) / 4_294_967_296 + 1e-12;
  };
}

/**
 * Repeatable standard normal numbers (G. E. P. Box & M. E. Muller, Ann. Math. Stat. 29, 610-611, 1958; from
 * memory, not seen).
 */
export function normals(start: number): () => number {
  const uniform = uniforms(start);
  return () => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform());
}
