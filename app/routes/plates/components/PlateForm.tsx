import { useEffect, useRef } from "react";
import { Form, useNavigation } from "react-router";
import type { Visibility } from "~/auth/permissions";
import { Button } from "~/components/ui/Button";
import { TextareaField } from "~/components/ui/Field";
import { useHydrated } from "~/components/ui/hydrated";
import type { PlateDraft } from "../draft.server";
import type { PlateTexts } from "../plates.schema";
import type { PreviewAnswer } from "../preview-plate.server";
import { PlateFields } from "./PlateFields";
import { Preview } from "./Preview";
import { usePreview } from "./use-preview";

interface PlateFormProps {
  projectId: string;
  visibility: Visibility;
  draft: PlateDraft;
  /** What the server said to the form as it was sent; null before it was. */
  answer: (PreviewAnswer & { sent: { texts: PlateTexts; wrong: string } }) | null;
}

/** Choices beside the plate that comes of them. Without scripts a button shows it. */
export function PlateForm({ projectId, visibility, draft, answer }: PlateFormProps) {
  const hydrated = useHydrated();
  const { state, formData } = useNavigation();
  const busy = formData?.get("intent") === "freeze";
  const pressed = useRef(false);
  useEffect(() => {
    if (state === "idle") pressed.current = false;
  }, [state]);
  const form = useRef<HTMLFormElement>(null);
  useEffect(() => {
    // The button is far below: what stopped it comes into view.
    if (answer && Object.keys(answer.errors).length > 0) {
      form.current?.querySelector<HTMLElement>("[aria-invalid=true]")?.focus();
    }
  }, [answer]);
  const tried = usePreview(`/projects/${projectId}/plates/preview`);
  const last = tried.answer ?? answer ?? draft;
  // While a field is half typed the last figure stays.
  const preview = last.preview ?? (last.problem ? null : (answer?.preview ?? draft.preview));
  const errors = { ...answer?.errors, ...tried.answer?.errors };
  return (
    <div className="plate-form">
      <Form
        ref={form}
        method="post"
        className="grid gap-5 content-start"
        onChange={(event) => tried.onChange(event.currentTarget)}
        onSubmit={(event) => {
          // The second press of two would break the first one off, and wait as long again.
          if (pressed.current) event.preventDefault();
          pressed.current = true;
        }}
        noValidate
      >
        <input type="hidden" name="from" value={draft.from} />
        <input type="hidden" name="draw" value={draft.draw} />
        {draft.mends && (
          <>
            <input type="hidden" name="mends" value={draft.mends.publicId} />
            <TextareaField
              label={`What was wrong with version ${draft.mends.version}`}
              hint="In a line or two. Readers of the old version see it."
              name="wrong"
              rows={2}
              maxLength={500}
              required
              defaultValue={answer?.sent.wrong ?? ""}
              errors={answer?.errors.wrong}
            />
          </>
        )}
        <PlateFields
          texts={answer?.sent.texts ?? draft.texts}
          errors={errors}
          labelled={(draft.preview ?? answer?.preview)?.labelled ?? []}
          curves={(draft.preview ?? answer?.preview)?.curves ?? true}
        />
        {!hydrated && (
          <div>
            <Button name="intent" value="show" variant="quiet">
              Show
            </Button>
          </div>
        )}
        <Consequence visibility={visibility} />
        <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
          <Button name="intent" value="freeze" busy={busy} icon="plate">
            {draft.mends ? "Freeze the new version" : "Freeze the plate"}
          </Button>
          <p className="text-small soft" role="status">
            {busy && "Every form of it is drawn and stored. This takes some seconds."}
          </p>
        </div>
      </Form>
      <Preview preview={preview} problem={last.problem} busy={tried.busy} />
    </div>
  );
}

function Consequence({ visibility }: { visibility: Visibility }) {
  return (
    <div
      className={`panel grid gap-2 border-l-3 ${visibility === "public" ? "border-l-fen" : "border-l-clay"}`}
    >
      <p className="font-semibold">
        Anyone who has a plate’s address can read it
        {visibility === "public" ? "." : `, although this project is ${visibility}.`}
      </p>
      <p className="text-small">
        With the figure go its numbers and points, the project’s title, the names of those who took part, and
        how each number came about. A plate can be withdrawn, but not changed: a mistake is mended by a new
        version.
      </p>
    </div>
  );
}
