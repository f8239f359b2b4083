import type { z } from "zod";
import type * as writeUps from "~/db/write-ups.server";
import { env } from "~/env.server";
import type { ShownMention } from "~/services/webmention/shown.server";
import { revisionOf } from "~/services/write-ups/publish.server";
import { shapeShownMention } from "./mention-shapes.server.ts";
import type { writeUpShape, writeUpSummaryShape } from "./write-up-schemas.ts";

type Row = Pick<
  writeUps.WriteUpRow,
  "publicId" | "title" | "publishedNumber" | "takenBackAt" | "updatedAt"
> & { publishedAt: Date | null };

export function shapeWriteUpSummary(row: Row, project: string): z.infer<typeof writeUpSummaryShape> {
  const state = row.publishedNumber !== null ? "published" : row.takenBackAt ? "taken-back" : "draft";
  return {
    id: row.publicId,
    project,
    title: row.title,
    state,
    version: row.publishedNumber,
    publishedAt: row.publishedAt?.toISOString() ?? null,
    updatedAt: row.updatedAt.toISOString(),
    address: `${env.BASE_URL}/write-ups/${row.publicId}`,
  };
}

interface Beside {
  versions: Awaited<ReturnType<typeof writeUps.findVersions>>;
  mentions: ShownMention[];
}

export function shapeWriteUp(
  row: Row,
  text: { title: string; body: string },
  project: string,
  { versions, mentions }: Beside = { versions: [], mentions: [] },
): z.infer<typeof writeUpShape> {
  return {
    ...shapeWriteUpSummary({ ...row, title: text.title }, project),
    versions: versions.map(({ number, title, remark, publishedAt, by }) => ({
      version: number,
      title,
      remark,
      publishedAt: publishedAt.toISOString(),
      publishedBy: by,
    })),
    mentions: mentions.map(shapeShownMention),
    body: text.body,
    revision: revisionOf(text),
  };
}
