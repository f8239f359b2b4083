import { requireProject } from "~/auth/require.server";
import { download } from "~/routes/sweeps/download.server";
import type { BatchReport } from "~/services/batch/report";
import { batchTable } from "~/services/batch/template";
import type { Route } from "./+types/filled";
import { requireBatch } from "./batch-form.server";

/** A batch's table with a line for each of its files: to be filled in and sent back. */
export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "sweep.add");
  const run = await requireBatch(access, args.params.batch);
  const text = batchTable((run.report as BatchReport).rows);
  return download(text, "sweeps.csv", "text/csv; charset=utf-8");
}
