import type { EventKind } from "~/services/event-kinds";
import type { LiveEvent, Looker } from "~/services/live-shape";
import type { Here } from "./here.ts";

/** "2 new notes and 1 new sweep, by Cleo Reed": what is not on the page yet. Empty where nothing is. */
export function newsWords(events: readonly LiveEvent[], here: Here): string {
  const counts = new Map<string, number>();
  const left = withoutTakenBack(events);
  for (const event of left) {
    const what = isOwn(event, here) ? (OWN[event.kind] ?? SORT[event.kind]) : SORT[event.kind];
    counts.set(what, (counts.get(what) ?? 0) + 1);
  }
  const parts = [...counts].map(([what, n]) => phrase(what, n));
  if (parts.length === 0) return "";
  const names = new Set(left.map(({ by }) => by?.name ?? ""));
  const [name] = names;
  return `${listed(parts)}${names.size === 1 && name ? `, by ${name}` : ""}`;
}

/** Without what the person did, but for what takes the page's own thing away. */
export function ofOthers(events: readonly LiveEvent[], self: string, here: Here): LiveEvent[] {
  return events.filter((event) => event.by?.userName !== self || isGone([event], here));
}

/** Public ids of the notes that are new, oldest first. */
export function newNotes(events: readonly LiveEvent[]): string[] {
  return withoutTakenBack(events).flatMap(({ kind, about }) =>
    kind === "note.added" && about.note ? [about.note] : [],
  );
}

/** Whether what this page shows is no more. */
export function isGone(events: readonly LiveEvent[], here: Here): boolean {
  return events.some(({ kind, about }) => {
    if (kind === "sweep.deleted") return about.sweep === here.subject || about.sweep === here.sweep;
    return kind === "step.deleted" && about.step === here.subject;
  });
}

/** "Cleo Reed is here; Bram Sedge is looking at a sweep": everybody but the person. */
export function lookingWords(lookers: readonly Looker[], self: string, here: Here): string {
  const others = lookers.filter(({ userName }) => userName !== self);
  const isHere = ({ kind, subject }: Looker) => kind === here.kind && subject === here.subject;
  const near = others.filter(isHere);
  const nearNames = new Set(near.map(({ userName }) => userName));
  const seen = new Set<string>();
  const far = others.filter(({ userName }) => {
    if (nearNames.has(userName) || seen.has(userName)) return false;
    seen.add(userName);
    return true;
  });
  const places = new Map<string, string[]>();
  for (const { kind, name } of far) places.set(kind, [...(places.get(kind) ?? []), name]);
  const parts = [
    ...(near.length > 0 ? [`${listed(namesOf(near))} ${isOrAre(near.length)} here`] : []),
    ...[...places].map(
      ([kind, names]) => `${listed(few(names))} ${isOrAre(names.length)} ${AT[kind] ?? AT.project}`,
    ),
  ];
  return parts.join("; ");
}

function namesOf(lookers: readonly Looker[]): string[] {
  return few(lookers.map(({ name }) => name));
}

/** The first few by name, the rest as a number. */
function few(names: readonly string[]): string[] {
  if (names.length <= MOST_NAMES + 1) return [...names];
  return [...names.slice(0, MOST_NAMES), `${names.length - MOST_NAMES} more`];
}

function isOrAre(n: number): string {
  return n === 1 ? "is" : "are";
}

/** A note that was added and removed again leaves nothing to see. */
function withoutTakenBack(events: readonly LiveEvent[]): LiveEvent[] {
  const added = new Set<string>();
  const last = new Map<string, EventKind>();
  for (const { kind, about } of events) {
    if (!about.note) continue;
    if (kind === "note.added") added.add(about.note);
    last.set(about.note, kind);
  }
  return events.filter(({ kind, about }) => {
    if (!kind.startsWith("note.") || !about.note || !added.has(about.note)) return true;
    return kind === "note.added" && last.get(about.note) !== "note.removed";
  });
}

function isOwn({ kind, about }: LiveEvent, here: Here): boolean {
  if (kind.startsWith("sweep.")) return about.sweep === here.subject || about.sweep === here.sweep;
  return kind.startsWith("step.") && about.step === here.subject;
}

/** "2 new notes"; what can't be counted is said once. */
function phrase(what: string, n: number): string {
  const [one, many] = what.split("|");
  if (many === undefined) return one;
  return n === 1 ? `1 ${one}` : `${n} ${many}`;
}

function listed(parts: readonly string[]): string {
  return parts.length < 2 ? parts.join("") : `${parts.slice(0, -1).join(", ")} and ${parts.at(-1)}`;
}

const MOST_NAMES = 3;

/** What is counted is "one|many". */
const SORT: Record<EventKind, string> = {
  "note.added": "new note|new notes",
  "note.edited": "note changed|notes changed",
  "note.removed": "note removed|notes removed",
  "sweep.added": "new sweep|new sweeps",
  "sweep.edited": "sweep changed|sweeps changed",
  "sweep.read-anew": "sweep read anew|sweeps read anew",
  "sweep.analysed": "sweep analysed anew|sweeps analysed anew",
  "sweep.deleted": "sweep deleted|sweeps deleted",
  "verdict.given": "new verdict|new verdicts",
  "trail.named": "trails changed",
  "trail.corrected": "trails changed",
  "step.added": "new step|new steps",
  "step.edited": "step changed|steps changed",
  "step.deleted": "step deleted|steps deleted",
  "antenna.changed": "the antenna changed",
  "bench.added": "new bench|new benches",
  "bench.changed": "bench changed|benches changed",
  "photograph.added": "new photograph|new photographs",
  "photograph.deleted": "photograph deleted|photographs deleted",
  "plate.made": "new plate|new plates",
  "plate.mended": "new version of a plate|new versions of plates",
  "plate.withdrawn": "plate withdrawn|plates withdrawn",
  "write-up.published": "write-up published|write-ups published",
  "write-up.taken-back": "write-up taken back|write-ups taken back",
  "mention.found": "new mention elsewhere|new mentions elsewhere",
  "member.joined": "the members changed",
  "member.changed": "the members changed",
  "member.left": "the members changed",
  "project.changed": "the project changed",
};

/** Of the very thing that the page shows. */
const OWN: Partial<Record<EventKind, string>> = {
  "sweep.edited": "title, date or bench changed",
  "sweep.read-anew": "read anew",
  "sweep.analysed": "analysed anew",
  "sweep.deleted": "the sweep was deleted",
  "step.edited": "the step changed",
  "step.deleted": "the step was deleted",
};

const AT: Record<string, string> = {
  project: "in the project",
  sweep: "looking at a sweep",
  dip: "looking at a dip",
  trail: "looking at a trail",
  step: "looking at a step",
  bench: "looking at a bench",
};
