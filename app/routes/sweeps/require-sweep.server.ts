import type { ProjectAccess } from "~/auth/require.server";
import * as sweeps from "~/db/sweeps.server";
import { notFound } from "~/errors";
import { type SweepAt, sweepAt } from "~/services/shown-sweep.server";
import { parsePlane } from "./sweeps.schema";

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

/** A sweep that was read, with all its points at the plane of the address (`?plane=`, else where its dips were found), or 404. */
export async function requireSweepAt(
  access: ProjectAccess,
  publicId: string,
  { url }: Request,
): Promise<{ found: sweeps.FoundSweep; at: SweepAt }> {
  const found = await requireSweep(access, publicId);
  const at = await sweepAt(found, parsePlane(new URL(url).searchParams.get("plane")));
  if (!at) throw notFound("reading of this sweep");
  return { found, at };
}
