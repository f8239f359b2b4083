import * as writeUps from "~/db/write-ups.server";
import { changeDraft } from "~/services/write-ups/drafts.server";
import { revisionOf } from "~/services/write-ups/publish.server";
import { absent, requireProjectOf } from "./access.server.ts";
import { type Call, endpoint } from "./endpoint.server.ts";
import { invalid } from "./invalid.ts";
import { readJson } from "./multipart.server.ts";
import { problem } from "./problem.ts";
import { writeUpChangeSchema, writeUpQuerySchema } from "./write-up-schemas.ts";
import { shapeWriteUp } from "./write-up-shapes.server.ts";

const handle = endpoint({ GET: read, POST: change });

export const loader = handle;
export const action = handle;

async function read(call: Call): Promise<Response> {
  const parsed = writeUpQuerySchema.safeParse(Object.fromEntries(call.query));
  if (!parsed.success) throw invalid(parsed.error);
  const found = await find(call);
  const published = await publishedOf(found.writeUp);
  if (parsed.data.draft === undefined && published) {
    const row = { ...found.writeUp, publishedAt: published.publishedAt };
    return Response.json(shapeWriteUp(row, published, found.project.publicId));
  }
  await requireProjectOf(call, found.project.id, "write-up.edit", "write-up");
  return answerDraft(found);
}

async function change(call: Call): Promise<Response> {
  const { writeUp, project } = await find(call);
  await requireProjectOf(call, project.id, "write-up.edit", "write-up");
  const parsed = writeUpChangeSchema.safeParse(await readJson(call.request));
  if (!parsed.success) throw invalid(parsed.error);
  const { title = writeUp.title, body = writeUp.body, revision } = parsed.data;
  if (revision !== revisionOf(writeUp)) throw elsewhere();
  const was = { title: writeUp.title, body: writeUp.body };
  const outcome = await changeDraft(writeUp.id, project, was, { title, body });
  if (outcome.kind === "gone") throw absent("write-up");
  if (outcome.kind === "conflict") throw elsewhere();
  return answerDraft(await find(call));
}

async function find(call: Call): Promise<writeUps.FoundWriteUp> {
  const found = await writeUps.findByPublicId(call.params.writeUp ?? "");
  if (!found) throw absent("write-up");
  return found;
}

async function answerDraft({ writeUp, project }: writeUps.FoundWriteUp): Promise<Response> {
  const published = await publishedOf(writeUp);
  const row = { ...writeUp, publishedAt: published?.publishedAt ?? null };
  return Response.json(shapeWriteUp(row, writeUp, project.publicId));
}

async function publishedOf({ id, publishedNumber }: writeUps.WriteUpRow) {
  if (publishedNumber === null) return undefined;
  return (await writeUps.findVersion(id, publishedNumber))?.version;
}

function elsewhere(): Response {
  const detail = "The draft was changed since. Nothing was written; read it again with `draft=yes`.";
  return problem({ status: 409, code: "changed-since", detail });
}
