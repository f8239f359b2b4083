import { IDEAL_STANDARDS, NOTHING_GIVEN } from "../../app/measurement/bench.ts";
import { correctSweep } from "../../app/measurement/correction/correct.ts";
import type { BenchReferences } from "../../app/measurement/correction/references.ts";
import type { ReadAs } from "../../app/measurement/correction/scale-faults.ts";
import { type Feedline, matchedLossDb, removeFeedline } from "../../app/measurement/feedline.ts";
import type { Correction, Sweep, Warning } from "../../app/measurement/sweep.ts";
import type { Reading } from "../../app/readers/reading.ts";
import type { CorrectionOptions } from "./options.ts";

/** A reference as its file gave it. */
export interface ReadReference {
  sweep: Sweep;
  reading: Reading;
}

export type Role = "open" | "short" | "load";

export interface Done {
  sweep: Sweep;
  correction: Correction;
  warnings: Warning[];
  /** One line: what was done. */
  told: string;
}

/** Applies the references and takes out the feedline, as far as they were named. */
export function correct(
  sweep: Sweep,
  reading: Reading,
  references: Partial<Record<Role, ReadReference>>,
  options: CorrectionOptions,
): Done {
  const sweeps: BenchReferences = {};
  const readAs: ReadAs = { sweep: readAsOf(reading) };
  for (const role of ROLES) {
    const reference = references[role];
    if (!reference) continue;
    sweeps[role] = reference.sweep;
    readAs[role] = readAsOf(reference.reading);
  }
  const loadAlone = references.load && !references.open && !references.short;
  const bench = {
    references: sweeps,
    standards: { ...IDEAL_STANDARDS, loadReturnLossDb: options.loadReturnLossDb },
    given: { ...NOTHING_GIVEN, zeroDb: loadAlone ? (readAsOf(reading).zeroDb ?? 0) : null },
  };
  const done = correctSweep(sweep, bench, readAs);
  const told = [inWords(done.correction, sweeps)];
  if (!options.line) return { ...done, told: told.join("; ") };
  const { line } = options;
  const moved = removeFeedline(sided(done.sweep, line), {
    ...line,
    velocityFactor: line.velocityFactor ?? 1,
  });
  told.push(lineInWords({ ...line, velocityFactor: line.velocityFactor ?? 1 }, sweep));
  const span = done.correction.kind === "none" ? spanOf(moved.sweep) : done.correction;
  return {
    sweep: moved.sweep,
    correction: {
      kind: done.correction.kind,
      plane: moved.sweep.plane,
      fromHz: span.fromHz,
      toHz: span.toHz,
    },
    warnings: [
      ...done.warnings,
      ...moved.warnings,
      ...(line.velocityFactor === null && sweep.gammaRe ? [NO_PHASE] : []),
    ],
    told: told.join("; "),
  };
}

function readAsOf({ quantity, spec }: Reading) {
  return { quantity, zeroDb: spec.text?.zeroDb ?? spec.screenshot?.zeroDb ?? null };
}

/** Without a velocity factor the phase at the far end is not known: the size alone goes on. */
function sided(
  { gammaRe, gammaIm, ...rest }: Sweep,
  { velocityFactor }: { velocityFactor: number | null },
): Sweep {
  return velocityFactor === null || !gammaRe || !gammaIm ? rest : { ...rest, gammaRe, gammaIm };
}

function spanOf({ frequencyHz, magnitude }: Sweep): { fromHz: number | null; toHz: number | null } {
  const first = magnitude.findIndex((value) => !Number.isNaN(value));
  if (first < 0) return { fromHz: null, toHz: null };
  return {
    fromHz: frequencyHz[first],
    toHz: frequencyHz[magnitude.findLastIndex((value) => !Number.isNaN(value))],
  };
}

function inWords({ kind, fromHz, toHz }: Correction, { open, short, load }: BenchReferences): string {
  if (kind === "none") return open || short || load ? "not corrected: see the warnings" : "as measured";
  const range = `${mhz(fromHz)} to ${mhz(toHz)} MHz`;
  if (kind === "three-term")
    return `open, short and load: directivity, source match and tracking taken out, ${range}`;
  const line =
    open && short ? "the mean of open and short" : open ? "the open" : short ? "the short" : "as read";
  return `0 dB line: ${line}, ${range}${load ? "; limits from the load" : ""}`;
}

function lineInWords(line: Feedline, { frequencyHz }: Sweep): string {
  const middle = frequencyHz[frequencyHz.length >> 1] ?? 0;
  return `${line.lengthM} m of ${line.name} taken out (${matchedLossDb(line, middle).toFixed(2)} dB one way at ${mhz(middle)} MHz): values at the antenna`;
}

function mhz(hz: number | null): string {
  return hz === null ? "?" : String(Number((hz / 1e6).toFixed(3)));
}

export const ROLES: readonly Role[] = ["open", "short", "load"];
const NO_PHASE: Warning = {
  code: "no-velocity-factor",
  message:
    "Without --velocity-factor the phase at the antenna is not known: the size was taken through the feedline, the phase left out.",
};
