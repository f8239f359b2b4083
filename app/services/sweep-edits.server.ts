import { inTransaction } from "~/db/client.server";
import * as jobs from "~/db/jobs.server";
import * as sweeps from "~/db/sweeps.server";
import { analyse } from "~/measurement/analyse";
import type { AnalysisSettings } from "~/measurement/sweep";
import type { Given, ReadProblem } from "~/readers/reading";
import { storeAnalysis } from "./analyses.server.ts";
import { storeOutcome } from "./intake.server.ts";
import { readFile } from "./reading.server.ts";
import { getObject } from "./storage.server.ts";
import { loadPoints } from "./sweep-points.server.ts";

/** Analyses the sweep anew under other settings and keeps that as the current analysis. */
export async function keepSettings(
  found: sweeps.FoundSweep,
  settings: AnalysisSettings,
  by: number,
): Promise<void> {
  const { sweep } = found;
  if (!sweep.readingId) return;
  const readingId = sweep.readingId;
  const analysis = analyse(await loadPoints(readingId), settings);
  const kept = found.analysis?.warnings.filter(
    (warning) => !analysis.warnings.some((w) => w.code === warning.code),
  );
  await inTransaction(async (tx) => {
    const now = await sweeps.lock(sweep.id, tx);
    // Read anew in the meantime: the newer reading has its own analysis.
    if (now?.readingId !== readingId) return;
    const warnings = [...(kept ?? []).filter((w) => w.code.startsWith("read-")), ...analysis.warnings];
    const analysisId = await storeAnalysis(
      { projectId: sweep.projectId, sweepId: sweep.id, readingId, analysis: { ...analysis, warnings }, by },
      tx,
    );
    await sweeps.update(sweep.id, { analysisId }, tx);
  });
}

/** Reads the stored original anew. A reading that fails changes nothing and says why. */
export async function readAnew(
  found: sweeps.FoundSweep,
  given: Given,
  settings: AnalysisSettings,
  by: number,
): Promise<ReadProblem | null> {
  const bytes = await getObject(found.file.storageKey);
  const outcome = await readFile({ name: found.file.name, bytes, given, settings });
  if (!outcome.ok) return outcome.problem;
  await inTransaction(async (tx) => {
    if (!(await sweeps.lock(found.sweep.id, tx))) return;
    await storeOutcome({ projectId: found.sweep.projectId, sweepId: found.sweep.id, given, outcome, by }, tx);
  });
  return null;
}

/** Deletes a sweep with its dips, notes and original; the object goes once the rows are gone. */
export async function deleteSweep(found: sweeps.FoundSweep): Promise<void> {
  await inTransaction(async (tx) => {
    await jobs.insert("delete-object", { key: found.file.storageKey }, new Date(), tx);
    await sweeps.deleteByFileId(found.file.id, tx);
  });
}
