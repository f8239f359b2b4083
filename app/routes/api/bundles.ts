import * as runs from "~/db/bundle-runs.server";
import { askForBundle } from "~/services/bundle/runs.server";
import { requireApiProject } from "./access.server.ts";
import { shapeBundle } from "./bundle-shapes.server.ts";
import { type Call, endpoint } from "./endpoint.server.ts";

/** Bundles of a project. */
const handle = endpoint({ GET: list, POST: make });

export const loader = handle;
export const action = handle;

async function list(call: Call): Promise<Response> {
  const { project } = await requireApiProject(call, "project.export");
  const found = await runs.findExports(project.id);
  return Response.json({ items: found.map((run) => shapeBundle(run, project.publicId)) });
}

/** Who asks while one is being made is led to that. */
async function make(call: Call): Promise<Response> {
  const { project } = await requireApiProject(call, "project.export");
  const { run } = await askForBundle(project.id, call.user.id);
  const shaped = shapeBundle(run, project.publicId);
  return Response.json(shaped, { status: 202, headers: { Location: shaped.links.self } });
}
