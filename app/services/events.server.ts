import type { Transaction } from "~/db/client.server";
import * as events from "~/db/events.server";
import * as jobs from "~/db/jobs.server";
import * as projects from "~/db/projects.server";
import type { EventAbout } from "~/db/schema";
import { type EventKind, TOLD_KINDS } from "./event-kinds.ts";

export interface NewEvent {
  projectId: number;
  kind: EventKind;
  actorId: number | null;
  about: EventAbout;
  at?: Date;
  /** Part of something that is told itself. */
  quiet?: boolean;
}

/**
 * Writes down that something happened, in the transaction that does it: what is rolled back never happened. Answers the
 * event's row id.
 *
 * The project's row is written first, so that two who write at once wait for one another (or, in a cluster, one of them
 * is tried again): within a project the order of ids is the order of commits, and a reader who has seen an id has missed
 * nothing before it.
 */
export async function record({ quiet = false, ...event }: NewEvent, tx: Transaction): Promise<number> {
  await projects.update(event.projectId, {}, tx);
  const id = await events.insert(event, tx);
  if (TOLD_KINDS.has(event.kind) && !quiet) await jobs.insert("tell", { event: id }, undefined, tx);
  return id;
}
