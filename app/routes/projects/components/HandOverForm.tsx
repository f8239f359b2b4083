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
import { AFTERWARDS, handOverSchema } from "../members.schema.ts";

interface HandOverFormProps {
  title: string;
  members: { userName: string; name: string }[];
  lastResult?: SubmissionResult<string[]> | null;
}

/** In two steps: unfolded and chosen, then confirmed by the title. */
export function HandOverForm({ title, members, lastResult }: HandOverFormProps) {
  const busy = useNavigation().formData?.get("intent") === "hand-over";
  const [form, fields] = useForm({
    id: "hand-over",
    lastResult,
    constraint: getZodConstraint(handOverSchema),
    onValidate: ({ formData }) => parseWithZod(formData, { schema: handOverSchema }),
  });
  if (members.length === 0) return null;
  return (
    <section className="space-y-3">
      <h2>Hand the project over</h2>
      <details open={lastResult?.status === "error"}>
        <summary className="button button-quiet">Choose a new owner</summary>
        <Form method="post" {...getFormProps(form)} className="mt-4 max-w-[30rem] space-y-4">
          <p>
            The new owner may do everything here, remove you, and delete the project. Only they can give it
            back.
          </p>
          <SelectField
            label="New owner"
            errors={fields.userName.errors}
            {...getSelectProps(fields.userName)}
            options={members.map(({ userName, name }) => ({
              value: userName,
              label: `${name} (${userName})`,
            }))}
          />
          <SelectField
            label="You then"
            errors={fields.afterwards.errors}
            {...getSelectProps(fields.afterwards)}
            options={AFTERWARDS.map(({ value, label }) => ({ value, label }))}
          />
          <InputField
            label={
              <>
                Type the title to go on: <span className="font-normal">{title}</span>
              </>
            }
            errors={fields.title.errors}
            {...getInputProps(fields.title, { type: "text" })}
            autoComplete="off"
          />
          <Button variant="danger" name="intent" value="hand-over" busy={busy}>
            Hand it over
          </Button>
        </Form>
      </details>
    </section>
  );
}
