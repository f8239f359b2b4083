import type { z } from "zod";
import * as projects from "~/db/projects.server";
import { DEFAULT_SETTINGS } from "~/measurement/sweep";
import { differencesInKind } from "~/routes/compare/compare-words";
import { bandsOf, chooseSweeps, rowsOf } from "~/services/compare.server";
import { requireApiProject } from "./access.server.ts";
import { comparisonQuerySchema, type comparisonShape } from "./compare-schemas.ts";
import { shapeComparedSweep, shapeFigures, shapeRow } from "./compare-shapes.server.ts";
import { endpoint } from "./endpoint.server.ts";
import { invalid } from "./invalid.ts";

/** Sweeps of any projects that the token's person may read, side by side; the bands are this project's. */
const handle = endpoint({
  GET: async (call) => {
    const { project } = await requireApiProject(call, "project.read");
    const query = comparisonQuerySchema.safeParse({
      ...Object.fromEntries(call.query),
      sweep: [...new Set(call.query.getAll("sweep"))],
    });
    if (!query.success) throw invalid(query.error);
    const [{ compared, unread, missing }, designBands] = await Promise.all([
      chooseSweeps(query.data.sweep, call.user.id),
      projects.findDesignBands(project.id),
    ]);
    const asked = compared.findIndex(({ sweep }) => sweep.publicId === query.data.reference);
    const reference = Math.max(0, asked);
    const limit = query.data.limit ?? DEFAULT_SETTINGS.swrLimit;
    const answer: z.output<typeof comparisonShape> = {
      reference: compared[reference]?.sweep.publicId ?? null,
      sweeps: compared.map(shapeComparedSweep),
      missing: [...missing, ...unread.map(({ sweep }) => sweep.publicId)],
      remarks: differencesInKind(compared),
      dips: rowsOf(compared, reference).map((row) => shapeRow(row, compared)),
      bands: bandsOf(compared, project.ituRegion, designBands, limit).map(({ figures, ...band }) => ({
        ...band,
        figures: figures.map(shapeFigures),
      })),
    };
    return Response.json(answer);
  },
});

export const loader = handle;
export const action = handle;
