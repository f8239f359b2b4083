import { endpoint } from "./endpoint.server.ts";
import { requireStanding } from "./plate-access.server.ts";
import { shapePlate } from "./plate-shapes.server.ts";

/** A plate as it was frozen, for whoever has a token: plates are read by anyone. */
const handle = endpoint({
  GET: async (call) => Response.json(await shapePlate(await requireStanding(call))),
});

export const loader = handle;
export const action = handle;
