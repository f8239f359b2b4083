import { FEEDLINE, type Series } from "../elements.ts";
import { formatLength, type LengthUnit } from "../lengths.ts";

/** A change that can be taken back: what to do, and by how much the part grows, metres. */
export interface Try {
  change: string;
  stepM: number;
}

/** A metre (3 ft) of feedline; of another part a tenth of its path, as a piece of wire clipped on. */
export function tryOn(part: string, name: string, series: Series, pathM: number, unit: LengthUnit): Try {
  const stepM = part === FEEDLINE ? FEEDLINE_STEP_M[unit] : rounded(pathM * SHARE, unit);
  const length = formatLength(stepM, unit);
  if (part === FEEDLINE) return { change: `Add ${length} of feedline`, stepM };
  if (series === "loop") return { change: `Let ${length} of wire into ${name}`, stepM };
  return { change: `Clip ${length} of wire to the end of ${name}`, stepM };
}

/** Where a dip at `hz` goes when its path of `pathM` grows by `stepM`, Hz. */
export function shiftOf(hz: number, pathM: number, stepM: number): number {
  return -hz * (stepM / (pathM + stepM));
}

function rounded(metres: number, unit: LengthUnit): number {
  if (unit === "metres") return Number(metres.toPrecision(2));
  return Math.max(1, Math.round(metres / INCH_M)) * INCH_M;
}

const INCH_M = 0.0254;
const FEEDLINE_STEP_M: Record<LengthUnit, number> = { metres: 1, feet: 36 * INCH_M };
/** A tenth moves what it is on beyond doubt. */
const SHARE = 0.1;
