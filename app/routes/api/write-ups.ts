import { mayInProject } from "~/auth/permissions";
import * as writeUps from "~/db/write-ups.server";
import { makeDraft } from "~/services/write-ups/drafts.server";
import { requireApiProject } from "./access.server.ts";
import { type Call, endpoint } from "./endpoint.server.ts";
import { invalid } from "./invalid.ts";
import { readJson } from "./multipart.server.ts";
import { newWriteUpSchema } from "./write-up-schemas.ts";
import { shapeWriteUp, shapeWriteUpSummary } from "./write-up-shapes.server.ts";

const handle = endpoint({ GET: list, POST: make });

export const loader = handle;
export const action = handle;

async function list(call: Call): Promise<Response> {
  const { project, role } = await requireApiProject(call, "project.read");
  const rows = await writeUps.findAllByProject(project.id, { drafts: mayInProject(role, "write-up.edit") });
  const items = rows.map((row) =>
    shapeWriteUpSummary({ ...row, title: row.publishedTitle ?? row.title }, project.publicId),
  );
  return Response.json({ items });
}

async function make(call: Call): Promise<Response> {
  const { project } = await requireApiProject(call, "write-up.edit");
  const parsed = newWriteUpSchema.safeParse(await readJson(call.request));
  if (!parsed.success) throw invalid(parsed.error);
  const publicId = await makeDraft(project, call.user, parsed.data);
  const found = await writeUps.findByPublicId(publicId);
  if (!found) throw new Error("The write-up that was just begun is not there.");
  const { writeUp } = found;
  return Response.json(shapeWriteUp({ ...writeUp, publishedAt: null }, writeUp, project.publicId), {
    status: 201,
    headers: { Location: `/api/v1/write-ups/${publicId}?draft=yes` },
  });
}
