import { requireProject } from "~/auth/require.server";
import { download } from "~/routes/sweeps/download.server";
import { batchTable } from "~/services/batch/template";
import type { Route } from "./+types/template";

/** The headings of a batch's table, to be filled in. */
export async function loader(args: Route.LoaderArgs) {
  await requireProject(args, "sweep.add");
  return download(batchTable([]), "sweeps.csv", "text/csv; charset=utf-8");
}
