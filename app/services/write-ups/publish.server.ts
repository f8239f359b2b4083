import { createHash } from "node:crypto";
import { inTransaction } from "~/db/client.server";
import type * as projects from "~/db/projects.server";
import * as writeUps from "~/db/write-ups.server";
import { record } from "../events.server.ts";
import { figuresIn, MOST_FIGURES } from "../markdown-article.ts";
import { queueSending } from "../webmention/send.server.ts";
import { loadFigures } from "./figures.server.ts";
import type { Frozen } from "./frozen.ts";

type OfProject = Pick<projects.Project, "id" | "publicId" | "title" | "ituRegion" | "licence">;

export type Published =
  | { kind: "published"; number: number }
  /** Somebody wrote in it since it was looked at. */
  | { kind: "changed-since" }
  | { kind: "same-as-published" }
  | { kind: "too-large" }
  | { kind: "gone" };

/** What a text is told apart by: what is looked at before publishing is what is published. */
export function revisionOf({ title, body }: { title: string; body: string }): string {
  return createHash("sha256").update(`${title}\n${body}`).digest("hex").slice(0, 20);
}

/**
 * Publishes the draft as its next version, with every figure and number that it shows frozen beside it. From then on
 * anyone with its address reads it.
 */
export async function publish(
  found: Pick<writeUps.WriteUpRow, "id" | "publicId">,
  project: OfProject,
  by: { id: number } | null,
  { revision, remark, at = new Date() }: { revision: string; remark: string; at?: Date },
): Promise<Published> {
  const draft = await writeUps.findByPublicId(found.publicId);
  if (!draft) return { kind: "gone" };
  const { title, body } = draft.writeUp;
  const frozen = await freeze(project, body);
  if (frozen.length > MOST_FROZEN_CHARACTERS) return { kind: "too-large" };
  return inTransaction<Published>(async (tx) => {
    const row = await writeUps.lock(found.id, tx);
    if (!row) return { kind: "gone" };
    if (revisionOf(row) !== revision || revisionOf({ title, body }) !== revision) {
      return { kind: "changed-since" };
    }
    const shown = row.publishedNumber
      ? await writeUps.findVersion(row.id, row.publishedNumber, tx)
      : undefined;
    if (shown && isSame(shown.version, row, frozen)) return { kind: "same-as-published" };
    const number = (await writeUps.findLastNumber(row.id, tx)) + 1;
    await writeUps.insertVersion(
      {
        writeUpId: row.id,
        number,
        title,
        body,
        frozen,
        remark,
        publishedBy: by?.id ?? null,
        publishedAt: at,
      },
      tx,
    );
    await writeUps.update(row.id, { publishedNumber: number, takenBackAt: null, updatedAt: at }, tx);
    const about = { writeUp: row.publicId, title };
    await record(
      { projectId: project.id, kind: "write-up.published", actorId: by?.id ?? null, about, at },
      tx,
    );
    await queueSending(row, tx);
    return { kind: "published", number };
  });
}

/** Its page says that it was taken back; the versions stay, for when it is published again. */
export function takeBack(
  found: Pick<writeUps.WriteUpRow, "id" | "projectId">,
  by: { id: number } | null,
): Promise<boolean> {
  return inTransaction(async (tx) => {
    const row = await writeUps.lock(found.id, tx);
    if (!row?.publishedNumber) return false;
    await writeUps.update(row.id, { publishedNumber: null, takenBackAt: new Date() }, tx);
    const about = { writeUp: row.publicId, title: row.title };
    await record(
      { projectId: row.projectId, kind: "write-up.taken-back", actorId: by?.id ?? null, about },
      tx,
    );
    await queueSending(row, tx);
    return true;
  });
}

async function freeze(project: OfProject, body: string): Promise<string> {
  // No page shows more: each holds a sweep while it is drawn.
  const figures = await loadFigures(project, figuresIn(body).slice(0, MOST_FIGURES));
  const frozen: Frozen = { figures, project: project.title, licence: project.licence };
  return JSON.stringify(frozen);
}

/** Text and figures alike; when the numbers were looked up is no difference. */
function isSame(version: writeUps.WriteUpVersion, row: writeUps.WriteUpRow, frozen: string): boolean {
  const timeless = (text: string) => text.replace(/"asOf":"[^"]*"/g, "");
  return (
    version.title === row.title && version.body === row.body && timeless(version.frozen) === timeless(frozen)
  );
}

/** Half of what the column takes in UTF-8, and of the database's usual packet. */
const MOST_FROZEN_CHARACTERS = 6_000_000;
