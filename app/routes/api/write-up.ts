import * as writeUps from "~/db/write-ups.server";
import { changeDraft, deleteDraft } from "~/services/write-ups/drafts.server";
import { revisionOf } from "~/services/write-ups/publish.server";
import { absent, requireProjectOf } from "./access.server.ts";
import { type Call, endpoint } from "./endpoint.server.ts";
import { invalid } from "./invalid.ts";
import { readJson } from "./multipart.server.ts";
import { problem } from "./problem.ts";
import { answerDraft, answerPublished, findWriteUp, requireWriter } from "./write-up-access.server.ts";
import { writeUpChangeSchema, writeUpQuerySchema } from "./write-up-schemas.ts";

const handle = endpoint({ GET: read, POST: change, DELETE: remove });

export const loader = handle;
export const action = handle;

async function read(call: Call): Promise<Response> {
  const parsed = writeUpQuerySchema.safeParse(Object.fromEntries(call.query));
  if (!parsed.success) throw invalid(parsed.error);
  const { draft, version } = parsed.data;
  const found = await findWriteUp(call);
  const { id, publishedNumber } = found.writeUp;
  if (draft === undefined && publishedNumber !== null) {
    const wanted = await writeUps.findVersion(id, version === undefined ? publishedNumber : Number(version));
    if (!wanted) throw absent("version of this write-up");
    return answerPublished(found, wanted.version);
  }
  await requireProjectOf(call, found.project.id, "write-up.edit", "write-up");
  if (version === undefined) return answerDraft(found);
  const wanted = await writeUps.findVersion(id, Number(version));
  if (!wanted) throw absent("version of this write-up");
  return answerPublished(found, wanted.version);
}

async function change(call: Call): Promise<Response> {
  const { writeUp, project } = await requireWriter(call);
  const parsed = writeUpChangeSchema.safeParse(await readJson(call.request));
  if (!parsed.success) throw invalid(parsed.error);
  const { title = writeUp.title, body = writeUp.body, revision } = parsed.data;
  if (revision !== revisionOf(writeUp)) throw elsewhere();
  const was = { title: writeUp.title, body: writeUp.body };
  const outcome = await changeDraft(writeUp.id, project, was, { title, body });
  if (outcome.kind === "gone") throw absent("write-up");
  if (outcome.kind === "conflict") throw elsewhere();
  return answerDraft(await findWriteUp(call));
}

async function remove(call: Call): Promise<Response> {
  const { writeUp } = await requireWriter(call);
  const removal = await deleteDraft(writeUp.id);
  if (removal === "gone") throw absent("write-up");
  if (removal === "removed") return new Response(null, { status: 204 });
  const detail = "It was published once, so it stays; it can be taken back. Nothing was changed.";
  throw problem({ status: 409, code: "published-once", detail });
}

function elsewhere(): Response {
  const detail = "The draft was changed since. Nothing was written; read it again with `draft=yes`.";
  return problem({ status: 409, code: "changed-since", detail });
}
