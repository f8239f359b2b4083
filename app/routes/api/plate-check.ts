import type { z } from "zod";
import { checkAgain } from "~/services/plates/check.server";
import { takeOne } from "~/services/rate-limit.server";
import { endpoint } from "./endpoint.server.ts";
import { requireStanding } from "./plate-access.server.ts";
import type { plateCheckShape } from "./plate-schemas.ts";
import { problem } from "./problem.ts";

/** A plate computed again from its stored originals, and what came out otherwise. Changes nothing. */
const handle = endpoint({
  GET: async (call) => {
    const plate = await requireStanding(call);
    const waitS = await takeOne("plate-check", call.user.publicId);
    if (waitS !== null) {
      const detail = `Plates were checked often in the last minutes. Go on in ${waitS} s.`;
      throw problem({ status: 429, code: "too-many", detail }, { "Retry-After": String(waitS) });
    }
    const outcome = await checkAgain(plate);
    const answer: z.output<typeof plateCheckShape> = {
      same: outcome.same,
      differences: outcome.same ? [] : outcome.differences,
    };
    return Response.json(answer);
  },
});

export const loader = handle;
export const action = handle;
