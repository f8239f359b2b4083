import type { Sweep } from "../sweep.ts";
import type { BenchQuality } from "./bench-quality.ts";
import { termsAt } from "./correct-fully.ts";
import { limitsOf, phaseLimitsOf } from "./limiting.ts";
import { missingOf } from "./missing.ts";
import { type BenchForCorrection, commonSpan, magnitudeAt } from "./references.ts";
import { residualLimits } from "./residual-limits.ts";
import { portMatch, scalarLimits } from "./scalar-limits.ts";
import { median, stretchesOf } from "./stretches.ts";
import { isKnown, type Wish } from "./wish.ts";
import { zeroLine } from "./zero-line.ts";

/**
 * What a bench can do, from its references alone (MEASUREMENT section 4), at the frequencies of the finer of open and
 * short within both. An empty bench gives empty arrays and what is missing. Never throws. Sources with the parts:
 * `zeroLine`, `scalarLimits`, `residualLimits`.
 */
export function qualifyBench(bench: BenchForCorrection, wish: Wish): BenchQuality {
  const { references, standards, given } = bench;
  const at = gridOf([references.open, references.short]);
  const n = at.length;
  const line = zeroLine(references, at);
  const scalar = line
    ? scalarLimits(at, line, references.load, standards, given)
    : { directivity: unknown(n), tracking: unknown(n), match: unknown(n) };
  const solved = termsAt(bench, at, references.open?.referenceOhm ?? 50);
  const terms = solved?.map((term) => {
    if (!term) return { directivity: Number.NaN, match: Number.NaN };
    const tracking = Math.hypot(term.tracking.re, term.tracking.im);
    return {
      directivity: Math.hypot(term.directivity.re, term.directivity.im) / tracking,
      match: Math.hypot(term.match.re, term.match.im),
    };
  });
  const through = references.through && magnitudeAt(references.through, at);
  const amplitude = line?.amplitude ?? unknown(n);
  const middle = median(amplitude);
  const left = terms ? residualLimits(n, standards, given) : scalar;
  const directivity = terms ? Float64Array.from(terms, (term) => term.directivity) : scalar.directivity;
  const port = line ? portMatch(at, line, scalar.directivity, given) : scalar.match;
  const match = terms ? Float64Array.from(terms, (term) => term.match) : port;
  const measures = {
    frequencyHz: at,
    insertionLossDb: through ? through.map((value, i) => db(value / amplitude[i])) : unknown(n),
    flatnessDb: amplitude.map((value) => db(value / middle)),
    openShortDisagreementDb: disagreement(references, at),
    directivityDb: directivity.map((value) => -db(value)),
    trackingDb: left.tracking.map((value) => db(1 + value)),
    testPortMatchDb: match.map((value) => -db(value)),
  };
  return {
    ...measures,
    correction: terms ? "three-term" : line ? "scalar" : "none",
    left,
    wish,
    ranges: stretchesOf(at, (i) => isKnown(wish, left, i)).map(({ first, last }) => ({
      fromHz: at[first],
      toHz: at[last],
    })),
    limits: [...phaseLimitsOf(at, solved), ...limitsOf(measures, left, wish)],
    missing: missingOf(bench, terms !== undefined),
  };
}

function gridOf(sweeps: (Sweep | undefined)[]): Float64Array {
  const given = sweeps.filter((sweep) => sweep !== undefined);
  if (given.length === 0) return new Float64Array(0);
  const { fromHz, toHz } = commonSpan(given);
  const inside = given.map((sweep) => sweep.frequencyHz.filter((hz) => hz >= fromHz && hz <= toHz));
  return inside.reduce((finest, grid) => (grid.length > finest.length ? grid : finest));
}

function disagreement({ open, short }: BenchForCorrection["references"], at: Float64Array): Float64Array {
  if (!open || !short) return unknown(at.length);
  const shorted = magnitudeAt(short, at);
  return magnitudeAt(open, at).map((value, i) => db(value / shorted[i]));
}

function db(ratio: number): number {
  return 20 * Math.log10(ratio);
}

function unknown(n: number): Float64Array {
  return new Float64Array(n).fill(Number.NaN);
}
