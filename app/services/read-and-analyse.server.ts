import { analyse } from "../measurement/analyse.ts";
import { decimate } from "../measurement/decimate.ts";
import type { Analysis, AnalysisSettings, Warning } from "../measurement/sweep.ts";
import { read } from "../readers/read.ts";
import type { Given, Reading, ReadProblem } from "../readers/reading.ts";
import { encodePoints, pickPoints } from "./points.server.ts";

/** A file to findings in one go, ready to be stored. Runs in a worker thread or in place. */

export interface ReadTask {
  name: string;
  bytes: Uint8Array;
  given: Given;
  settings: AnalysisSettings;
}

export type ReadOutcome =
  | { ok: false; problem: ReadProblem; reading: Reading | null }
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
    };

export default function readAndAnalyse(task: ReadTask): ReadOutcome {
  const result = read({ name: task.name, bytes: task.bytes }, task.given);
  if (!result.ok) return { ok: false, problem: result.problem, reading: result.reading ?? null };
  const { sweep, reading } = result;
  const analysis = analyse(sweep, task.settings);
  const n = sweep.frequencyHz.length;
  return {
    ok: true,
    reading,
    parts: encodePoints(sweep),
    preview: encodePoints(pickPoints(sweep, decimate(sweep, PREVIEW_POINTS)))[0],
    pointCount: n,
    startHz: sweep.frequencyHz[0],
    stopHz: sweep.frequencyHz[n - 1],
    referenceOhm: sweep.referenceOhm,
    complex: sweep.gammaRe !== undefined,
    analysis: { ...analysis, warnings: mergeWarnings(result.warnings, analysis.warnings) },
  };
}

function mergeWarnings(a: Warning[], b: Warning[]): Warning[] {
  const seen = new Set<string>();
  return [...a, ...b].filter(({ code, message }) => {
    const key = `${code} ${message}`;
    return seen.has(key) ? false : seen.add(key);
  });
}

/** Enough for a chart 1600 px wide. */
export const PREVIEW_POINTS = 1600;
