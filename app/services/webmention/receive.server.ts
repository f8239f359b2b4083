import { inTransaction } from "~/db/client.server";
import * as jobs from "~/db/jobs.server";
import * as plates from "~/db/plates.server";
import * as webmentions from "~/db/webmentions.server";
import * as writeUps from "~/db/write-ups.server";
import { env } from "~/env.server";
import { takeOne } from "../rate-limit.server.ts";
import { judgeUrl } from "../safe-fetch/judge.ts";
import { targetOf } from "./targets.ts";

/** W3C Webmention 3.2: what comes is judged at once and looked up later. */

export type Received =
  | { kind: "queued" }
  | { kind: "refused"; problem: string }
  | { kind: "too-many"; waitSeconds: number };

/** `from`: the network address that sent it. Nothing is fetched here. */
export async function receive(
  { source, target }: { source: string; target: string },
  from: string,
): Promise<Received> {
  const waitSeconds = await takeOne("mention-from", from);
  if (waitSeconds !== null) return { kind: "too-many", waitSeconds };
  const judged = judgeUrl(source, env.WEBMENTION_TEST_ORIGIN);
  if ("problem" in judged)
    return { kind: "refused", problem: `The source was not accepted. ${judged.problem}` };
  if (target.length > MOST_CHARACTERS || !URL.canParse(target)) {
    return { kind: "refused", problem: "The target is no complete address." };
  }
  if (withoutPlace(source) === withoutPlace(target)) {
    return { kind: "refused", problem: "Source and target are the same page." };
  }
  const of = await accepting(target);
  if (!of) return { kind: "refused", problem: NOT_OURS };
  const busySeconds = await takeOne("mention-host", judged.url.hostname);
  if (busySeconds !== null) return { kind: "too-many", waitSeconds: busySeconds };
  await inTransaction(async (tx) => {
    const mention = await webmentions.receive({ source, target, ...of }, tx);
    await jobs.insert("check-mention", { mention, attempt: 1 }, undefined, tx);
  });
  return { kind: "queued" };
}

/** A plate that was not withdrawn, or a write-up that is published. */
async function accepting(address: string): Promise<webmentions.MentionOf | null> {
  const target = targetOf(address, env.BASE_URL);
  if (target?.kind === "plate") {
    const plate = await plates.findByPublicId(target.publicId);
    return plate && plate.withdrawnAt === null ? { plateId: plate.id, writeUpId: null } : null;
  }
  const found = target && (await writeUps.findByPublicId(target.publicId));
  if (!found || found.writeUp.publishedNumber === null) return null;
  return { plateId: null, writeUpId: found.writeUp.id };
}

function withoutPlace(address: string): string {
  const url = new URL(address);
  url.hash = "";
  return url.href;
}

const MOST_CHARACTERS = 2000;
const NOT_OURS = `The target is no plate and no published write-up at ${env.BASE_URL}.`;
