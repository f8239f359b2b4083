import { Readable } from "node:stream";
import { requireProject } from "~/auth/require.server";
import { notFound } from "~/errors";
import { attachment } from "~/services/file-names";
import { mayCarryPlace, strippedCopy } from "~/services/picture-copies.server";
import type { Route } from "./+types/original";
import { readOriginal, streamOriginal } from "./open-original.server";
import { requireSweep } from "./require-sweep.server";

/**
 * The file as it was given, byte for byte; always as a download, whatever it claims to be. Of a picture only those who
 * may change the sweep get that; others get its pixels written anew, for it may say where and with what it was taken.
 */
export async function loader(args: Route.LoaderArgs) {
  const access = await requireProject(args, "project.read");
  const { file } = await requireSweep(access, args.params.sweep);
  const headers = {
    "Content-Type": "application/octet-stream",
    "Content-Disposition": attachment(file.name),
    "X-Content-Type-Options": "nosniff",
    "Cache-Control": "private, no-cache",
  };
  if (!access.may("sweep.edit")) {
    const bytes = await readOriginal(file.storageKey);
    if (mayCarryPlace(file.name, bytes)) {
      const copy = await strippedCopy(bytes);
      if (!copy) throw notFound("copy of this picture without its camera data");
      return new Response(new Uint8Array(copy.bytes), {
        headers: { ...headers, "Content-Length": String(copy.bytes.length) },
      });
    }
  }
  const body = await streamOriginal(file.storageKey);
  return new Response(Readable.toWeb(body) as ReadableStream, {
    headers: { ...headers, "Content-Length": String(file.sizeBytes), ETag: `"${file.sha256}"` },
  });
}
