import * as benchReferences from "~/db/bench-references.server";
import * as benches from "~/db/benches.server";
import type { BenchForCorrection, BenchReferences } from "~/measurement/correction/references";
import type { ReadAs } from "~/measurement/correction/scale-faults";
import type { Sweep } from "~/measurement/sweep";
import { readAsOf } from "./correction.server.ts";
import { formatDate } from "./dates.ts";
import { loadPoints } from "./sweep-points.server.ts";

/** A version of a bench with the points of its references, ready for `correctSweep` and `qualifyBench`. */
export interface LoadedBench {
  bench: benches.BenchRow;
  version: benches.BenchVersionRow;
  correction: BenchForCorrection;
  /** How the references were read, for `correctSweep`. */
  readAs: ReadAs;
  /** Those that are read; one whose file is still to be read is missing from `correction` and listed in `unread`. */
  references: benchReferences.FoundReference[];
  unread: benchReferences.FoundReference[];
  /** SHA-256 of the references' originals by kind. */
  sha256: Partial<Record<benchReferences.ReferenceKind, string>>;
}

export type BenchForSweep =
  | ({ kind: "bench" } & LoadedBench)
  /** It was said which bench, and it can't be used: `message` says why and what to do. */
  | { kind: "problem"; code: "bench-later" | "bench-gone"; message: string; bench: benches.BenchRow | null };

/**
 * The bench that a sweep was taken with, as it was when the sweep was taken (where that is not known: when it came in). Null where no
 * bench is said. A sweep from before the bench's first version gets no version in silence, but a problem in words.
 */
export async function benchForSweep(sweep: {
  benchId: number | null;
  takenAt: Date | null;
  createdAt: Date;
}): Promise<BenchForSweep | null> {
  if (sweep.benchId === null) return null;
  const bench = await benches.findById(sweep.benchId);
  if (!bench) return { kind: "problem", code: "bench-gone", message: GONE, bench: null };
  const at = sweep.takenAt ?? sweep.createdAt;
  const version = await benches.findVersionAt(bench.id, at);
  if (version) return { kind: "bench", ...(await loadBench(bench, version)) };
  const first = await benches.findFirstVersion(bench.id);
  const taken = sweep.takenAt ? "was taken" : "has no date of its own and came in";
  const message = first
    ? `The bench “${bench.name}” is described from ${formatDate(first.validFrom)} on, and the sweep ${taken} on ${formatDate(at)}. It is not corrected: correct the date of the sweep, or say on the bench's page since when it has been as it is.`
    : `The bench “${bench.name}” has no version. The sweep is not corrected: describe the bench first.`;
  return { kind: "problem", code: "bench-later", message, bench };
}

/** A version's references with all their points; the last points used are kept in memory. */
export async function loadBench(
  bench: benches.BenchRow,
  version: benches.BenchVersionRow,
): Promise<LoadedBench> {
  const found = await benchReferences.findAllByVersions([version.id]);
  const references = found.filter(({ sweep }) => sweep.readingId !== null && sweep.problem === null);
  const points = await Promise.all(references.map(({ sweep }) => loadPoints(sweep.readingId as number)));
  const byKind: BenchReferences = {};
  const readAs: ReadAs = {};
  for (const [i, { kind, reading }] of references.entries()) {
    byKind[kind] = points[i] as Sweep;
    if (reading) readAs[kind] = readAsOf(reading);
  }
  return {
    bench,
    version,
    correction: { references: byKind, standards: version.standards, given: version.given },
    readAs,
    references,
    unread: found.filter((reference) => !references.includes(reference)),
    sha256: Object.fromEntries(references.map(({ kind, sha256 }) => [kind, sha256])),
  };
}

/** The benches that a sweep of the project can be said to be taken with: kept here, or members' own, none put away. */
export async function usableBenches(projectId: number): Promise<benches.ListedBench[]> {
  const [own, borrowed] = await Promise.all([
    benches.findAllByProject(projectId),
    benches.findBorrowable(projectId),
  ]);
  return [...own.filter(({ bench }) => bench.retiredAt === null), ...borrowed];
}

/** Row id of a bench that a sweep of the project can be said to be taken with; undefined where there is none such. */
export async function usableBenchId(publicId: string, projectId: number): Promise<number | undefined> {
  const found = await benches.findByPublicId(publicId);
  return found && (await benches.isUsableIn(found.bench, projectId)) ? found.bench.id : undefined;
}

const GONE =
  "The bench that this sweep was taken with is no longer here. The sweep is as it was measured: choose another bench, or none.";
