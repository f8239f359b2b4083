import { inTransaction } from "~/db/client.server";
import * as jobs from "~/db/jobs.server";
import * as webmentions from "~/db/webmentions.server";

export type Decision = "show" | "hide" | "check";

/** What an owner decides on a mention of what is the project's; false where it is none of it, or not to be decided. */
export function decide(
  publicId: string,
  decision: Decision,
  project: { id: number },
  by: { id: number } | null,
): Promise<boolean> {
  return inTransaction(async (tx) => {
    const found = await webmentions.findByPublicId(publicId, tx);
    if (!found || found.projectId !== project.id) return false;
    const row = await webmentions.lock(found.mention.id, tx);
    if (!row || !DECIDABLE[decision].includes(row.state)) return false;
    if (decision === "check") {
      await jobs.insert("check-mention", { mention: publicId, attempt: 1 }, undefined, tx);
      return true;
    }
    const state = decision === "show" ? "shown" : "hidden";
    await webmentions.update(row.id, { state, decidedBy: by?.id ?? null }, tx);
    return true;
  });
}

/** Only what was found to link is shown. */
const DECIDABLE: Record<Decision, webmentions.MentionState[]> = {
  show: ["verified", "hidden"],
  hide: ["verified", "shown"],
  check: ["verified", "shown"],
};
