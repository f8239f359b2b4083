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
import { INVITATION_DAYS, inviteSchema } from "../members.schema.ts";
import { ROLES } from "../project.schema.ts";

interface InviteFormProps {
  lastResult?: SubmissionResult<string[]> | null;
  /** The link that was just made; shown this once. */
  link: string | null;
}

/** For somebody who has no account yet, or whose user name nobody knows. */
export function InviteForm({ lastResult, link }: InviteFormProps) {
  const busy = useNavigation().formData?.get("intent") === "invite";
  const [form, fields] = useForm({
    id: "invite",
    lastResult,
    defaultValue: { role: "commenter", days: "7" },
    constraint: getZodConstraint(inviteSchema),
    shouldRevalidate: "onInput",
    onValidate: ({ formData }) => parseWithZod(formData, { schema: inviteSchema }),
  });
  return (
    <section className="space-y-3">
      <h2>Invite</h2>
      {link && (
        <div role="status" className="panel space-y-2 border-l-3 border-l-fen">
          <p className="font-semibold">The link, shown this once:</p>
          <input
            readOnly
            className="control number"
            aria-label="The link of the invitation"
            value={link}
            onFocus={(event) => event.target.select()}
          />
          <p className="soft text-small">Anyone who has it can join until it ends or is revoked.</p>
        </div>
      )}
      <Form method="post" {...getFormProps(form)} className="max-w-[30rem] space-y-4">
        <InputField
          label="E-mail address"
          hint="It is taken once, by whoever reads the mail, signed in with any address; you see who. Leave it empty for a link that many can take."
          errors={fields.email.errors}
          {...getInputProps(fields.email, { type: "email" })}
          autoComplete="off"
        />
        <SelectField
          label="Role"
          errors={fields.role.errors}
          {...getSelectProps(fields.role)}
          options={ROLES.filter((role) => role.value !== "owner").map((role) => ({
            value: role.value,
            label: `${role.label}: ${role.may}`,
          }))}
        />
        <SelectField
          label="Works for"
          errors={fields.days.errors}
          {...getSelectProps(fields.days)}
          options={INVITATION_DAYS.map(({ value, label }) => ({ value, label }))}
        />
        <Button name="intent" value="invite" icon="link" busy={busy}>
          Invite
        </Button>
      </Form>
    </section>
  );
}
