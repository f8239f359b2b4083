import type { Cause, CauseContext, JudgedDip } from "../causes.ts";
import { FEEDLINE, type Prediction, predictionsOf } from "../elements.ts";
import { formatLength } from "../lengths.ts";
import { FARTHEST, standingOf } from "./rank.ts";
import { offsetWords, shiftWords } from "./words.ts";

/** The best prediction of each part of the antenna that is near enough to the dip. */
export function byParts(dip: JudgedDip, { antenna, unit }: CauseContext): Cause[] {
  const best = new Map<string, Cause>();
  for (const prediction of predictionsOf(antenna, dip.frequencyHz * REACH, unit)) {
    const cause = causeOf(dip, prediction, unit);
    if (cause && cause.score > (best.get(prediction.part)?.score ?? Number.NEGATIVE_INFINITY))
      best.set(prediction.part, cause);
  }
  return [...best.values()];
}

function causeOf(dip: JudgedDip, prediction: Prediction, unit: CauseContext["unit"]): Cause | null {
  const { frequencyHz: predictedHz, highHz, part, name, order, what, condition, pathM } = prediction;
  const standing = standingOf(dip.frequencyHz, dip.frequencyUncertaintyHz, {
    ...prediction,
    predictedHz,
    toleranceHz: highHz - predictedHz,
  });
  if (!standing) return null;
  const hzPerMetre = -dip.frequencyHz / pathM;
  const stepM = part === FEEDLINE ? 1 : TRY_SHARE * pathM;
  const shift = shiftWords(-dip.frequencyHz * (stepM / (pathM + stepM)));
  const test =
    part === FEEDLINE
      ? `Add ${formatLength(1, unit)} of feedline, or lay it otherwise: this cause predicts ${shift}.`
      : `Make ${name} ${formatLength(Number(stepM.toPrecision(2)), unit)} longer for a try: this cause predicts ${shift}.`;
  return {
    kind: "part",
    part,
    order,
    title: `may be ${name}, ${what}${condition && `, ${condition}`}`,
    arithmetic: prediction.arithmetic + offsetWords(standing, predictedHz),
    predictedHz,
    ...standing,
    hzPerMetre,
    test,
  };
}

/** Predictions above the dip that may still reach down to it. */
const REACH = 1 + FARTHEST * 0.06;
/** A clip-on piece of a tenth moves what it is on beyond doubt. */
const TRY_SHARE = 0.1;
