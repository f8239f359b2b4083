import type { StoredCorrection } from "~/db/schema";
import type { FoundSweep } from "~/db/sweeps.server";
import { pointLimits } from "~/measurement/limits/point-limits";
import { noiseOf } from "~/measurement/noise";
import type { Plane, Sweep } from "~/measurement/sweep";
import { type CorrectedSweep, correctAsRead } from "./correction.server.ts";
import { type Means, meansOf, meansOfStored, taskOf, toStore } from "./sweep-corrections.server.ts";
import { loadPoints } from "./sweep-points.server.ts";

/** A sweep at one plane, with how it came there. */
export interface SweepAt extends Omit<CorrectedSweep, "correction"> {
  correction: StoredCorrection | null;
  means: Means;
  /** Another plane than that of the stored analysis. */
  tried: boolean;
}

/**
 * All points of a sweep at a plane. At that of its stored analysis (or null) with what that was corrected with; at another with the bench
 * and the line as they are said now.
 */
export async function sweepAt(found: FoundSweep, plane: Plane | null = null): Promise<SweepAt | null> {
  const { reading, sweep, analysis } = found;
  if (!reading?.reading || sweep.problem) return null;
  const stored = analysis?.correction ?? null;
  const storedPlane = stored?.plane ?? "instrument";
  const tried = plane !== null && plane !== storedPlane;
  const [points, means] = await Promise.all([
    loadPoints(reading.id),
    tried ? meansOf(sweep) : meansOfStored(stored),
  ]);
  const done = correctAsRead(points, reading.reading, taskOf(means, plane ?? storedPlane));
  return { ...done, correction: toStore(done.correction, means), means, tried };
}

/** Limits of abs Γ per point; undefined where no point has any. */
export function limitsOf(sweep: Sweep): { low: Float64Array; high: Float64Array } | undefined {
  const { low, high, known } = pointLimits(sweep, noiseOf(sweep.magnitude));
  return known ? { low, high } : undefined;
}

/** abs Γ as it was measured, where the correction does not hold; NaN elsewhere. Undefined where it holds everywhere. */
export function uncorrected({ sweep, measured, correction }: SweepAt): Float64Array | undefined {
  if (!correction) return undefined;
  const outside = measured.magnitude.map((value, i) =>
    Number.isNaN(sweep.magnitude[i]) ? value : Number.NaN,
  );
  return outside.some((value) => !Number.isNaN(value)) ? outside : undefined;
}
