import { data, redirect } from "react-router";
import { requireProject } from "~/auth/require.server";
import { parseForm } from "~/services/parse-form";
import { drawDraft } from "~/services/write-ups/preview.server";
import type { Route } from "./+types/preview";
import { lookSchema } from "./write-ups.schema.ts";

/** How a draft will look, while it is written. Nothing is stored. */
export async function action(args: Route.ActionArgs) {
  const access = await requireProject(args, "write-up.edit");
  const submission = parseForm(await args.request.formData(), { schema: lookSchema });
  if (submission.status !== "success") throw data("There was no text to show.", 400);
  const { body } = submission.value;
  return Response.json({ text: body, ...(await drawDraft(access, body)) });
}

export async function loader(args: Route.LoaderArgs) {
  const { project } = await requireProject(args, "write-up.edit");
  return redirect(`/projects/${project.publicId}/write-ups`);
}
