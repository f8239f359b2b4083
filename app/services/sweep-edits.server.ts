import { inTransaction } from "~/db/client.server";
import * as jobs from "~/db/jobs.server";
import * as sweeps from "~/db/sweeps.server";
import { analyse } from "~/measurement/analyse";
import type { AnalysisSettings, Plane } from "~/measurement/sweep";
import type { Given, ReadProblem } from "~/readers/reading";
import { storeAnalysis } from "./analyses.server.ts";
import { correctAsRead } from "./correction.server.ts";
import { storeOutcome } from "./intake.server.ts";
import { mergeEdit } from "./merge-edit.ts";
import { previewOf } from "./points.server.ts";
import { readFile } from "./reading.server.ts";
import { getObject } from "./storage.server.ts";
import {
  meansOf,
  NO_MEANS,
  planeToKeep,
  taskOf,
  toStore,
  withBenchWarnings,
} from "./sweep-corrections.server.ts";
import { loadPoints } from "./sweep-points.server.ts";

export interface TitleAndDate {
  title: string;
  /** To the minute in UTC, `2026-09-14T17:20`; null where it is not known. */
  takenAt: string | null;
}

/** As the form shows them. */
export function titleAndDateOf(sweep: { title: string; takenAt: Date | null }): TitleAndDate {
  return { title: sweep.title, takenAt: sweep.takenAt?.toISOString().slice(0, 16) ?? null };
}

/** Keeps what a person changed of title and date; answers what somebody else changed meanwhile, with nothing kept. */
export function keepTitleAndDate(
  id: number,
  was: Partial<TitleAndDate>,
  wanted: { title: string; takenAt: Date | null },
): Promise<TitleAndDate | null> {
  return inTransaction(async (tx) => {
    const sweep = await sweeps.lock(id, tx);
    if (!sweep) return null;
    const now = titleAndDateOf(sweep);
    const { changes, conflicts } = mergeEdit(was, { ...now }, { ...titleAndDateOf(wanted) });
    if (conflicts.length > 0) return now;
    const { title, takenAt } = changes;
    if (title === undefined && takenAt === undefined) return null;
    await sweeps.update(
      id,
      { ...(title !== undefined && { title }), ...(takenAt !== undefined && { takenAt: wanted.takenAt }) },
      tx,
    );
    return null;
  });
}

/**
 * Analyses the sweep anew, under other settings or at another plane, and keeps that as the current analysis. At the port
 * and at the antenna the bench counts as it was when the sweep was taken.
 */
export async function keepSettings(
  found: sweeps.FoundSweep,
  settings: AnalysisSettings,
  by: number,
  plane: Plane = planeToKeep(found),
): Promise<void> {
  const { sweep, reading } = found;
  if (!sweep.readingId || !reading?.reading) return;
  const readingId = sweep.readingId;
  const [points, means] = await Promise.all([loadPoints(readingId), meansOf(sweep)]);
  const done = correctAsRead(points, reading.reading, taskOf(means, plane));
  const plain = analyse(done.sweep, settings);
  const analysis = withBenchWarnings(
    { ...plain, warnings: [...done.warnings, ...plain.warnings] },
    plane === "instrument" ? NO_MEANS : means,
  );
  const kept = found.analysis?.warnings.filter(
    (warning) => !analysis.warnings.some((w) => w.code === warning.code),
  );
  await inTransaction(async (tx) => {
    const now = await sweeps.lock(sweep.id, tx);
    // Read anew in the meantime: the newer reading has its own analysis.
    if (now?.readingId !== readingId) return;
    const warnings = [...(kept ?? []).filter((w) => w.code.startsWith("read-")), ...analysis.warnings];
    const analysisId = await storeAnalysis(
      {
        projectId: sweep.projectId,
        sweepId: sweep.id,
        readingId,
        analysis: { ...analysis, warnings },
        correction: toStore(done.correction, means),
        by,
      },
      tx,
    );
    await sweeps.update(sweep.id, { analysisId, preview: previewOf(done.sweep) }, tx);
  });
}

/**
 * Keeps an answer to one question of a file that was never read: the next question may still be open, and there are no
 * numbers to lose. Answers what still stands in the way; null when the file is read now.
 */
export async function keepAnswer(
  found: sweeps.FoundSweep,
  given: Given,
  settings: AnalysisSettings,
  by: number,
): Promise<ReadProblem | null> {
  const { outcome, means } = await readStored(found, given, settings);
  if (!outcome.ok && !outcome.reading) return outcome.problem;
  await inTransaction(async (tx) => {
    const now = await sweeps.lock(found.sweep.id, tx);
    // Read by somebody else in the meantime: that stays.
    if (!now?.problem) return;
    const { id: sweepId, projectId } = found.sweep;
    await storeOutcome({ projectId, sweepId, given, outcome, means, by }, tx);
  });
  return outcome.ok ? null : outcome.problem;
}

/** Reads the stored original anew. A reading that fails changes nothing and says why. */
export async function readAnew(
  found: sweeps.FoundSweep,
  given: Given,
  settings: AnalysisSettings,
  by: number,
): Promise<ReadProblem | null> {
  const { outcome, means } = await readStored(found, given, settings);
  if (!outcome.ok) return outcome.problem;
  await inTransaction(async (tx) => {
    if (!(await sweeps.lock(found.sweep.id, tx))) return;
    const { id: sweepId, projectId } = found.sweep;
    await storeOutcome({ projectId, sweepId, given, outcome, means, by }, tx);
  });
  return null;
}

/** The stored original read once more, its dips found where they were found before. */
async function readStored(found: sweeps.FoundSweep, given: Given, settings: AnalysisSettings) {
  const [bytes, means] = await Promise.all([getObject(found.file.storageKey), meansOf(found.sweep)]);
  const correct = taskOf(means, planeToKeep(found));
  const outcome = await readFile({ name: found.file.name, bytes, given, settings, correct });
  return { outcome, means };
}

/** Deletes a sweep with its dips, notes and original; the object goes once the rows are gone. */
export async function deleteSweep(found: sweeps.FoundSweep): Promise<void> {
  await inTransaction(async (tx) => {
    await jobs.insert("delete-object", { key: found.file.storageKey }, new Date(), tx);
    await sweeps.deleteByFileId(found.file.id, tx);
  });
}
