import type { Sweep } from "../measurement/sweep.ts";
import type { ChartPoints } from "./decimate.ts";

/**
 * Points on their way from the server to a chart: an even grid as its ends, columns of numbers as base64 (float32 for
 * abs Γ, float64 for frequencies), because thousands of single numbers cost the page's data format dearly.
 */
export interface SentPoints {
  count: number;
  grid: { startHz: number; stopHz: number } | { frequencyHz: string };
  /** abs Γ; NaN is a gap. */
  magnitude: string;
  limits?: { low: string; high: string };
  /** abs Γ as measured where the correction does not hold; NaN elsewhere. */
  measured?: string;
}

export interface UnpackedPoints extends ChartPoints {
  limits?: { low: ArrayLike<number>; high: ArrayLike<number> };
  measured?: ArrayLike<number>;
}

/** What is drawn besides the line itself, point by point. */
export interface BesidePoints {
  /** abs Γ; NaN where not known. In place of a picture's own limits. */
  limits?: { low: Float64Array; high: Float64Array };
  measured?: Float64Array;
}

export function packPoints(sweep: Sweep | null, beside: BesidePoints = {}): SentPoints {
  if (!sweep) return { count: 0, grid: { frequencyHz: "" }, magnitude: "" };
  const { frequencyHz, magnitude } = sweep;
  const limits = beside.limits ?? pictured(sweep);
  const single = (values: Float64Array) => toBase64(Float32Array.from(values));
  return {
    count: frequencyHz.length,
    grid: isEven(frequencyHz)
      ? { startHz: frequencyHz[0], stopHz: frequencyHz[frequencyHz.length - 1] }
      : { frequencyHz: toBase64(frequencyHz) },
    magnitude: single(magnitude),
    ...(limits && { limits: { low: single(limits.low), high: single(limits.high) } }),
    ...(beside.measured && { measured: single(beside.measured) }),
  };
}

function pictured({ pictureLimits }: Sweep): BesidePoints["limits"] {
  return pictureLimits && { low: pictureLimits.magnitudeLow, high: pictureLimits.magnitudeHigh };
}

export function unpackPoints({ count, grid, magnitude, limits, measured }: SentPoints): UnpackedPoints {
  const single = (text: string) => new Float32Array(fromBase64(text));
  return {
    frequencyHz:
      "frequencyHz" in grid ? new Float64Array(fromBase64(grid.frequencyHz)) : evenGrid(grid, count),
    magnitude: single(magnitude),
    ...(limits && { limits: { low: single(limits.low), high: single(limits.high) } }),
    ...(measured && { measured: single(measured) }),
  };
}

function evenGrid({ startHz, stopHz }: { startHz: number; stopHz: number }, count: number): Float64Array {
  const step = (stopHz - startHz) / (count - 1);
  return Float64Array.from({ length: count }, (_, i) => startHz + i * step);
}

/** Within a part in ten million of its span everywhere: a thousandth of a pixel. */
function isEven(frequencyHz: Float64Array): boolean {
  const n = frequencyHz.length;
  if (n < 3) return false;
  const span = frequencyHz[n - 1] - frequencyHz[0];
  for (let i = 1; i < n - 1; i++) {
    if (Math.abs(frequencyHz[i] - frequencyHz[0] - (span * i) / (n - 1)) > span * EVENNESS) return false;
  }
  return true;
}

export function toBase64(values: Float32Array | Float64Array): string {
  const bytes = new Uint8Array(values.buffer, values.byteOffset, values.byteLength);
  let text = "";
  for (let i = 0; i < bytes.length; i += CHUNK) text += String.fromCharCode(...bytes.subarray(i, i + CHUNK));
  return btoa(text);
}

export function fromBase64(text: string): ArrayBuffer {
  const binary = atob(text);
  const bytes = new Uint8Array(binary.length);
  for (let i = 0; i < binary.length; i++) bytes[i] = binary.charCodeAt(i);
  return bytes.buffer;
}

const EVENNESS = 1e-7;
/** As many arguments as any engine takes. */
const CHUNK = 8192;
