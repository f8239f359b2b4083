import * as batches from "~/db/batches.server";
import { type ApiProject, absent, requireProjectOf } from "./access.server.ts";
import type { Call } from "./endpoint.server.ts";

export interface ApiBatch extends ApiProject {
  run: batches.BatchRow;
}

/** The batch at `:batch`, for who may add sweeps to its project. */
export async function requireApiBatch(call: Call): Promise<ApiBatch> {
  const run = await batches.findByPublicId(call.params.batch ?? "");
  if (!run || run.projectId === null) throw absent("batch");
  return { run, ...(await requireProjectOf(call, run.projectId, "sweep.add", "batch")) };
}

/** The same run as it is by now. */
export async function againBatch({ publicId }: batches.BatchRow): Promise<batches.BatchRow> {
  const run = await batches.findByPublicId(publicId);
  if (!run) throw absent("batch");
  return run;
}
