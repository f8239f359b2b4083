import { parseWithZod } from "@conform-to/zod/v4";
import { data, redirect } from "react-router";
import { requirePerson } from "~/auth/require.server";
import { previewSchema } from "~/components/notes/notes.schema";
import { renderNote } from "~/services/markdown.server";
import type { Route } from "./+types/preview";

/** How a note will look, for someone who is writing one. Nothing is stored. */
export async function action(args: Route.ActionArgs) {
  await requirePerson(args);
  const submission = parseWithZod(await args.request.formData(), { schema: previewSchema });
  if (submission.status !== "success") throw data("There was no text to show.", 400);
  return { html: renderNote(submission.value.body) };
}

export function loader() {
  return redirect("/");
}
