import { formatDateTime } from "../dates.ts";
import { escapeHtml } from "../html-text.ts";
import { renderNote } from "../markdown.server.ts";
import { NO_LINKS, type NoteLinks } from "../markdown-links.ts";
import { page } from "./pages.ts";

/** A note as a thread shows it. */
export interface ThreadNote {
  id: string;
  parent: string | null;
  author: string;
  at: Date;
  edited: boolean;
  removed: boolean;
  body: string;
}

/** A thread as Markdown: answers are set in under what they answer. */
export function threadMarkdown(title: string, notes: ThreadNote[]): string {
  const texts = inOrder(notes).map(({ note, depth }) => {
    const text = `**${note.author}**, ${formatDateTime(note.at)}${note.edited ? ", edited" : ""}\n\n${bodyOf(note)}`;
    return text
      .split("\n")
      .map((line) => `${"> ".repeat(depth)}${line}`.trimEnd())
      .join("\n");
  });
  return `# Notes on ${title}\n\n${texts.join("\n\n---\n\n")}\n`;
}

export function threadHtml(title: string, notes: ThreadNote[], links: NoteLinks = NO_LINKS): string {
  const items = inOrder(notes).map(
    ({ note, depth }) =>
      `<article id="note-${note.id}" class="note" style="margin-left:${depth * 2}rem"><p class="soft"><b>${escapeHtml(note.author)}</b>, ${formatDateTime(note.at)}${note.edited ? ", edited" : ""}</p>${renderNote(bodyOf(note), links)}</article>`,
  );
  return page(`Notes on ${title}`, `<p><a href="../index.html">The project</a></p>${items.join("")}`);
}

function bodyOf(note: ThreadNote): string {
  return note.removed ? "*This note was removed.*" : note.body;
}

/** Oldest first, answers behind what they answer. */
function inOrder(notes: ThreadNote[]): { note: ThreadNote; depth: number }[] {
  const answers = new Map<string | null, ThreadNote[]>([[null, []]]);
  const known = new Set(notes.map((note) => note.id));
  for (const note of notes) {
    const under = note.parent !== null && known.has(note.parent) ? note.parent : null;
    const before = answers.get(under);
    if (before) before.push(note);
    else answers.set(under, [note]);
  }
  // Without recursion: a chain of answers may be as long as people like.
  const told: { note: ThreadNote; depth: number }[] = [];
  const left = (answers.get(null) ?? []).map((note) => ({ note, depth: 0 })).reverse();
  for (let next = left.pop(); next; next = left.pop()) {
    told.push({ ...next, depth: Math.min(next.depth, DEEPEST) });
    const deeper = next.depth + 1;
    for (const note of [...(answers.get(next.note.id) ?? [])].reverse()) left.push({ note, depth: deeper });
  }
  return told;
}

const DEEPEST = 4;
