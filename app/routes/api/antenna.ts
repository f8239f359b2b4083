import * as antennas from "~/db/antennas.server";
import { requireApiProject } from "./access.server.ts";
import { endpoint } from "./endpoint.server.ts";
import { invalid } from "./invalid.ts";
import { antennaQuerySchema } from "./story-schemas.ts";

/** The antenna as it was on a day, and every change of it. */
const handle = endpoint({
  GET: async (call) => {
    const { project } = await requireApiProject(call, "project.read");
    const parsed = antennaQuerySchema.safeParse(Object.fromEntries(call.query));
    if (!parsed.success) throw invalid(parsed.error);
    const on = endOf(parsed.data.on);
    const versions = await antennas.findAllByProject(project.id);
    const then = versions.findLast(({ version }) => version.validFrom <= on);
    return Response.json({
      on: on.toISOString(),
      antenna: then?.version.content ?? null,
      describedFrom: versions[0]?.version.validFrom.toISOString() ?? null,
      versions: versions.map(({ version: { number, validFrom, remark }, step }) => ({
        number,
        validFrom: validFrom.toISOString(),
        remark,
        step: step?.publicId ?? null,
      })),
    });
  },
});

export const loader = handle;
export const action = handle;

/** Of a day its last moment. */
function endOf(on: string | undefined): Date {
  if (on === undefined) return new Date();
  return new Date(on.includes("T") ? on : `${on}T23:59:59.999Z`);
}
