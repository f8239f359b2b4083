import { safePath } from "~/auth/next";
import type { ProjectAccess } from "~/auth/require.server";
import { kindOf, PLACE_KINDS, type ThreadPlace } from "~/components/notes/place";
import * as benches from "~/db/benches.server";
import * as dips from "~/db/dips.server";
import type { NotePlace } from "~/db/notes.server";
import * as steps from "~/db/steps.server";
import * as sweeps from "~/db/sweeps.server";
import * as trails from "~/db/trails.server";
import { notFound } from "~/errors";

/** The place that a public id names, in this project, or 404. */
export async function requirePlace({ project }: ProjectAccess, wished: ThreadPlace): Promise<NotePlace> {
  const place: NotePlace = { projectId: project.id, sweepId: null, dipId: null };
  const kind = kindOf(wished);
  if (!kind) return place;
  const publicId = wished[kind] ?? "";
  const own = <T extends { projectId: number }>(row: T | undefined): T => {
    if (row?.projectId !== project.id) throw notFound(kind);
    return row;
  };
  switch (kind) {
    case "dip": {
      const dip = own((await dips.findByPublicId(publicId))?.dip);
      return { ...place, sweepId: dip.sweepId, dipId: dip.id };
    }
    case "sweep":
      return { ...place, sweepId: own((await sweeps.findByPublicId(publicId))?.sweep).id };
    case "trail":
      return { ...place, trailId: own((await trails.findByPublicId(publicId))?.trail).id };
    case "step":
      return { ...place, stepId: own((await steps.findByPublicId(publicId))?.step).id };
    case "bench":
      return { ...place, benchId: own((await benches.findByPublicId(publicId))?.bench).id };
    default:
      return kind satisfies never;
  }
}

/** `?dip=` and the like. */
export function wishedPlace(query: URLSearchParams): ThreadPlace {
  return Object.fromEntries(
    PLACE_KINDS.flatMap((kind) => (query.get(kind) ? [[kind, query.get(kind)]] : [])),
  );
}

/** The page on which a place's thread stands for good. */
export function pathOf(project: { publicId: string }, place: ThreadPlace): string {
  const base = `/projects/${project.publicId}`;
  const kind = kindOf(place);
  return kind ? `${base}/${FOLDERS[kind]}/${place[kind]}` : base;
}

const FOLDERS = { dip: "dips", sweep: "sweeps", trail: "trails", step: "steps", bench: "benches" };

/** Where a form without scripts goes back to, with the note in sight. */
export function backTo(returnTo: string | undefined, otherwise: string, notePublicId?: string): string {
  const path = safePath(returnTo, otherwise).replace(/#.*$/, "");
  return notePublicId ? `${path}#note-${notePublicId}` : `${path}#thread`;
}

/** Asked by a script of the page, which stays where it is; else by a form of a browser without scripts. */
export function isFromScript(request: Request): boolean {
  return new URL(request.url).pathname.endsWith(".data");
}
