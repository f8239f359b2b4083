import type { ProjectAction, ProjectRole } from "~/auth/permissions";
import * as benches from "~/db/benches.server";

/** What is asked of an access; what `requireProject` answers has it. */
interface Access {
  project: { id: number };
  person: { id: number } | null;
  role: ProjectRole;
  may: (action: ProjectAction) => boolean;
}

/** A bench is changed in the project that keeps it, by whoever edits benches there; somebody's own only by that person. */
export function mayEditBench({ project, person, may }: Access, bench: benches.BenchRow): boolean {
  if (bench.projectId !== project.id || !may("bench.edit")) return false;
  return bench.ownerId === null || bench.ownerId === person?.id;
}

/**
 * Whether the bench can be looked at in a project: by all who read the project that keeps it; elsewhere, where it is
 * somebody's own and can be used, by those who may use it, and by all once a sweep of that project was taken with it.
 */
export async function maySeeBench({ project, may }: Access, bench: benches.BenchRow): Promise<boolean> {
  if (bench.projectId === project.id) return true;
  const taken = await benches.findSweepsTakenWith(bench.id, project.id);
  if (taken.length > 0) return true;
  return may("sweep.add") && (await benches.isUsableIn(bench, project.id));
}
