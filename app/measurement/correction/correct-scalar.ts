import type { Sweep, Warning } from "../sweep.ts";
import { type Corrected, none } from "./corrected.ts";
import { type BenchForCorrection, commonSpan } from "./references.ts";
import { scalarLimits } from "./scalar-limits.ts";
import { zeroLine, zeroPhase } from "./zero-line.ts";

/**
 * abs Γ over the 0 dB line: the references' (see `zeroLine`), or a level that was given, `zeroDb` dB above the sweep's
 * own. The phase of a complex sweep is referred to open and short where they have phase (response normalisation), else
 * kept as it was measured. NaN outside the references, or where one of them is a gap.
 */
export function correctScalar(sweep: Sweep, bench: BenchForCorrection, zeroDb: number | null): Corrected {
  const { open, short, load } = bench.references;
  const { frequencyHz } = sweep;
  const line = zeroLine(bench.references, frequencyHz);
  const warnings: Warning[] = [];
  const given = zeroDb === null ? null : new Float64Array(frequencyHz.length).fill(10 ** (zeroDb / 20));
  const amplitude = line?.amplitude ?? given;
  if (!amplitude) return none(sweep);
  const limits = scalarLimits(frequencyHz, line ?? stated(amplitude), load, bench.standards, bench.given);
  const over = (values: Float64Array) => values.map((value, i) => value / amplitude[i]);
  const out: Sweep = { ...sweep, plane: "port", magnitude: over(sweep.magnitude), benchLimits: limits };
  if (sweep.gammaRe && sweep.gammaIm) {
    const phase = zeroPhase(bench.references, frequencyHz);
    const re = over(sweep.gammaRe);
    const im = over(sweep.gammaIm);
    if (phase) turnBack(re, im, phase);
    Object.assign(out, { gammaRe: re, gammaIm: im });
    warnings.push(phaseNote(phase !== null));
  }
  if (sweep.pictureLimits) {
    const { frequencyHz: half, magnitudeLow, magnitudeHigh } = sweep.pictureLimits;
    out.pictureLimits = {
      frequencyHz: half,
      magnitudeLow: over(magnitudeLow),
      magnitudeHigh: over(magnitudeHigh),
    };
  }
  warnings.push(...limitNotes(bench, line !== null));
  const span = line ? commonSpan([open, short, sweep]) : commonSpan([sweep]);
  return { sweep: out, correction: { kind: "scalar", plane: "port", ...span }, warnings };
}

function stated(amplitude: Float64Array) {
  return { amplitude, ripple: new Float64Array(amplitude.length).fill(Number.NaN) };
}

function turnBack(re: Float64Array, im: Float64Array, phase: { re: Float64Array; im: Float64Array }) {
  for (let i = 0; i < re.length; i++) {
    const [x, y] = [re[i], im[i]];
    re[i] = x * phase.re[i] + y * phase.im[i];
    im[i] = y * phase.re[i] - x * phase.im[i];
  }
}

function limitNotes({ references, standards, given }: BenchForCorrection, line: boolean): Warning[] {
  const notes: Warning[] = [];
  if (references.load && standards.loadReturnLossDb === null && standards.loadOhm === null)
    notes.push({
      code: "load-not-described",
      message:
        "The directivity is what the load leaves: the load's own error is inside it, either way. The bench does not give the load's return loss.",
    });
  else if (!references.load && given.directivityDb === null)
    notes.push({
      code: "directivity-unknown",
      message: "Without a sweep of the load the directivity is not known, and so no limits of SWR are.",
    });
  if (line && !(references.open && references.short) && given.testPortMatchDb === null)
    notes.push({
      code: "one-reference",
      message: `The 0 dB line is the ${references.open ? "open" : "short"} alone: source match and directivity stay in it in full, and the limits take a test port of 14 dB for it. A sweep of the ${references.open ? "short" : "open"} as well takes most of them out and shows how large they are.`,
    });
  return notes;
}

function phaseNote(referred: boolean): Warning {
  return referred
    ? {
        code: "no-three-term",
        message:
          "Size and phase are referred to the open and the short there are; directivity and source match stay in the values. Open, short and load together, all with phase, would take them out.",
      }
    : {
        code: "phase-as-measured",
        message:
          "The references have no phase: the size is corrected, the phase is as it was measured, so R and X are not those at the port.",
      };
}
