import {
  getFormProps,
  getInputProps,
  getSelectProps,
  type SubmissionResult,
  useForm,
} from "@conform-to/react";
import { getZodConstraint, parseWithZod } from "@conform-to/zod/v4";
import { Form, useNavigation } from "react-router";
import { Button } from "~/components/ui/Button";
import { InputField, SelectField } from "~/components/ui/Field";
import { addMemberSchema } from "../members.schema.ts";
import { ROLES } from "../project.schema.ts";

export function AddMemberForm({ lastResult }: { lastResult?: SubmissionResult<string[]> | null }) {
  const busy = useNavigation().formData?.get("intent") === "add";
  const [form, fields] = useForm({
    id: "add-member",
    lastResult,
    defaultValue: { role: "commenter" },
    constraint: getZodConstraint(addMemberSchema),
    shouldRevalidate: "onInput",
    onValidate: ({ formData }) => parseWithZod(formData, { schema: addMemberSchema }),
  });
  return (
    <section className="space-y-3">
      <h2>Add somebody who has an account</h2>
      <Form method="post" {...getFormProps(form)} className="max-w-[30rem] space-y-4">
        <InputField
          label="User name"
          hint="As that person's settings say it."
          errors={fields.userName.errors}
          {...getInputProps(fields.userName, { type: "text" })}
          autoComplete="off"
          autoCapitalize="none"
          spellCheck={false}
        />
        <SelectField
          label="Role"
          errors={fields.role.errors}
          {...getSelectProps(fields.role)}
          options={ROLES.map((role) => ({ value: role.value, label: `${role.label}: ${role.may}` }))}
        />
        <Button name="intent" value="add" icon="add" busy={busy}>
          Add
        </Button>
      </Form>
    </section>
  );
}
