import { inTransaction } from "~/db/client.server";
import * as jobs from "~/db/jobs.server";
import * as webmentions from "~/db/webmentions.server";
import { record } from "../events.server.ts";
import type { Fetched } from "../safe-fetch/exchange.ts";
import { safeFetch } from "../safe-fetch/safe-fetch.server.ts";
import { retryAt } from "./retries.ts";
import { readSource } from "./source.ts";

/** What the source says when it is looked at. */
type Seen =
  | { kind: "links"; title: string }
  | { kind: "does-not"; reason: string }
  /** Nothing can be said now. */
  | { kind: "unknown"; reason: string; again: boolean };

/**
 * Looks whether the source links to the target (W3C Webmention 3.2.2 and 3.2.4). One that never did is refused; one that
 * did and no longer does is gone; one that can't be reached is tried again and, where it was verified before, left as it is.
 */
export async function checkMention({ mention, attempt }: { mention: string; attempt: number }) {
  const found = await webmentions.findByPublicId(mention);
  if (!found) return;
  const { source, target } = found.mention;
  const seen = judge(await safeFetch(source), target);
  const next = seen.kind === "unknown" && seen.again ? retryAt(attempt) : null;
  await inTransaction(async (tx) => {
    const row = await webmentions.lock(found.mention.id, tx);
    if (!row) return;
    if (next) await jobs.insert("check-mention", { mention, attempt: attempt + 1 }, next, tx);
    const state = stateAfter(row.state, seen, next !== null);
    const title = seen.kind === "links" ? seen.title : row.title;
    const reason = seen.kind === "links" ? "" : seen.reason;
    await webmentions.update(row.id, { state, title, reason, checkedAt: new Date() }, tx);
    if (row.state !== "verified" && state === "verified") await tellOwners(found, tx);
  });
}

function judge(fetched: Fetched, target: string): Seen {
  if (fetched.kind === "refused") return { kind: "unknown", reason: fetched.reason, again: false };
  if (fetched.kind === "failed") return { kind: "unknown", reason: fetched.reason, again: true };
  const { status } = fetched;
  if (status === 404 || status === 410) return { kind: "does-not", reason: "The page is no longer there." };
  if (status < 200 || status > 299) {
    const again = status >= 500 || status === 429;
    return { kind: "unknown", reason: `The page answered with ${status}.`, again };
  }
  const { links, title } = readSource(fetched, target);
  return links ? { kind: "links", title } : { kind: "does-not", reason: "The page does not link to it." };
}

function stateAfter(before: webmentions.MentionState, seen: Seen, again: boolean): webmentions.MentionState {
  // What an owner has hidden stays so, whatever becomes of it.
  if (before === "hidden" || (seen.kind === "unknown" && (again || before !== "queued"))) return before;
  if (seen.kind === "links") return before === "shown" ? "shown" : "verified";
  return before === "queued" || before === "refused" ? "refused" : "gone";
}

/** The event names what is cited, and nothing that a stranger wrote. */
async function tellOwners(
  { projectId, plate, writeUp, mention }: webmentions.FoundMention,
  tx: Parameters<typeof record>[1],
) {
  if (projectId === null) return;
  const of = plate ? { plate: plate.publicId } : { writeUp: writeUp?.publicId };
  const title = plate ? `Plate ${plate.number}, ${plate.title}` : (writeUp?.title ?? "");
  const about = { ...of, mention: mention.publicId, title };
  await record({ projectId, kind: "mention.found", actorId: null, about }, tx);
}
