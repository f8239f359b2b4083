import { requireProject } from "~/auth/require.server";
import type { Route } from "./+types/preview";
import { type PreviewAnswer, previewOfForm } from "./preview-plate.server";

/** The plate as its form stands, while it is filled in. Nothing is kept. */
export async function action(args: Route.ActionArgs): Promise<PreviewAnswer> {
  const { project } = await requireProject(args, "plate.make");
  return previewOfForm(project, await args.request.formData());
}
