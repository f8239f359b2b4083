import * as dips from "~/db/dips.server";
import { requireApiSweep } from "./access.server.ts";
import { endpoint } from "./endpoint.server.ts";
import { shapeSweep } from "./shapes.server.ts";

const handle = endpoint({
  GET: async (call) => {
    const found = await requireApiSweep(call);
    const its = await dips.findAllBySweep(found.sweep.id);
    return Response.json(shapeSweep(found, its, found.project.publicId));
  },
});

export const loader = handle;
export const action = handle;
