import { getFormProps, getInputProps, type SubmissionResult, useForm } from "@conform-to/react";
import { getZodConstraint, parseWithZod } from "@conform-to/zod/v4";
import { Form, useNavigation } from "react-router";
import { Button } from "~/components/ui/Button";
import { CheckboxField, FieldGroup, InputField } from "~/components/ui/Field";
import { makeTokenSchema } from "../account.schema.ts";

export function MakeTokenForm({ lastResult }: { lastResult?: SubmissionResult<string[]> | null }) {
  const busy = useNavigation().formData?.get("intent") === "make";
  const [form, fields] = useForm({
    id: "make-token",
    lastResult,
    constraint: getZodConstraint(makeTokenSchema),
    shouldRevalidate: "onInput",
    onValidate: ({ formData }) => parseWithZod(formData, { schema: makeTokenSchema }),
  });
  return (
    <section className="space-y-3">
      <h2>Make a token</h2>
      <Form method="post" {...getFormProps(form)} className="max-w-[30rem] space-y-4">
        <InputField
          label="What it is for"
          hint="So that you know later which one to revoke."
          errors={fields.label.errors}
          {...getInputProps(fields.label, { type: "text" })}
          autoComplete="off"
        />
        <FieldGroup legend="What it may do">
          <CheckboxField
            type="radio"
            name="scope"
            value="read"
            defaultChecked
            id="scope-read"
            label="Read: everything you can read"
          />
          <CheckboxField
            type="radio"
            name="scope"
            value="write"
            id="scope-write"
            label="Write: also take sweeps in and write notes"
            errors={fields.scope.errors}
          />
        </FieldGroup>
        <Button name="intent" value="make" busy={busy}>
          Make the token
        </Button>
      </Form>
    </section>
  );
}
