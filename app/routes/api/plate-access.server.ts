import * as plates from "~/db/plates.server";
import { formatDate } from "~/services/dates";
import { absent } from "./access.server.ts";
import type { Call } from "./endpoint.server.ts";
import { problem } from "./problem.ts";

/** The plate at `:plate`; 404 where there is none, 410 with the reason where it was withdrawn. */
export async function requireStanding(call: Call): Promise<plates.PlateRow> {
  const found = await plates.findByPublicId(call.params.plate ?? "");
  if (!found) throw absent("plate");
  if (!found.withdrawnAt) return found;
  const detail = `This plate was withdrawn on ${formatDate(found.withdrawnAt)}: ${found.withdrawnReason}`;
  throw problem({ status: 410, code: "withdrawn", detail });
}
