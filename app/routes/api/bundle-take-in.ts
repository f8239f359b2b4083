import * as runs from "~/db/bundle-runs.server";
import { CutShort, fileOfForm } from "~/services/bundle/multipart";
import { type Given, giveBundle } from "~/services/bundle/runs.server";
import { log } from "~/services/log.server";
import { shapeBundle, shapeBundleFor } from "./bundle-shapes.server.ts";
import { type Call, endpoint } from "./endpoint.server.ts";
import { invalid } from "./invalid.ts";
import { notMultipart } from "./multipart.server.ts";
import { problem } from "./problem.ts";

/** Bundles on their way in: each becomes a project of whoever holds the token. */
const handle = endpoint({ GET: list, POST: takeIn });

export const loader = handle;
export const action = handle;

async function list({ user }: Call): Promise<Response> {
  const found = await runs.findByUser(user.id, "import");
  return Response.json({ items: await Promise.all(found.map((run) => shapeBundleFor(run, user.id))) });
}

/** What it holds is looked at behind the answer. */
async function takeIn({ request, user }: Call): Promise<Response> {
  const type = request.headers.get("Content-Type") ?? "";
  if (!/^multipart\/form-data\b/i.test(type)) throw notMultipart("bundle");
  const file = request.body && (await fileOfForm(request.body, type));
  if (!file) throw invalid([{ field: "bundle", message: "Send the ZIP in the field `bundle`." }]);
  const given = await giveBundle(user.id, file.bytes).catch((error) => {
    log.warn({ err: error }, "a bundle did not arrive whole");
    if (!(error instanceof CutShort)) throw problem({ status: 503, code: "no-store", detail: NO_STORE });
    const detail = "The file did not arrive whole. Nothing was stored; send it again.";
    throw problem({ status: 400, code: "cut-short", detail });
  });
  const shaped = shapeBundle(requireGiven(given), null);
  return Response.json(shaped, { status: 202, headers: { Location: shaped.links.self } });
}

function requireGiven(given: Given): runs.ShownRun {
  switch (given.kind) {
    case "given":
      return given.run;
    case "too-large":
      throw problem({ status: 413, code: "too-large", detail: "It has more than 2 GB. Nothing was stored." });
    case "too-many": {
      const detail =
        "Three bundles of yours are being looked at. Nothing was stored; wait until one is done.";
      throw problem({ status: 409, code: "too-many-open", detail });
    }
    default:
      return given satisfies never;
  }
}

const NO_STORE = "It could not be stored just now. Nothing of it was kept; send it again in a minute.";
