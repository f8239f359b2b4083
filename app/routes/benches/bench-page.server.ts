import type { ProjectAccess } from "~/auth/require.server";
import type * as benchReferences from "~/db/bench-references.server";
import * as benches from "~/db/benches.server";
import type { BenchQuality } from "~/measurement/correction/bench-quality";
import { qualifyBench } from "~/measurement/correction/qualify";
import { mayEditBench } from "~/services/bench-access.server";
import { loadBench } from "~/services/bench-sweeps.server";
import { renderNote } from "~/services/markdown.server";
import { listThread } from "~/services/note-thread.server";
import { listPhotographs } from "~/services/photographs.server";
import { benchScene, MEASURES } from "./bench-scene";
import type { Wish } from "./benches.schema";
import { pickVersion } from "./require-bench.server";

/** All that a bench's page shows: one round of queries, then its references' points. */
export async function loadBenchPage(
  access: ProjectAccess,
  found: benches.FoundBench,
  wish: Wish,
  versionId: string | null,
) {
  const { project, person } = access;
  const { bench, owner } = found;
  const here = bench.projectId === project.id;
  const [versions, taken, sweepCount, photographs, thread] = await Promise.all([
    benches.findVersions(bench.id),
    benches.findSweepsTakenWith(bench.id, project.id),
    benches.countSweeps(bench.id),
    here ? listPhotographs({ projectId: project.id, benchId: bench.id }) : [],
    // What is said of a bench is for the readers of the project that keeps it.
    here ? listThread({ projectId: project.id, sweepId: null, dipId: null, benchId: bench.id }, access) : [],
  ]);
  const chosen = pickVersion(versions, versionId);
  const loaded = await loadBench(bench, chosen.version);
  const quality = qualifyBench(loaded.correction, wish);
  return {
    project: { publicId: project.publicId },
    may: { edit: mayEditBench(access, bench), write: access.may("note.write") },
    thread,
    bench: {
      publicId: bench.publicId,
      name: bench.name,
      descriptionHtml: bench.description ? renderNote(bench.description) : null,
      owner: bench.ownerId === null ? null : bench.ownerId === person?.id ? "you" : owner,
      elsewhere: !here,
      retiredAt: bench.retiredAt,
    },
    version: { ...shownVersion(chosen), parts: chosen.version.parts },
    standards: chosen.version.standards,
    given: chosen.version.given,
    versions: versions.map(shownVersion),
    references: [...loaded.references, ...loaded.unread].map((reference) => shownReference(reference, here)),
    taken,
    sweepCount,
    photographs,
    wish,
    quality: {
      correction: quality.correction,
      ranges: quality.ranges,
      limits: quality.limits.map(({ code, message }) => ({ code, message })),
      missing: quality.missing,
    },
    scene: benchScene([quality], wish),
    numbers: numbersOf(quality),
  };
}
export type BenchPageData = Awaited<ReturnType<typeof loadBenchPage>>;

/** The measures at a handful of frequencies, for the table under the drawing. */
export function numbersOf(quality: BenchQuality) {
  const n = quality.frequencyHz.length;
  const indices = Array.from({ length: Math.min(n, TABLE_ROWS) }, (_, i) =>
    n <= TABLE_ROWS ? i : Math.round((i * (n - 1)) / (TABLE_ROWS - 1)),
  );
  return indices.map((i) => ({
    frequencyHz: quality.frequencyHz[i],
    values: MEASURES.map(({ key }) => {
      const value = quality[key][i];
      return Number.isFinite(value) ? value : null;
    }),
  }));
}

function shownVersion({ version, by }: benches.ListedVersion) {
  const { publicId, number, validFrom, remark, createdAt } = version;
  return { publicId, number, validFrom, remark, createdAt, by };
}

/** Where the bench is lent, what its references cover; their sweeps, files and pages are of the project that keeps it. */
function shownReference({ kind, sweep, project, fileName }: benchReferences.FoundReference, here: boolean) {
  const unread = sweep.readingId === null || sweep.problem !== null;
  const page = `/projects/${project}/sweeps/${sweep.publicId}`;
  return {
    kind,
    unread,
    fileName: here ? fileName : null,
    href: here ? (unread ? `${page}/reading` : page) : null,
    pointCount: sweep.pointCount,
    startHz: sweep.startHz,
    stopHz: sweep.stopHz,
  };
}

const TABLE_ROWS = 13;
