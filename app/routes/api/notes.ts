import * as dips from "~/db/dips.server";
import * as notes from "~/db/notes.server";
import { NoteProblem, type WriteNote, writeNote } from "~/services/notes.server";
import { absent, requireProjectOf } from "./access.server.ts";
import { type Call, endpoint } from "./endpoint.server.ts";
import { invalid } from "./invalid.ts";
import { readJson } from "./multipart.server.ts";
import { problem } from "./problem.ts";
import { newNoteSchema } from "./schemas.ts";
import { shapeNote } from "./shapes.server.ts";

const handle = endpoint({ GET: list, POST: write });

export const loader = handle;
export const action = handle;

async function list(call: Call): Promise<Response> {
  const { dip } = await requireDip(call, "project.read");
  const page = await notes.findPageByDip(dip.id, { cursor: call.query.get("cursor") ?? undefined });
  return Response.json({ items: page.rows.map(shapeNote), nextCursor: page.nextCursor });
}

async function write(call: Call): Promise<Response> {
  const { dip, project } = await requireDip(call, "note.write");
  const parsed = newNoteSchema.safeParse(await readJson(call.request));
  if (!parsed.success) throw invalid(parsed.error);
  const { body, parent, clientKey } = parsed.data;
  const publicId = await store({
    project,
    author: call.user,
    place: { projectId: project.id, sweepId: dip.sweepId, dipId: dip.id },
    parentPublicId: parent ?? null,
    body,
    clientKey: clientKey ?? null,
  });
  const note = await notes.findWithParent(publicId);
  if (!note) throw new Error("The note that was just written is not there.");
  const headers = { Location: `/api/v1/dips/${dip.publicId}/notes` };
  return Response.json(shapeNote(note), { status: 201, headers });
}

async function store(note: WriteNote): Promise<string> {
  try {
    return (await writeNote(note)).publicId;
  } catch (error) {
    if (error instanceof NoteProblem) throw problem({ status: 422, code: "note", detail: error.message });
    throw error;
  }
}

async function requireDip(call: Call, action: "project.read" | "note.write") {
  const found = await dips.findByPublicId(call.params.dip ?? "");
  if (!found) throw absent("dip");
  return { ...found, ...(await requireProjectOf(call, found.dip.projectId, action, "dip")) };
}
