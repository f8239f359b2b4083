import { requireProject } from "~/auth/require.server";
import { notFound } from "~/errors";
import { toTouchstone } from "~/services/exports.server";
import type { Route } from "./+types/touchstone";
import { download } from "./download.server";
import { requirePoints } from "./require-sweep.server";

export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "project.read");
  const { found, points } = await requirePoints(access, args.params.sweep);
  if (!points.gammaRe) throw notFound("phase in this sweep, so no Touchstone file");
  return download(
    toTouchstone(points, found.sweep.title),
    `${found.sweep.title}.s1p`,
    "text/plain; charset=utf-8",
  );
}
