import { data } from "react-router";
import { env } from "~/env.server";
import type { PlainError } from "~/errors";

/**
 * Refuses what another site's page sends in a visitor's name. The framework asks this of pages only; routes
 * without a page are reached by forms too. The API is left out: it takes no cookie.
 */
export function refuseForeignOrigin({ request }: { request: Request }): void {
  const url = new URL(request.url);
  if (SAFE_METHODS.has(request.method) || url.pathname.startsWith("/api/")) return;
  if (isForeign(request, [url.origin, env.BASE_URL])) {
    throw data<PlainError>(
      {
        title: "Sent from another site",
        message: "This form was sent from a page of another site, so nothing was changed. Use the form here.",
      },
      { status: 403 },
    );
  }
}

/** Judged by `Origin`, which browsers put on every POST; where there is none, by `Sec-Fetch-Site`. */
export function isForeign(request: Request, ownOrigins: string[]): boolean {
  const origin = request.headers.get("Origin");
  if (origin !== null) return !ownOrigins.includes(origin);
  const site = request.headers.get("Sec-Fetch-Site");
  return site !== null && site !== "same-origin" && site !== "none";
}

const SAFE_METHODS = new Set(["GET", "HEAD", "OPTIONS"]);
