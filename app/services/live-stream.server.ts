import { countListeners, listen } from "./live-hub.server.ts";
import type { Ear } from "./live-standing.server.ts";

/** A stream of events for one page; null where this process has as many as it can bear. */
export async function openStream(
  ear: Ear,
  after: number | undefined,
  signal: AbortSignal,
): Promise<Response | null> {
  if (countListeners() >= MOST_STREAMS) return null;
  let controller: ReadableStreamDefaultController<Uint8Array> | undefined;
  let end = () => {};
  let closed = false;
  const close = () => {
    if (closed) return;
    closed = true;
    end();
    try {
      controller?.close();
    } catch {
      // The other side is gone already.
    }
  };
  const body = new ReadableStream<Uint8Array>(
    {
      start(given) {
        controller = given;
      },
      cancel: close,
    },
    { highWaterMark: MOST_UNREAD_BYTES, size: (chunk) => chunk?.byteLength ?? 0 },
  );
  const send = (text: string) => {
    if (closed || !controller) return;
    controller.enqueue(encoder.encode(text));
    // Who does not read is let go, and goes on later from the last mark.
    if ((controller.desiredSize ?? 0) < 0) close();
  };
  end = await listen({ ...ear, send, close }, after);
  if (closed || signal.aborted) {
    closed = false;
    close();
  } else signal.addEventListener("abort", close, { once: true });
  return new Response(body, { headers: STREAM_HEADERS });
}

export const STREAM_HEADERS = {
  "Content-Type": "text/event-stream; charset=utf-8",
  "Cache-Control": "no-store, no-transform",
  // For proxies that would otherwise hold back what is small.
  "X-Accel-Buffering": "no",
};

const encoder = new TextEncoder();
const MOST_STREAMS = 4000;
/** Catching up with 2000 events takes about 600 KB. */
const MOST_UNREAD_BYTES = 4 * 1024 * 1024;
