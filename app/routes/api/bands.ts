import type { z } from "zod";
import * as dips from "~/db/dips.server";
import * as projects from "~/db/projects.server";
import { bandsOfSweep, targetsOf } from "~/services/bands.server";
import { storedDips } from "~/services/shown-dips.server";
import { sweepAt } from "~/services/shown-sweep.server";
import { absent, requireApiSweep } from "./access.server.ts";
import { bandsQuerySchema, type bandsShape } from "./compare-schemas.ts";
import { shapeBand, shapeTarget } from "./compare-shapes.server.ts";
import { endpoint } from "./endpoint.server.ts";
import { invalid } from "./invalid.ts";

/** What a sweep shows of every band that it touches, and how far its dips lie from the design bands. */
const handle = endpoint({
  GET: async (call) => {
    const found = await requireApiSweep(call);
    const query = bandsQuerySchema.safeParse(Object.fromEntries(call.query));
    if (!query.success) throw invalid(query.error);
    const { sweep, analysis, project } = found;
    const [at, known, designBands] = await Promise.all([
      sweepAt(found),
      dips.findAllBySweep(sweep.id),
      projects.findDesignBands(project.id),
    ]);
    if (!at || !analysis) throw absent("reading of this sweep");
    const shown = storedDips(known, designBands);
    const limit = query.data.limit ?? analysis.settings.swrLimit;
    const answer: z.output<typeof bandsShape> = {
      region: project.ituRegion,
      bands: bandsOfSweep(at.sweep, shown, project.ituRegion, designBands, limit).map(shapeBand),
      targets: (await targetsOf(sweep, shown, designBands, "metres")).map(shapeTarget),
    };
    return Response.json(answer);
  },
});

export const loader = handle;
export const action = handle;
