import { randomUUID } from "node:crypto";
import type { NextFunction, Request, Response } from "express";
import { env } from "~/env.server";
import { log } from "./log.server";
import { recordRequest } from "./metrics.server";

/** Gives the request its id and, when it has been answered, counts it and writes its line. */
export function accessLog(request: Request, response: Response, next: NextFunction): void {
  const started = process.hrtime.bigint();
  const id = requestIdOf(request);
  response.locals.requestId = id;
  response.setHeader("X-Request-Id", id);
  response.once("close", () => {
    const seconds = Number(process.hrtime.bigint() - started) / 1e9;
    // The query may hold what somebody searched for, so it is not kept.
    const path = request.originalUrl.split("?", 1)[0].replace(SECRET_PATH, "$1…");
    const { method } = request;
    const status = response.writableFinished ? response.statusCode : 499;
    recordRequest(path, method, status, seconds);
    const level = status >= 500 ? "error" : QUIET_PATH.test(path) ? "debug" : "info";
    log[level]({ id, method, path, status, ms: Math.round(seconds * 1e4) / 10, ip: request.ip }, "request");
  });
  next();
}

const QUIET_PATH = /^\/(assets\/|healthz$|readyz$|metrics$)/;
/** What opens a door is not kept either. */
const SECRET_PATH = /^(\/(?:invitations)\/)[^/.]+/;
const REQUEST_ID = /^[\w.-]{8,80}$/;

/** A proxy in front that we trust may have named the request already. */
function requestIdOf(request: Request): string {
  const given = request.get("X-Request-Id");
  return env.TRUST_PROXY > 0 && given && REQUEST_ID.test(given) ? given : randomUUID();
}
