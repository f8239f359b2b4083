import type { ProjectAccess } from "~/auth/require.server";
import * as sweeps from "~/db/sweeps.server";
import { notFound } from "~/errors";
import type { Sweep } from "~/measurement/sweep";
import { loadPoints } from "~/services/sweep-points.server";

/** The sweep of this project, or 404. `asked` is the query, where it was begun while access was still being asked. */
export async function requireSweep(
  access: ProjectAccess,
  publicId: string,
  asked: ReturnType<typeof sweeps.findByPublicId> = sweeps.findByPublicId(publicId),
): Promise<sweeps.FoundSweep> {
  const found = await asked;
  if (!found || found.sweep.projectId !== access.project.id) throw notFound("sweep");
  return found;
}

/** A sweep that was read, with all its points, or 404: an unread one has no numbers to give. */
export async function requirePoints(
  access: ProjectAccess,
  publicId: string,
): Promise<{ found: sweeps.FoundSweep; points: Sweep }> {
  const found = await requireSweep(access, publicId);
  if (!found.sweep.readingId || found.sweep.problem) throw notFound("reading of this sweep");
  return { found, points: await loadPoints(found.sweep.readingId) };
}
