import type { NextFunction, Request, Response } from "express";

const MEGABYTE = 1024 * 1024;
/** Two files of the largest size and what surrounds them. */
const UPLOAD_BYTES = 140 * MEGABYTE;
const FORM_BYTES = MEGABYTE;
/** A whole project, which is read as a stream. */
const BUNDLE_BYTES = 2049 * MEGABYTE;

const OF_BUNDLES = new Set(["/projects/take-in", "/projects/take-in.data", "/api/v1/bundles/take-in"]);

/** Refuses a body that is too large, or of unknown length, before a byte of it is read. */
export function bodyLimits(request: Request, response: Response, next: NextFunction): void {
  const refusal = refusalOf(request);
  if (!refusal) {
    next();
    return;
  }
  const { status, title, detail } = refusal;
  response.status(status).set("Connection", "close");
  if (request.path.startsWith("/api/")) {
    response.type("application/problem+json").send(JSON.stringify({ title, status, detail }));
  } else {
    response.type("text/plain").send(`${title}. ${detail}\n`);
  }
}

function refusalOf(request: Request): { status: number; title: string; detail: string } | undefined {
  const length = request.get("Content-Length");
  if (length === undefined) {
    if (request.get("Transfer-Encoding") === undefined) return undefined;
    return { status: 411, title: "Length required", detail: "Say how long the body is (Content-Length)." };
  }
  const upload =
    /^\/(api\/v1\/)?projects\//.test(request.path) && request.is("multipart/form-data") !== false;
  const bundle = OF_BUNDLES.has(request.path);
  const limitBytes = bundle ? BUNDLE_BYTES : upload ? UPLOAD_BYTES : FORM_BYTES;
  if (Number(length) <= limitBytes) return undefined;
  const limit = `${limitBytes / MEGABYTE} MB`;
  return {
    status: 413,
    title: "Too large",
    detail: `More than ${limit} came in one request. Nothing was kept. Send less at once.`,
  };
}
