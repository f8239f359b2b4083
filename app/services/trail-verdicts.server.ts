import { inTransaction } from "~/db/client.server";
import * as projects from "~/db/projects.server";
import type { Evidence } from "~/db/schema";
import * as trails from "~/db/trails.server";
import { record } from "./events.server.ts";
import { MAX_VERDICT_CHARACTERS } from "./note-limits.ts";
import { ALLOWED_FROM, VERDICT_AFTER, type VerdictChange, type VerdictIntent } from "./verdicts.server.ts";

export interface ChangeTrailVerdict {
  trail: { id: number; projectId: number };
  by: { id: number };
  intent: VerdictIntent;
  text: string;
  /** What it was when the person decided; with another one since, nothing is changed. */
  was: trails.TrailRow["verdict"];
  /** What it rests on, as it reads now. */
  evidence?: Evidence[];
  at?: Date;
}

/** Changes a trail's verdict by the same rules as a dip's, and keeps every one that was given. */
export function changeTrailVerdict(input: ChangeTrailVerdict): Promise<VerdictChange> {
  return inTransaction(async (tx) => {
    await projects.lock(input.trail.projectId, tx);
    const trail = await trails.lock(input.trail.id, tx);
    if (!trail) return "missing";
    if (trail.verdict !== input.was) return "changed-since";
    if (!ALLOWED_FROM[input.intent].includes(trail.verdict)) return "not-now";
    const at = input.at ?? new Date();
    const verdict = VERDICT_AFTER[input.intent];
    const text = input.text.trim().slice(0, MAX_VERDICT_CHARACTERS);
    const by = input.by.id;
    await trails.update(trail.id, { verdict, verdictText: text, verdictBy: by, verdictAt: at }, tx);
    const { projectId, publicId } = trail;
    await trails.insertVerdictEvent(
      { projectId, trailId: trail.id, verdict, text, evidence: input.evidence ?? [], by, at },
      tx,
    );
    const about = { trail: publicId, title: text };
    await record({ projectId, kind: "verdict.given", actorId: by, about, at }, tx);
    return "done";
  });
}

/** Names a trail; an empty name takes its name away. False where it is no longer there. */
export function nameTrail(input: {
  trail: { id: number; projectId: number };
  by: { id: number };
  name: string;
  at?: Date;
}): Promise<boolean> {
  return inTransaction(async (tx) => {
    await projects.lock(input.trail.projectId, tx);
    const trail = await trails.lock(input.trail.id, tx);
    if (!trail) return false;
    await trails.update(trail.id, { name: input.name }, tx);
    const title = input.name || "A trail has no name any more";
    const about = { trail: trail.publicId, title };
    const by = input.by.id;
    await record({ projectId: trail.projectId, kind: "trail.named", actorId: by, about, at: input.at }, tx);
    return true;
  });
}
