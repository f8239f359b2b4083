import { useLocation } from "react-router";
import { Button } from "~/components/ui/Button";
import { MAX_NOTE_CHARACTERS } from "~/services/note-limits";
import { notesPath, type ThreadWhere } from "./place.ts";

export interface NoteTarget {
  /** The note that is answered. */
  parent?: string;
  /** The note that is changed. */
  edited?: { publicId: string; body: string };
}

/** A note's form for a browser without scripts: a field and a button. */
export function BareNoteForm({
  where,
  target,
  label,
}: {
  where: ThreadWhere;
  target: NoteTarget;
  label: string;
}) {
  return (
    <form
      method="post"
      action={notesPath(where, target.edited?.publicId)}
      className="grid gap-2 justify-items-start"
    >
      <NoteTargetFields where={where} target={target} />
      <textarea
        name="body"
        required
        rows={4}
        maxLength={MAX_NOTE_CHARACTERS}
        defaultValue={target.edited?.body}
        aria-label={label}
        className="control"
      />
      <Button size="small">{target.edited ? "Keep the change" : "Store the note"}</Button>
    </form>
  );
}

/** What says where a note goes, and where its writer goes back to. */
export function NoteTargetFields({ where: { place }, target }: { where: ThreadWhere; target: NoteTarget }) {
  const { pathname, search } = useLocation();
  return (
    <>
      <input type="hidden" name="returnTo" value={pathname + search} />
      {target.edited && <input type="hidden" name="intent" value="edit" />}
      {!target.edited && place.dip && <input type="hidden" name="dip" value={place.dip} />}
      {!target.edited && place.sweep && <input type="hidden" name="sweep" value={place.sweep} />}
      {!target.edited && target.parent && <input type="hidden" name="parent" value={target.parent} />}
    </>
  );
}
