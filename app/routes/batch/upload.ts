import { requireProject } from "~/auth/require.server";
import { readUploadForm } from "~/routes/sweeps/take-uploads.server";
import type { Route } from "./+types/upload";
import { receiveForm } from "./batch-form.server";

/** Some files of a batch; the page sends it in pieces, and the last piece has it checked. */
export async function action(args: Route.ActionArgs) {
  const access = await requireProject(args, "sweep.add");
  const form = await readUploadForm(args.request);
  const batch = await receiveForm(access, form, { last: form.get("last") === "yes" });
  return Response.json({ batch }, { status: batch ? 200 : 400 });
}
