import { requireProject } from "~/auth/require.server";
import * as photographs from "~/db/photographs.server";
import { notFound, unavailable } from "~/errors";
import { mayEditBench } from "~/services/bench-access.server";
import { attachment } from "~/services/file-names";
import { log } from "~/services/log.server";
import { type PhotographSize, readPhotograph } from "~/services/photographs.server";
import type { Route } from "./+types/photograph";

/** One size of a photograph. The original says where and with what it was taken: it is for those who may change it. */
export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "project.read");
  const found = await photographs.findByPublicId(args.params.photograph);
  const size = SIZES.find((known) => known === args.params.size);
  if (!found || found.photograph.projectId !== access.project.id || !size) throw notFound("photograph");
  const { photograph, bench, step } = found;
  if (size === "original") {
    const may = bench ? mayEditBench(access, bench) : access.may(step ? "step.edit" : "antenna.edit");
    if (!may) throw notFound("original for you");
  }
  const bytes = await readPhotograph(photograph, size).catch((error) => {
    log.error({ err: error }, "a photograph could not be fetched from the store");
    throw unavailable(
      "The photograph can't be fetched just now",
      "The store of photographs does not answer. The photograph is safe there. Try again in a minute.",
    );
  });
  return new Response(new Uint8Array(bytes), {
    headers: {
      "Content-Type": size === "original" ? "application/octet-stream" : "image/jpeg",
      "Content-Length": String(bytes.length),
      "X-Content-Type-Options": "nosniff",
      // The bytes of an address never change; whether one may have them can.
      "Cache-Control": "private, max-age=600",
      ...(size === "original" && { "Content-Disposition": attachment(photograph.name) }),
    },
  });
}

const SIZES: readonly PhotographSize[] = ["small", "shown", "original"];
