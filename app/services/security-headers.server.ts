import { randomBytes } from "node:crypto";
import type { NextFunction, Request, Response } from "express";
import helmet from "helmet";
import { env } from "~/env.server";

/** Gives each response a nonce of its own, the content security policy with it, and the other guards. */
export function securityHeaders(development: boolean) {
  const secure = env.BASE_URL.startsWith("https://");
  const guards = helmet({
    contentSecurityPolicy: false,
    frameguard: false,
    strictTransportSecurity: secure,
    // "no-referrer" would make browsers send `Origin: null` with forms, which the router refuses.
    referrerPolicy: { policy: "strict-origin-when-cross-origin" },
    crossOriginResourcePolicy: false,
  });
  return (request: Request, response: Response, next: NextFunction): void => {
    const nonce = randomBytes(16).toString("base64");
    response.locals.nonce = nonce;
    const embed = EMBED_PATH.test(request.path);
    response.setHeader("Content-Security-Policy", policyOf(nonce, embed, development, secure));
    if (!embed) response.setHeader("X-Frame-Options", "DENY");
    // Plates are made to be shown on other sites; nothing else is.
    const shared = request.path.startsWith("/plates/");
    response.setHeader("Cross-Origin-Resource-Policy", shared ? "cross-origin" : "same-origin");
    guards(request, response, next);
  };
}

const EMBED_PATH = /^\/plates\/[^/]+\/embed$/;

function policyOf(nonce: string, embed: boolean, development: boolean, secure: boolean): string {
  // A form that signs in ends at the provider, and browsers hold the redirect against form-action.
  const providerOrigin = new URL(env.GITHUB_BASE_URL).origin;
  const directives = [
    "default-src 'self'",
    `script-src 'self' 'nonce-${nonce}'`,
    // Plotly writes its own style element.
    "style-src 'self' 'unsafe-inline'",
    "img-src 'self' data: blob:",
    "font-src 'self'",
    `connect-src 'self'${development ? " ws:" : ""}`,
    "worker-src 'self' blob:",
    "object-src 'none'",
    "base-uri 'none'",
    `form-action 'self' ${providerOrigin}`,
    `frame-ancestors ${embed ? "*" : "'none'"}`,
  ];
  if (secure) directives.push("upgrade-insecure-requests");
  return directives.join("; ");
}
