import { formatFrequency } from "../units.ts";
import type { Cause, CauseContext, JudgedDip } from "./cause.ts";
import { type Standing, standingOf } from "./rank.ts";
import { offsetWords } from "./words.ts";

/**
 * Odd multiples of lower dips of the sweep. Where `parts` already has a part whose own order says the same, nothing is added.
 *
 * A grounded quarter wave comes again at (n − δ)/(1 − δ) times its first, the long-wire rule of elements.ts; δ between 0
 * and 0.06, 0.02 to 0.035 in NEC-2 (tests/fixtures/nec and REFERENCE values 3.068, 5.142, 7.218, 9.295 for a vertical).
 */
export function byMultiples(dip: JudgedDip, { dips }: CauseContext, parts: readonly Cause[]): Cause[] {
  let best: Multiple | null = null;
  for (const lower of dips) {
    if (lower.edge || !(lower.frequencyHz < dip.frequencyHz / 2)) continue;
    const multiple = multipleOf(dip, lower);
    if (multiple && multiple.standing.score > (best?.standing.score ?? Number.NEGATIVE_INFINITY))
      best = multiple;
  }
  if (best === null) return [];
  const { order } = best;
  const said = parts.some((part) => part.order === order && Math.abs(part.offsetHz) < part.toleranceHz);
  return said ? [] : [causeOf(best)];
}

interface Multiple {
  lower: JudgedDip;
  order: number;
  ratio: number;
  predictedHz: number;
  standing: Standing;
}

function multipleOf(dip: JudgedDip, lower: JudgedDip): Multiple | null {
  const order = nearestOdd(dip.frequencyHz / lower.frequencyHz);
  if (order < 3 || order > MOST) return null;
  const ratio = (order - END) / (1 - END);
  const predictedHz = ratio * lower.frequencyHz;
  const standing = standingOf(dip.frequencyHz, dip.frequencyUncertaintyHz, {
    predictedHz,
    toleranceHz: predictedHz * SPREAD,
    spacingHz: 2 * lower.frequencyHz,
    weight: WEIGHT,
  });
  return standing && { lower, order, ratio, predictedHz, standing };
}

function causeOf({ lower, order, ratio, predictedHz, standing }: Multiple): Cause {
  const at = formatFrequency(lower.frequencyHz, lower.frequencyUncertaintyHz ?? null);
  const sum = `${ratio.toFixed(3)} × ${at} = ${formatFrequency(Number(predictedHz.toPrecision(4)))}`;
  return {
    kind: "multiple",
    part: null,
    order,
    name: `the ${order}-fold of the dip at ${at}`,
    title: `may be the ${order}-fold of the dip at ${at}`,
    arithmetic: sum + offsetWords(standing, predictedHz),
    predictedHz,
    ...standing,
    path: null,
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
