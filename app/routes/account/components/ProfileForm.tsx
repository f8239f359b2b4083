import { getFormProps, getInputProps, type SubmissionResult, useForm } from "@conform-to/react";
import { getZodConstraint, parseWithZod } from "@conform-to/zod/v4";
import { Form, useNavigation } from "react-router";
import { Button } from "~/components/ui/Button";
import { InputField } from "~/components/ui/Field";
import { profileSchema } from "../account.schema.ts";

export interface ProfileFormProps {
  person: { name: string; userName: string; email: string | null };
  lastResult?: SubmissionResult<string[]> | null;
}

export function ProfileForm({ person, lastResult }: ProfileFormProps) {
  const busy = useNavigation().formData?.get("intent") === "profile";
  const [form, fields] = useForm({
    id: "profile",
    lastResult,
    defaultValue: person,
    constraint: getZodConstraint(profileSchema),
    shouldValidate: "onBlur",
    shouldRevalidate: "onInput",
    onValidate: ({ formData }) => parseWithZod(formData, { schema: profileSchema }),
  });
  return (
    <section className="space-y-3">
      <h2>You</h2>
      <Form method="post" {...getFormProps(form)} className="max-w-[30rem] space-y-4">
        <InputField
          label="Name"
          hint="What others see beside your notes and sweeps."
          errors={fields.name.errors}
          {...getInputProps(fields.name, { type: "text" })}
          autoComplete="name"
        />
        <InputField
          label="User name"
          hint="How others find you to add you to a project. Lower-case letters, digits and hyphens."
          errors={fields.userName.errors}
          {...getInputProps(fields.userName, { type: "text" })}
          autoComplete="username"
          autoCapitalize="none"
          spellCheck={false}
        />
        <p className="soft text-small">
          {person.email
            ? `E-mail: ${person.email}, as the provider you sign in with confirmed it. Nobody else sees it.`
            : "No e-mail address is known: mails can't reach you."}
        </p>
        <Button name="intent" value="profile" busy={busy}>
          Keep these names
        </Button>
      </Form>
    </section>
  );
}
