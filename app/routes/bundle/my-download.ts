import { requirePerson } from "~/auth/require.server";
import * as runs from "~/db/bundle-runs.server";
import type { Route } from "./+types/my-download";
import { sendBundle } from "./send-bundle.server";

export async function loader(args: Route.LoaderArgs) {
  const person = await requirePerson(args);
  const run = await runs.findByPublicId(args.params.run);
  const own = run?.kind === "mine" && run.userId === person.id ? run : undefined;
  return sendBundle(args.request, own, "/settings/my-data");
}
