import { inTransaction, type Transaction } from "~/db/client.server";
import * as dips from "~/db/dips.server";
import * as projects from "~/db/projects.server";
import type { Evidence } from "~/db/schema";
import * as verdictEvents from "~/db/verdict-events.server";
import { record } from "./events.server.ts";
import { MAX_VERDICT_CHARACTERS } from "./note-limits.ts";
import { writeNote } from "./notes.server.ts";

export type VerdictIntent = "propose" | "settle" | "reopen";

export interface ChangeVerdict {
  dip: { id: number; projectId: number };
  by: { id: number };
  intent: VerdictIntent;
  /** The explanation, or why it is open again. */
  text: string;
  /** What it was when the person decided; with another one since, nothing is changed. */
  was: dips.DipRow["verdict"];
  /** What it rests on; kept as it reads now. */
  evidence?: Evidence[];
  /** Markdown, further down in the note. */
  details?: string;
  at?: Date;
}

export type VerdictChange = "done" | "changed-since" | "not-now" | "missing";

/**
 * Changes a dip's verdict and says so in its thread, in one transaction. Proposing is for a dip that is not settled,
 * reopening for one that is not open. What counts is the verdict that stands, which may be its trail's; the new one is the dip's own.
 */
export function changeVerdict(input: ChangeVerdict): Promise<VerdictChange> {
  return inTransaction(async (tx) => {
    await projects.lock(input.dip.projectId, tx);
    const dip = await dips.lock(input.dip.id, tx);
    if (!dip) return "missing";
    const found = await dips.findByPublicId(dip.publicId, tx);
    const stands = found?.dip.verdict ?? dip.verdict;
    if (stands !== input.was) return "changed-since";
    if (!ALLOWED_FROM[input.intent].includes(stands)) return "not-now";
    await storeVerdict(dip, input, found?.sweep.publicId, tx);
    return "done";
  });
}

async function storeVerdict(
  { id, publicId, projectId, sweepId }: dips.DipRow,
  input: ChangeVerdict,
  sweep: string | undefined,
  tx: Transaction,
): Promise<void> {
  const { by, intent, evidence = [], details, at = new Date() } = input;
  const verdict = VERDICT_AFTER[intent];
  const text = input.text.trim().slice(0, MAX_VERDICT_CHARACTERS);
  await dips.updateVerdict(id, { verdict, verdictText: text, verdictBy: by.id, verdictAt: at }, tx);
  await verdictEvents.insert({ projectId, dipId: id, verdict, text, evidence, by: by.id, at }, tx);
  const { publicId: note } = await writeNote(
    {
      project: { id: projectId },
      author: by,
      place: { projectId, sweepId, dipId: id },
      body: [`**${SAID[intent]}:** ${text}`, details, evidenceWords(evidence)].filter(Boolean).join("\n\n"),
      createdAt: at,
      quiet: true,
    },
    tx,
  );
  const about = { sweep, dip: publicId, note, title: text };
  await record({ projectId, kind: "verdict.given", actorId: by.id, about, at }, tx);
}

/** "On the evidence of: …", a line each; of a cause its arithmetic is told already. */
function evidenceWords(evidence: readonly Evidence[]): string | undefined {
  if (evidence.length === 0) return undefined;
  const lines = evidence.map(({ kind, text }) => `- ${EVIDENCE_WORDS[kind]}: ${text.replaceAll("\n", " ")}`);
  return ["On the evidence of", ...lines].join("\n");
}

export const EVIDENCE_WORDS: Record<Evidence["kind"], string> = {
  sweep: "sweep",
  step: "step",
  note: "note",
  cause: "reckoned",
  dip: "dip",
};

export const VERDICT_AFTER = { propose: "proposed", settle: "settled", reopen: "open" } as const;
const SAID = { propose: "Verdict proposed", settle: "Verdict settled", reopen: "Verdict reopened" } as const;
/** What a verdict must be for it to be done. */
export const ALLOWED_FROM: Record<VerdictIntent, dips.DipRow["verdict"][]> = {
  propose: ["open", "proposed"],
  settle: ["open", "proposed"],
  reopen: ["proposed", "settled"],
};
