import { effectiveRole, mayInProject, type ProjectAction, type ProjectRole } from "~/auth/permissions";
import * as projects from "~/db/projects.server";
import * as sweeps from "~/db/sweeps.server";
import type { Call } from "./endpoint.server.ts";
import { problem } from "./problem.ts";

export interface ApiProject {
  project: projects.Project;
  role: ProjectRole;
}

/** The project at `:project` for whoever holds the token: 404 where it is absent or hidden, 403 where refused. */
export async function requireApiProject(call: Call, action: ProjectAction): Promise<ApiProject> {
  return judge(await projects.findWithRole(call.params.project ?? "", call.user.id), action, "project");
}

/** The same for a project known by its row, as that of `what`. */
export async function requireProjectOf(
  call: Call,
  projectId: number,
  action: ProjectAction,
  what: string,
): Promise<ApiProject> {
  return judge(await projects.findWithRoleById(projectId, call.user.id), action, what);
}

/** The sweep at `:sweep`. */
export async function requireApiSweep(call: Call): Promise<sweeps.FoundSweep & ApiProject> {
  const found = await sweeps.findByPublicId(call.params.sweep ?? "");
  if (!found) throw absent("sweep");
  return { ...found, ...(await requireProjectOf(call, found.sweep.projectId, "project.read", "sweep")) };
}

export function absent(what: string): Response {
  const detail = `There is no ${what} at this address, or it is hidden from you. Nothing was changed.`;
  return problem({ status: 404, code: "absent", detail });
}

function judge(
  found: { project: projects.Project; role: ProjectRole | null } | undefined,
  action: ProjectAction,
  what: string,
): ApiProject {
  const role = found ? effectiveRole(found.role, found.project.visibility) : null;
  if (!found || !role) throw absent(what);
  if (!mayInProject(role, action)) {
    const detail = `Your role in this project (${role}) does not include this. Nothing was changed.`;
    throw problem({ status: 403, code: "role", detail });
  }
  return { project: found.project, role };
}
