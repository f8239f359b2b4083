import { requireProject } from "~/auth/require.server";
import { decimate } from "~/measurement/decimate";
import { pickPoints } from "~/services/points.server";
import type { Route } from "./+types/points";
import { requireSweepAt } from "./require-sweep.server";
import { parseView } from "./sweeps.schema";

/** What the zoomable chart draws: `{frequencyHz, magnitude, total}`, decimated with dips kept. */
export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "project.read");
  const { sweep: points } = (await requireSweepAt(access, args.params.sweep, args.request)).at;
  const view = parseView(new URL(args.request.url).searchParams);
  const indices = decimate(points, MOST_POINTS, {
    fromHz: view.fromHz ?? points.frequencyHz[0],
    toHz: view.toHz ?? points.frequencyHz[points.frequencyHz.length - 1],
  });
  const picked = pickPoints(points, indices);
  return Response.json(
    {
      frequencyHz: Array.from(picked.frequencyHz),
      magnitude: Array.from(picked.magnitude, (value) =>
        Number.isNaN(value) ? null : Number(value.toPrecision(7)),
      ),
      total: points.frequencyHz.length,
    },
    { headers: { "Cache-Control": "private, max-age=60" } },
  );
}

const MOST_POINTS = 6000;
