import { inTransaction, type Transaction } from "~/db/client.server";
import * as dips from "~/db/dips.server";
import { MAX_VERDICT_CHARACTERS } from "./note-limits.ts";
import { writeNote } from "./notes.server.ts";

export type VerdictIntent = "propose" | "settle" | "reopen";

export interface ChangeVerdict {
  dip: { id: number };
  by: { id: number };
  intent: VerdictIntent;
  /** The explanation, or why it is open again. */
  text: string;
  /** What it was when the person decided; with another one since, nothing is changed. */
  was: dips.DipRow["verdict"];
  at?: Date;
}

export type VerdictChange = "done" | "changed-since" | "not-now" | "missing";

/**
 * Changes a dip's verdict and says so in its thread, in one transaction. Proposing is for a dip that is not settled,
 * reopening for one that is not open.
 */
export function changeVerdict(input: ChangeVerdict): Promise<VerdictChange> {
  return inTransaction(async (tx) => {
    const dip = await dips.lock(input.dip.id, tx);
    if (!dip) return "missing";
    if (dip.verdict !== input.was) return "changed-since";
    if (!ALLOWED_FROM[input.intent].includes(dip.verdict)) return "not-now";
    await storeVerdict(dip, input, tx);
    return "done";
  });
}

async function storeVerdict(dip: dips.DipRow, input: ChangeVerdict, tx: Transaction): Promise<void> {
  const at = input.at ?? new Date();
  const text = input.text.trim().slice(0, MAX_VERDICT_CHARACTERS);
  await dips.updateVerdict(
    dip.id,
    { verdict: VERDICT_AFTER[input.intent], verdictText: text, verdictBy: input.by.id, verdictAt: at },
    tx,
  );
  await writeNote(
    {
      project: { id: dip.projectId },
      author: input.by,
      place: { projectId: dip.projectId, sweepId: dip.sweepId, dipId: dip.id },
      body: `**${SAID[input.intent]}:** ${text}`,
      createdAt: at,
    },
    tx,
  );
}

export const VERDICT_AFTER = { propose: "proposed", settle: "settled", reopen: "open" } as const;
const SAID = { propose: "Verdict proposed", settle: "Verdict settled", reopen: "Verdict reopened" } as const;
/** What a verdict must be for it to be done. */
export const ALLOWED_FROM: Record<VerdictIntent, dips.DipRow["verdict"][]> = {
  propose: ["open", "proposed"],
  settle: ["open", "proposed"],
  reopen: ["proposed", "settled"],
};
