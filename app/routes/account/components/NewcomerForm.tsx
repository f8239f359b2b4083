import { getFormProps, getInputProps, type SubmissionResult, useForm } from "@conform-to/react";
import { getZodConstraint, parseWithZod } from "@conform-to/zod/v4";
import { Form, useNavigation } from "react-router";
import { Button } from "~/components/ui/Button";
import { InputField } from "~/components/ui/Field";
import { newcomerSchema } from "../email.schema.ts";

/** The address is confirmed, and nobody here has it. */
export function NewcomerForm({
  email,
  lastResult,
}: {
  email: string;
  lastResult?: SubmissionResult<string[]> | null;
}) {
  const busy = useNavigation().formData?.get("intent") === "name";
  const [form, fields] = useForm({
    id: "newcomer",
    lastResult,
    constraint: getZodConstraint(newcomerSchema),
    shouldRevalidate: "onInput",
    onValidate: ({ formData }) => parseWithZod(formData, { schema: newcomerSchema }),
  });
  return (
    <div className="space-y-6">
      <p>
        <strong className="break-all">{email}</strong> is new here, so an account is made. If you have one
        already, sign in there and add this address under Settings instead.
      </p>
      <Form method="post" action="/auth/email" {...getFormProps(form)} className="space-y-4">
        <InputField
          label="Name"
          hint="What others see beside your notes and sweeps. You can change it."
          errors={fields.name.errors}
          {...getInputProps(fields.name, { type: "text" })}
          autoComplete="name"
          autoFocus
        />
        <Button name="intent" value="name" busy={busy}>
          Make my account
        </Button>
      </Form>
      <Form method="post" action="/auth/email">
        <Button variant="quiet" size="small" name="intent" value="again">
          Use another address
        </Button>
      </Form>
    </div>
  );
}
