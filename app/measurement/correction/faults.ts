import type { Sweep, Warning } from "../sweep.ts";
import { type BenchReferences, commonSpan, magnitudeAt } from "./references.ts";
import { type ReadAs, scaleFaults } from "./scale-faults.ts";
import { allMhz, mhz } from "./words.ts";
import { sameSweep, zeroLine } from "./zero-line.ts";

/**
 * What is wrong with the references of a sweep, as far as it can be seen without phase; each with a code and a plain
 * sentence. Nothing is repaired. A swapped open and short makes no difference to a scalar correction and is not looked
 * for here.
 */
export function referenceFaults(sweep: Sweep, references: BenchReferences, readAs: ReadAs): Warning[] {
  const { open, short, load } = references;
  const used = [open, short, load].filter((one) => one !== undefined);
  if (used.length === 0) return [];
  return [
    ...rangeFaults(sweep, [open, short, ...(threeTerm(sweep, references) ? [load] : [])]),
    ...loadFaults(sweep, references),
    ...(threeTerm(sweep, references) ? [] : pairFaults(sweep, references)),
    ...scaleFaults(readAs),
    ...used
      .filter((one) => one.referenceOhm !== sweep.referenceOhm)
      .slice(0, 1)
      .map((one) => ({
        code: "references-other-ohm",
        message: `The references are in ${one.referenceOhm} Ω and the sweep in ${sweep.referenceOhm} Ω: were they taken with one instrument and one setting?`,
      })),
  ];
}

function rangeFaults(sweep: Sweep, references: (Sweep | undefined)[]): Warning[] {
  if (references.every((one) => one === undefined) || sweep.frequencyHz.length === 0) return [];
  const { fromHz, toHz } = commonSpan(references);
  const n = sweep.frequencyHz.length;
  const outside = sweep.frequencyHz.reduce((count, hz) => count + Number(!(hz >= fromHz && hz <= toHz)), 0);
  if (outside === 0) return [];
  const where = fromHz <= toHz ? `reach from ${mhz(fromHz)} to ${mhz(toHz)} MHz` : "have no range in common";
  return [
    {
      code: "references-short",
      message: `The references ${where}: ${outside === n ? "no point" : `${outside} of ${n} points`} of the sweep ${outside === n ? "lies in it, and nothing was corrected" : "lie outside and are left out"}. Nothing is extrapolated.`,
    },
  ];
}

function threeTerm(sweep: Sweep, { open, short, load }: BenchReferences): boolean {
  return [sweep, open, short, load].every((one) => one?.gammaRe !== undefined);
}

function loadFaults(sweep: Sweep, references: BenchReferences): Warning[] {
  const at = sweep.frequencyHz;
  const line = zeroLine(references, at);
  if (!references.load || !line) return [];
  const left = magnitudeAt(references.load, at).map((value, i) => value / line.amplitude[i]);
  const where = stretch(at, left, (value) => value > NO_LOAD);
  if (!where) return [];
  const least =
    -20 * Math.log10(left.filter((value) => value > 0).reduce((most, value) => Math.max(most, value), 0));
  return [
    {
      code: "load-not-a-load",
      message: `The load returns ${least < 0.05 ? "as much as" : `only ${least.toFixed(1)} dB less than`} open and short ${where}: it is not a load of ${sweep.referenceOhm} Ω, it was not connected, or two files were exchanged.`,
    },
  ];
}

function pairFaults(sweep: Sweep, references: BenchReferences): Warning[] {
  const { open, short } = references;
  if (!open || !short) return [];
  if (sameSweep(open, short))
    return [
      {
        code: "open-is-short",
        message:
          "The open and the short are the same sweep, so they count as one reference. Look whether one file was given twice.",
      },
    ];
  const at = sweep.frequencyHz;
  const line = zeroLine(references, at);
  const where = line && stretch(at, line.ripple, (value) => value > DISAGREE);
  if (!where) return [];
  return [
    {
      code: "open-short-disagree",
      message: `The open and the short disagree by more than 1 dB ${where}: source match, directivity or a bad contact. Their mean is used; the limits say what that costs.`,
    },
  ];
}

function stretch(at: Float64Array, values: Float64Array, bad: (value: number) => boolean): string | null {
  const hits: number[] = [];
  values.forEach((value, i) => {
    if (bad(value)) hits.push(i);
  });
  return hits.length > 0 ? allMhz(at, hits) : null;
}

/** A load of 30 or 90 Ω still returns 12 dB less; open-circuited leads return 0 to 3 dB less. */
const NO_LOAD = 10 ** (-10 / 20);
/** Half the difference over the mean that is 1 dB between the two. */
const DISAGREE = (10 ** (1 / 20) - 1) / (10 ** (1 / 20) + 1);
