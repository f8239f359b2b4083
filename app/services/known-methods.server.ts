import type { NextFunction, Request, Response } from "express";

/**
 * Answers what nothing here can take before the router meets it: methods that are not known, and on pages bodies that
 * no form of a page sends.
 */
export function knownMethods(request: Request, response: Response, next: NextFunction): void {
  const api = request.path.startsWith("/api/");
  const allowed = api ? KNOWN : OF_PAGES;
  if (!allowed.has(request.method)) {
    response.set("Allow", [...allowed].join(", "));
    refuse(response, api, { status: 405, title: "Method Not Allowed", code: "wrong-method" }, request.method);
    return;
  }
  const type = request.get("Content-Type");
  if (!api && request.method === "POST" && type !== undefined && !FORMS.test(type)) {
    refuse(response, api, { status: 415, title: "Unsupported Media Type", code: "wrong-type" }, type);
    return;
  }
  next();
}

interface Refusal {
  status: number;
  title: string;
  code: string;
}

function refuse(response: Response, api: boolean, refusal: Refusal, what: string): void {
  const detail = `${what} is not answered here. Nothing was changed.`;
  response.status(refusal.status);
  if (api) {
    response.setHeader("Content-Type", "application/problem+json");
    response.end(JSON.stringify({ type: "about:blank", ...refusal, detail }));
  } else {
    response.type("text/plain").send(`${detail}\n`);
  }
}

const KNOWN = new Set(["GET", "HEAD", "POST", "PUT", "PATCH", "DELETE", "OPTIONS"]);
const OF_PAGES = new Set(["GET", "HEAD", "POST"]);
const FORMS = /^(application\/x-www-form-urlencoded|multipart\/form-data)\b/i;
