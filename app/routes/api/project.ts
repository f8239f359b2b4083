import * as projects from "~/db/projects.server";
import * as sweeps from "~/db/sweeps.server";
import { changeLicence } from "~/services/projects.server";
import { type ApiProject, requireApiProject } from "./access.server.ts";
import { type Call, endpoint } from "./endpoint.server.ts";
import { invalid } from "./invalid.ts";
import { readJson } from "./multipart.server.ts";
import { projectChangeSchema } from "./schemas.ts";
import { shapeProject } from "./shapes.server.ts";

const handle = endpoint({
  GET: async (call) => answer(await requireApiProject(call, "project.read")),
  POST: change,
});

export const loader = handle;
export const action = handle;

async function change(call: Call): Promise<Response> {
  const { project } = await requireApiProject(call, "project.edit");
  const parsed = projectChangeSchema.safeParse(await readJson(call.request));
  if (!parsed.success) throw invalid(parsed.error);
  await changeLicence(project.id, parsed.data.licence, call.user.id);
  return answer(await requireApiProject(call, "project.read"));
}

async function answer({ project, role }: ApiProject): Promise<Response> {
  const [bands, sweepCount] = await Promise.all([
    projects.findDesignBands(project.id),
    sweeps.countByProject(project.id),
  ]);
  return Response.json({
    ...shapeProject(project, role, sweepCount),
    licence: project.licence,
    designBands: bands.map(({ name, lowHz, highHz, swrLimit }) => ({ name, lowHz, highHz, swrLimit })),
  });
}
