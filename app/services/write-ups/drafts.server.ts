import type { ProjectAccess } from "~/auth/require.server";
import { inTransaction } from "~/db/client.server";
import * as writeUps from "~/db/write-ups.server";
import { conflictOf, mergeEdit } from "../merge-edit.ts";
import { expandNote } from "../note-links.server.ts";

/** What a write-up's form holds. */
export type DraftText = { title: string; body: string };

/** Begins a write-up, for its writers alone until it is published. */
export async function makeDraft(
  project: { id: number },
  by: { id: number } | null,
  { title, body }: DraftText,
  at?: Date,
): Promise<string> {
  const values = { projectId: project.id, title, body: await expandWriteUp(project.id, body) };
  const { publicId } = await writeUps.insert({ ...values, createdBy: by?.id ?? null, createdAt: at });
  return publicId;
}

export type DraftChange =
  | { kind: "kept" }
  /** Somebody else changed the same; nothing was kept. */
  | { kind: "conflict"; conflict: ReturnType<typeof conflictOf> }
  | { kind: "gone" };

/** Keeps what a person changed of a draft, and nothing of what another did meanwhile. */
export async function changeDraft(
  id: number,
  project: { id: number },
  was: Partial<DraftText>,
  wanted: DraftText,
): Promise<DraftChange> {
  const body = await expandWriteUp(project.id, wanted.body);
  return inTransaction<DraftChange>(async (tx) => {
    const row = await writeUps.lock(id, tx);
    if (!row) return { kind: "gone" };
    const now: DraftText = { title: row.title, body: row.body };
    const merged = mergeEdit<DraftText>(was, now, { title: wanted.title, body });
    if (merged.conflicts.length > 0) {
      return {
        kind: "conflict",
        conflict: conflictOf<DraftText>(now, { title: wanted.title, body }, merged),
      };
    }
    if (Object.keys(merged.changes).length > 0) await writeUps.update(id, merged.changes, tx);
    return { kind: "kept" };
  });
}

export type DraftRemoval = "removed" | "published-once" | "gone";

/** Only what never was published can go: an address that was given out must tell what became of it. */
export function deleteDraft(id: number): Promise<DraftRemoval> {
  return inTransaction<DraftRemoval>(async (tx) => {
    const row = await writeUps.lock(id, tx);
    if (!row) return "gone";
    if ((await writeUps.findLastNumber(id, tx)) > 0) return "published-once";
    await writeUps.deleteById(id, tx);
    return "removed";
  });
}

/** `@user-name` and `#dip:…` become links of our own as in a note; figures stay as they were written. */
export async function expandWriteUp(projectId: number, written: string): Promise<string> {
  const held = written.replace(/\r\n?/g, "\n").replace(FIGURE_HREF, `](${HELD}$1`);
  const { body } = await expandNote(projectId, held);
  return body.replaceAll(`](${HELD}`, "](#");
}

/** A write-up of this project, or nothing. */
export async function findOf(
  { project }: Pick<ProjectAccess, "project">,
  publicId: string | undefined,
): Promise<writeUps.FoundWriteUp | undefined> {
  const found = await writeUps.findByPublicId(publicId ?? "");
  return found?.project.id === project.id ? found : undefined;
}

const FIGURE_HREF = /\]\(#((?:plate|dip|sweep|step):[0-9a-z]{1,16}\))/g;
/** Of Unicode's private use: nobody types it. */
const HELD = "\ue000";
