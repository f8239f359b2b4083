import type { Sweep } from "./sweep.ts";

export interface Difference {
  /** Hz, ascending. */
  frequencyHz: Float64Array;
  /** dB of return loss, `after` less `before`: over 0 where less comes back than did. NaN where either has a gap. */
  db: Float64Array;
}

/**
 * The difference of two sweeps over the range that both cover, at the points of the one that is finer there; the other
 * is drawn straight between its points in dB. Empty where they have no range in common.
 */
export function differenceOf(
  before: Pick<Sweep, "frequencyHz" | "magnitude">,
  after: Pick<Sweep, "frequencyHz" | "magnitude">,
): Difference {
  const fromHz = Math.max(before.frequencyHz[0], after.frequencyHz[0]);
  const toHz = Math.min(before.frequencyHz.at(-1) ?? Number.NaN, after.frequencyHz.at(-1) ?? Number.NaN);
  const within = ({ frequencyHz }: Pick<Sweep, "frequencyHz">) =>
    frequencyHz.filter((hz) => hz >= fromHz && hz <= toHz);
  const [a, b] = [within(before), within(after)];
  const frequencyHz = a.length > b.length ? a : b;
  const [old, fresh] = [lossAt(before, frequencyHz), lossAt(after, frequencyHz)];
  return { frequencyHz, db: fresh.map((db, i) => db - old[i]) };
}

/** Return loss in dB at ascending frequencies inside the sweep. */
function lossAt({ frequencyHz, magnitude }: Pick<Sweep, "frequencyHz" | "magnitude">, atHz: Float64Array) {
  let next = 0;
  const loss = (i: number) => -20 * Math.log10(magnitude[i]);
  return atHz.map((hz) => {
    while (next < frequencyHz.length && frequencyHz[next] < hz) next++;
    if (frequencyHz[next] === hz) return loss(next);
    if (next === 0 || next === frequencyHz.length) return Number.NaN;
    const share = (hz - frequencyHz[next - 1]) / (frequencyHz[next] - frequencyHz[next - 1]);
    return loss(next - 1) + share * (loss(next) - loss(next - 1));
  });
}
