import * as projects from "~/db/projects.server";
import { endpoint } from "./endpoint.server.ts";
import { shapeProject } from "./shapes.server.ts";

/** The projects that the token's holder is a member of. */
const handle = endpoint({
  GET: async ({ user, query }) => {
    const page = await projects.findPageByUser(user.id, { cursor: query.get("cursor") ?? undefined });
    return Response.json({
      items: page.rows.map((row) => shapeProject(row, row.role, row.sweepCount)),
      nextCursor: page.nextCursor,
    });
  },
});

export const loader = handle;
export const action = handle;
