import { requireProject } from "~/auth/require.server";
import { notFound } from "~/errors";
import { toTouchstone } from "~/services/exports.server";
import type { Route } from "./+types/touchstone";
import { correctionWords, planeWords } from "./correction-words";
import { download } from "./download.server";
import { requireSweepAt } from "./require-sweep.server";

export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "project.read");
  const { found, at } = await requireSweepAt(access, args.params.sweep, args.request);
  if (!at.sweep.gammaRe) throw notFound("phase in this sweep, so no Touchstone file");
  return download(
    toTouchstone(at.sweep, [found.sweep.title, correctionWords(at.correction)]),
    `${found.sweep.title}, ${planeWords(at.correction)}.s1p`,
    "text/plain; charset=utf-8",
  );
}
