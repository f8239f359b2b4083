import type { EventKind } from "../../../app/services/event-kinds.ts";
import type { LiveEvent } from "../../../app/services/live-shape.ts";

/** An event as it comes in; its id is the number in words. */
export function event(
  n: number,
  kind: EventKind,
  about: Partial<LiveEvent["about"]> = {},
  by = "Cleo",
): LiveEvent {
  return {
    id: `m${n}`,
    kind,
    at: "2026-03-07T12:00:00.000Z",
    by: { name: by, userName: by.toLowerCase() },
    about: { title: "", ...about },
  };
}
