import * as runs from "~/db/bundle-runs.server";
import { absent, requireProjectOf } from "./access.server.ts";
import type { Call } from "./endpoint.server.ts";

/** The run at `:bundle`: of a project for who may export it, else for whoever asked for it alone. */
export async function requireBundle(call: Call): Promise<runs.ShownRun> {
  const run = await runs.findByPublicId(call.params.bundle ?? "");
  if (!run || run.kind === "batch") throw absent("bundle");
  switch (run.kind) {
    case "export":
      if (run.projectId === null) throw absent("bundle");
      await requireProjectOf(call, run.projectId, "project.export", "bundle");
      return run;
    case "import":
    case "mine":
      if (run.userId !== call.user.id) throw absent("bundle");
      return run;
    default:
      return run.kind satisfies never;
  }
}
