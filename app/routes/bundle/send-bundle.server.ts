import { Readable } from "node:stream";
import type { ShownRun } from "~/db/bundle-runs.server";
import { unavailable } from "~/errors";
import { offered } from "~/services/bundle/runs.server";
import { readPieces } from "~/services/bundle/store.server";
import { attachment } from "~/services/file-names";
import { redirectWithMessage } from "~/services/flash.server";
import { log } from "~/services/log.server";

/** A bundle as a download; one that is not kept any more leads back. */
export async function sendBundle(
  request: Request,
  run: ShownRun | undefined,
  back: string,
): Promise<Response> {
  const offer = run && offered(run);
  if (!offer) return redirectWithMessage(back, "That bundle is not kept any more. Make another one.");
  return bundleFile(request, run, offer);
}

/** The file of a run that offers one, in one go or from where it was broken off (RFC 9110, range requests). */
export async function bundleFile(
  request: Request,
  run: Pick<ShownRun, "publicId">,
  { sizeBytes, storageKey, name }: NonNullable<ReturnType<typeof offered>>,
): Promise<Response> {
  const etag = `"${run.publicId}-${sizeBytes}"`;
  const headers = {
    "Content-Type": "application/zip",
    "Content-Disposition": attachment(name),
    "Accept-Ranges": "bytes",
    ETag: etag,
    "X-Content-Type-Options": "nosniff",
    "Cache-Control": "private, no-cache, no-transform",
  };
  if (request.headers.get("If-None-Match") === etag) return new Response(null, { status: 304, headers });
  const range = rangeOf(request, etag, sizeBytes);
  if (range === "none") {
    return new Response(null, {
      status: 416,
      headers: { ...headers, "Content-Range": `bytes */${sizeBytes}` },
    });
  }
  const [from, to] = range ?? [0, sizeBytes - 1];
  if (request.method === "HEAD")
    return new Response(null, { headers: { ...headers, "Content-Length": String(sizeBytes) } });
  const body = await begun(readPieces(storageKey, from, to)).catch((error) => {
    log.error({ err: error }, "a bundle could not be fetched from the store");
    throw unavailable(
      "The bundle can't be fetched just now",
      "The store does not answer. The bundle is safe there. Try again in a minute.",
    );
  });
  return new Response(Readable.toWeb(Readable.from(body)) as ReadableStream, {
    status: range ? 206 : 200,
    headers: {
      ...headers,
      "Content-Length": String(to - from + 1),
      ...(range && { "Content-Range": `bytes ${from}-${to}/${sizeBytes}` }),
    },
  });
}

/** The same pieces, once the first is there: whether the store answers is known before the head of the answer is sent. */
async function begun(pieces: AsyncGenerator<Uint8Array>): Promise<AsyncGenerator<Uint8Array>> {
  const first = await pieces.next();
  return (async function* () {
    if (!first.done) yield first.value;
    yield* pieces;
  })();
}

/** The one stretch that is asked for; null for all of it, "none" for one that is not there. */
export function rangeOf(request: Request, etag: string, size: number): [number, number] | null | "none" {
  const asked = /^bytes=(\d*)-(\d*)$/.exec(request.headers.get("Range") ?? "");
  if (!asked || (asked[1] === "" && asked[2] === "")) return null;
  const condition = request.headers.get("If-Range");
  if (condition !== null && condition !== etag) return null;
  const from = asked[1] === "" ? Math.max(0, size - Number(asked[2])) : Number(asked[1]);
  const to = asked[1] === "" || asked[2] === "" ? size - 1 : Math.min(size - 1, Number(asked[2]));
  return from > to || from >= size ? "none" : [from, to];
}
