import * as projects from "~/db/projects.server";
import * as sweeps from "~/db/sweeps.server";
import { requireApiProject } from "./access.server.ts";
import { endpoint } from "./endpoint.server.ts";
import { shapeProject } from "./shapes.server.ts";

const handle = endpoint({
  GET: async (call) => {
    const { project, role } = await requireApiProject(call, "project.read");
    const [bands, sweepCount] = await Promise.all([
      projects.findDesignBands(project.id),
      sweeps.countByProject(project.id),
    ]);
    return Response.json({
      ...shapeProject(project, role, sweepCount),
      designBands: bands.map(({ name, lowHz, highHz, swrLimit }) => ({ name, lowHz, highHz, swrLimit })),
    });
  },
});

export const loader = handle;
export const action = handle;
