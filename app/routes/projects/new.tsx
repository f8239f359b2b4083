import { getFormProps, useForm } from "@conform-to/react";
import { getZodConstraint, parseWithZod } from "@conform-to/zod/v4";
import { data, Form, useNavigation } from "react-router";
import { requirePerson } from "~/auth/require.server";
import { Breadcrumbs } from "~/components/ui/Breadcrumbs";
import { Button } from "~/components/ui/Button";
import { redirectWithMessage } from "~/services/flash.server";
import { parseForm } from "~/services/parse-form";
import { createProject } from "~/services/projects.server";
import type { Route } from "./+types/new";
import { AboutFields } from "./components/AboutFields.tsx";
import { newProjectSchema } from "./project.schema.ts";

export const meta: Route.MetaFunction = () => [{ title: "New project · Swale" }];

export async function loader(args: Route.LoaderArgs) {
  const { ituRegion } = await requirePerson(args, "project.create");
  return { ituRegion: ituRegion === null ? "" : String(ituRegion) };
}

export async function action(args: Route.ActionArgs) {
  const person = await requirePerson(args, "project.create");
  const submission = parseForm(await args.request.formData(), { schema: newProjectSchema });
  if (submission.status !== "success") return data({ lastResult: submission.reply() }, { status: 400 });
  const { publicId } = await createProject(submission.value, person.id);
  return redirectWithMessage(`/projects/${publicId}`, "The project was made. Its first sweep is next.");
}

export default function NewProject({ loaderData, actionData }: Route.ComponentProps) {
  const busy = useNavigation().state === "submitting";
  const [form, fields] = useForm({
    id: "new-project",
    lastResult: actionData?.lastResult,
    defaultValue: { visibility: "private", ituRegion: loaderData.ituRegion },
    constraint: getZodConstraint(newProjectSchema),
    shouldValidate: "onBlur",
    shouldRevalidate: "onInput",
    onValidate: ({ formData }) => parseWithZod(formData, { schema: newProjectSchema }),
  });
  return (
    <div className="max-w-[42rem] space-y-6">
      <div className="space-y-2">
        <Breadcrumbs items={[{ label: "Projects", to: "/projects" }]} />
        <h1>New project</h1>
        <p className="soft">One experiment: an antenna, what is done to it, and the people who look at it.</p>
      </div>
      <Form method="post" {...getFormProps(form)} className="space-y-5">
        <AboutFields fields={fields} />
        <Button busy={busy}>Make the project</Button>
      </Form>
    </div>
  );
}
