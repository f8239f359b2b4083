import type { AntennaFeedline } from "../antenna.ts";
import { cableNamed } from "../cables.ts";
import { SPEED_OF_LIGHT } from "../feedline.ts";
import { formatFrequency } from "../units.ts";
import type { Cause, CauseContext, JudgedDip } from "./cause.ts";
import { standingOf } from "./rank.ts";
import { offsetWords } from "./words.ts";

/**
 * VF·c/(2l) of a feedline, Hz; null where its length is not said, or neither its velocity factor nor a cable of the table
 * (`cables.ts`) that has one.
 */
export function ripplePeriodOf(line: Pick<AntennaFeedline, "cable" | "lengthM" | "velocityFactor"> | null) {
  const factor = line?.velocityFactor ?? (line?.cable ? cableNamed(line.cable)?.velocityFactor : null);
  const lengthM = line?.lengthM;
  if (!factor || !lengthM || !(factor > 0 && factor <= 1 && lengthM > 0)) return null;
  return (factor * SPEED_OF_LIGHT) / (2 * lengthM);
}

/**
 * Ripple of a mismatched feedline: minima VF·c/(2l) apart. Offered where a neighbouring dip lies one period away within the
 * tolerance; two neighbours that do make it likelier. Source of the period: standing wave on a line, D. M. Pozar, Microwave
 * Engineering, ch. 2 (from memory, not seen).
 */
export function byRipple(dip: JudgedDip, { dips, ripplePeriodHz: period }: CauseContext): Cause[] {
  if (!period || !(period > 0)) return [];
  const others = dips.filter((other) => other.frequencyHz !== dip.frequencyHz && !other.edge);
  const sides = [-1, 1].flatMap((side) => {
    const aim = dip.frequencyHz + side * period;
    const beyond = others.filter((other) => (other.frequencyHz - dip.frequencyHz) * side > 0);
    const near = beyond.toSorted((a, b) => Math.abs(a.frequencyHz - aim) - Math.abs(b.frequencyHz - aim))[0];
    if (!near) return [];
    const apartHz = Math.abs(near.frequencyHz - dip.frequencyHz);
    const standing = standingOf(apartHz, dip.frequencyUncertaintyHz, {
      predictedHz: period,
      toleranceHz: TOLERANCE * period,
      // Neighbouring dips of no cause lie anywhere within two periods.
      spacingHz: 2 * period,
      weight: WEIGHT,
    });
    return standing ? [{ apartHz, standing, near }] : [];
  });
  if (sides.length === 0) return [];
  const [best] = sides.sort((a, b) => b.standing.score - a.standing.score);
  const both =
    sides.length === 2
      ? sides[0].standing.score + sides[1].standing.score - Math.log(WEIGHT)
      : best.standing.score;
  const at = formatFrequency(best.near.frequencyHz, best.near.frequencyUncertaintyHz ?? null);
  const apart = formatFrequency(Number(best.apartHz.toPrecision(4)));
  const off = offsetWords(best.standing, period)
    .replace("the dip is there", "as predicted")
    .replace("the dip is", "that is");
  return [
    {
      kind: "ripple",
      part: null,
      order: null,
      name: "ripple of the feedline",
      title: "may be ripple of the feedline",
      arithmetic: `VF·c/(2·l) = ${formatFrequency(Number(period.toPrecision(4)))} between minima; the dip at ${at} is ${apart} away${off}${sides.length === 2 ? ", and one on the other side too" : ""}`,
      predictedHz: dip.frequencyHz - best.standing.offsetHz,
      ...best.standing,
      score: both,
      path: null,
      test: "Put another length of cable of the same kind between port and antenna: this cause predicts minima closer together, by the ratio of the lengths.",
    },
  ];
}

/** Of the period: velocity factors vary by some 5 % within a type (common practice, no source), and dips ride on the antenna's own. */
const TOLERANCE = 0.08;
/** Two dips a period apart are often just two dips. */
const WEIGHT = 0.25;
