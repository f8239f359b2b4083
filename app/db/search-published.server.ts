import { and, desc, eq, isNull, sql } from "drizzle-orm";
import { db, type Queryable } from "./client.server.ts";
import { isReadable } from "./readable.server.ts";
import { plates, projects, writeUps, writeUpVersions } from "./schema/index.ts";
import { before, pageOf, project, type Search } from "./search.server.ts";
import { textHasWords } from "./words.server.ts";

/** Plates by title and caption: of each the newest version, and nothing of what was withdrawn. */
export async function findPlates(search: Search, tx: Queryable = db) {
  const rows = await tx
    .select({
      id: plates.id,
      at: plates.createdAt,
      project,
      publicId: plates.publicId,
      number: plates.number,
      version: plates.version,
      title: plates.title,
      caption: plates.caption,
      withdrawnAt: plates.withdrawnAt,
    })
    .from(plates)
    .innerJoin(projects, eq(projects.id, plates.projectId))
    .where(
      and(
        isReadable(search.userId),
        isNull(plates.withdrawnAt),
        sql`not exists (select 1 from ${plates} later where later.previous_id = ${plates.id})`,
        textHasWords(search.words, sql`concat_ws(' ', ${plates.title}, ${plates.caption})`),
        before(search, plates.createdAt, plates.id),
      ),
    )
    .orderBy(desc(plates.createdAt), desc(plates.id))
    .limit(search.limit + 1);
  return pageOf(rows, search);
}

/** Write-ups by title and text, as they are published; drafts and what was taken back are not looked into. */
export async function findWriteUps(search: Search, tx: Queryable = db) {
  const rows = await tx
    .select({
      id: writeUpVersions.id,
      at: writeUpVersions.publishedAt,
      project,
      publicId: writeUps.publicId,
      title: writeUpVersions.title,
      body: writeUpVersions.body,
    })
    .from(writeUpVersions)
    .innerJoin(
      writeUps,
      and(eq(writeUps.id, writeUpVersions.writeUpId), eq(writeUps.publishedNumber, writeUpVersions.number)),
    )
    .innerJoin(projects, eq(projects.id, writeUps.projectId))
    .where(
      and(
        isReadable(search.userId),
        textHasWords(search.words, sql`concat_ws(' ', ${writeUpVersions.title}, ${writeUpVersions.body})`),
        before(search, writeUpVersions.publishedAt, writeUpVersions.id),
      ),
    )
    .orderBy(desc(writeUpVersions.publishedAt), desc(writeUpVersions.id))
    .limit(search.limit + 1);
  return pageOf(rows, search);
}
