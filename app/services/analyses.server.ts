import type { Transaction } from "~/db/client.server";
import * as dips from "~/db/dips.server";
import { newPublicId } from "~/db/ids.server";
import type { StoredCorrection } from "~/db/schema";
import * as sweeps from "~/db/sweeps.server";
import { pairDips } from "~/measurement/match-dips";
import type { Analysis, Dip } from "~/measurement/sweep";

export interface StoreAnalysis {
  projectId: number;
  sweepId: number;
  readingId: number;
  analysis: Analysis;
  /** Null: the dips were found in the sweep as it was measured. */
  correction: StoredCorrection | null;
  by: number | null;
}

/**
 * Stores an analysis as the sweep's current one. Dips keep their identity, and so their threads and verdicts:
 * each found dip goes to the known one nearest to it; a known one that is not found any more is kept as absent
 * when something was said on it, else removed.
 */
export async function storeAnalysis(input: StoreAnalysis, tx: Transaction): Promise<number> {
  const { analysis, sweepId, projectId } = input;
  const known = await dips.findAllBySweep(sweepId, tx);
  const pairs = pairDips(
    known.map(({ dip }) => dip.frequencyHz),
    analysis.dips.map((dip) => dip.frequencyHz),
    gateOf(analysis.dips),
  );
  const publicIds: string[] = analysis.dips.map(() => "");
  for (const [i, { dip }] of known.entries()) {
    const j = pairs[i];
    if (j !== null) {
      publicIds[j] = dip.publicId;
      await dips.updateNumbers(dip.id, analysis.dips[j], tx);
    } else if (!(await dips.deleteIfBare(dip.id, tx))) {
      await dips.setAbsent(dip.id, tx);
    }
  }
  const fresh = analysis.dips.flatMap((numbers, j) => {
    if (publicIds[j]) return [];
    publicIds[j] = newPublicId();
    return [{ projectId, sweepId, numbers, publicId: publicIds[j] }];
  });
  await dips.insertAll(fresh, tx);
  return sweeps.insertAnalysis(
    {
      sweepId,
      readingId: input.readingId,
      version: analysis.version,
      settings: analysis.settings,
      correction: input.correction,
      noiseDb: Number.isFinite(analysis.noiseDb) ? analysis.noiseDb : null,
      warnings: analysis.warnings,
      dips: analysis.dips.map((dip, j) => ({ ...dip, publicId: publicIds[j] })),
      createdBy: input.by,
    },
    tx,
  );
}

/** How far a dip may have moved between two analyses of one sweep and still be the same one, Hz. */
function gateOf(found: Dip[]): (hz: number) => number {
  return (hz) => {
    const nearest = found.reduce(
      (best, dip) => (Math.abs(dip.frequencyHz - hz) < Math.abs(best.frequencyHz - hz) ? dip : best),
      found[0],
    );
    return Math.max(hz * GATE_FRACTION, (nearest?.bandwidth?.widthHz ?? 0) / 2);
  };
}

/** A tenth of a per cent to one per cent was seen between a parabola and a fit on coarse sweeps. */
const GATE_FRACTION = 0.01;
