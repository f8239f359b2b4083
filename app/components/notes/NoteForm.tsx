import { getFormProps, type SubmissionResult, useForm } from "@conform-to/react";
import { parseWithZod } from "@conform-to/zod/v4";
import { type FormEvent, useEffect, useId, useRef } from "react";
import { useFetcher, useLocation, useRouteLoaderData } from "react-router";
import { Difference } from "~/components/edit-conflict/Difference";
import { Button } from "~/components/ui/Button";
import { useHydrated } from "~/components/ui/hydrated";
import { useToast } from "~/components/ui/Toast";
import { MAX_NOTE_CHARACTERS } from "~/services/note-limits";
import { BareFiles } from "./BareFiles.tsx";
import { type NoteTarget, NoteTargetFields } from "./BareNoteForm.tsx";
import { useClientKey, useDraft } from "./draft.ts";
import { useMarks } from "./marks.tsx";
import { NoteText } from "./NoteText.tsx";
import { editNoteSchema, writeNoteSchema } from "./notes.schema.ts";
import { PartFields } from "./PartFields.tsx";
import { Preview } from "./Preview.tsx";
import { notesPath, placeKey, type ThreadWhere } from "./place.ts";
import { useWaiting } from "./use-waiting.ts";

export interface NoteFormProps {
  where: ThreadWhere;
  target?: NoteTarget;
  label: string;
  /** Called when the note is stored. */
  onDone?: () => void;
  /** Offers to leave without storing. */
  onCancel?: () => void;
  autoFocus?: boolean;
}

interface Answer {
  unreached?: boolean;
  signedOut?: boolean;
  publicId?: string;
  done?: "edit";
  /** Changed in another window since this form was opened. */
  changedSince?: { body: string; revision: string };
  lastResult?: SubmissionResult<string[]>;
}

/** Writes, answers or changes a note. Begun text stays on the device until it is stored. */
export function NoteForm({ where, target = {}, label, onDone, onCancel, autoFocus }: NoteFormProps) {
  const fetcher = useFetcher<Answer>();
  const { show } = useToast();
  const { edited } = target;
  const marks = useMarks();
  const root = useRouteLoaderData<{ person: { userName: string } | null }>("root");
  const about = `${placeKey(where)}:${edited?.publicId ?? target.parent ?? ""}`;
  const draftKey = `${root?.person?.userName ?? ""}:${about}`;
  const draft = useDraft(draftKey, edited?.body ?? "");
  const busy = fetcher.state !== "idle";
  const element = useRef<HTMLFormElement>(null);
  const waiting = useWaiting(draftKey, element, busy);
  const [clientKey, renewKey] = useClientKey(waiting.clientKey);
  const schema = edited ? editNoteSchema : writeNoteSchema;
  const [form, fields] = useForm<{ body: string }>({
    id: useId(),
    lastResult: busy || fetcher.data?.unreached ? null : fetcher.data?.lastResult,
    shouldRevalidate: "onInput",
    onValidate: ({ formData }) => parseWithZod(formData, { schema }) as never,
  });
  const theirs = fetcher.data?.changedSince;
  const answered = useRef<unknown>(null);
  useEffect(() => {
    const { data } = fetcher;
    if (!data || answered.current === data) return;
    answered.current = data;
    if (data.unreached) return waiting.wait(clientKey);
    waiting.stop();
    if (!data.publicId && !data.done) return;
    draft.forget("");
    renewKey();
    marks?.setPicked({ stretch: null, region: null });
    show({ id: `note-${Date.now()}`, text: data.done ? "The note is changed." : "The note is stored." });
    onDone?.();
  });
  const formProps = getFormProps(form);
  const send = (event: FormEvent<HTMLFormElement>) => {
    if (navigator.onLine) return formProps.onSubmit(event);
    event.preventDefault();
    if (draft.text.trim() !== "") waiting.wait(clientKey);
  };
  return (
    <fetcher.Form
      method="post"
      encType="multipart/form-data"
      action={notesPath(where, edited?.publicId)}
      {...formProps}
      ref={element}
      onSubmit={send}
      className="grid gap-2"
    >
      <NoteTargetFields
        where={where}
        target={edited && theirs ? { edited: { ...edited, revision: theirs.revision } } : target}
      />
      {theirs && (
        <section
          role="alert"
          className="grid gap-2 border border-dashed border-edge rounded-base p-3"
          aria-label="Changed in another window"
        >
          <p>
            You changed this note in another window since this form was opened. Nothing was stored yet. It now
            says what stands here; take over from it what you want to keep, or store yours in its place.
          </p>
          <p className="text-small max-h-[20rem] overflow-auto">
            <Difference text={theirs.body} against={draft.text} />
          </p>
        </section>
      )}
      {!edited && <input type="hidden" name="clientKey" value={clientKey} />}
      <NoteText
        projectId={where.projectId}
        field={fields.body}
        label={label}
        autoFocus={autoFocus}
        text={draft.text}
        change={(text) => {
          draft.change(text);
          // What was sent already may have arrived: a changed text is another note, and never lost.
          if (waiting.clientKey === null) return;
          waiting.stop();
          renewKey();
        }}
        errors={fields.body.errors ?? form.errors}
        hint={<Hint restored={draft.restored} left={MAX_NOTE_CHARACTERS - draft.text.length} />}
      />
      {!edited && <BareFiles />}
      {fetcher.data?.signedOut && !busy && <SignInAgain />}
      {waiting.clientKey !== null && <Waiting busy={busy} onStop={waiting.stop} />}
      {where.parts && !edited && !target.parent && <PartFields offered={where.parts} />}
      <Preview text={draft.text} projectId={where.projectId} />
      <div className="flex flex-wrap items-center gap-2">
        <Button size="small" busy={busy}>
          {theirs ? "Store mine in its place" : edited ? "Keep the change" : "Store the note"}
        </Button>
        {onCancel && (
          <Button
            type="button"
            variant="quiet"
            size="small"
            onClick={() => {
              draft.forget(edited?.body ?? "");
              onCancel();
            }}
          >
            Leave it
          </Button>
        )}
      </div>
    </fetcher.Form>
  );
}

/** Leads to signing in and back to the thread, where the text waits on this device. */
function SignInAgain() {
  const { pathname, search } = useLocation();
  const next = encodeURIComponent(`${pathname}${search}#thread`);
  return (
    <p>
      <a href={`/sign-in?next=${next}`}>Sign in again and come back here</a>
    </p>
  );
}

function Waiting({ busy, onStop }: { busy: boolean; onStop: () => void }) {
  return (
    <p role="status" className="flex flex-wrap items-center gap-x-3 text-small">
      {busy ? "Sending it again." : WAITING}
      <Button type="button" variant="quiet" size="small" onClick={onStop}>
        Do not send it by itself
      </Button>
    </p>
  );
}

/** Says how to write while there is room, and how much is left where it gets tight. */
function Hint({ restored, left }: { restored: boolean; left: number }) {
  const hydrated = useHydrated();
  if (left < NEAR_LIMIT) {
    return (
      <span role="status" className={left < 0 ? "text-alarm" : undefined}>
        {left < 0 ? `${-left} characters too many` : `${left} characters left`}
      </span>
    );
  }
  if (restored) return "You began this earlier on this device; it was not stored yet.";
  return hydrated
    ? "Markdown; @ names a member, # a dip, sweep, step or plate. Kept on this device until it is stored."
    : "Markdown.";
}

const NEAR_LIMIT = 1000;
const WAITING =
  "The server can't be reached. The text is kept on this device and is sent by itself, once, when there is a connection again.";
