import * as runs from "~/db/bundle-runs.server";
import { askForMine } from "~/services/bundle/runs.server";
import { shapeBundle } from "./bundle-shapes.server.ts";
import { type Call, endpoint } from "./endpoint.server.ts";

/** All data of whoever holds the token. */
const handle = endpoint({ GET: list, POST: gather });

export const loader = handle;
export const action = handle;

async function list({ user }: Call): Promise<Response> {
  const found = await runs.findByUser(user.id, "mine");
  return Response.json({ items: found.map((run) => shapeBundle(run, null)) });
}

/** Who asks while it is being put together is led to that. */
async function gather({ user }: Call): Promise<Response> {
  const { run } = await askForMine(user.id);
  const shaped = shapeBundle(run, null);
  return Response.json(shaped, { status: 202, headers: { Location: shaped.links.self } });
}
