import { requireProject } from "~/auth/require.server";
import type { Route } from "./+types/upload";
import { takeUploads } from "./take-uploads.server";

/** One file of the drop zone, answered as JSON; the page sends them one by one and shows each one's progress. */
export async function action(args: Route.ActionArgs) {
  const access = await requireProject(args, "sweep.add");
  const results = await takeUploads(access, await args.request.formData());
  const refused = results.some((result) => result.kind === "refused");
  return Response.json({ results }, { status: refused ? 422 : 200 });
}
