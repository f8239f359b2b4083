import type { Sweep } from "../measurement/sweep.ts";
import type { ChartPoints } from "./decimate.ts";

/** Points on their way from the server to a chart: an even grid as its ends, magnitudes rounded to what can be seen. */
export interface SentPoints {
  grid: { startHz: number; stopHz: number } | { frequencyHz: number[] };
  /** abs Γ; NaN is a gap. */
  magnitude: number[];
  limits?: { low: number[]; high: number[] };
}

export function packPoints(sweep: Sweep | null): SentPoints {
  if (!sweep) return { grid: { frequencyHz: [] }, magnitude: [] };
  const { frequencyHz, magnitude, pictureLimits } = sweep;
  return {
    grid: isEven(frequencyHz)
      ? { startHz: frequencyHz[0], stopHz: frequencyHz[frequencyHz.length - 1] }
      : { frequencyHz: Array.from(frequencyHz, (hz) => Math.round(hz * 10) / 10) },
    magnitude: rounded(magnitude),
    ...(pictureLimits && {
      limits: { low: rounded(pictureLimits.magnitudeLow), high: rounded(pictureLimits.magnitudeHigh) },
    }),
  };
}

export function unpackPoints({ grid, magnitude }: SentPoints): ChartPoints {
  if ("frequencyHz" in grid) return { frequencyHz: grid.frequencyHz, magnitude };
  const step = (grid.stopHz - grid.startHz) / (magnitude.length - 1);
  return { frequencyHz: magnitude.map((_, i) => grid.startHz + i * step), magnitude };
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

/** Five decimals of abs Γ: 80 dB of return loss. */
function rounded(values: Float64Array): number[] {
  return Array.from(values, (value) => Math.round(value * 1e5) / 1e5);
}

const EVENNESS = 1e-7;
