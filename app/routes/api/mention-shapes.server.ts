import type { z } from "zod";
import type { ListedMention } from "~/db/webmentions.server";
import type { ShownMention } from "~/services/webmention/shown.server";
import type { mentionShape, shownMentionShape } from "./mention-schemas.ts";

/** A mention in a list or alone. What only an owner is to know is left out for everybody else. */
export function shapeMention(
  { mention, plate, writeUp, decidedBy }: ListedMention,
  moderates: boolean,
): z.output<typeof mentionShape> {
  const of = plate
    ? { cited: `/plates/${plate.publicId}`, title: plate.title }
    : { cited: `/write-ups/${writeUp?.publicId}`, title: writeUp?.title ?? "" };
  return {
    id: mention.publicId,
    state: mention.state,
    source: mention.source,
    title: mention.title || null,
    plate: plate?.publicId ?? null,
    writeUp: writeUp?.publicId ?? null,
    citedTitle: of.title,
    reason: moderates ? mention.reason || null : null,
    receivedAt: mention.receivedAt.toISOString(),
    checkedAt: mention.checkedAt?.toISOString() ?? null,
    decidedBy: moderates ? decidedBy : null,
    links: { self: `/api/v1/mentions/${mention.publicId}`, cited: of.cited },
  };
}

export function shapeShownMention({ source, title, at }: ShownMention): z.output<typeof shownMentionShape> {
  return { source, title, at: at.toISOString() };
}
