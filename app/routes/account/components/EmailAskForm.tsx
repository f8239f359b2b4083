import { getFormProps, getInputProps, type SubmissionResult, useForm } from "@conform-to/react";
import { getZodConstraint, parseWithZod } from "@conform-to/zod/v4";
import { Form, useNavigation } from "react-router";
import { Button } from "~/components/ui/Button";
import { InputField } from "~/components/ui/Field";
import { askSchema } from "../email.schema.ts";

interface EmailAskFormProps {
  /** Where to go when signed in. */
  next: string;
  adding?: boolean;
  lastResult?: SubmissionResult<string[]> | null;
}

/** The address; the same is answered whether anybody here has it. */
export function EmailAskForm({ next, adding = false, lastResult }: EmailAskFormProps) {
  const busy = useNavigation().formData?.get("intent") === "ask";
  const [form, fields] = useForm({
    id: "email-ask",
    lastResult,
    constraint: getZodConstraint(askSchema),
    shouldRevalidate: "onInput",
    onValidate: ({ formData }) => parseWithZod(formData, { schema: askSchema }),
  });
  return (
    <Form method="post" action="/auth/email" {...getFormProps(form)} className="space-y-4">
      <input type="hidden" name="next" value={next} />
      {adding && <input type="hidden" name="add" value="yes" />}
      <InputField
        label="E-mail address"
        hint="A code of eight digits is mailed there. No password."
        errors={fields.email.errors}
        {...getInputProps(fields.email, { type: "email" })}
        autoComplete="email"
        autoCapitalize="none"
        spellCheck={false}
      />
      <Button variant={adding ? "primary" : "quiet"} name="intent" value="ask" busy={busy}>
        Mail me a code
      </Button>
    </Form>
  );
}
