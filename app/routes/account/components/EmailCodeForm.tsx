import { getFormProps, getInputProps, type SubmissionResult, useForm } from "@conform-to/react";
import { getZodConstraint, parseWithZod } from "@conform-to/zod/v4";
import { Form, useNavigation } from "react-router";
import { Button } from "~/components/ui/Button";
import { InputField } from "~/components/ui/Field";
import { codeSchema } from "../email.schema.ts";

interface EmailCodeFormProps {
  email: string;
  /** Where mails are read when they are kept on this machine. */
  inbox: string | null;
  lastResult?: SubmissionResult<string[]> | null;
}

export function EmailCodeForm({ email, inbox, lastResult }: EmailCodeFormProps) {
  const busy = useNavigation().formData?.get("intent") === "code";
  const [form, fields] = useForm({
    id: "email-code",
    lastResult,
    constraint: getZodConstraint(codeSchema),
    onValidate: ({ formData }) => parseWithZod(formData, { schema: codeSchema }),
  });
  return (
    <div className="space-y-6">
      <p>
        A mail with a code is on its way to <strong className="break-all">{email}</strong>. It works for ten
        minutes, once, and only in this browser. If none comes, look where spam goes, and check the address.
      </p>
      {inbox && (
        <p className="soft text-small">
          This installation sends no mail out: <a href={inbox}>read it in the local inbox</a>.
        </p>
      )}
      <Form method="post" action="/auth/email" {...getFormProps(form)} className="space-y-4">
        <InputField
          label="Code"
          errors={fields.code.errors}
          {...getInputProps(fields.code, { type: "text" })}
          className="max-w-[14rem]"
          inputMode="numeric"
          autoComplete="one-time-code"
          autoFocus
        />
        <Button name="intent" value="code" busy={busy}>
          Go on
        </Button>
      </Form>
      <Form method="post" action="/auth/email">
        <Button variant="quiet" size="small" name="intent" value="again">
          Use another address, or ask again
        </Button>
      </Form>
    </div>
  );
}
