import * as trailStops from "~/db/trail-stops.server";
import * as trails from "~/db/trails.server";
import { requireApiProject } from "./access.server.ts";
import { endpoint } from "./endpoint.server.ts";
import { shapeTrail } from "./story-shapes.server.ts";

/** Every trail of a project, by frequency. */
const handle = endpoint({
  GET: async (call) => {
    const { project } = await requireApiProject(call, "project.read");
    const [rows, stops] = await Promise.all([
      trails.findAllByProject(project.id),
      trailStops.findAllByProject(project.id),
    ]);
    const byTrail = new Map<number, typeof stops>(rows.map(({ id }) => [id, []]));
    for (const stop of stops) byTrail.get(stop.trailId)?.push(stop);
    return Response.json({
      items: rows.map((row) => shapeTrail(row, byTrail.get(row.id) ?? [], project.publicId)),
    });
  },
});

export const loader = handle;
export const action = handle;
