import type { EventAbout } from "~/db/schema";
import type { EventKind } from "./event-kinds.ts";

/** One notice in a line: "Ada Marsh answered you on 7.1 MHz, Before the choke". Pure. */
export function noticeWords(notice: {
  reason: "mention" | "reply" | "follow" | "verdict" | "invited";
  kind: string;
  about: EventAbout;
  actor: string | null;
}): string {
  const { reason, about } = notice;
  const who = notice.actor ?? "A former member";
  const kind = notice.kind as EventKind;
  if (kind === "mention.found") return `A page elsewhere cites ${about.title}; it waits for your word`;
  if (reason === "invited") return `${who} added you to the project`;
  if (kind === "verdict.given") return `${who} gave a verdict: ${about.title || "open again"}`;
  if (kind === "sweep.added") return `${who} added the sweep ${about.title}`;
  if (kind === "step.added") return `${who} wrote down the step ${about.title}`;
  if (kind === "plate.made") return `${who} made ${about.title}`;
  if (kind === "plate.mended") return `${who} mended ${about.title}`;
  if (kind === "plate.withdrawn") return `${who} withdrew ${about.title}`;
  if (kind === "write-up.published") return `${who} published the write-up ${about.title}`;
  if (reason === "mention") return `${who} named you on ${about.title}`;
  if (reason === "reply") return `${who} answered you on ${about.title}`;
  return `${who} wrote on ${about.title}`;
}

/** Where a notice leads: to the note, so that it can be answered there, else to what the event is about. */
export function noticePath(
  project: string,
  { mention, writeUp, plate, note, dip, trail, step, bench, sweep }: EventAbout,
): string {
  if (mention) return `/projects/${project}/mentions`;
  if (writeUp) return `/write-ups/${writeUp}`;
  if (plate) return `/plates/${plate}`;
  const base = `/projects/${project}`;
  const places = { notes: note, dips: dip, trails: trail, steps: step, benches: bench, sweeps: sweep };
  const there = Object.entries(places).find(([, id]) => id !== undefined);
  return there ? `${base}/${there[0]}/${there[1]}` : base;
}

/** Why a notice came, for the foot of a mail. */
export const WHY = {
  mention: "you were named",
  reply: "your note was answered",
  follow: "you follow it",
  verdict: "you follow it",
  invited: "you were added to the project",
} as const;
