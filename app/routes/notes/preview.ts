import { data, redirect } from "react-router";
import { requirePerson, requireProject } from "~/auth/require.server";
import { previewSchema } from "~/components/notes/notes.schema";
import { renderNote } from "~/services/markdown.server";
import { expandNote, loadLinks } from "~/services/note-links.server";
import { parseForm } from "~/services/parse-form";
import type { Route } from "./+types/preview";

/** How a note will look, for someone who is writing one; in a project, with whom and what it names there. Nothing is stored. */
export async function action(args: Route.ActionArgs) {
  await requirePerson(args);
  const submission = parseForm(await args.request.formData(), { schema: previewSchema });
  if (submission.status !== "success") throw data("There was no text to show.", 400);
  const { body, project: publicId } = submission.value;
  if (!publicId) return { html: renderNote(body) };
  const access = await requireProject({ ...args, params: { project: publicId } }, "note.write");
  const expanded = await expandNote(access.project.id, body);
  return { html: renderNote(expanded.body, await loadLinks(access.project.id, [expanded.body], access)) };
}

export function loader() {
  return redirect("/");
}
