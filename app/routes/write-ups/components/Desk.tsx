import { useEffect, useRef, useState } from "react";
import { Form, useNavigation } from "react-router";
import { useDraft } from "~/components/notes/draft";
import { Button, LinkButton } from "~/components/ui/Button";
import { InputField } from "~/components/ui/Field";
import { useHydrated } from "~/components/ui/hydrated";
import type { Route } from "../+types/edit";
import { ArticleText } from "./ArticleText.tsx";
import { FigureChoices } from "./FigureChoices.tsx";
import { TextHint } from "./TextHint.tsx";
import { useLook } from "./use-look.ts";
import { WriteUpText } from "./WriteUpText.tsx";

export interface DeskProps {
  data: Route.ComponentProps["loaderData"];
  answer: Route.ComponentProps["actionData"] | null;
  draftKey: string;
}

/** Where a write-up is written: the text, kept on this device as it grows, and beside it how it will look. */
export function Desk({ data, answer, draftKey }: DeskProps) {
  const { projectId, writeUp, choices, drawn } = data;
  const looked = answer && "looked" in answer ? answer.looked : null;
  const hydrated = useHydrated();
  const busy = useNavigation().state === "submitting";
  const [stored, setStored] = useState({ title: writeUp.title, body: writeUp.body });
  const titled = useDraft(`${draftKey}:title`, stored.title);
  const draft = useDraft(draftKey, stored.body);
  const field = useRef<HTMLTextAreaElement>(null);
  const sent = useRef({ title: "", body: "" });
  const [title, text] = looked && !hydrated ? [looked.title, looked.body] : [titled.text, draft.text];
  const look = useLook(projectId, text, looked?.drawn ?? drawn);
  const kept = answer && "kept" in answer ? answer.kept : null;
  const answered = useRef<unknown>(null);
  useEffect(() => {
    if (!kept || answered.current === kept) return;
    answered.current = kept;
    setStored(kept);
    // What was typed while it was on its way is not kept yet.
    if (titled.text === sent.current.title) titled.forget(kept.title);
    if (draft.text === sent.current.body) draft.forget(kept.body);
  });
  const errors = (answer && "lastResult" in answer && answer.lastResult.error) || {};
  const unkept = text !== stored.body || title !== stored.title;
  return (
    <Form
      method="post"
      preventScrollReset
      onSubmit={() => {
        sent.current = { title, body: text };
      }}
      className="grid gap-5"
    >
      <input type="hidden" name="was" value={JSON.stringify(stored)} />
      {hydrated && <input type="hidden" name="here" value="yes" />}
      <InputField
        label="Title"
        name="title"
        required
        maxLength={160}
        value={title}
        onChange={(event) => titled.change(event.currentTarget.value)}
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
            hint={<TextHint text={text} restored={draft.restored} />}
          />
          <FigureChoices choices={choices} text={text} change={draft.change} field={field} />
          {errors[""]?.[0] && (
            <p role="alert" className="field-error">
              {errors[""][0]}
            </p>
          )}
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
              Publish…
            </LinkButton>
            <span role="status" className="text-small soft">
              {hydrated && (busy ? "Keeping it." : unkept ? UNKEPT : kept ? "The draft is kept." : "")}
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
          {look.missed && (
            <p className="text-small soft">
              The server can't be reached just now: this shows an earlier text. What you write is kept on this
              device.
            </p>
          )}
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

const UNKEPT = "Not kept yet; it is on this device. Publishing takes what is kept.";
