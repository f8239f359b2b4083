import type { z } from "zod";
import * as dips from "~/db/dips.server";
import * as projects from "~/db/projects.server";
import * as sweeps from "~/db/sweeps.server";
import * as trails from "~/db/trails.server";
import * as verdictEvents from "~/db/verdict-events.server";
import { type Advice, adviseOn } from "~/services/advice.server";
import { judgeDip } from "~/services/causes.server";
import { absent, requireProjectOf } from "./access.server.ts";
import { endpoint } from "./endpoint.server.ts";
import type { causesShape } from "./story-schemas.ts";

/** What may be behind a dip, what to cut, and what was held of it. */
const handle = endpoint({
  GET: async (call) => {
    const found = await dips.findByPublicId(call.params.dip ?? "");
    if (!found) throw absent("dip");
    const { dip } = found;
    const { project } = await requireProjectOf(call, dip.projectId, "project.read", "dip");
    const [from, trail, bands] = await Promise.all([
      sweeps.findByPublicId(found.sweep.publicId),
      trails.findByDip(dip.id),
      projects.findDesignBands(project.id),
    ]);
    if (!from) throw absent("dip");
    const judged = await judgeDip(dip, from.sweep, "metres");
    const [advice, events] = await Promise.all([
      adviseOn(dip, trail?.publicId ?? null, judged, bands, "metres"),
      verdictEvents.findAllOnDip(dip.id, trail?.id ?? null),
    ]);
    const answer: z.output<typeof causesShape> = {
      causes: judged.causes.map(({ name: _, key: __, score: ___, path: ____, ...cause }) => cause),
      tests: judged.tests.map(({ change, predictions, shiftHz }) => ({ change, predictions, shiftHz })),
      notJudged: judged.notJudged,
      ripplePeriodHz: judged.ripplePeriodHz,
      trims: advice ? trimsOf(advice) : [],
      verdicts: events.map(({ event, by }) => ({
        verdict: event.verdict,
        text: event.text,
        by,
        at: event.at.toISOString(),
        ofTrail: event.trailId !== null,
        evidence: event.evidence,
      })),
    };
    return Response.json(answer);
  },
});

export const loader = handle;
export const action = handle;

function trimsOf({ offset, trims }: Advice) {
  return trims.map(({ part, lengthM, trim }) => ({
    part,
    band: offset.band.name,
    targetHz: offset.targetHz,
    method: trim.method,
    lengthM,
    toM: trim.lengthM,
    lowM: trim.lowM,
    highM: trim.highM,
    how: trim.how,
  }));
}
