import { getFormProps, type SubmissionResult, useForm } from "@conform-to/react";
import { getZodConstraint, parseWithZod } from "@conform-to/zod/v4";
import { Form, useNavigation } from "react-router";
import { Button } from "~/components/ui/Button";
import { aboutSchema } from "../project.schema.ts";
import { AboutFields } from "./AboutFields.tsx";

export interface AboutFormProps {
  about: { title: string; summary: string; visibility: string; ituRegion: string };
  /** What is stored now, as JSON: only what differs from it is changed. */
  was: string;
  lastResult?: SubmissionResult<string[]>;
}

export function AboutForm({ about, was, lastResult }: AboutFormProps) {
  const busy = useNavigation().formData?.get("intent") === "about";
  const [form, fields] = useForm({
    id: "about",
    lastResult,
    defaultValue: about,
    constraint: getZodConstraint(aboutSchema),
    shouldValidate: "onBlur",
    shouldRevalidate: "onInput",
    onValidate: ({ formData }) => parseWithZod(formData, { schema: aboutSchema }),
  });
  return (
    <section className="space-y-3">
      <h2>About</h2>
      <Form method="post" {...getFormProps(form)} className="max-w-[42rem] space-y-5">
        <input type="hidden" name="was" value={was} />
        <AboutFields fields={fields} />
        <Button name="intent" value="about" busy={busy}>
          Keep this
        </Button>
      </Form>
    </section>
  );
}
