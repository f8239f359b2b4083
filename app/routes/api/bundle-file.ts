import { bundleFile } from "~/routes/bundle/send-bundle.server";
import { offered } from "~/services/bundle/runs.server";
import { absent } from "./access.server.ts";
import { requireBundle } from "./bundle-access.server.ts";
import { type Call, endpoint } from "./endpoint.server.ts";
import { problem } from "./problem.ts";

/** The ZIP of a bundle, in one go or in pieces. */
const handle = endpoint({ GET: send });

export const loader = handle;
export const action = handle;

async function send(call: Call): Promise<Response> {
  const run = await requireBundle(call);
  if (run.kind === "import") throw absent("file");
  const offer = offered(run);
  if (offer) return bundleFile(call.request, run, offer);
  if (run.state === "done") {
    throw problem({ status: 410, code: "gone", detail: "It is not kept any more. Make another one." });
  }
  const detail =
    run.state === "failed"
      ? "It could not be made; its `faults` say why. The project is as it was."
      : "It is not made yet. Ask for its state until that is `done`.";
  throw problem({ status: 409, code: "not-done", detail });
}
