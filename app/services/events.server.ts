import type { Transaction } from "~/db/client.server";
import * as events from "~/db/events.server";
import type { EventAbout } from "~/db/schema";
import type { EventKind } from "./event-kinds.ts";

/**
 * Writes down that something happened, in the transaction that does it: what is rolled back never happened. Answers the
 * event's row id.
 */
export function record(
  event: { projectId: number; kind: EventKind; actorId: number | null; about: EventAbout; at?: Date },
  tx: Transaction,
): Promise<number> {
  return events.insert(event, tx);
}
