import { correctSweep } from "../measurement/correction/correct.ts";
import type { BenchForCorrection } from "../measurement/correction/references.ts";
import type { ReadAs } from "../measurement/correction/scale-faults.ts";
import { type Feedline, removeFeedline } from "../measurement/feedline.ts";
import type { Correction, Plane, Sweep, Warning } from "../measurement/sweep.ts";
import type { Reading } from "../readers/reading.ts";

/** What a sweep is to be corrected with. It goes to a worker thread as it is. */
export interface CorrectionTask {
  /** The bench as it was that day; null where there is none. */
  bench: BenchForCorrection | null;
  /** How the files of the bench's references were read; the sweep's own comes with the sweep. */
  readAs: ReadAs;
  /** The line between port and antenna; null where it is not said. */
  feedline: Feedline | null;
  /** How far: a plane for which something is missing stops at the one before it. */
  plane: Plane;
}

export interface CorrectedSweep {
  /** At the plane that was reached; NaN where the correction does not hold. */
  sweep: Sweep;
  /** Null: nothing was done, the sweep is as it was measured. */
  correction: Correction | null;
  warnings: Warning[];
  /** As it was read, for what lies outside the correction. */
  measured: Sweep;
}

/**
 * A sweep as it is read, at the port of its bench, or at the far end of its feedline: first the bench's correction, then the
 * line is taken away. Without a bench the line is taken away from what was measured, and the limits stay unknown.
 */
export function correctedSweep(measured: Sweep, task: CorrectionTask): CorrectedSweep {
  const untouched = { sweep: measured, correction: null, warnings: [], measured };
  if (task.plane === "instrument") return untouched;
  const atPort = task.bench
    ? { ...correctSweep(measured, task.bench, task.readAs), measured }
    : { ...untouched, correction: null };
  const done = task.plane === "antenna" && task.feedline ? withoutLine(atPort, task.feedline) : atPort;
  if (done.sweep.magnitude.some((value) => !Number.isNaN(value))) return done;
  return { ...untouched, warnings: [...done.warnings, NOWHERE] };
}

function withoutLine(atPort: CorrectedSweep, feedline: Feedline): CorrectedSweep {
  const { sweep, warnings } = removeFeedline(atPort.sweep, feedline);
  const all = [...atPort.warnings, ...warnings];
  // A line that can't be is not taken away: nothing was done by it.
  if (sweep.plane !== "antenna") return { ...atPort, warnings: all };
  const { measured, correction } = atPort;
  return {
    sweep,
    correction: { ...(correction ?? NOTHING_DONE), plane: "antenna" },
    warnings: all,
    measured,
  };
}

/** The same with how the sweep's own file was read, so that references of another kind are noticed. */
export function correctAsRead(
  measured: Sweep,
  reading: Reading,
  task: CorrectionTask | undefined,
): CorrectedSweep {
  if (!task) return { sweep: measured, correction: null, warnings: [], measured };
  const sweep = readAsOf(reading);
  const { references, readAs } = onZeroLineOf(sweep, task);
  const bench = task.bench && { ...task.bench, references };
  return correctedSweep(measured, { ...task, bench, readAs: { ...readAs, sweep } });
}

/** Levels of references brought to the 0 dB line that the sweep's own levels were read with: only their ratio counts. */
function onZeroLineOf({ quantity, zeroDb }: ReadFigures, { bench, readAs }: CorrectionTask) {
  const references = { ...bench?.references };
  const figures = { ...readAs };
  for (const kind of ["open", "short", "load", "through"] as const) {
    const [one, its] = [references[kind], figures[kind]];
    if (quantity !== "level" || its?.quantity !== "level" || !one) continue;
    const ratio = 10 ** (((its.zeroDb ?? 0) - (zeroDb ?? 0)) / 20);
    if (ratio === 1) continue;
    references[kind] = { ...one, magnitude: one.magnitude.map((value) => value * ratio) };
    figures[kind] = { quantity, zeroDb };
  }
  return { references, readAs: figures };
}

type ReadFigures = NonNullable<ReadAs["sweep"]>;

/** What a reading says of its numbers, to be compared with those of other files. */
export function readAsOf({ quantity, spec }: Reading): ReadFigures {
  return { quantity, zeroDb: spec.text?.zeroDb ?? spec.screenshot?.zeroDb ?? null };
}

const NOWHERE: Warning = {
  code: "corrected-nowhere",
  message:
    "The correction holds nowhere in this sweep: the references or the cable's figures do not reach its frequencies. It is shown as measured, with nothing corrected.",
};
const NOTHING_DONE: Correction = { kind: "none", plane: "instrument", fromHz: null, toHz: null };
