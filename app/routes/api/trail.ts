import * as trailStops from "~/db/trail-stops.server";
import * as trails from "~/db/trails.server";
import { absent, requireProjectOf } from "./access.server.ts";
import { endpoint } from "./endpoint.server.ts";
import { shapeTrail } from "./story-shapes.server.ts";

const handle = endpoint({
  GET: async (call) => {
    const found = await trails.findByPublicId(call.params.trail ?? "");
    if (!found) throw absent("trail");
    const { project } = await requireProjectOf(call, found.trail.projectId, "project.read", "trail");
    const stops = await trailStops.findAllByTrail(found.trail.id);
    return Response.json(shapeTrail(found.trail, stops, project.publicId));
  },
});

export const loader = handle;
export const action = handle;
