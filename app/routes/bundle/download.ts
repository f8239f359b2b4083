import { requireProject } from "~/auth/require.server";
import * as runs from "~/db/bundle-runs.server";
import type { Route } from "./+types/download";
import { sendBundle } from "./send-bundle.server";

export async function loader(args: Route.LoaderArgs) {
  const { project } = await requireProject(args, "project.export");
  const run = await runs.findByPublicId(args.params.run);
  const own = run?.kind === "export" && run.projectId === project.id ? run : undefined;
  return sendBundle(args.request, own, `/projects/${project.publicId}/bundle`);
}
