import type { ProjectAccess } from "~/auth/require.server";
import * as benches from "~/db/benches.server";
import * as photographs from "~/db/photographs.server";
import * as steps from "~/db/steps.server";
import { notFound, refused } from "~/errors";
import { mayEditBench } from "~/services/bench-access.server";

/** Whose photographs they are: row ids, the page that shows them, and that the person may change them. */
export interface PhotographPlace {
  of: photographs.PhotographOf;
  page: string;
}

/** The bench or step that two public ids name, else the antenna; 404 where it is not here, 403 where it may not be changed. */
export async function requirePhotographPlace(
  access: ProjectAccess,
  { bench, step }: { bench?: string; step?: string },
): Promise<PhotographPlace> {
  if (bench) return benchPlace(access, (await benches.findByPublicId(bench))?.bench);
  if (step) return stepPlace(access, (await steps.findByPublicId(step))?.step);
  return antennaPlace(access);
}

/** A photograph of this project with its place, for someone who may change it. */
export async function requirePhotograph(access: ProjectAccess, publicId: string) {
  const found = await photographs.findByPublicId(publicId);
  if (!found || found.photograph.projectId !== access.project.id) throw notFound("photograph");
  const { photograph, bench, step } = found;
  if (bench) return { photograph, place: benchPlace(access, bench) };
  return { photograph, place: step ? stepPlace(access, step) : antennaPlace(access) };
}

function benchPlace(access: ProjectAccess, bench: benches.BenchRow | undefined): PhotographPlace {
  const { project } = access;
  if (!bench || bench.projectId !== project.id) throw notFound("bench");
  if (!mayEditBench(access, bench)) throw refused(NOT_YOURS);
  return {
    of: { projectId: project.id, benchId: bench.id },
    page: `/projects/${project.publicId}/benches/${bench.publicId}`,
  };
}

function stepPlace(access: ProjectAccess, step: steps.StepRow | undefined): PhotographPlace {
  const { project } = access;
  if (!step || step.projectId !== project.id) throw notFound("step");
  if (!access.may("step.edit")) throw refused(NOT_YOURS);
  return {
    of: { projectId: project.id, stepId: step.id },
    page: `/projects/${project.publicId}/steps/${step.publicId}`,
  };
}

function antennaPlace({ project, may }: ProjectAccess): PhotographPlace {
  if (!may("antenna.edit")) throw refused(NOT_YOURS);
  return { of: { projectId: project.id }, page: `/projects/${project.publicId}/antenna` };
}

const NOT_YOURS = "These photographs are for others to change. Nothing was changed.";
