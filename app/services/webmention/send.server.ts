import { inTransaction, type Transaction } from "~/db/client.server";
import * as jobs from "~/db/jobs.server";
import * as sent from "~/db/sent-mentions.server";
import * as writeUps from "~/db/write-ups.server";
import { env } from "~/env.server";
import { renderArticle } from "../markdown.server.ts";
import { NO_LINKS } from "../markdown-links.ts";
import { safeFetch } from "../safe-fetch/safe-fetch.server.ts";
import { endpointOf } from "./discover.ts";
import { outwardLinks } from "./outward-links.ts";
import { retryAt } from "./retries.ts";

/** In the transaction that publishes a write-up or takes it back: those it links to are told afterwards. */
export async function queueSending(writeUp: { publicId: string }, tx: Transaction): Promise<void> {
  await jobs.insert("send-mentions", { writeUp: writeUp.publicId }, undefined, tx);
}

/**
 * Every page elsewhere that the published version links to gets a job, and so does every page that was told of an older
 * version and is no longer linked to (W3C Webmention 3.1.4). New pages are told only where the project is public: a linked or
 * private project gives its addresses to nobody by itself.
 */
export async function sendMentions({ writeUp: publicId }: { writeUp: string }): Promise<void> {
  const found = await writeUps.findByPublicId(publicId);
  if (!found) return;
  const { writeUp, project } = found;
  const number = writeUp.publishedNumber;
  const version = number === null ? undefined : await writeUps.findVersion(writeUp.id, number);
  const html = version ? renderArticle(version.version.body, NO_LINKS, () => null).html : "";
  const links = outwardLinks(html, env.BASE_URL);
  const known = await sent.findAllByWriteUp(writeUp.id);
  const told = new Set(known.map(({ target }) => target));
  const linked = links.filter((target) => project.visibility === "public" || told.has(target));
  const removed = known.filter(({ target }) => !links.includes(target));
  await inTransaction(async (tx) => {
    for (const target of linked) await enqueue(target, false, tx);
    for (const { target, endpoint, id } of removed) {
      if (endpoint === null) await sent.deleteById(id, tx);
      else await enqueue(target, true, tx);
    }
  });

  async function enqueue(target: string, isRemoved: boolean, tx: Transaction) {
    const id = await sent.queue({ writeUpId: writeUp.id, target, number: number ?? 0 }, tx);
    await jobs.insert("send-mention", { sent: id, removed: isRemoved, attempt: 1 }, undefined, tx);
  }
}

type Told =
  | { state: "sent"; endpoint: string }
  | { state: "none"; endpoint: null; reason: string }
  | { state: "failed"; endpoint?: string; reason: string; again: boolean };

/** Tells one page; what is no longer linked to is forgotten once its page knows. */
export async function sendMention(job: { sent: number; removed: boolean; attempt: number }): Promise<void> {
  const found = await sent.findById(job.sent);
  if (!found) return;
  const { id, target } = found.sent;
  const told = await tell(`${env.BASE_URL}/write-ups/${found.writeUp}`, target);
  const next = told.state === "failed" && told.again ? retryAt(job.attempt) : null;
  await inTransaction(async (tx) => {
    if (next) await jobs.insert("send-mention", { ...job, attempt: job.attempt + 1 }, next, tx);
    else if (job.removed) return await sent.deleteById(id, tx);
    const { state, endpoint } = told;
    const reason = "reason" in told ? told.reason : "";
    await sent.update(
      id,
      { state: next ? "queued" : state, reason, ...(endpoint !== undefined && { endpoint }) },
      tx,
    );
  });
}

async function tell(source: string, target: string): Promise<Told> {
  const page = await safeFetch(target, { whole: "welcome" });
  if (page.kind === "refused") return { state: "none", endpoint: null, reason: page.reason };
  if (page.kind === "failed") return { state: "failed", reason: page.reason, again: true };
  if (page.status < 200 || page.status > 299) return answered(page.status);
  const endpoint = endpointOf(page);
  if (endpoint === null) return { state: "none", endpoint, reason: "It does not ask to be told." };
  const form = new URLSearchParams({ source, target });
  const answer = await safeFetch(endpoint, { form, whole: "welcome", maxBytes: MOST_ANSWER_BYTES });
  if (answer.kind !== "answer") {
    return { state: "failed", endpoint, reason: answer.reason, again: answer.kind === "failed" };
  }
  const ok = answer.status >= 200 && answer.status <= 299;
  return ok ? { state: "sent", endpoint } : { ...answered(answer.status), endpoint };
}

function answered(status: number): { state: "failed"; reason: string; again: boolean } {
  return { state: "failed", reason: `It answered with ${status}.`, again: status >= 500 || status === 429 };
}

/** Nothing of the answer is used. */
const MOST_ANSWER_BYTES = 10_000;
