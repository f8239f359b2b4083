import { Readable } from "node:stream";
import { requireProject } from "~/auth/require.server";
import { getObjectStream } from "~/services/storage.server";
import type { Route } from "./+types/original";
import { requireSweep } from "./require-sweep.server";

/** The file as it was given, byte for byte; always as a download, whatever it claims to be. */
export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "project.read");
  const { file } = await requireSweep(access, args.params.sweep);
  const body = await getObjectStream(file.storageKey);
  return new Response(Readable.toWeb(body) as ReadableStream, {
    headers: {
      "Content-Type": "application/octet-stream",
      "Content-Length": String(file.sizeBytes),
      "Content-Disposition": `attachment; filename*=UTF-8''${encodeURIComponent(file.name)}`,
      "X-Content-Type-Options": "nosniff",
      "Cache-Control": "private, max-age=3600",
      ETag: `"${file.sha256}"`,
    },
  });
}
