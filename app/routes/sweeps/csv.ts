import { requireProject } from "~/auth/require.server";
import { toCsv } from "~/services/exports.server";
import type { Route } from "./+types/csv";
import { download } from "./download.server";
import { requirePoints } from "./require-sweep.server";

export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "project.read");
  const { found, points } = await requirePoints(access, args.params.sweep);
  return download(toCsv(points), `${found.sweep.title}.csv`, "text/csv; charset=utf-8");
}
