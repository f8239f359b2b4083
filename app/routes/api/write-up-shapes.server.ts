import type { z } from "zod";
import type * as writeUps from "~/db/write-ups.server";
import { env } from "~/env.server";
import { revisionOf } from "~/services/write-ups/publish.server";
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

export function shapeWriteUp(
  row: Row,
  text: { title: string; body: string },
  project: string,
): z.infer<typeof writeUpShape> {
  return {
    ...shapeWriteUpSummary({ ...row, title: text.title }, project),
    body: text.body,
    revision: revisionOf(text),
  };
}
