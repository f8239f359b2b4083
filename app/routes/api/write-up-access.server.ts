import * as writeUps from "~/db/write-ups.server";
import { shownMentions } from "~/services/webmention/shown.server";
import { absent, requireProjectOf } from "./access.server.ts";
import type { Call } from "./endpoint.server.ts";
import { shapeWriteUp } from "./write-up-shapes.server.ts";

/** The write-up at `:writeUp`, whoever asks: what is published is read by anyone. */
export async function findWriteUp(call: Call): Promise<writeUps.FoundWriteUp> {
  const found = await writeUps.findByPublicId(call.params.writeUp ?? "");
  if (!found) throw absent("write-up");
  return found;
}

/** The same for who may write it. */
export async function requireWriter(call: Call): Promise<writeUps.FoundWriteUp> {
  const found = await findWriteUp(call);
  await requireProjectOf(call, found.project.id, "write-up.edit", "write-up");
  return found;
}

/** As it is being written. */
export async function answerDraft(found: writeUps.FoundWriteUp, init: ResponseInit = {}): Promise<Response> {
  const published = await publishedOf(found.writeUp);
  return Response.json(await shaped(found, published?.publishedAt ?? null, found.writeUp), init);
}

/** A version as it was published. */
export async function answerPublished(
  found: writeUps.FoundWriteUp,
  version: writeUps.WriteUpVersion,
): Promise<Response> {
  const shown = await shaped(found, version.publishedAt, version);
  return Response.json({ ...shown, version: version.number });
}

export async function publishedOf({ id, publishedNumber }: writeUps.WriteUpRow) {
  if (publishedNumber === null) return undefined;
  return (await writeUps.findVersion(id, publishedNumber))?.version;
}

async function shaped(
  { writeUp, project }: writeUps.FoundWriteUp,
  publishedAt: Date | null,
  text: { title: string; body: string },
) {
  const [versions, mentions] = await Promise.all([
    writeUps.findVersions(writeUp.id),
    shownMentions({ writeUpId: writeUp.id }),
  ]);
  return shapeWriteUp({ ...writeUp, publishedAt }, text, project.publicId, { versions, mentions });
}
