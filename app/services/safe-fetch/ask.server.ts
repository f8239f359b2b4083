import { request as askHttp, type ClientRequest, type IncomingMessage } from "node:http";
import { request as askHttps } from "node:https";
import { isPublicAddress } from "./addresses.ts";
import type { Fetched, Wanted } from "./exchange.ts";
import { addressesOf, pinnedTo, type Resolve, type Resolved } from "./resolve.server.ts";

export type Asked = Fetched | { kind: "redirect"; to: string; sameMethod: boolean };

/** One request to one judged URL, over a connection of its own to exactly the addresses that were judged. */
export async function ask(
  url: URL,
  wanted: Wanted & { resolve: Resolve },
  deadline: AbortSignal,
): Promise<Asked> {
  const late = new Promise<never>((_, reject) => {
    deadline.addEventListener("abort", () => reject(new Late()), { once: true });
    if (deadline.aborted) reject(new Late());
  });
  late.catch(() => undefined);
  try {
    const found = await Promise.race([addressesOf(url, wanted.resolve, wanted.exempt), late]);
    if ("problem" in found) return { kind: "refused", reason: found.problem };
    return await Promise.race([send(url, found.addresses, wanted, deadline), late]);
  } catch (error) {
    if (error instanceof Late || deadline.aborted) return { kind: "failed", reason: "It took too long." };
    return { kind: "failed", reason: "It could not be reached." };
  }
}

function send(url: URL, addresses: Resolved[], wanted: Wanted, signal: AbortSignal): Promise<Asked> {
  const body = wanted.form?.toString();
  return new Promise((resolve, reject) => {
    const request = (url.protocol === "https:" ? askHttps : askHttp)(url, {
      method: body === undefined ? "GET" : "POST",
      agent: false,
      lookup: pinnedTo(addresses),
      signal,
      headers: {
        "User-Agent": USER_AGENT,
        Accept: wanted.accept ?? "text/html, application/xhtml+xml, application/json;q=0.9, text/plain;q=0.8",
        "Accept-Encoding": "identity",
        ...(body !== undefined && {
          "Content-Type": "application/x-www-form-urlencoded",
          "Content-Length": String(Buffer.byteLength(body)),
        }),
      },
    });
    request.on("error", reject);
    guard(request, addresses, url.origin === wanted.exempt);
    request.on("response", (response) => resolve(take(url, response, wanted)));
    request.end(body);
  });
}

/** The connection is where it was meant to go, or it is cut before a byte of the request is written. */
function guard(request: ClientRequest, addresses: Resolved[], exempt: boolean) {
  request.on("socket", (socket) => {
    socket.once("connect", () => {
      const there = socket.remoteAddress ?? "";
      const meant = addresses.some(({ address }) => address === there);
      if (!meant || !(exempt || isPublicAddress(there)))
        socket.destroy(new Error("The connection went astray."));
    });
  });
}

async function take(url: URL, response: IncomingMessage, wanted: Wanted): Promise<Asked> {
  const { statusCode: status = 0, headers } = response;
  if (REDIRECTS.has(status) && headers.location !== undefined) {
    response.destroy();
    const to = URL.canParse(headers.location, url) ? new URL(headers.location, url).href : headers.location;
    return { kind: "redirect", to, sameMethod: status === 307 || status === 308 };
  }
  const mediaType = (headers["content-type"] ?? "").split(";")[0].trim().toLowerCase();
  const links = response.headersDistinct.link ?? [];
  const answer = { kind: "answer" as const, status, url: url.href, mediaType, links };
  const optional = wanted.whole === "welcome" || status < 200 || status > 299;
  const problem = problemOf(response, mediaType);
  if (problem !== undefined) {
    response.destroy();
    return optional ? { ...answer, text: "" } : { kind: "failed", reason: problem };
  }
  const { text, cut } = await read(response, Math.min(wanted.maxBytes ?? MOST_BYTES, MOST_BYTES));
  if (cut && !optional) return { kind: "failed", reason: "It is larger than 1 MB." };
  return { ...answer, text };
}

function problemOf({ headers }: IncomingMessage, mediaType: string): string | undefined {
  const encoding = headers["content-encoding"];
  // Nothing is unpacked, so nothing grows.
  if (encoding !== undefined && encoding.toLowerCase() !== "identity") return "It came packed, unasked.";
  if (!TEXTS.test(mediaType)) return "It is neither HTML, JSON nor plain text.";
  return undefined;
}

async function read(response: IncomingMessage, maxBytes: number): Promise<{ text: string; cut: boolean }> {
  const parts: Buffer[] = [];
  let size = 0;
  for await (const part of response as AsyncIterable<Buffer>) {
    size += part.length;
    parts.push(part);
    if (size > maxBytes) break;
  }
  return { text: Buffer.concat(parts).subarray(0, maxBytes).toString("utf8"), cut: size > maxBytes };
}

class Late extends Error {}

const REDIRECTS = new Set([301, 302, 303, 307, 308]);
const TEXTS = /^(?:text\/(?:html|plain)|application\/(?:xhtml\+xml|(?:[\w.-]+\+)?json))$/;
const MOST_BYTES = 1_000_000;
const USER_AGENT = "Swale (Webmention; https://www.w3.org/TR/webmention/)";
