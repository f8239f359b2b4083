import { PassThrough } from "node:stream";
import { createReadableStreamFromReadable } from "@react-router/node";
import { isbot } from "isbot";
import { renderToPipeableStream } from "react-dom/server";
import { type EntryContext, type RouterContextProvider, ServerRouter } from "react-router";
import { nonceContext } from "~/context";

export const streamTimeout = 5_000;

/** Draws a page. Every script of the page carries the nonce of its content security policy. */
export default function handleRequest(
  request: Request,
  responseStatusCode: number,
  responseHeaders: Headers,
  routerContext: EntryContext,
  loadContext: Readonly<RouterContextProvider>,
) {
  if (request.method.toUpperCase() === "HEAD") {
    return new Response(null, { status: responseStatusCode, headers: responseHeaders });
  }
  const nonce = loadContext.get(nonceContext);
  const userAgent = request.headers.get("user-agent");
  const ready = userAgent && isbot(userAgent) ? "onAllReady" : "onShellReady";
  let status = responseStatusCode;
  let shellDrawn = false;

  return new Promise<Response>((resolve, reject) => {
    let timer: NodeJS.Timeout | undefined;
    const { pipe, abort } = renderToPipeableStream(
      <ServerRouter context={routerContext} url={request.url} nonce={nonce} />,
      {
        nonce,
        [ready]() {
          shellDrawn = true;
          const body = new PassThrough({
            final(callback) {
              clearTimeout(timer);
              callback();
            },
          });
          responseHeaders.set("Content-Type", "text/html; charset=utf-8");
          pipe(body);
          resolve(new Response(createReadableStreamFromReadable(body), { headers: responseHeaders, status }));
        },
        onShellError: reject,
        onError(error: unknown) {
          status = 500;
          // An error inside the shell rejects and is logged by the framework; later ones only here.
          if (shellDrawn) console.error(error);
        },
      },
    );
    timer = setTimeout(() => abort(), streamTimeout + 1_000);
  });
}
