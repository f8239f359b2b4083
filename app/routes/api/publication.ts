import { publish, takeBack } from "~/services/write-ups/publish.server";
import { absent } from "./access.server.ts";
import { type Call, endpoint } from "./endpoint.server.ts";
import { invalid } from "./invalid.ts";
import { readJson } from "./multipart.server.ts";
import { problem } from "./problem.ts";
import { answerPublished, findWriteUp, publishedOf, requireWriter } from "./write-up-access.server.ts";
import { publicationSchema } from "./write-up-schemas.ts";

/** What a write-up's readers see: its draft is published as the next version, or what is published is taken back. */
const handle = endpoint({ POST: make, DELETE: remove });

export const loader = handle;
export const action = handle;

async function make(call: Call): Promise<Response> {
  const { writeUp, project } = await requireWriter(call);
  const parsed = publicationSchema.safeParse(await readJson(call.request));
  if (!parsed.success) throw invalid(parsed.error);
  const outcome = await publish(writeUp, project, call.user, parsed.data);
  switch (outcome.kind) {
    case "published": {
      const found = await findWriteUp(call);
      const version = await publishedOf(found.writeUp);
      if (!version) throw absent("write-up");
      return answerPublished(found, version);
    }
    case "gone":
      throw absent("write-up");
    case "changed-since":
    case "same-as-published":
    case "too-large":
      throw problem({ status: 409, code: outcome.kind, detail: PROBLEMS[outcome.kind] });
    default:
      return outcome satisfies never;
  }
}

async function remove(call: Call): Promise<Response> {
  const { writeUp } = await requireWriter(call);
  if (await takeBack(writeUp, call.user)) return new Response(null, { status: 204 });
  const detail = "It is not published. Nothing was changed.";
  throw problem({ status: 409, code: "not-published", detail });
}

const PROBLEMS = {
  "changed-since":
    "The draft was changed since. Nothing was published; read it again with `draft=yes`, and publish that.",
  "same-as-published": "This is what is published already, word for word. Nothing was changed.",
  "too-large":
    "Its figures are too large to be kept together. Nothing was published; take some out, or make plates of them.",
};
