import { useEffect, useRef } from "react";
import { Link, useLocation } from "react-router";
import { RelativeTime } from "~/components/ui/DateTime";
import { useHydrated } from "~/components/ui/hydrated";
import { Markdown } from "~/components/ui/Markdown";
import type { ThreadNote } from "~/services/note-thread.server";
import { BareNoteForm } from "./BareNoteForm.tsx";
import { NoteForm } from "./NoteForm.tsx";
import { PartLink, usePartShown } from "./PartLink.tsx";
import { notesPath, type ThreadWhere } from "./place.ts";
import { RemovedNote, RemoveNote } from "./RemoveNote.tsx";
import { Unfold } from "./Unfold.tsx";

/** One note under its permanent anchor. */
export function NoteItem({ note, where }: { note: ThreadNote; where: ThreadWhere }) {
  const [article, chosen] = useAnchor(`note-${note.publicId}`);
  const shown = usePartShown(note.part, chosen);
  const name = note.author?.name ?? "A former member";
  if (note.removed) {
    return (
      <article ref={article} id={`note-${note.publicId}`} tabIndex={-1} className="note soft">
        <RemovedNote note={note} where={where} />
      </article>
    );
  }
  return (
    <article
      ref={article}
      id={`note-${note.publicId}`}
      tabIndex={-1}
      aria-label={`Note by ${name}`}
      className={`note ${chosen ? "note-chosen" : ""}`}
      {...shown}
    >
      <header className="flex flex-wrap items-baseline gap-x-3">
        <span className="font-semibold">{name}</span>
        {note.answers && (
          <a href={`#note-${note.answers.publicId}`} className="text-small">
            in answer to {note.answers.author}
          </a>
        )}
        <a href={`#note-${note.publicId}`} className="note-time">
          <RelativeTime at={note.createdAt} />
        </a>
        {note.part && <PartLink part={note.part} />}
        {note.editedAt && (
          <span className="text-small soft">
            <Link to={`${notesPath(where, note.publicId)}/history`}>
              changed <RelativeTime at={note.editedAt} />
            </Link>
          </span>
        )}
      </header>
      {note.folded ? (
        <details>
          <summary className="note-action">Folded away: you blocked {name}</summary>
          <Markdown html={note.html} />
        </details>
      ) : (
        <Markdown html={note.html} />
      )}
      {(where.mayWrite || note.mayEdit || note.mayRemove || note.mayReport) && (
        <Actions note={note} where={where} name={name} />
      )}
    </article>
  );
}

function Actions({ note, where, name }: { note: ThreadNote; where: ThreadWhere; name: string }) {
  const about = note.mayEdit ? "your note" : `the note by ${name}`;
  const answer = { parent: note.publicId };
  const { publicId, body, revision } = note;
  const edit = { edited: { publicId, body: body ?? "", revision } };
  return (
    <footer className="flex flex-wrap items-start gap-x-4 no-print">
      {where.mayWrite && (
        <Unfold
          label="Answer"
          about={about}
          bare={<BareNoteForm where={where} target={answer} label={`Answer to ${name}`} />}
        >
          {(close) => (
            <NoteForm
              where={where}
              target={answer}
              label={`Answer to ${name}`}
              onDone={close}
              onCancel={close}
              autoFocus
            />
          )}
        </Unfold>
      )}
      {note.mayEdit && (
        <Unfold
          label="Change"
          about={about}
          bare={<BareNoteForm where={where} target={edit} label="Change your note" />}
        >
          {(close) => (
            <NoteForm
              where={where}
              target={edit}
              label="Change your note"
              onDone={close}
              onCancel={close}
              autoFocus
            />
          )}
        </Unfold>
      )}
      {note.mayRemove && <RemoveNote note={note} where={where} about={about} />}
      {note.mayReport && (
        <Link to={`${notesPath(where, note.publicId)}/report`} className="note-action">
          Report or block<span className="sr-only"> {about}</span>
        </Link>
      )}
    </footer>
  );
}

/** Whether the address points here; then it is brought into sight and focused, also after a step without reload. */
function useAnchor(id: string) {
  const { hash, key } = useLocation();
  const hydrated = useHydrated();
  const element = useRef<HTMLElement>(null);
  const chosen = hydrated && hash === `#${id}`;
  // biome-ignore lint/correctness/useExhaustiveDependencies: going to the same anchor again shows it again
  useEffect(() => {
    if (!chosen) return;
    element.current?.scrollIntoView({ block: "center" });
    element.current?.focus({ preventScroll: true });
  }, [chosen, key]);
  return [element, chosen] as const;
}
