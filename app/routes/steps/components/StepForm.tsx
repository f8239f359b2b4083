import { useState } from "react";
import { Form, Link, useNavigation } from "react-router";
import { type Conflict, EditConflict } from "~/components/edit-conflict/EditConflict";
import { Button } from "~/components/ui/Button";
import { CheckboxField, FieldGroup, InputField, TextareaField } from "~/components/ui/Field";
import { quantityLines } from "../step-conflict";
import type { StepTexts, TargetOption } from "../step-form";
import { QuantityFields } from "./QuantityFields";

export interface StepFormProps {
  data: {
    projectId: string;
    texts: StepTexts;
    was: string;
    targets: TargetOption[];
    /** False where there is no antenna to point at. */
    described: boolean;
  };
  /** What the server said to the form as it was sent; null before it was. */
  answer: {
    sent: StepTexts & { was: string };
    errors: Record<string, string[] | null>;
    more?: boolean;
    conflict?: Conflict;
  } | null;
  submit: string;
}

/** A step, new or known. It works without scripts, where another row costs a round. */
export function StepForm({ data, answer, submit }: StepFormProps) {
  const busy = useNavigation().formData?.get("intent") === "keep";
  const [more, setMore] = useState(0);
  if (answer?.conflict) {
    const words = {
      quantities: (rows: string) => quantityLines(rows, data.targets),
      at: (at: string) => at.replace("T", " "),
    };
    const { conflict } = answer;
    return (
      <EditConflict key={conflict.was} intent="keep" conflict={conflict} labels={LABELS} words={words} />
    );
  }
  const shown = answer?.sent ?? data.texts;
  const errors = answer?.errors ?? {};
  const spare = more + (answer?.more ? 1 : 0) + (shown.quantities.length === 0 ? 1 : 0);
  const rows = [...shown.quantities, ...Array.from({ length: spare }, () => ({}))];
  const confirm = errors.confirm?.[0];
  return (
    <Form method="post" className="grid gap-6" noValidate>
      <input type="hidden" name="was" value={answer?.sent.was ?? data.was} />
      <InputField
        label="What was changed"
        hint="In a line: “Trimmed the reed pole”."
        name="title"
        defaultValue={shown.title}
        errors={errors.title ?? undefined}
        maxLength={160}
        autoComplete="off"
      />
      <section aria-labelledby="quantities" className="grid gap-3">
        <h3 id="quantities">Measured</h3>
        <p className="field-hint max-w-[72ch]">
          {data.described ? (
            "Point at a part of the antenna, and the step changes it there; or name anything else. Lengths in metres or feet: 10.04, 32 ft 11 1/4 in."
          ) : (
            <>
              Lengths can point at the antenna once it is described.{" "}
              <Link to={`/projects/${data.projectId}/antenna/edit`}>Describe the antenna</Link>
            </>
          )}
        </p>
        {rows.map((row, i) => (
          // biome-ignore lint/suspicious/noArrayIndexKey: a row is its place in the form
          <QuantityFields key={i} index={i} row={row} targets={data.targets} errors={errors} />
        ))}
        <div>
          <Button
            name="intent"
            value="another"
            variant="quiet"
            size="small"
            icon="add"
            onClick={(event) => {
              event.preventDefault();
              setMore(more + 1);
            }}
          >
            Another quantity
          </Button>
        </div>
      </section>
      <FieldGroup legend="Is it done?">
        <CheckboxField
          type="radio"
          name="state"
          value="done"
          defaultChecked={shown.state !== "planned"}
          label="Done"
          hint="The antenna is as it says from then on."
        />
        <CheckboxField
          type="radio"
          name="state"
          value="planned"
          defaultChecked={shown.state === "planned"}
          label="Planned"
          hint="The antenna stays as it is; where each trail should go is reckoned now and compared later."
        />
      </FieldGroup>
      <InputField
        label="When"
        hint="In UTC. A planned step may have no day yet."
        name="at"
        type="datetime-local"
        defaultValue={shown.at}
        errors={errors.at ?? undefined}
        className="max-w-[20rem]"
      />
      <TextareaField
        label="What else is to be said"
        hint="Markdown. May stay empty."
        name="body"
        rows={4}
        defaultValue={shown.body}
        errors={errors.body ?? undefined}
      />
      {confirm && (
        <CheckboxField name="confirm" label="The lengths in question are right" errors={[confirm]} />
      )}
      <div>
        <Button name="intent" value="keep" busy={busy}>
          {submit}
        </Button>
      </div>
    </Form>
  );
}

const LABELS = {
  title: "What was changed",
  quantities: "Measured",
  at: "When",
  body: "What else is to be said",
};
