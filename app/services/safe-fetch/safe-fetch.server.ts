import { env } from "~/env.server";
import { ask } from "./ask.server.ts";
import { judgeUrl } from "./judge.ts";
import { type Resolve, resolveByDns } from "./resolve.server.ts";

/** The only way to ask a server whose address somebody gave: nothing private, nothing large, nothing slow. */

export interface Wanted {
  /** Sent as a form; without one it is a GET. */
  form?: URLSearchParams;
  accept?: string;
  /** What is read of a body, 1 MB at most. */
  maxBytes?: number;
  /** What happens with a longer body, or one that is no text: refused, or left out (its headers are enough). */
  whole?: "required" | "welcome";
  /** For tests: stand-ins for the world outside, and a shorter patience. */
  resolve?: Resolve;
  exempt?: string;
  patienceMs?: number;
}

export interface Answer {
  kind: "answer";
  status: number;
  /** Where the answer came from, after every redirect. */
  url: string;
  mediaType: string;
  /** Every `Link` header, as it came. */
  links: string[];
  /** As UTF-8; empty where it was left out. */
  text: string;
}

/** `refused`: it must not be asked, ever. `failed`: it did not answer as it should; another time it may. */
export type Fetched = Answer | { kind: "refused"; reason: string } | { kind: "failed"; reason: string };

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
