import type { ListedMention } from "~/db/webmentions.server";

/** A mention as those who decide on it see it. */
export function shapeMention({ mention, plate, writeUp, decidedBy }: ListedMention) {
  const { publicId, source, title, state, reason, receivedAt } = mention;
  const { host } = new URL(source);
  const of = plate
    ? { path: `/plates/${plate.publicId}`, title: `Plate ${plate.number}, ${plate.title}` }
    : { path: `/write-ups/${writeUp?.publicId}`, title: writeUp?.title ?? "" };
  return { publicId, source, title: title || host, host, state, reason, at: receivedAt, of, decidedBy };
}
export type ProjectMention = ReturnType<typeof shapeMention>;
