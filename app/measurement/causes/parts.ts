import { type Prediction, predictionsOf } from "../elements.ts";
import type { Cause, CauseContext, JudgedDip } from "./cause.ts";
import { FARTHEST, type Standing, standingOf } from "./rank.ts";
import { shiftOf, tryOn } from "./tries.ts";
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
  const { frequencyHz: predictedHz, part, order, what, condition, series, joined } = prediction;
  const { change, stepM } = tryOn(part, prediction.name, series, prediction.pathM, unit ?? "metres");
  const name = `${prediction.name}, ${what}`;
  return {
    kind: "part",
    part,
    order,
    name,
    title: `may be ${name}${condition && `, ${condition}`}`,
    arithmetic: prediction.arithmetic + offsetWords(standing, predictedHz),
    predictedHz,
    ...standing,
    path: { name: prediction.name, series, lengthM: prediction.pathM, joined },
    test: `${change}: this cause predicts ${shiftWords(shiftOf(dip.frequencyHz, prediction.pathM, stepM))}.`,
  };
}

/** Predictions that may still reach to the dip: FARTHEST times the widest tolerance. */
const REACH = 1 + FARTHEST * 0.06;
