import type { z } from "zod";
import { effectiveRole } from "~/auth/permissions";
import type { ShownRun } from "~/db/bundle-runs.server";
import * as projects from "~/db/projects.server";
import { shownRun } from "~/routes/bundle/shown-run.server";
import type { bundleShape } from "./bundle-schemas.ts";

/** A run as the API shows it; `project` is the public id of its project, for whoever may read that. */
export function shapeBundle(run: ShownRun, project: string | null): z.output<typeof bundleShape> {
  if (run.kind === "batch") throw new Error("A batch is no bundle.");
  const { id, state, share, again, faults, createdAt, offer, records } = shownRun(run);
  const self = `/api/v1/bundles/${id}`;
  return {
    ...{ id, kind: run.kind, state, share, again, faults, createdAt, file: offer, records, project },
    links: { self, file: offer && `${self}/file`, page: pageOf(run.kind, project) },
  };
}

/** The same, with the project asked for as the person may read it. */
export async function shapeBundleFor(run: ShownRun, userId: number) {
  const found = run.projectId === null ? undefined : await projects.findWithRoleById(run.projectId, userId);
  const readable = found && effectiveRole(found.role, found.project.visibility);
  return shapeBundle(run, readable ? found.project.publicId : null);
}

function pageOf(kind: "export" | "import" | "mine", project: string | null): string {
  switch (kind) {
    case "export":
      return `/projects/${project}/bundle`;
    case "import":
      return "/projects/take-in";
    case "mine":
      return "/settings/my-data";
    default:
      return kind satisfies never;
  }
}
