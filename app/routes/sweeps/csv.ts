import { requireProject } from "~/auth/require.server";
import { toCsv } from "~/services/exports.server";
import { limitsOf } from "~/services/shown-sweep.server";
import type { Route } from "./+types/csv";
import { planeWords } from "./correction-words";
import { download } from "./download.server";
import { requireSweepAt } from "./require-sweep.server";

export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "project.read");
  const { found, at } = await requireSweepAt(access, args.params.sweep, args.request);
  const name = `${found.sweep.title}, ${planeWords(at.correction)}.csv`;
  return download(toCsv(at.sweep, limitsOf(at.sweep)), name, "text/csv; charset=utf-8");
}
