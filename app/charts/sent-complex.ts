import { fromBase64, toBase64 } from "./sent-points.ts";
import type { ComplexPoints } from "./smith-trace.ts";

/** Points with phase on their way from the server to a page, as `SentPoints`: frequencies in float64, the rest in float32. */
export interface SentComplex {
  frequencyHz: string;
  re: string;
  im: string;
  phaseDeg: string;
}

export interface PhasePoints extends ComplexPoints {
  /** Angle of Γ without jumps. */
  phaseDeg: ArrayLike<number>;
}

type Columns = Record<keyof SentComplex, Float64Array>;

export function packComplex({ frequencyHz, re, im, phaseDeg }: Columns): SentComplex {
  const single = (values: Float64Array) => toBase64(Float32Array.from(values));
  return { frequencyHz: toBase64(frequencyHz), re: single(re), im: single(im), phaseDeg: single(phaseDeg) };
}

export function unpackComplex({ frequencyHz, re, im, phaseDeg }: SentComplex): PhasePoints {
  const single = (text: string) => new Float32Array(fromBase64(text));
  return {
    frequencyHz: new Float64Array(fromBase64(frequencyHz)),
    re: single(re),
    im: single(im),
    phaseDeg: single(phaseDeg),
  };
}
