import * as rows from "~/db/bundle-rows.server";
import type { Queryable } from "~/db/client.server";
import { formatFrequency } from "~/measurement/units";
import type { Overview } from "./pages.ts";
import { type PlanLine, textEntry } from "./plan.ts";
import type { Rec } from "./records.ts";
import { threadHtml, threadMarkdown } from "./threads.ts";

/** What a thread stands on, and the row ids of its notes. */
export interface Subject {
  title: string;
  notes: number[];
}

/** Puts a note under what it stands on. */
export function subjectOfNote(
  note: Rec,
  rowId: number,
  shown: Map<string, Rec[]>,
  subjects: Map<string, Subject>,
): void {
  const kind = KINDS.find((one) => note[one]);
  const file = kind ? `${kind}-${note[kind]}` : "project";
  let subject = subjects.get(file);
  if (!subject) {
    const record =
      kind && shown.get(`${kind}${kind === "bench" ? "es" : "s"}`)?.find(({ id }) => id === note[kind]);
    subject = { title: kind && record ? titleOf(kind, record) : "the project", notes: [] };
    subjects.set(file, subject);
  }
  subject.notes.push(rowId);
}

/** Each thread as Markdown and as a page; `told` hears of each. */
export async function* threadLines(
  subjects: Map<string, Subject>,
  tx: Queryable,
  told: Overview["threads"],
): AsyncGenerator<PlanLine> {
  for (const [file, { title, notes }] of subjects) {
    const found = [];
    for (let i = 0; i < notes.length; i += MANY) {
      found.push(...(await rows.findNotes(notes.slice(i, i + MANY), tx)));
    }
    const idOf = new Map(found.map(({ note }) => [note.id, note.publicId]));
    const thread = found.map(({ note, author }) => ({
      id: note.publicId,
      parent: note.parentId === null ? null : (idOf.get(note.parentId) ?? null),
      author: author ?? "A former member",
      at: note.createdAt,
      edited: note.editedAt !== null,
      removed: note.removedAt !== null,
      body: note.body,
    }));
    yield* textEntry(`data/notes/${file}.md`, threadMarkdown(title, thread));
    yield* textEntry(`data/notes/${file}.html`, threadHtml(title, thread));
    told.push({ title, file, notes: notes.length });
  }
}

function titleOf(kind: (typeof KINDS)[number], record: Rec): string {
  switch (kind) {
    case "dip":
      return `the dip at ${formatFrequency(Number(record.frequencyHz))}`;
    case "trail":
      return `the trail ${record.name || formatFrequency(Number(record.frequencyHz))}`;
    case "bench":
      return `the bench ${record.name}`;
    default:
      return `the ${kind} ${record.title}`;
  }
}

const KINDS = ["dip", "trail", "step", "bench", "sweep"] as const;
const MANY = 200;
