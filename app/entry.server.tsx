import { Writable } from "node:stream";
import { renderToPipeableStream } from "react-dom/server";
import { type EntryContext, type RouterContextProvider, ServerRouter } from "react-router";
import { nonceContext } from "~/context";

export const streamTimeout = 5_000;

/**
 * Draws a page whole before it is sent: no loader here defers anything, and one write is cheaper than many.
 * Every script of the page carries the nonce of its content security policy.
 */
export default function handleRequest(
  request: Request,
  responseStatusCode: number,
  responseHeaders: Headers,
  routerContext: EntryContext,
  loadContext: Readonly<RouterContextProvider>,
) {
  // Pages differ from person to person, and the Back button must not show them after signing out.
  if (!responseHeaders.has("Cache-Control")) responseHeaders.set("Cache-Control", "private, no-cache");
  if (request.method.toUpperCase() === "HEAD") {
    return new Response(null, { status: responseStatusCode, headers: responseHeaders });
  }
  const nonce = loadContext.get(nonceContext);
  let status = responseStatusCode;
  let shellDrawn = false;
  return new Promise<Response>((resolve, reject) => {
    const chunks: Buffer[] = [];
    const body = new Writable({
      write(chunk: Buffer, _encoding, callback) {
        chunks.push(chunk);
        callback();
      },
      final(callback) {
        clearTimeout(timer);
        responseHeaders.set("Content-Type", "text/html; charset=utf-8");
        resolve(new Response(Buffer.concat(chunks), { headers: responseHeaders, status }));
        callback();
      },
    });
    const { pipe, abort } = renderToPipeableStream(
      <ServerRouter context={routerContext} url={request.url} nonce={nonce} />,
      {
        nonce,
        onShellReady() {
          shellDrawn = true;
        },
        onAllReady: () => pipe(body),
        onShellError: reject,
        onError(error: unknown) {
          status = 500;
          // An error inside the shell rejects and is logged by the framework; later ones only here.
          if (shellDrawn) console.error(error);
        },
      },
    );
    const timer = setTimeout(() => abort(), streamTimeout + 1_000);
  });
}
