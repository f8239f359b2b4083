import type { ReactNode } from "react";

export type Tone = "plain" | "fen" | "heather" | "clay" | "moss" | "alarm";

/** A short word about a thing, in a thin outline. Its colour never says more than its words. */
export function Tag({ tone = "plain", children }: { tone?: Tone; children: ReactNode }) {
  return <span className={`tag tone-${tone}`}>{children}</span>;
}

const VERDICT_TONE = { open: "clay", proposed: "heather", settled: "moss" } as const;

/** The state of a dip's verdict. */
export function VerdictTag({ verdict }: { verdict: keyof typeof VERDICT_TONE }) {
  return <Tag tone={VERDICT_TONE[verdict]}>{verdict}</Tag>;
}
