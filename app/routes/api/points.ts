import { decimate } from "~/measurement/decimate";
import { pickPoints } from "~/services/points.server";
import { sweepAt } from "~/services/shown-sweep.server";
import { absent, requireApiSweep } from "./access.server.ts";
import { endpoint } from "./endpoint.server.ts";
import { invalid } from "./invalid.ts";
import { pointsQuerySchema } from "./schemas.ts";
import { shapeCorrection } from "./shapes.server.ts";

/** The points of a sweep, or of a stretch of it; more than `max` are thinned with the dips kept. */
const handle = endpoint({
  GET: async (call) => {
    const found = await requireApiSweep(call);
    const query = pointsQuerySchema.safeParse(Object.fromEntries(call.query));
    if (!query.success) throw invalid(query.error);
    const at = await sweepAt(found, query.data.plane ?? null);
    if (!at) throw absent("reading of this sweep");
    const points = at.sweep;
    const { frequencyHz } = points;
    const { fromHz = frequencyHz[0], toHz = frequencyHz[frequencyHz.length - 1], max } = query.data;
    if (fromHz > toHz) throw invalid([{ field: "toHz", message: "It lies below fromHz." }]);
    const picked = pickPoints(points, decimate(points, max, { fromHz, toHz }));
    const complex = picked.gammaRe &&
      picked.gammaIm && { gammaRe: column(picked.gammaRe), gammaIm: column(picked.gammaIm) };
    return Response.json({
      total: frequencyHz.length,
      correction: shapeCorrection(at.correction),
      points: {
        frequencyHz: Array.from(picked.frequencyHz),
        magnitude: column(picked.magnitude),
        returnLossDb: column(picked.magnitude.map((magnitude) => -20 * Math.log10(magnitude))),
        ...complex,
      },
    });
  },
});

export const loader = handle;
export const action = handle;

/** JSON has neither NaN nor Infinity: a gap is null. */
function column(values: Float64Array): (number | null)[] {
  return Array.from(values, (value) => (Number.isFinite(value) ? value : null));
}
