import * as benches from "~/db/benches.server";
import type { StoredCorrection } from "~/db/schema";
import type { FoundSweep, SweepRow } from "~/db/sweeps.server";
import type { Feedline } from "~/measurement/feedline";
import type { Analysis, Correction, Plane } from "~/measurement/sweep";
import { benchForSweep, type LoadedBench, loadBench } from "./bench-sweeps.server.ts";
import type { CorrectionTask } from "./correction.server.ts";
import { sha256Of } from "./storage.server.ts";

/** The bench and the line that a sweep can be corrected with. */
export interface Means {
  bench: LoadedBench | null;
  /** The bench that was said, also where it can't be used. */
  named: benches.BenchRow | null;
  feedline: Feedline | null;
  /** Why a bench that was named can't be used for this sweep; null where there is nothing against it. */
  problem: string | null;
}

export const NO_MEANS: Means = { bench: null, named: null, feedline: null, problem: null };

/** What the sweep says it was taken with, as that was when it was taken (or, where that is not said, came in). */
export async function meansOf(
  sweep: Pick<SweepRow, "benchId" | "feedline" | "takenAt" | "createdAt">,
): Promise<Means> {
  const means = { ...NO_MEANS, feedline: sweep.feedline ?? null };
  const found = await benchForSweep(sweep);
  if (!found) return means;
  return found.kind === "bench"
    ? { ...means, bench: found, named: found.bench }
    : { ...means, named: found.bench, problem: found.message };
}

/** What a stored analysis was corrected with, as it is now. */
export async function meansOfStored(stored: StoredCorrection | null): Promise<Means> {
  if (!stored) return NO_MEANS;
  const means = { ...NO_MEANS, feedline: stored.feedline };
  if (!stored.bench) return means;
  const found = await benches.findVersionByPublicId(stored.bench.version);
  if (found) return { ...means, named: found.bench, bench: await loadBench(found.bench, found.version) };
  const problem = `The bench “${stored.bench.name}” that it was corrected with is no longer here. The numbers are kept as they were found; the curve is as it was measured.`;
  return { ...means, feedline: null, problem };
}

export function taskOf({ bench, feedline }: Means, plane: Plane): CorrectionTask {
  return { bench: bench?.correction ?? null, readAs: bench?.readAs ?? {}, feedline, plane };
}

/** Where the sweep's dips are found when it is read anew: where they were; with a bench that never was used, at its port. */
export function planeToKeep({ sweep, analysis }: Pick<FoundSweep, "sweep" | "analysis">): Plane {
  if (analysis) return analysis.correction?.plane ?? "instrument";
  return sweep.benchId === null ? "instrument" : "port";
}

/** The analysis with what is to be said of the bench that it was, or could not be, corrected with. */
export function withBenchWarnings(analysis: Analysis, { bench, problem }: Means): Analysis {
  const more = [
    ...(problem ? [{ code: "bench-not-used", message: problem }] : []),
    ...(bench?.unread ?? []).map(({ kind }) => ({
      code: "reference-unread",
      message: `The bench's ${kind} sweep is not read yet, so the correction does without it.`,
    })),
  ];
  return more.length === 0 ? analysis : { ...analysis, warnings: [...more, ...analysis.warnings] };
}

/** A correction with where it came from, as it is kept with its analysis. */
export function toStore(correction: Correction | null, { bench, feedline }: Means): StoredCorrection | null {
  if (!correction) return null;
  return {
    ...correction,
    bench: bench && {
      bench: bench.bench.publicId,
      version: bench.version.publicId,
      number: bench.version.number,
      name: bench.bench.name,
    },
    references: bench?.sha256 ?? {},
    feedline: correction.plane === "antenna" ? feedline : null,
    ...(bench && { basis: basisOf(bench), validFrom: bench.version.validFrom.toISOString() }),
  };
}

/** What has changed in the bench since an analysis, in words; null where analysing anew would give the same. */
export function changedSince(stored: StoredCorrection | null, now: Means): string | null {
  if (!stored?.bench) return null;
  if (!now.bench)
    return (
      now.problem &&
      `${now.problem} The numbers are of version ${stored.bench.number} of that bench, as they were found.`
    );
  const { version, bench } = now.bench;
  if (version.publicId !== stored.bench.version)
    return `For the day of this sweep the bench “${bench.name}” now has version ${version.number}; the numbers are of version ${stored.bench.number}.`;
  if (stored.basis !== undefined && stored.basis !== basisOf(now.bench))
    return `The references or standards of the bench “${bench.name}” have changed since the numbers were found.`;
  return null;
}

/** Of everything that the bench's part of a correction is computed from: another one gives other numbers. */
function basisOf({ version, references }: LoadedBench): string {
  const from = [
    version.publicId,
    Object.entries(version.standards).sort(),
    Object.entries(version.given).sort(),
    references.map(({ kind, sweep }) => `${kind} ${sweep.readingId}`).sort(),
  ];
  return sha256Of(new TextEncoder().encode(JSON.stringify(from))).slice(0, BASIS_LENGTH);
}

const BASIS_LENGTH = 16;
