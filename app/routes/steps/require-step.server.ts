import type { ProjectAccess } from "~/auth/require.server";
import * as steps from "~/db/steps.server";
import { notFound } from "~/errors";

/** The step of this project, or 404. */
export async function requireStep(access: ProjectAccess, publicId: string): Promise<steps.FoundStep> {
  const found = await steps.findByPublicId(publicId);
  if (!found || found.step.projectId !== access.project.id) throw notFound("step");
  return found;
}
