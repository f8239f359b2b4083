import type { ShownRun } from "~/db/bundle-runs.server";
import { offered } from "~/services/bundle/runs.server";
import type { Run } from "./components/RunList.tsx";

/** A run as pages show it. */
export function shownRun(run: ShownRun & { project?: { publicId: string; title: string } | null }): Run {
  const offer = offered(run);
  const report = (run.report ?? {}) as { faults?: string[]; records?: number; attempts?: number };
  return {
    id: run.publicId,
    state: run.state === "done" && run.kind !== "import" && !offer ? "gone" : run.state,
    createdAt: run.createdAt.toISOString(),
    share: shareOf(run),
    again: (report.attempts ?? 0) > 0,
    offer: offer && {
      name: offer.name,
      sizeBytes: offer.sizeBytes,
      files: offer.files,
      until: run.expiresAt?.toISOString() ?? "",
    },
    faults: report.faults ?? [],
    records: report.records ?? null,
    project: run.project?.publicId ? { id: run.project.publicId, title: run.project.title } : null,
  };
}

/** How far it is was written down now and then: the end says that it is done. */
function shareOf({ state, doneParts, allParts }: ShownRun): number | null {
  if (state === "done") return 1;
  return allParts > 0 ? Math.min(1, doneParts / allParts) : null;
}
