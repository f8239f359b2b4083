import * as steps from "~/db/steps.server";
import { absent, requireProjectOf } from "./access.server.ts";
import { endpoint } from "./endpoint.server.ts";
import { shapeStep } from "./story-shapes.server.ts";

const handle = endpoint({
  GET: async (call) => {
    const found = await steps.findByPublicId(call.params.step ?? "");
    if (!found) throw absent("step");
    const { project } = await requireProjectOf(call, found.step.projectId, "project.read", "step");
    const ordered = await steps.findSweepsInOrder(project.id);
    return Response.json(shapeStep(found, ordered, project.publicId));
  },
});

export const loader = handle;
export const action = handle;
