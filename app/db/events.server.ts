import type { Transaction } from "./client.server.ts";
import { type EventAbout, events } from "./schema/index.ts";

export interface NewEvent {
  projectId: number;
  kind: string;
  /** Row id of who did it; null for the service itself. */
  actorId: number | null;
  about: EventAbout;
  /** When it happened, where that is not now. */
  at?: Date;
}

/** Answers the event's row id. */
export async function insert({ at = new Date(), ...event }: NewEvent, tx: Transaction): Promise<number> {
  const [{ id }] = await tx
    .insert(events)
    .values({ ...event, at })
    .$returningId();
  return id;
}
