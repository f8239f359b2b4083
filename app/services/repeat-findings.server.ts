import type { FoundSweep } from "~/db/sweeps.server";
import { analyse } from "~/measurement/analyse";
import { decimate } from "~/measurement/decimate";
import { repeatDips } from "~/measurement/repeat-dips";
import { averageRepeats } from "~/measurement/repeats";
import type { Sweep } from "~/measurement/sweep";
import { pickPoints } from "./points.server.ts";
import { type SweepAt, sweepAt } from "./shown-sweep.server.ts";

/** What repeats of one thing say together: the mean with its spread, and each dip's. */
export async function findRepeats(members: FoundSweep[]) {
  const read = members.filter(({ analysis }) => analysis !== null);
  const at = (await Promise.all(read.map((found) => sweepAt(found)))).filter(
    (one): one is SweepAt => one !== null,
  );
  const mean = averageRepeats(at.map(({ sweep }) => sweep));
  const dips = repeatDips(read.map(({ analysis }) => ({ dips: analysis?.dips ?? [] })));
  return {
    count: at.length,
    dips: dips.map(({ at: found, ...dip }) => ({
      ...dip,
      found: found.filter((index) => index !== null).length,
    })),
    mean: mean && {
      ...drawn(mean.sweep, mean.spread),
      dips: analyse(mean.sweep, read[0]?.analysis?.settings).dips,
      swrLimit: read[0]?.analysis?.settings.swrLimit ?? 2,
    },
    warnings: mean?.warnings ?? [NOTHING_IN_COMMON],
  };
}

/** The mean, and around it one standard deviation of single sweeps. */
function drawn(sweep: Sweep, spread: Float64Array) {
  const kept = decimate(sweep, CHART_POINTS);
  const pick = (value: (i: number) => number) => Float64Array.from(kept, (i) => value(i));
  return {
    sweep: pickPoints(sweep, kept),
    limits: {
      low: pick((i) => Math.max(0, sweep.magnitude[i] - spread[i])),
      high: pick((i) => sweep.magnitude[i] + spread[i]),
    },
  };
}

const NOTHING_IN_COMMON = {
  code: "repeats-nothing-common",
  message: "These sweeps have no range or no reference impedance in common, so they have no mean.",
};
const CHART_POINTS = 1200;
