import { useLocation } from "react-router";
import { Button } from "~/components/ui/Button";
import { MAX_NOTE_CHARACTERS } from "~/services/note-limits";
import { BareFiles } from "./BareFiles.tsx";
import { PartFields } from "./PartFields.tsx";
import { kindOf, notesPath, type ThreadWhere } from "./place.ts";

export interface NoteTarget {
  /** The note that is answered. */
  parent?: string;
  /** The note that is changed. */
  edited?: { publicId: string; body: string; revision: string };
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
      encType="multipart/form-data"
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
      {!target.edited && <BareFiles />}
      {where.parts && !target.edited && !target.parent && <PartFields offered={where.parts} />}
      <Button size="small">{target.edited ? "Keep the change" : "Store the note"}</Button>
    </form>
  );
}

/** What says where a note goes, and where its writer goes back to. */
export function NoteTargetFields({ where: { place }, target }: { where: ThreadWhere; target: NoteTarget }) {
  const { pathname, search } = useLocation();
  const { edited, parent } = target;
  const kind = kindOf(place);
  return (
    <>
      <input type="hidden" name="returnTo" value={pathname + search} />
      {edited && <input type="hidden" name="intent" value="edit" />}
      {edited && <input type="hidden" name="revision" value={edited.revision} />}
      {!edited && kind && <input type="hidden" name={kind} value={place[kind]} />}
      {!edited && parent && <input type="hidden" name="parent" value={parent} />}
    </>
  );
}
