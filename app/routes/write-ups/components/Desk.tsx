import { useEffect, useRef, useState } from "react";
import { useFetcher } from "react-router";
import { useDraft } from "~/components/notes/draft";
import { Button, LinkButton } from "~/components/ui/Button";
import { InputField } from "~/components/ui/Field";
import { useHydrated } from "~/components/ui/hydrated";
import { MAX_WRITE_UP_CHARACTERS } from "~/services/note-limits";
import type { Route } from "../+types/edit";
import type { EditAnswer } from "../edit.tsx";
import { ArticleText } from "./ArticleText.tsx";
import { FigureChoices } from "./FigureChoices.tsx";
import { useLook } from "./use-look.ts";
import { WriteUpText } from "./WriteUpText.tsx";

export interface DeskProps {
  data: Route.ComponentProps["loaderData"];
  /** What a form without scripts was answered. */
  answer: Route.ComponentProps["actionData"] | null;
  draftKey: string;
}

interface Answer {
  kept?: { title: string; body: string };
  conflict?: unknown;
  lastResult?: { error?: Record<string, string[] | null> | null };
}

/** Where a write-up is written: the text, kept on this device as it grows, and beside it how it will look. */
export function Desk({ data, answer, draftKey }: DeskProps) {
  const { projectId, writeUp, choices, drawn } = data;
  const looked = answer && "looked" in answer ? answer.looked : null;
  const fetcher = useFetcher<Answer>();
  const hydrated = useHydrated();
  const [stored, setStored] = useState({ title: writeUp.title, body: writeUp.body });
  const [title, setTitle] = useState(looked?.title ?? stored.title);
  const draft = useDraft(draftKey, stored.body);
  const field = useRef<HTMLTextAreaElement>(null);
  const text = looked && !hydrated ? looked.body : draft.text;
  const look = useLook(projectId, text, looked?.drawn ?? drawn);
  const busy = fetcher.state !== "idle";
  const { kept } = fetcher.data ?? {};
  const answered = useRef<unknown>(null);
  useEffect(() => {
    if (!kept || answered.current === kept) return;
    answered.current = kept;
    setStored(kept);
    setTitle(kept.title);
    draft.forget(kept.body);
  });
  const errors = {
    ...(answer && "lastResult" in answer ? answer.lastResult.error : {}),
    ...fetcher.data?.lastResult?.error,
  };
  const unkept = text !== stored.body || title !== stored.title;
  const left = MAX_WRITE_UP_CHARACTERS - text.length;
  const Form = fetcher.Form;
  return (
    <Form method="post" className="grid gap-5">
      <input type="hidden" name="was" value={JSON.stringify(stored)} />
      {hydrated && <input type="hidden" name="here" value="yes" />}
      <InputField
        label="Title"
        name="title"
        required
        maxLength={160}
        value={title}
        onChange={(event) => setTitle(event.currentTarget.value)}
        errors={errors.title ?? undefined}
        className="max-w-[44rem]"
      />
      <div className="write-up-desk">
        <div className="write-up-text grid gap-3 content-start min-w-0">
          <WriteUpText
            projectId={projectId}
            text={text}
            change={draft.change}
            field={field}
            errors={errors.body ?? undefined}
            hint={
              left < NEAR_LIMIT
                ? left < 0
                  ? `${-left} characters too many`
                  : `${left} characters left`
                : draft.restored
                  ? "You began this earlier on this device; it was not kept yet."
                  : HINT
            }
          />
          <FigureChoices choices={choices} text={text} change={draft.change} field={field} />
          <div className="flex flex-wrap items-center gap-3">
            <Button name="intent" value="keep" busy={busy}>
              Keep the draft
            </Button>
            {!hydrated && (
              <Button name="intent" value="look" variant="quiet">
                Look at it
              </Button>
            )}
            <LinkButton to={`/projects/${projectId}/write-ups/${writeUp.publicId}/publish`} variant="quiet">
              Look at it and publish
            </LinkButton>
            <span role="status" className="text-small soft">
              {busy ? "Keeping it." : !hydrated ? "" : unkept ? UNKEPT : kept ? "The draft is kept." : ""}
            </span>
          </div>
        </div>
        <section
          aria-label="How it will look"
          aria-busy={look.busy}
          // biome-ignore lint/a11y/noNoninteractiveTabindex: a box that scrolls must be reachable by keyboard
          tabIndex={0}
          className="write-up-look"
        >
          {look.article.html.trim() === "" ? (
            <p className="soft">What you write is shown here as readers will see it.</p>
          ) : (
            <ArticleText html={look.article.html} />
          )}
        </section>
      </div>
    </Form>
  );
}

export type { EditAnswer };

const NEAR_LIMIT = 1000;
const UNKEPT = "Not kept yet; the text is on this device.";
const HINT = (
  <>
    Markdown, with footnotes <code>[^1]</code> and formulas <code>$\lambda/4$</code>; <code>#</code> names a
    dip, a sweep, a step or a plate. A figure is a line of its own: <code>![caption](#dip:…)</code>.
  </>
);
