import type { Complex } from "../reflection.ts";
import type { BenchLimits, Sweep, Warning } from "../sweep.ts";
import { type Corrected, none } from "./corrected.ts";
import { type BenchForCorrection, commonSpan, gammaAt } from "./references.ts";
import { residualLimits } from "./residual-limits.ts";
import { standardGammas } from "./standards.ts";
import { termFaults } from "./term-faults.ts";
import { applyTerms, type ErrorTerms, solveTerms } from "./three-term.ts";

/**
 * The three error terms at the frequencies of `atHz`, from complex open, short and load; null where one is a gap, out
 * of range or equal to another. Null as a whole where a reference is missing or has no phase.
 */
export function termsAt(
  bench: BenchForCorrection,
  atHz: Float64Array,
  referenceOhm: number,
): (ErrorTerms | null)[] | null {
  const { open, short, load } = bench.references;
  const o = open && gammaAt(open, atHz);
  const s = short && gammaAt(short, atHz);
  const l = load && gammaAt(load, atHz);
  if (!o || !s || !l) return null;
  const at = ({ re, im }: { re: Float64Array; im: Float64Array }, i: number): Complex => ({
    re: re[i],
    im: im[i],
  });
  return Array.from(atHz, (hz, i) =>
    solveTerms(
      { open: at(o, i), short: at(s, i), load: at(l, i) },
      standardGammas(bench.standards, hz, referenceOhm),
    ),
  );
}

/** The complex sweep with directivity, source match and tracking taken out; NaN where the terms are not known. */
export function correctFully(sweep: Sweep, bench: BenchForCorrection): Corrected | null {
  if (!sweep.gammaRe || !sweep.gammaIm) return null;
  const terms = termsAt(bench, sweep.frequencyHz, sweep.referenceOhm);
  if (!terms) return null;
  const { open, short, load } = bench.references;
  const span = commonSpan([open, short, load, sweep]);
  const inside = sweep.frequencyHz.reduce((n, hz) => n + Number(hz >= span.fromHz && hz <= span.toHz), 0);
  const solved = terms.reduce((n, term) => n + Number(term !== null), 0);
  if (inside > 0 && solved === 0) return none(sweep, equalStandards(inside, inside));
  const n = terms.length;
  const gammaRe = new Float64Array(n).fill(Number.NaN);
  const gammaIm = new Float64Array(n).fill(Number.NaN);
  const magnitude = new Float64Array(n).fill(Number.NaN);
  for (let i = 0; i < n; i++) {
    const term = terms[i];
    if (!term) continue;
    const { re, im } = applyTerms(term, { re: sweep.gammaRe[i], im: sweep.gammaIm[i] });
    [gammaRe[i], gammaIm[i], magnitude[i]] = [re, im, Math.hypot(re, im)];
  }
  const benchLimits: BenchLimits = residualLimits(n, bench.standards, bench.given);
  const warnings: Warning[] = [...termFaults(sweep.frequencyHz, terms)];
  if (Number.isNaN(benchLimits.directivity[0])) warnings.push(IDEAL_LOAD);
  if (solved < inside) warnings.push(equalStandards(inside - solved, inside));
  return {
    sweep: { ...sweep, plane: "port", gammaRe, gammaIm, magnitude, benchLimits },
    correction: { kind: "three-term", plane: "port", ...span },
    warnings,
  };
}

function equalStandards(count: number, of: number): Warning {
  const where = count === of ? "everywhere" : `at ${count} of ${of} points`;
  return {
    code: "equal-standards",
    message: `Two of open, short and load are the same ${where}, or one is a gap: three errors can't be told from two standards, and nothing was corrected there. Look whether one file was given twice.`,
  };
}

const IDEAL_LOAD: Warning = {
  code: "load-taken-as-ideal",
  message:
    "Limits are not known: after a correction the directivity left is the load's own return loss, and the bench does not give it. A load that was compared with a better one makes it known.",
};
