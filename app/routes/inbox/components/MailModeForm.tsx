import { Form } from "react-router";
import { Button } from "~/components/ui/Button";
import { SelectField } from "~/components/ui/Field";
import type { MailMode } from "~/db/mail-choices.server";
import { MAIL_MODES } from "../inbox.schema.ts";

export interface MailModeFormProps {
  /** "all" or a project's public id. */
  scope: string;
  /** Null: as for all projects. */
  mode: MailMode | null;
  label: string;
  /** What the form is, where its page has several. */
  intent?: string;
}

export function MailModeForm({ scope, mode, label, intent }: MailModeFormProps) {
  const usual = scope === "all" ? [] : [{ value: "usual", label: "As for all projects" }];
  return (
    <Form method="post" className="flex flex-wrap items-end gap-3">
      <input type="hidden" name="scope" value={scope} />
      <SelectField
        key={mode}
        id={`mode-${scope}`}
        label={label}
        name="mode"
        defaultValue={mode ?? "usual"}
        options={[...usual, ...MAIL_MODES]}
      />
      <Button variant="quiet" {...(intent ? { name: "intent", value: intent } : {})}>
        Keep
      </Button>
    </Form>
  );
}
