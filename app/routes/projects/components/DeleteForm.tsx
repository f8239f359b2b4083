import { getFormProps, getInputProps, type SubmissionResult, useForm } from "@conform-to/react";
import { getZodConstraint, parseWithZod } from "@conform-to/zod/v4";
import { Form, Link, useNavigation } from "react-router";
import { Button } from "~/components/ui/Button";
import { InputField } from "~/components/ui/Field";
import { deleteSchema } from "../project.schema.ts";

export interface DeleteFormProps {
  title: string;
  lastResult?: SubmissionResult<string[]>;
}

/** Asks once, by having the title typed: a deleted project can't be brought back. */
export function DeleteForm({ title, lastResult }: DeleteFormProps) {
  const busy = useNavigation().formData?.get("intent") === "delete";
  const [form, fields] = useForm({
    id: "delete-project",
    lastResult,
    constraint: getZodConstraint(deleteSchema),
    onValidate: ({ formData }) => parseWithZod(formData, { schema: deleteSchema }),
  });
  return (
    <section className="space-y-3 border-l-3 border-alarm pl-4">
      <h2>Delete the project</h2>
      <p className="max-w-[72ch]">
        Its sweeps, their original files, dips, notes and write-ups go for good, for every member; also the
        write-ups that are published. Plates stay at their addresses. This can't be undone.{" "}
        <Link to="../bundle" relative="path">
          Make a bundle
        </Link>{" "}
        first, and it can be taken in again.
      </p>
      <Form method="post" {...getFormProps(form)} className="max-w-[30rem] space-y-4">
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
        <Button variant="danger" name="intent" value="delete" icon="remove" busy={busy}>
          Delete the project
        </Button>
      </Form>
    </section>
  );
}
