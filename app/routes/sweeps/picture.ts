import { redirect } from "react-router";
import { requireProject } from "~/auth/require.server";
import { notFound } from "~/errors";
import { strippedCopy } from "~/services/picture-copies.server";
import { layFlat } from "~/services/reading.server";
import { getObject, sha256Of } from "~/services/storage.server";
import type { Route } from "./+types/picture";
import { requireSweep } from "./require-sweep.server";

/** A picture upright and without anything but its pixels; with `?flat` its plot laid flat as it was read. */
export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "project.read");
  const { file, reading } = await requireSweep(access, args.params.sweep);
  const spec = reading?.reading?.spec.screenshot;
  // A sweep of numbers is shown by its own page.
  if (!spec) throw redirect(`/projects/${access.project.publicId}/sweeps/${args.params.sweep}`);
  const flat = new URL(args.request.url).searchParams.has("flat") && spec.corners !== undefined;
  const variant = flat ? sha256Of(new TextEncoder().encode(JSON.stringify(spec.corners))).slice(0, 16) : "u";
  const headers = {
    "X-Content-Type-Options": "nosniff",
    "Cache-Control": "private, max-age=3600",
    ETag: `"${file.sha256.slice(0, 32)}-${variant}"`,
  };
  if (args.request.headers.get("If-None-Match") === headers.ETag)
    return new Response(null, { status: 304, headers });
  const bytes = await getObject(file.storageKey);
  const copy = flat ? await layFlat(bytes, spec) : await strippedCopy(bytes);
  if (!copy) throw notFound("picture that can be shown");
  return new Response(new Uint8Array(copy.bytes), {
    headers: { ...headers, "Content-Type": copy.contentType, "Content-Length": String(copy.bytes.length) },
  });
}
