import type { ProjectAction } from "~/auth/permissions";
import * as blocks from "~/db/blocks.server";
import * as notes from "~/db/notes.server";
import { renderNote } from "./markdown.server.ts";
import type { NoteLinks } from "./markdown-links.ts";
import { revisionOf } from "./note-changes.server.ts";
import { UNDO_MS } from "./note-limits.ts";
import { loadLinks } from "./note-links.server.ts";
import type { PictureRegion } from "./note-parts.ts";

/** Who looks at a thread, as far as it changes what is offered. */
export interface ThreadViewer {
  person: { id: number } | null;
  may: (action: ProjectAction) => boolean;
}

export interface ThreadNote {
  publicId: string;
  /** Null for a former member, and for a removed note. */
  author: { name: string; userName: string } | null;
  createdAt: Date;
  editedAt: Date | null;
  removed: boolean;
  /** By somebody whom the viewer blocked: shown only when unfolded. */
  folded: boolean;
  /** Somebody else's, seen by somebody who is signed in. */
  mayReport: boolean;
  html: string;
  /** Of a sweep: what it speaks of; null for all of it. */
  part: { stretch: { fromHz: number; toHz: number } | null; region: PictureRegion | null } | null;
  /** As it was written; only for who may edit it. */
  body: string | null;
  mayEdit: boolean;
  /** Tells this text from the next, for who changes it. */
  revision: string;
  mayRemove: boolean;
  /** Removed by the viewer a moment ago: it can be brought back. */
  mayRestore: boolean;
  /** The note that this one answers, where that is not the one it stands under. */
  answers: { publicId: string; author: string } | null;
  /** Every answer below, however deep, oldest first; empty in answers themselves. */
  replies: ThreadNote[];
}

/** The notes of one place, ready for drawing: oldest first, with all that answers each under it. */
export async function listThread(place: notes.NotePlace, whose: ThreadViewer): Promise<ThreadNote[]> {
  const [all, blocked] = await Promise.all([
    notes.findAllByPlace(place),
    whose.person ? blocks.findBlockedIds(whose.person.id) : [],
  ]);
  const viewer = { ...whose, blocked: new Set(blocked) };
  const shown = shownOf(all, viewer);
  const rows = all.filter(({ note }) => shown.has(note.id));
  const said = rows.flatMap(({ note }) => (note.removedAt ? [] : [note.body]));
  const links = await loadLinks(place.projectId, said, viewer);
  const byId = new Map(rows.map((row) => [row.note.id, row]));
  const drawn = new Map<number, ThreadNote>();
  const heads: ThreadNote[] = [];
  for (const row of rows) {
    const parent = row.note.parentId === null ? undefined : byId.get(row.note.parentId);
    const head = parent && drawn.get(parent.note.id);
    if (!head) {
      const note = drawNote(row, viewer, links, null);
      drawn.set(row.note.id, note);
      heads.push(note);
      continue;
    }
    const deeper = head.publicId !== parent.note.publicId;
    const author = parent.author?.name ?? FORMER;
    head.replies.push(
      drawNote(row, viewer, links, deeper ? { publicId: parent.note.publicId, author } : null),
    );
    // Whoever answers this one is shown under the same head.
    drawn.set(row.note.id, head);
  }
  return heads;
}

export function countNotes(thread: ThreadNote[]): number {
  return thread.reduce((sum, note) => sum + (note.removed ? 0 : 1) + countNotes(note.replies), 0);
}

function drawNote(
  { note, author }: notes.ListedNote,
  viewer: ThreadViewer & { blocked: ReadonlySet<number> },
  links: NoteLinks,
  answers: ThreadNote["answers"],
): ThreadNote {
  const { person, may } = viewer;
  const removed = note.removedAt !== null;
  const own = person !== null && note.authorId === person.id && may("note.write");
  const mayEdit = own && !removed;
  return {
    publicId: note.publicId,
    author: author && !removed ? { name: author.name, userName: author.userName } : null,
    createdAt: note.createdAt,
    editedAt: note.editedAt,
    removed,
    folded: !removed && author !== null && viewer.blocked.has(author.id),
    mayReport: !removed && person !== null && note.authorId !== person.id,
    part: removed ? null : partOf(note),
    html: removed ? "" : renderNote(note.body, links),
    body: mayEdit ? note.body : null,
    mayEdit,
    revision: revisionOf(note),
    mayRemove: !removed && (own || (person !== null && may("note.moderate"))),
    mayRestore: mayRestore(note, viewer),
    answers,
    replies: [],
  };
}

/**
 * Rows that are shown, by row id: what is there, removed ones that something there answers, and what the viewer can
 * still bring back.
 */
function shownOf(rows: notes.ListedNote[], viewer: ThreadViewer): Set<number> {
  const shown = new Set<number>();
  const answered = new Set<number>();
  // Answers have larger ids than what they answer.
  for (const { note } of rows.toReversed()) {
    if (note.removedAt && !answered.has(note.id) && !mayRestore(note, viewer)) continue;
    shown.add(note.id);
    if (note.parentId !== null) answered.add(note.parentId);
  }
  return shown;
}

function partOf({ fromHz, toHz, region }: notes.NoteRow): ThreadNote["part"] {
  const stretch = fromHz !== null && toHz !== null ? { fromHz, toHz } : null;
  return stretch || region ? { stretch, region } : null;
}

function mayRestore({ removedAt, removedBy }: notes.NoteRow, { person }: ThreadViewer): boolean {
  return removedAt !== null && removedBy === person?.id && Date.now() - removedAt.getTime() < UNDO_MS;
}

const FORMER = "a former member";
