import { inTransaction, type Transaction } from "~/db/client.server";
import * as dips from "~/db/dips.server";
import * as jobs from "~/db/jobs.server";
import * as projects from "~/db/projects.server";
import * as sweeps from "~/db/sweeps.server";
import { analyse } from "~/measurement/analyse";
import type { Feedline } from "~/measurement/feedline";
import { type AnalysisSettings, DEFAULT_SETTINGS, type Plane } from "~/measurement/sweep";
import type { Given, ReadProblem } from "~/readers/reading";
import { storeAnalysis } from "./analyses.server.ts";
import { deleteAttachmentsUnder } from "./attachments.server.ts";
import { correctAsRead } from "./correction.server.ts";
import { record } from "./events.server.ts";
import { storeOutcome } from "./intake.server.ts";
import { conflictOf, mergeEdit } from "./merge-edit.ts";
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
import { keepDecisionsAround, refreshTrails } from "./trails.server.ts";

export interface TitleAndDate {
  title: string;
  /** To the minute in UTC, `2026-09-14T17:20`; null where it is not known. */
  takenAt: string | null;
}

/** As the form shows them. */
export function titleAndDateOf(sweep: { title: string; takenAt: Date | null }): TitleAndDate {
  return { title: sweep.title, takenAt: sweep.takenAt?.toISOString().slice(0, 16) ?? null };
}

/** Keeps what a person changed of title and date; where somebody else changed the same meanwhile, answers what to ask, with nothing kept. */
export function keepTitleAndDate(
  { id, projectId }: Pick<sweeps.SweepRow, "id" | "projectId">,
  was: Partial<TitleAndDate>,
  wanted: { title: string; takenAt: Date | null },
  by: number,
): Promise<ReturnType<typeof conflictOf> | null> {
  return inTransaction(async (tx) => {
    await projects.lock(projectId, tx);
    const sweep = await sweeps.lock(id, tx);
    if (!sweep) return null;
    const now = titleAndDateOf(sweep);
    const mine = titleAndDateOf(wanted);
    const merged = mergeEdit(was, { ...now }, { ...mine });
    if (merged.conflicts.length > 0) return conflictOf({ ...now }, { ...mine }, merged);
    const { title, takenAt } = merged.changes;
    if (title === undefined && takenAt === undefined) return null;
    await sweeps.update(
      id,
      { ...(title !== undefined && { title }), ...(takenAt !== undefined && { takenAt: wanted.takenAt }) },
      tx,
    );
    if (takenAt !== undefined) await refreshTrails(projectId, tx);
    await tellOfSweep("sweep.edited", { ...sweep, title: title ?? sweep.title }, by, tx);
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
  /** Of the sweep's own row, written with the analysis. */
  changes: Pick<Partial<sweeps.SweepRow>, "benchId" | "feedline"> = {},
): Promise<void> {
  const { reading } = found;
  const sweep = { ...found.sweep, ...changes };
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
    await projects.lock(sweep.projectId, tx);
    const now = await sweeps.lock(sweep.id, tx);
    // Read anew in the meantime: the newer reading has its own analysis.
    if (now?.readingId !== readingId) {
      if (now && Object.keys(changes).length > 0) {
        await sweeps.update(sweep.id, changes, tx);
        await tellOfSweep("sweep.edited", now, by, tx);
      }
      return;
    }
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
    await sweeps.update(sweep.id, { ...changes, analysisId, preview: previewOf(done.sweep) }, tx);
    await refreshTrails(sweep.projectId, tx);
    await tellOfSweep("sweep.analysed", now, by, tx);
  });
}

/** The same settings and plane once more, with the bench and the line as they are now. */
export async function analyseAnew(found: sweeps.FoundSweep, by: number): Promise<void> {
  await keepSettings(found, found.analysis?.settings ?? DEFAULT_SETTINGS, by);
}

/**
 * Says which bench the sweep was taken with, null for none, and finds its dips anew at that bench's port (or at the antenna, where they were);
 * without one, where it was measured.
 */
export async function chooseBench(
  found: sweeps.FoundSweep,
  benchId: number | null,
  by: number,
): Promise<void> {
  const { analysis } = found;
  if (!analysis) return changeOnly(found.sweep, { benchId }, by);
  const atAntenna = analysis.correction?.plane === "antenna";
  const plane = atAntenna ? "antenna" : benchId === null ? "instrument" : "port";
  await keepSettings(found, analysis.settings, by, plane, { benchId });
}

/** Says which line lies before the antenna, null for none. Answers whether dips were found anew, as those at the antenna are. */
export async function chooseFeedline(
  found: sweeps.FoundSweep,
  feedline: Feedline | null,
  by: number,
): Promise<boolean> {
  const { analysis, sweep } = found;
  if (analysis?.correction?.plane !== "antenna") {
    await changeOnly(sweep, { feedline }, by);
    return false;
  }
  const without = sweep.benchId === null ? "instrument" : "port";
  await keepSettings(found, analysis.settings, by, feedline ? "antenna" : without, { feedline });
  return true;
}

/** Of the sweep's own row, where no dips are to be found anew. */
function changeOnly(
  sweep: sweeps.SweepRow,
  changes: Pick<Partial<sweeps.SweepRow>, "benchId" | "feedline">,
  by: number,
): Promise<void> {
  return inTransaction(async (tx) => {
    await projects.lock(sweep.projectId, tx);
    await sweeps.update(sweep.id, changes, tx);
    await tellOfSweep("sweep.edited", sweep, by, tx);
  });
}

/** Writes down what happened to a sweep of the antenna, under `projects.lock`; what is done with references is told of their bench. */
export async function tellOfSweep(
  kind: "sweep.edited" | "sweep.read-anew" | "sweep.analysed" | "sweep.deleted",
  { projectId, publicId, title, purpose }: sweeps.SweepRow,
  by: number,
  tx: Transaction,
): Promise<void> {
  if (purpose === "reference") return;
  await record({ projectId, kind, actorId: by, about: { sweep: publicId, title } }, tx);
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
    await projects.lock(found.sweep.projectId, tx);
    const now = await sweeps.lock(found.sweep.id, tx);
    // Read by somebody else in the meantime: that stays.
    if (!now?.problem) return;
    const { id: sweepId, projectId } = found.sweep;
    await storeOutcome({ projectId, sweepId, given, outcome, means, by }, tx);
    await tellOfSweep("sweep.read-anew", now, by, tx);
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
    await projects.lock(found.sweep.projectId, tx);
    if (!(await sweeps.lock(found.sweep.id, tx))) return;
    const { id: sweepId, projectId } = found.sweep;
    await storeOutcome({ projectId, sweepId, given, outcome, means, by }, tx);
    await tellOfSweep("sweep.read-anew", found.sweep, by, tx);
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
export async function deleteSweep(found: sweeps.FoundSweep, by: number): Promise<void> {
  const { id, projectId } = found.sweep;
  await inTransaction(async (tx) => {
    await projects.lock(projectId, tx);
    await jobs.insert("delete-object", { key: found.file.storageKey }, new Date(), tx);
    const gone = await dips.findAllBySweep(id, tx);
    await keepDecisionsAround(
      gone.map(({ dip }) => dip.id),
      tx,
    );
    await deleteAttachmentsUnder({ sweepId: id }, tx);
    await sweeps.deleteByFileId(found.file.id, tx);
    await refreshTrails(projectId, tx);
    await tellOfSweep("sweep.deleted", found.sweep, by, tx);
  });
}
