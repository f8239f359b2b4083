import type { NextFunction, Request, Response } from "express";

/** Answers methods that nothing here knows before the router meets them: it can't even build a request of some. */
export function knownMethods(request: Request, response: Response, next: NextFunction): void {
  if (KNOWN.has(request.method)) {
    next();
    return;
  }
  const detail = `${request.method} is not answered here. Nothing was changed.`;
  response.status(405).set("Allow", [...KNOWN].join(", "));
  if (request.path.startsWith("/api/")) {
    const body = {
      type: "about:blank",
      title: "Method Not Allowed",
      status: 405,
      code: "wrong-method",
      detail,
    };
    response.setHeader("Content-Type", "application/problem+json");
    response.end(JSON.stringify(body));
  } else {
    response.type("text/plain").send(`${detail}\n`);
  }
}

const KNOWN = new Set(["GET", "HEAD", "POST", "PUT", "PATCH", "DELETE", "OPTIONS"]);
