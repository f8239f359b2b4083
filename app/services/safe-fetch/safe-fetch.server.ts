import { env } from "~/env.server";
import { ask } from "./ask.server.ts";
import type { Fetched, Wanted } from "./exchange.ts";
import { judgeUrl } from "./judge.ts";
import { resolveByDns } from "./resolve.server.ts";

/** The only way to ask a server whose address somebody gave: nothing private, nothing large, nothing slow. */

/** Asks, following at most five redirects, each judged like the first; ten seconds for all of it. */
export async function safeFetch(address: string, wanted: Wanted = {}): Promise<Fetched> {
  const { exempt = env.WEBMENTION_TEST_ORIGIN, patienceMs = PATIENCE_MS, resolve = resolveByDns } = wanted;
  const deadline = AbortSignal.timeout(patienceMs);
  let at = address;
  for (let hop = 0; hop <= MOST_REDIRECTS; hop++) {
    const judged = judgeUrl(at, exempt);
    if ("problem" in judged) return { kind: "refused", reason: judged.problem };
    const asked = await ask(judged.url, { ...wanted, resolve, exempt }, deadline);
    if (asked.kind !== "redirect") return asked;
    if (wanted.form && !asked.sameMethod)
      return { kind: "failed", reason: "It answered a form with a redirect." };
    at = asked.to;
  }
  return { kind: "failed", reason: `It redirected more than ${MOST_REDIRECTS} times.` };
}

const PATIENCE_MS = 10_000;
const MOST_REDIRECTS = 5;
