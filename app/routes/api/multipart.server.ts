import { MAX_FILE_BYTES } from "~/readers/reading";
import { problem } from "./problem.ts";

/** A file of the largest size, and what a form puts around it. */
export const MAX_BODY_BYTES = MAX_FILE_BYTES + 1024 * 1024;

/** Reads a multipart body, counting: what is too large is refused without being held. */
export async function readMultipart(
  request: Request,
  { field = "file", limitBytes = MAX_BODY_BYTES } = {},
): Promise<FormData> {
  const type = request.headers.get("Content-Type") ?? "";
  if (!/^multipart\/form-data\b/i.test(type)) throw notMultipart(field);
  const bytes = await readUpTo(request, limitBytes);
  try {
    return await new Response(bytes, { headers: { "Content-Type": type } }).formData();
  } catch {
    const detail = "The body is not well-formed multipart/form-data. Nothing was stored.";
    throw problem({ status: 400, code: "bad-multipart", detail });
  }
}

export function notMultipart(field: string): Response {
  const detail = `Send it as multipart/form-data, in the field \`${field}\`. Nothing was stored.`;
  return problem({ status: 415, code: "not-multipart", detail });
}

/** The same as `readJson`, an empty object where nothing was sent. */
export async function readJsonIfAny(request: Request): Promise<unknown> {
  return request.headers.get("Content-Type") === null ? {} : readJson(request);
}

/** Reads a JSON body of at most a megabyte. */
export async function readJson(request: Request): Promise<unknown> {
  const type = request.headers.get("Content-Type") ?? "";
  if (!/^application\/json\b/i.test(type)) {
    const detail = "Send JSON, and say so: Content-Type: application/json. Nothing was stored.";
    throw problem({ status: 415, code: "not-json", detail });
  }
  try {
    return JSON.parse(new TextDecoder("utf-8", { fatal: true }).decode(await readUpTo(request, 1024 * 1024)));
  } catch (error) {
    if (error instanceof Response) throw error;
    throw problem({ status: 400, code: "bad-json", detail: "The body is not JSON. Nothing was stored." });
  }
}

async function readUpTo(request: Request, limitBytes: number): Promise<Uint8Array<ArrayBuffer>> {
  if (Number(request.headers.get("Content-Length")) > limitBytes) throw tooLarge(limitBytes);
  const chunks: Uint8Array[] = [];
  let total = 0;
  for await (const chunk of request.body ?? []) {
    total += chunk.length;
    if (total > limitBytes) throw tooLarge(limitBytes);
    chunks.push(chunk);
  }
  const bytes = new Uint8Array(total);
  let at = 0;
  for (const chunk of chunks) {
    bytes.set(chunk, at);
    at += chunk.length;
  }
  return bytes;
}

function tooLarge(limitBytes: number): Response {
  const limit = limitBytes === MAX_BODY_BYTES ? MAX_FILE_BYTES : limitBytes;
  const detail = `More than ${Math.round(limit / 1024 / 1024)} MB came. Nothing was stored: send less, or split the file.`;
  return problem({ status: 413, code: "too-large", detail });
}
