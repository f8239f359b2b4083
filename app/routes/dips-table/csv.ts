import { requireProject } from "~/auth/require.server";
import type { Route } from "./+types/csv";
import { answerCsv } from "./answer-csv.server.ts";
import { parseTable } from "./dips-table.schema";

/** The table of all dips with the filters and the order of its page, all of its pages. */
export async function loader(args: Route.LoaderArgs) {
  const { project } = await requireProject(args, "project.read");
  return answerCsv(project, parseTable(new URL(args.request.url).searchParams));
}
