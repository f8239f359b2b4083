import type { Cause, CauseContext, JudgedDip } from "../causes.ts";
import { FEEDLINE, type Prediction, predictionsOf } from "../elements.ts";
import { formatLength } from "../lengths.ts";
import { FARTHEST, type Standing, standingOf } from "./rank.ts";
import { offsetWords, shiftWords } from "./words.ts";

/** The best prediction of each part of the antenna that is near enough to the dip. */
export function byParts(dip: JudgedDip, { antenna, unit }: CauseContext): Cause[] {
  const best = new Map<string, { prediction: Prediction; standing: Standing }>();
  const near = predictionsOf(antenna, dip.frequencyHz * REACH, unit, dip.frequencyHz / REACH);
  for (const prediction of near) {
    const { frequencyHz: predictedHz, highHz, spacingHz, weight } = prediction;
    const asked = { predictedHz, toleranceHz: highHz - predictedHz, spacingHz, weight };
    const standing = standingOf(dip.frequencyHz, dip.frequencyUncertaintyHz, asked);
    if (standing && standing.score > (best.get(prediction.part)?.standing.score ?? Number.NEGATIVE_INFINITY))
      best.set(prediction.part, { prediction, standing });
  }
  return [...best.values()].map(({ prediction, standing }) => causeOf(dip, prediction, standing, unit));
}

function causeOf(
  dip: JudgedDip,
  prediction: Prediction,
  standing: Standing,
  unit: CauseContext["unit"],
): Cause {
  const { frequencyHz: predictedHz, part, name, order, what, condition, pathM } = prediction;
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

/** Predictions that may still reach to the dip: FARTHEST times the widest tolerance. */
const REACH = 1 + FARTHEST * 0.06;
/** A clip-on piece of a tenth moves what it is on beyond doubt. */
const TRY_SHARE = 0.1;
