import { formatFrequency } from "../units.ts";
import type { Cause, CauseContext, JudgedDip } from "./cause.ts";
import { standingOf } from "./rank.ts";
import { offsetWords } from "./words.ts";

/** The same dip in a sweep of the bench without an antenna: then it is of the bench. The nearest is taken. */
export function byReferences(dip: JudgedDip, { references }: CauseContext): Cause[] {
  const near = references
    .filter(({ frequencyHz }) => frequencyHz > 0)
    .toSorted(
      (a, b) => Math.abs(a.frequencyHz - dip.frequencyHz) - Math.abs(b.frequencyHz - dip.frequencyHz),
    )[0];
  if (!near) return [];
  const standing = standingOf(dip.frequencyHz, dip.frequencyUncertaintyHz, {
    predictedHz: near.frequencyHz,
    toleranceHz: Math.hypot(near.frequencyUncertaintyHz ?? 0, TOLERANCE * near.frequencyHz),
    spacingHz: near.frequencyHz * APART,
    weight: 1,
  });
  if (!standing) return [];
  const at = formatFrequency(near.frequencyHz, near.frequencyUncertaintyHz);
  return [
    {
      kind: "reference",
      part: null,
      order: null,
      name: "the bench",
      title: `may be of the bench: its ${near.role} sweep has the same dip`,
      arithmetic: `${near.role} sweep: dip at ${at}${offsetWords(standing, near.frequencyHz)}`,
      predictedHz: near.frequencyHz,
      ...standing,
      path: null,
      test: "Put the load in the antenna's place and sweep: this cause predicts the dip without the antenna.",
    },
  ];
}

/** The bench's own dips stay where they are but for temperature and the antenna's own slope (common practice, no source). */
const TOLERANCE = 0.01;
/** Dips of a bench are rare: one in a quarter of the frequency at most. */
const APART = 0.25;
