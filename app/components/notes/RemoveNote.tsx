import type { SubmissionResult } from "@conform-to/react";
import { useEffect, useRef } from "react";
import { useFetcher, useLocation } from "react-router";
import { Button } from "~/components/ui/Button";
import { useToast } from "~/components/ui/Toast";
import { UNDO_MS } from "~/services/note-limits";
import type { ThreadNote } from "~/services/note-thread.server";
import { notesPath, type ThreadWhere } from "./place.ts";
import { Unfold } from "./Unfold.tsx";

interface RemoveNoteProps {
  note: ThreadNote;
  where: ThreadWhere;
  about: string;
}

interface Answer {
  done?: "remove" | "restore";
  lastResult?: SubmissionResult<string[]>;
}

/** Asks once, in place, then removes. */
export function RemoveNote({ note, where, about }: RemoveNoteProps) {
  // The form is gone once the note is: the answer is told by `RemovedNote`, which takes its place.
  const fetcher = useFetcher<Answer>({ key: `remove-${note.publicId}` });
  const { pathname, search } = useLocation();
  const problem = fetcher.data?.lastResult?.error?.[""]?.[0];
  const ask = (
    <fetcher.Form
      method="post"
      action={notesPath(where, note.publicId)}
      className="grid gap-2 justify-items-start"
    >
      <input type="hidden" name="intent" value="remove" />
      <input type="hidden" name="returnTo" value={pathname + search} />
      <p>
        Remove {about}? For ten seconds it can be brought back, then its text is gone for good.
        {note.replies.length > 0 && " Answers to it stay, under a line that says it was removed."}
      </p>
      {problem && (
        <p role="alert" className="field-error">
          {problem}
        </p>
      )}
      <Button variant="danger" size="small" busy={fetcher.state !== "idle"}>
        Remove the note
      </Button>
    </fetcher.Form>
  );
  return (
    <Unfold label="Remove" about={about} bare={ask}>
      {() => ask}
    </Unfold>
  );
}

/** What stands where a note was; with the way back for who removed it a moment ago. */
export function RemovedNote({ note, where }: { note: ThreadNote; where: ThreadWhere }) {
  const { show } = useToast();
  const fetcher = useFetcher<Answer>({ key: `restore-${note.publicId}` });
  const { pathname, search } = useLocation();
  const told = useRef(false);
  const fields = { intent: "restore", returnTo: pathname + search };
  useEffect(() => {
    if (!note.mayRestore || told.current) return;
    told.current = true;
    const act = () => fetcher.submit(fields, { method: "post", action: notesPath(where, note.publicId) });
    show({
      id: `removed-${note.publicId}`,
      text: "The note is removed.",
      undo: { act, forMs: UNDO_MS },
    });
  });
  const problem = fetcher.data?.lastResult?.error?.[""]?.[0];
  return (
    <>
      <p>
        {note.mayRestore && note.replies.length === 0
          ? "You removed this note."
          : "This note was removed. What answers it stays."}
      </p>
      {problem && (
        <p role="alert" className="field-error">
          {problem}
        </p>
      )}
      {note.mayRestore && (
        <fetcher.Form method="post" action={notesPath(where, note.publicId)}>
          {Object.entries(fields).map(([name, value]) => (
            <input key={name} type="hidden" name={name} value={value} />
          ))}
          <Button variant="quiet" size="small" busy={fetcher.state !== "idle"}>
            Bring it back
          </Button>
        </fetcher.Form>
      )}
    </>
  );
}
