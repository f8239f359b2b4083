import { Link, useLocation, useRouteLoaderData } from "react-router";
import { useHydrated } from "~/components/ui/hydrated";
import type { ThreadNote } from "~/services/note-thread.server";
import { BareNoteForm } from "./BareNoteForm.tsx";
import { NoteForm } from "./NoteForm.tsx";
import { NoteItem } from "./NoteItem.tsx";
import type { PartsOffered } from "./parts.ts";
import { kindOf, placeName, type ThreadPlace, type ThreadWhere } from "./place.ts";
import "./notes.css";

export interface ThreadProps {
  /** Public id. */
  projectId: string;
  place: ThreadPlace;
  thread: ThreadNote[];
  mayWrite: boolean;
  /** On a sweep: what a note can speak of a part of. */
  parts?: PartsOffered;
}

/** The notes of one place, with all there is to do about them. Complete without scripts. */
export function Thread({ projectId, place, thread, mayWrite, parts }: ThreadProps) {
  const where = { projectId, place, mayWrite, parts };
  return (
    <div className="grid gap-6">
      {thread.length === 0 ? (
        <p className="soft">Nobody has said anything here yet.</p>
      ) : (
        <ol className="grid gap-6" aria-label="Notes">
          {thread.map((note) => (
            <li key={note.publicId} className="grid gap-4 min-w-0">
              <NoteItem note={note} where={where} />
              {note.replies.length > 0 && (
                <ol className="note-replies" aria-label={`Answers to ${note.author?.name ?? "this note"}`}>
                  {note.replies.map((reply) => (
                    <li key={reply.publicId} className="min-w-0">
                      <NoteItem note={reply} where={where} />
                    </li>
                  ))}
                </ol>
              )}
            </li>
          ))}
        </ol>
      )}
      {mayWrite ? <WriteNote where={where} /> : <WhoMayWrite />}
      <FollowLink projectId={projectId} place={place} />
    </div>
  );
}

function WriteNote({ where }: { where: ThreadWhere }) {
  const hydrated = useHydrated();
  const label = `Write a note on ${placeName(where.place)}`;
  if (hydrated) return <NoteForm where={where} label={label} />;
  return (
    <div className="grid gap-1">
      <p className="font-semibold">{label}</p>
      <BareNoteForm where={where} target={{}} label={label} />
      <p className="field-hint">Markdown.</p>
    </div>
  );
}

/** Where a member says what to hear of this thread. */
function FollowLink({ projectId, place }: Pick<ThreadWhere, "projectId" | "place">) {
  const root = useRouteLoaderData<{ person: unknown }>("root");
  if (!root?.person) return null;
  const kind = kindOf(place);
  const of = kind ? `?${new URLSearchParams({ kind, subject: place[kind] ?? "" })}` : "";
  return (
    <p className="text-small no-print">
      <Link to={`/projects/${projectId}/follow${of}`}>Follow or mute {placeName(place)}</Link>
    </p>
  );
}

function WhoMayWrite() {
  const root = useRouteLoaderData<{ person: unknown }>("root");
  const { pathname, search } = useLocation();
  return (
    <p className="text-small soft">
      {root?.person ? (
        "Members of the project who may comment write here. An owner can give you that role."
      ) : (
        <>
          <Link to={`/sign-in?next=${encodeURIComponent(pathname + search)}`}>Sign in</Link> to write here,
          where you are a member who may.
        </>
      )}
    </p>
  );
}
