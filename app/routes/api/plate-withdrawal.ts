import * as plates from "~/db/plates.server";
import { findPlate } from "~/routes/plates/plate-page.server";
import { withdraw } from "~/services/plates/withdraw.server";
import { absent } from "./access.server.ts";
import { endpoint } from "./endpoint.server.ts";
import { invalid } from "./invalid.ts";
import { readJson } from "./multipart.server.ts";
import { requireStanding } from "./plate-access.server.ts";
import { plateWithdrawalSchema } from "./plate-schemas.ts";
import { shapeWithdrawn } from "./plate-shapes.server.ts";
import { problem } from "./problem.ts";

/** Takes a plate back for good. As on its page: refused to whoever may not, and hidden from nobody. */
const handle = endpoint({
  POST: async (call) => {
    const plate = await requireStanding(call);
    const { mayWithdraw } = await findPlate(plate.publicId, call.user);
    if (!mayWithdraw) throw problem({ status: 403, code: "role", detail: NOT_YOURS });
    const parsed = plateWithdrawalSchema.safeParse(await readJson(call.request));
    if (!parsed.success) throw invalid(parsed.error);
    await withdraw(plate, parsed.data.reason, call.user);
    const now = await plates.findByPublicId(plate.publicId);
    if (!now) throw absent("plate");
    return Response.json(await shapeWithdrawn(now));
  },
});

export const loader = handle;
export const action = handle;

const NOT_YOURS = "Only owners and experimenters of the plate’s project withdraw it. Nothing was changed.";
