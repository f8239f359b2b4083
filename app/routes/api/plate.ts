import * as plates from "~/db/plates.server";
import { parseRecord } from "~/services/plates/record";
import { absent } from "./access.server.ts";
import { endpoint } from "./endpoint.server.ts";
import { problem } from "./problem.ts";

/** A plate as it was frozen, for whoever has a token: plates are read by anyone. */
const handle = endpoint({
  GET: async (call) => {
    const found = await plates.findByPublicId(call.params.plate ?? "");
    if (!found) throw absent("plate");
    if (!found.withdrawnAt) return Response.json(parseRecord(found.record));
    const day = found.withdrawnAt.toISOString().slice(0, 10);
    const detail = `This plate was withdrawn on ${day}: ${found.withdrawnReason}`;
    throw problem({ status: 410, code: "withdrawn", detail });
  },
});

export const loader = handle;
export const action = handle;
