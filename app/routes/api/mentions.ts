import { mayInProject } from "~/auth/permissions";
import * as webmentions from "~/db/webmentions.server";
import { requireApiProject } from "./access.server.ts";
import { endpoint } from "./endpoint.server.ts";
import { invalid } from "./invalid.ts";
import { mentionQuerySchema } from "./mention-schemas.ts";
import { shapeMention } from "./mention-shapes.server.ts";

/** Pages elsewhere that cite what is the project's: those that are shown, and all for who decides on them. */
const handle = endpoint({
  GET: async (call) => {
    const parsed = mentionQuerySchema.safeParse(Object.fromEntries(call.query));
    if (!parsed.success) throw invalid(parsed.error);
    const { state, cursor } = parsed.data;
    const hidden = state !== undefined && state !== "shown";
    const { project, role } = await requireApiProject(call, hidden ? "mention.moderate" : "project.read");
    const moderates = mayInProject(role, "mention.moderate");
    const states = state ? [state] : moderates ? webmentions.MENTION_STATES : (["shown"] as const);
    const page = await webmentions.findPageByProject(project.id, states, cursor);
    const items = page.rows.map((row) => shapeMention(row, moderates));
    return Response.json({ items, nextCursor: page.nextCursor });
  },
});

export const loader = handle;
export const action = handle;
