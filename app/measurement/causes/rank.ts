/** Where a dip lies against a prediction. */
export interface Standing {
  offsetHz: number;
  toleranceHz: number;
  byChance: number;
  score: number;
}

/**
 * `predictedHz` ± `toleranceHz` (95 %) of a series with `spacingHz` between its members, for a dip at `dipHz` known to
 * ± `uncertaintyHz` (null: taken as small against the tolerance). Null where it is further off than FARTHEST tolerances.
 */
export function standingOf(
  dipHz: number,
  uncertaintyHz: number | null | undefined,
  prediction: { predictedHz: number; toleranceHz: number; spacingHz: number; weight: number },
): Standing | null {
  const { predictedHz, spacingHz, weight } = prediction;
  const toleranceHz = Math.hypot(prediction.toleranceHz, uncertaintyHz ?? 0);
  const offsetHz = dipHz - predictedHz;
  const z = Math.abs(offsetHz) / toleranceHz;
  if (!(z <= FARTHEST)) return null;
  const t = z * STUDENT_95;
  const density = (STUDENT_AT_0 * STUDENT_95) / toleranceHz / (1 + (t * t) / FREEDOM) ** ((FREEDOM + 1) / 2);
  const byChance = Math.min(1, (2 * Math.abs(offsetHz)) / spacingHz);
  return { offsetHz, toleranceHz, byChance, score: Math.log(density * spacingHz * weight) };
}

/** A prediction that misses by more explains nothing. */
export const FARTHEST = 2.5;
/** Student's t with 5 degrees of freedom: 95 % two-sided and the density at 0 (tables; from memory, not seen). */
const FREEDOM = 5;
const STUDENT_95 = 2.571;
const STUDENT_AT_0 = 0.3796;
