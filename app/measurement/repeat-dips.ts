import { pairDips } from "./match-dips.ts";
import type { Analysis, Dip, Warning } from "./sweep.ts";

/** One dip over the repeats in which it was found. */
export interface RepeatedDip {
  /** Index of the dip in each analysis; null where it was not found. */
  at: (number | null)[];
  frequencyHz: number;
  frequencySpreadHz: number | null;
  minimumSwr: number;
  minimumSwrSpread: number | null;
  warnings: Warning[];
}

/**
 * The dips of the first analysis paired with those of the others within one per cent, their means and
 * standard deviations, and a warning where two repeats differ by more than the sum of their own limits.
 * Edge dips are left out.
 */
export function repeatDips(analyses: readonly Pick<Analysis, "dips">[]): RepeatedDip[] {
  const first = analyses.at(0);
  if (!first) return [];
  const hz = (dips: Dip[]) => dips.map((dip) => (dip.edge ? Number.NaN : dip.frequencyHz));
  const pairs = analyses.map(({ dips }) => pairDips(hz(first.dips), hz(dips), (at) => at * GATE));
  return first.dips.flatMap((dip, i) => {
    if (dip.edge) return [];
    const at = pairs.map((pair) => pair[i]);
    const found = at.flatMap((j, k) => (j === null ? [] : [analyses[k].dips[j]]));
    const frequency = meanOf(found.map((one) => one.frequencyHz));
    const swr = meanOf(found.map((one) => one.minimumSwr));
    return [
      {
        at,
        frequencyHz: frequency.mean,
        frequencySpreadHz: frequency.spread,
        minimumSwr: swr.mean,
        minimumSwrSpread: swr.spread,
        warnings: changed(found) ? [CHANGED] : [],
      },
    ];
  });
}

/** The bench is the same each time: only what scatters may differ. */
function changed(dips: Dip[]): boolean {
  return dips.some((a, i) =>
    dips.slice(i + 1).some((b) => {
      const [fa, fb] = [a.frequencyUncertaintyHz, b.frequencyUncertaintyHz];
      const far = fa !== null && fb !== null && Math.abs(a.frequencyHz - b.frequencyHz) > fa + fb;
      return far || apart(a, b) || apart(b, a);
    }),
  );
}

function apart({ minimumSwrNoiseHigh: high }: Dip, { minimumSwrNoiseLow: low }: Dip): boolean {
  return high !== null && low !== null && high < low;
}

function meanOf(values: number[]) {
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  if (values.length < 2) return { mean, spread: null };
  const squares = values.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  return { mean, spread: Math.sqrt(squares / (values.length - 1)) };
}

/** Of the frequency: a dip that moves by more is another one. */
const GATE = 0.01;
const CHANGED: Warning = {
  code: "repeats-differ",
  message: "The repeats differ by more than the limits allow: something changed between them.",
};
