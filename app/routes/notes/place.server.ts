import { safePath } from "~/auth/next";
import type { ProjectAccess } from "~/auth/require.server";
import * as dips from "~/db/dips.server";
import type { NotePlace } from "~/db/notes.server";
import * as sweeps from "~/db/sweeps.server";
import { notFound } from "~/errors";

/** The place that two public ids name, in this project, or 404. */
export async function requirePlace(
  { project }: ProjectAccess,
  { dip, sweep }: { dip?: string | null; sweep?: string | null },
): Promise<NotePlace> {
  const place: NotePlace = { projectId: project.id, sweepId: null, dipId: null };
  if (dip) {
    const found = await dips.findByPublicId(dip);
    if (!found || found.dip.projectId !== project.id) throw notFound("dip");
    return { ...place, sweepId: found.dip.sweepId, dipId: found.dip.id };
  }
  if (sweep) {
    const found = await sweeps.findByPublicId(sweep);
    if (!found || found.sweep.projectId !== project.id) throw notFound("sweep");
    return { ...place, sweepId: found.sweep.id };
  }
  return place;
}

/** The page on which a place's thread stands for good. */
export function pathOf(
  project: { publicId: string },
  { dip, sweep }: { dip?: string | null; sweep?: string | null },
): string {
  const base = `/projects/${project.publicId}`;
  if (dip) return `${base}/dips/${dip}`;
  return sweep ? `${base}/sweeps/${sweep}` : base;
}

/** Where a form without scripts goes back to, with the note in sight. */
export function backTo(returnTo: string | undefined, otherwise: string, notePublicId?: string): string {
  const path = safePath(returnTo, otherwise).replace(/#.*$/, "");
  return notePublicId ? `${path}#note-${notePublicId}` : `${path}#thread`;
}

/** Asked by a script of the page, which stays where it is; else by a form of a browser without scripts. */
export function isFromScript(request: Request): boolean {
  return new URL(request.url).pathname.endsWith(".data");
}
