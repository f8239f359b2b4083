import type { Cause, CauseContext, JudgedDip } from "../causes.ts";
import { formatFrequency } from "../units.ts";
import { standingOf } from "./rank.ts";
import { offsetWords } from "./words.ts";

/**
 * Odd multiples of lower dips of the sweep. Where `parts` already has a part whose own order says the same, nothing is added.
 *
 * A grounded quarter wave comes again at (n − δ)/(1 − δ) times its first, the long-wire rule of elements.ts; δ between 0
 * and 0.06, 0.02 to 0.035 in NEC-2 (tests/fixtures/nec and REFERENCE values 3.068, 5.142, 7.218, 9.295 for a vertical).
 */
export function byMultiples(dip: JudgedDip, { dips }: CauseContext, parts: readonly Cause[]): Cause[] {
  let best: Cause | null = null;
  for (const lower of dips) {
    if (lower.edge || !(lower.frequencyHz < dip.frequencyHz / 2)) continue;
    const cause = multipleOf(dip, lower);
    if (cause && cause.score > (best?.score ?? Number.NEGATIVE_INFINITY)) best = cause;
  }
  const said = parts.some(
    ({ order, offsetHz, toleranceHz }) => order === best?.order && Math.abs(offsetHz) < toleranceHz,
  );
  return best && !said ? [best] : [];
}

function multipleOf(dip: JudgedDip, lower: JudgedDip): Cause | null {
  const order = nearestOdd(dip.frequencyHz / lower.frequencyHz);
  if (order < 3 || order > MOST) return null;
  const ratio = (order - END) / (1 - END);
  const predictedHz = ratio * lower.frequencyHz;
  const toleranceHz = predictedHz * SPREAD;
  const standing = standingOf(dip.frequencyHz, dip.frequencyUncertaintyHz, {
    predictedHz,
    toleranceHz,
    spacingHz: 2 * lower.frequencyHz,
    weight: WEIGHT,
  });
  if (!standing) return null;
  const at = formatFrequency(lower.frequencyHz, lower.frequencyUncertaintyHz ?? null);
  return {
    kind: "multiple",
    part: null,
    order,
    title: `may be the ${order}-fold of the dip at ${at}`,
    arithmetic: `${ratio.toFixed(3)} × ${at} = ${formatFrequency(Number(predictedHz.toPrecision(4)))}${offsetWords(standing, predictedHz)}`,
    predictedHz,
    ...standing,
    hzPerMetre: 0,
    test: `Change what makes the dip at ${at}: this cause predicts that both move by the same per cent.`,
  };
}

function nearestOdd(ratio: number): number {
  return 2 * Math.round((ratio * (1 - END) + END - 1) / 2) + 1;
}

const END = 0.03;
/** 95 %: δ from 0 to 0.06, and coupling. */
const SPREAD = 0.025;
/** Any dip has multiples, so one alone is a weak reason. */
const WEIGHT = 0.2;
const MOST = 41;
