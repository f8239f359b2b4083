import { removeRun } from "~/services/bundle/runs.server";
import { requireBundle } from "./bundle-access.server.ts";
import { shapeBundleFor } from "./bundle-shapes.server.ts";
import { type Call, endpoint } from "./endpoint.server.ts";
import { problem } from "./problem.ts";

/** How far a bundle is, and its end before its time. */
const handle = endpoint({ GET: read, DELETE: remove });

export const loader = handle;
export const action = handle;

async function read(call: Call): Promise<Response> {
  return Response.json(await shapeBundleFor(await requireBundle(call), call.user.id));
}

async function remove(call: Call): Promise<Response> {
  if (await removeRun(await requireBundle(call))) return new Response(null, { status: 204 });
  const detail = "It is being worked on. Nothing was removed; remove it when it is done.";
  throw problem({ status: 409, code: "under-way", detail });
}
