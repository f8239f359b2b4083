import type { SubmissionResult } from "@conform-to/react";
import { useEffect, useRef } from "react";
import { useFetcher, useLocation } from "react-router";
import { Button } from "~/components/ui/Button";
import { useToast } from "~/components/ui/Toast";
import type { ThreadNote } from "~/services/notes.server";
import { notesPath, type ThreadWhere } from "./place.ts";
import { Unfold } from "./Unfold.tsx";

interface RemoveNoteProps {
  note: ThreadNote;
  where: ThreadWhere;
  about: string;
}

/** Asks once, in place, then removes. */
export function RemoveNote({ note, where, about }: RemoveNoteProps) {
  const fetcher = useFetcher<{ done?: "remove"; lastResult?: SubmissionResult<string[]> }>();
  const { show } = useToast();
  const { pathname, search } = useLocation();
  const told = useRef(false);
  useEffect(() => {
    if (fetcher.data?.done !== "remove" || told.current) return;
    told.current = true;
    show({ id: `removed-${note.publicId}`, text: "The note is removed." });
  });
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
        Remove {about} for good?
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
