import type { MessagePort } from "node:worker_threads";
import { analyse } from "../measurement/analyse.ts";
import type { Analysis, AnalysisSettings, Correction, Sweep, Warning } from "../measurement/sweep.ts";
import { readAny } from "../readers/read.ts";
import type { Given, Reading, ReadProblem, ReadResult } from "../readers/reading.ts";
import { type CorrectedResult, readCorrected } from "../readers/screenshot/correct.ts";
import { type CorrectionTask, correctAsRead } from "./correction.server.ts";
import { keptPicture, recogniseNothing } from "./kept-pictures.server.ts";
import { PictureRefused, readPictureFile, recogniseText } from "./picture.server.ts";
import { encodePoints, previewOf } from "./points.server.ts";
import { type PictureStage, type SeenPicture, seenPicture } from "./seen-picture.ts";

/** A file to findings in one go, ready to be stored. Runs in a worker thread or in place. */

export interface ReadTask {
  name: string;
  bytes: Uint8Array;
  given: Given;
  settings: AnalysisSettings;
  /** The bench and the line to correct with before dips are found; as measured without. */
  correct?: CorrectionTask;
  /** Pictures: told each stage that is done. */
  port?: MessagePort;
  /** Pictures: the file's SHA-256 where it is being corrected, so that its pixels are kept at hand. */
  kept?: string;
  /** Pictures: whether what is printed is read where it is not given. */
  print?: boolean;
}

export type ReadOutcome =
  | { ok: false; problem: ReadProblem; reading: Reading | null; picture: SeenPicture | null }
  | {
      ok: true;
      reading: Reading;
      parts: Uint8Array[];
      preview: Uint8Array;
      pointCount: number;
      startHz: number;
      stopHz: number;
      referenceOhm: number;
      complex: boolean;
      analysis: Analysis;
      /** What was done before the dips were found; null: nothing. */
      correction: Correction | null;
      picture: SeenPicture | null;
    };

export default async function readAndAnalyse(task: ReadTask): Promise<ReadOutcome> {
  const tell = (stage: PictureStage) => task.port?.postMessage(stage);
  let seen: SeenPicture | null = null;
  const picture = async (): Promise<ReadResult> => {
    const result = await readOnePicture(task, tell);
    seen = result.corners || result.picture.width > 0 ? seenPicture(result) : null;
    return result;
  };
  const result = await readAny({ name: task.name, bytes: task.bytes }, task.given, { picture });
  if (!result.ok) {
    return { ok: false, problem: result.problem, reading: result.reading ?? null, picture: seen };
  }
  if (seen) tell("trace");
  const { sweep, reading } = result;
  if (sweep.magnitude.every(Number.isNaN)) return { ok: false, problem: ONLY_GAPS, reading, picture: seen };
  const done = correctAsRead(sweep, reading, task.correct);
  const analysis = analyse(done.sweep, task.settings);
  if (seen) tell("dips");
  return {
    ok: true,
    reading,
    ...storedForm(sweep, done.sweep),
    analysis: {
      ...analysis,
      warnings: mergeWarnings(result.warnings, [...done.warnings, ...analysis.warnings]),
    },
    correction: done.correction,
    picture: seen,
  };
}

/** The reader says which stage it begins; the one before it is then done. */
async function readOnePicture(task: ReadTask, tell: (stage: PictureStage) => void): Promise<CorrectedResult> {
  const done = { frame: "decoded", axes: "frame", trace: "axes" } as const;
  const file = { name: task.name, bytes: task.bytes };
  if (!task.kept) return readPictureFile(file, task.given, (stage) => tell(done[stage]));
  try {
    const pixels = await keptPicture(task.kept, task.bytes);
    return await readCorrected(pixels, task.print ? recogniseText : recogniseNothing, task.given.screenshot);
  } catch (error) {
    // Said by the reader in its own words.
    if (error instanceof PictureRefused) return readPictureFile(file, task.given);
    throw error;
  }
}

/** The points as they were read, and a preview of the sweep that was analysed. */
function storedForm(sweep: Sweep, analysed: Sweep) {
  const n = sweep.frequencyHz.length;
  return {
    parts: encodePoints(sweep),
    preview: previewOf(analysed),
    pointCount: n,
    startHz: sweep.frequencyHz[0],
    stopHz: sweep.frequencyHz[n - 1],
    referenceOhm: sweep.referenceOhm,
    complex: sweep.gammaRe !== undefined,
  };
}

function mergeWarnings(a: Warning[], b: Warning[]): Warning[] {
  const seen = new Set<string>();
  return [...a, ...b].filter(({ code, message }) => {
    const key = `${code} ${message}`;
    return seen.has(key) ? false : seen.add(key);
  });
}

const ONLY_GAPS: ReadProblem = {
  code: "no-values",
  message:
    "Every value is a gap when read so: expected numbers. Choose another column, quantity or decimal sign.",
};
