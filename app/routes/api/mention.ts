import { mayInProject } from "~/auth/permissions";
import * as webmentions from "~/db/webmentions.server";
import { decide } from "~/services/webmention/moderate.server";
import { absent, requireProjectOf } from "./access.server.ts";
import { type Call, endpoint } from "./endpoint.server.ts";
import { invalid } from "./invalid.ts";
import { mentionDecisionSchema } from "./mention-schemas.ts";
import { shapeMention } from "./mention-shapes.server.ts";
import { readJson } from "./multipart.server.ts";
import { problem } from "./problem.ts";

const handle = endpoint({ GET: read, POST: change });

export const loader = handle;
export const action = handle;

async function read(call: Call): Promise<Response> {
  const found = await find(call);
  const shown = found.mention.state === "shown";
  const { role } = await requireProjectOf(
    call,
    found.projectId,
    shown ? "project.read" : "mention.moderate",
    "mention",
  );
  return answer(found.mention.publicId, mayInProject(role, "mention.moderate"));
}

async function change(call: Call): Promise<Response> {
  const { mention, projectId } = await find(call);
  const { project } = await requireProjectOf(call, projectId, "mention.moderate", "mention");
  const parsed = mentionDecisionSchema.safeParse(await readJson(call.request));
  if (!parsed.success) throw invalid(parsed.error);
  const { decision } = parsed.data;
  if (!(await decide(mention.publicId, decision, project, call.user))) {
    const detail = `It is ${mention.state}: ${DECIDABLE[decision]} Nothing was changed.`;
    throw problem({ status: 409, code: "not-now", detail });
  }
  return answer(mention.publicId, true);
}

/** One of what is in a project: a plate may outlive its own, and then nobody decides. */
async function find(call: Call): Promise<webmentions.FoundMention & { projectId: number }> {
  const found = await webmentions.findByPublicId(call.params.mention ?? "");
  if (!found || found.projectId === null) throw absent("mention");
  return { ...found, projectId: found.projectId };
}

async function answer(publicId: string, moderates: boolean): Promise<Response> {
  const row = await webmentions.findListed(publicId);
  if (!row) throw absent("mention");
  return Response.json(shapeMention(row, moderates));
}

/** As `decide` takes them. */
const DECIDABLE = {
  show: "what was found to link here can be shown, once.",
  hide: "what waits or is shown can be hidden.",
  check: "what waits or is shown can be looked up again.",
};
