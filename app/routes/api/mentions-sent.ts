import type { z } from "zod";
import * as sentMentions from "~/db/sent-mentions.server";
import { requireApiProject } from "./access.server.ts";
import { endpoint } from "./endpoint.server.ts";
import type { sentMentionListShape } from "./mention-schemas.ts";

/** Which pages elsewhere the project's write-ups told that they cite them. */
const handle = endpoint({
  GET: async (call) => {
    const { project } = await requireApiProject(call, "mention.moderate");
    const rows = await sentMentions.findAllByProject(project.id, MOST_LISTED);
    const items: z.output<typeof sentMentionListShape>["items"] = rows.flatMap(({ sent, writeUp }) => {
      const { target, state, reason, at } = sent;
      if (state === "none") return [];
      const { publicId, title } = writeUp;
      return [{ writeUp: publicId, title, target, state, reason, at: at.toISOString() }];
    });
    return Response.json({ items });
  },
});

export const loader = handle;
export const action = handle;

const MOST_LISTED = 100;
