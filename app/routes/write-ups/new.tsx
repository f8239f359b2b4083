import { getFormProps, getInputProps, useForm } from "@conform-to/react";
import { parseWithZod } from "@conform-to/zod/v4";
import { data, Form, redirect, useNavigation } from "react-router";
import { requireProject } from "~/auth/require.server";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import { Button } from "~/components/ui/Button";
import { InputField } from "~/components/ui/Field";
import { parseForm } from "~/services/parse-form";
import { makeDraft } from "~/services/write-ups/drafts.server";
import type { Route } from "./+types/new";
import { newSchema } from "./write-ups.schema.ts";

export const meta: Route.MetaFunction = () => [{ title: "New write-up · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const { project } = await requireProject(args, "write-up.edit");
  return { projectId: project.publicId };
}

export async function action(args: Route.ActionArgs) {
  const { project, person } = await requireProject(args, "write-up.edit");
  const submission = parseForm(await args.request.formData(), { schema: newSchema });
  if (submission.status !== "success") return data({ lastResult: submission.reply() }, 400);
  const publicId = await makeDraft(project, person, { title: submission.value.title, body: "" });
  return redirect(`/projects/${project.publicId}/write-ups/${publicId}/edit`);
}

export default function NewWriteUp({ loaderData, actionData }: Route.ComponentProps) {
  const busy = useNavigation().state === "submitting";
  const [form, fields] = useForm({
    lastResult: busy ? null : actionData?.lastResult,
    shouldRevalidate: "onInput",
    onValidate: ({ formData }) => parseWithZod(formData, { schema: newSchema }),
  });
  return (
    <article className="grid gap-6 max-w-[44rem]">
      <header className="grid gap-2">
        <Breadcrumbs items={[{ label: "Write-ups", to: `/projects/${loaderData.projectId}/write-ups` }]} />
        <h2 className="sweep-title">New write-up</h2>
        <p className="soft">
          It is a draft that only this project's owners and experimenters see, until one of them publishes it.
        </p>
      </header>
      <Form method="post" {...getFormProps(form)} className="grid gap-4">
        <InputField
          {...getInputProps(fields.title, { type: "text" })}
          key={fields.title.key}
          label="Title"
          required
          maxLength={160}
          errors={fields.title.errors}
        />
        <div>
          <Button busy={busy}>Begin</Button>
        </div>
      </Form>
    </article>
  );
}
