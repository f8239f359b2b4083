import type { EventAbout } from "~/db/schema";
import type { EventKind } from "./event-kinds.ts";

/** A project's account in lines: what is alike on one day is told in one. Pure. */

export interface Happened {
  kind: EventKind;
  about: EventAbout;
  at: Date;
  /** Null for the service itself. */
  by: string | null;
}

export interface ActivityLine {
  key: string;
  kind: EventKind;
  count: number;
  /** "4 notes on", "A sweep came in:". */
  words: string;
  /** What it was done to, newest first; at most a few are named. */
  items: { title: string; to: string | null }[];
  /** How many more there are. */
  more: number;
  by: string[];
  at: Date;
}

export interface ActivityDay {
  /** `2026-05-01`, UTC. */
  day: string;
  lines: ActivityLine[];
}

/** Newest first in, newest first out. `placeOf` answers where a thing is, null for what is gone. */
export function foldDays(happened: Happened[], placeOf: (about: EventAbout) => string | null): ActivityDay[] {
  const days = new Map<string, Map<string, Happened[]>>();
  for (const event of happened) {
    const day = event.at.toISOString().slice(0, 10);
    const lines = days.get(day) ?? new Map<string, Happened[]>();
    days.set(day, lines);
    const key = lineKey(event);
    lines.set(key, [...(lines.get(key) ?? []), event]);
  }
  return [...days].map(([day, lines]) => ({
    day,
    lines: [...lines].map(([key, events]) => lineOf(key, events, placeOf)),
  }));
}

/** Alike is: notes in one thread, changes of one thing, things of one kind that came. */
function lineKey({ kind, about }: Happened): string {
  return TOGETHER.has(kind) ? kind : `${kind} ${subjectOf(about)}`;
}

function lineOf(
  key: string,
  events: Happened[],
  placeOf: (about: EventAbout) => string | null,
): ActivityLine {
  const [{ kind, at }] = events;
  const items = new Map<string, ActivityLine["items"][number]>();
  for (const { about } of events) {
    const subject = TOGETHER.has(kind) ? `${subjectOf(about)} ${about.title}` : subjectOf(about);
    if (!items.has(subject)) items.set(subject, { title: about.title, to: placeOf(about) });
  }
  const by = new Set(events.flatMap((event) => event.by ?? []));
  return {
    key,
    kind,
    count: events.length,
    words: WORDS[kind](events.length),
    items: [...items.values()].slice(0, NAMED),
    more: Math.max(0, items.size - NAMED),
    by: [...by].slice(0, NAMED),
    at,
  };
}

/** The narrowest thing that it is about, for one who groups by it. */
export function subjectOf({ writeUp, plate, dip, trail, step, bench, sweep }: EventAbout): string {
  return writeUp ?? plate ?? dip ?? trail ?? step ?? bench ?? sweep ?? "project";
}

/** "3 notes", for lists of how much of what there is. */
export function countWords(kind: EventKind, n: number): string {
  const [one, many] = COUNTED[kind];
  return n === 1 ? `1 ${one}` : `${n} ${many}`;
}

/** What is told in one line whatever it was. */
const TOGETHER = new Set<EventKind>([
  "sweep.added",
  "sweep.deleted",
  "step.added",
  "plate.made",
  "member.joined",
  "member.changed",
  "member.left",
]);
const NAMED = 4;

type Words = (n: number) => string;
const some =
  (one: string, many: string): Words =>
  (n) =>
    n === 1 ? one : many.replace("#", String(n));
const times =
  (words: string): Words =>
  (n) =>
    n === 1 ? `${words}:` : `${words} ${n} times:`;

const WORDS: Record<EventKind, Words> = {
  "note.added": some("A note on", "# notes on"),
  "note.edited": some("A note was edited on", "# edits of notes on"),
  "note.removed": some("A note was removed from", "# notes were removed from"),
  "sweep.added": some("A sweep came in:", "# sweeps came in:"),
  "sweep.edited": times("Details of a sweep were changed"),
  "sweep.read-anew": times("Read anew"),
  "sweep.analysed": times("Analysed anew"),
  "sweep.deleted": some("A sweep was deleted:", "# sweeps were deleted:"),
  "verdict.given": times("A verdict was given"),
  "trail.named": times("A trail was named"),
  "trail.corrected": times("Trails"),
  "step.added": some("A step was written down:", "# steps were written down:"),
  "step.edited": times("A step was changed"),
  "step.deleted": times("A step was deleted"),
  "antenna.changed": times("The antenna"),
  "bench.added": times("A bench came"),
  "bench.changed": times("A bench was changed"),
  "photograph.added": some("A photograph of", "# photographs of"),
  "photograph.deleted": some("A photograph was deleted, of", "# photographs were deleted, of"),
  "plate.made": some("A plate was made:", "# plates were made:"),
  "plate.mended": times("A plate has a new version"),
  "plate.withdrawn": times("A plate was withdrawn"),
  "write-up.published": times("A write-up was published"),
  "write-up.taken-back": times("A write-up was taken back"),
  "mention.found": times("Cited elsewhere"),
  "member.joined": some("Joined:", "# people joined:"),
  "member.changed": some("Has another role:", "# people have another role:"),
  "member.left": some("Left:", "# people left:"),
  "project.changed": times("The project was changed"),
};

const COUNTED: Record<EventKind, [string, string]> = {
  "note.added": ["note", "notes"],
  "note.edited": ["edit of a note", "edits of notes"],
  "note.removed": ["note removed", "notes removed"],
  "sweep.added": ["sweep", "sweeps"],
  "sweep.edited": ["change of a sweep", "changes of sweeps"],
  "sweep.read-anew": ["sweep read anew", "sweeps read anew"],
  "sweep.analysed": ["new analysis", "new analyses"],
  "sweep.deleted": ["sweep deleted", "sweeps deleted"],
  "verdict.given": ["verdict", "verdicts"],
  "trail.named": ["trail named", "trails named"],
  "trail.corrected": ["trail corrected", "trails corrected"],
  "step.added": ["step", "steps"],
  "step.edited": ["change of a step", "changes of steps"],
  "step.deleted": ["step deleted", "steps deleted"],
  "antenna.changed": ["change of the antenna", "changes of the antenna"],
  "bench.added": ["bench", "benches"],
  "bench.changed": ["change of a bench", "changes of benches"],
  "photograph.added": ["photograph", "photographs"],
  "photograph.deleted": ["photograph deleted", "photographs deleted"],
  "plate.made": ["plate", "plates"],
  "plate.mended": ["new version of a plate", "new versions of plates"],
  "plate.withdrawn": ["plate withdrawn", "plates withdrawn"],
  "write-up.published": ["write-up published", "write-ups published"],
  "write-up.taken-back": ["write-up taken back", "write-ups taken back"],
  "mention.found": ["mention elsewhere", "mentions elsewhere"],
  "member.joined": ["person joined", "people joined"],
  "member.changed": ["change of a role", "changes of roles"],
  "member.left": ["person left", "people left"],
  "project.changed": ["change of the project", "changes of the project"],
};
