import type { Resolve } from "./resolve.server.ts";

/** What is asked of another server, and under which conditions. */
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
