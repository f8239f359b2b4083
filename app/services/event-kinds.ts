/** What can happen in a project, as live updates, activity, feeds and mail know it. */
export const EVENT_KINDS = [
  "note.added",
  "note.edited",
  "note.removed",
  "sweep.added",
  "sweep.edited",
  "sweep.read-anew",
  "sweep.analysed",
  "sweep.deleted",
  "verdict.given",
  "trail.named",
  "trail.corrected",
  "step.added",
  "step.edited",
  "step.deleted",
  "antenna.changed",
  "bench.added",
  "bench.changed",
  "photograph.added",
  "photograph.deleted",
  "plate.made",
  "plate.mended",
  "plate.withdrawn",
  "write-up.published",
  "write-up.taken-back",
  "mention.found",
  "member.joined",
  "member.changed",
  "member.left",
  "project.changed",
] as const;

export type EventKind = (typeof EVENT_KINDS)[number];

/** What goes to the inboxes of those who follow; the rest stands in the account of the project. */
export const TOLD_KINDS: ReadonlySet<EventKind> = new Set([
  "note.added",
  // Those whom the change names, and nobody else.
  "note.edited",
  "verdict.given",
  "sweep.added",
  "step.added",
  "plate.made",
  "plate.mended",
  "plate.withdrawn",
  "write-up.published",
  "mention.found",
]);
