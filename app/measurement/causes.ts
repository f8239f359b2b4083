import type { Cause, CauseContext, JudgedDip } from "./causes/cause.ts";
import { byMultiples } from "./causes/multiples.ts";
import { byParts } from "./causes/parts.ts";
import { byReferences } from "./causes/references.ts";
import { byRipple } from "./causes/ripple.ts";

/**
 * Causes of a dip, likeliest first, at most one a part; empty where nothing that is known explains it. Predictions further off
 * than FARTHEST times their tolerance are not offered.
 *
 * Ranking: with z the offset in tolerances (95 %), a dip of this cause lies there with a density of
 * Student's form (5 degrees of freedom, so that one bad length does not rule a cause out), a dip of no cause anywhere between two of the
 * series' predictions alike. The score is the logarithm of their ratio, times how usual the case is. So a near
 * prediction of a crowded series counts less than one of a sparse series. An own rule; how often it is right is measured on
 * NEC-2 models (`npm run accuracy -- causes`). A NaN or infinite frequency has no causes.
 */
export function causesOf(dip: JudgedDip, context: CauseContext): Cause[] {
  if (!(dip.frequencyHz > 0) || !Number.isFinite(dip.frequencyHz)) return [];
  const parts = byParts(dip, context);
  const all = [
    ...parts,
    ...byMultiples(dip, context, parts),
    ...byRipple(dip, context),
    ...byReferences(dip, context),
  ];
  return all.sort((a, b) => b.score - a.score);
}
