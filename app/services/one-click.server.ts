import type { NextFunction, Request, Response } from "express";

/**
 * A mail's way out is taken by whatever program shows the mail, from any origin or none (RFC 8058, 3.2): the secret in its
 * address is all it needs, and who is signed in does not count there. Everywhere else the router refuses foreign origins, so it must not
 * see one here.
 */
export function oneClick(request: Request, _response: Response, next: NextFunction): void {
  if (request.method === "POST" && WAY_OUT.test(request.path)) {
    for (const name of ["origin", "referer", "sec-fetch-site"]) delete request.headers[name];
  }
  next();
}

const WAY_OUT = /^\/unsubscribe\/[\w-]+$/;
