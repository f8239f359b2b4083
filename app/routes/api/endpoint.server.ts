import type { PlainError } from "~/errors";
import { log } from "~/services/log.server";
import { takeOne } from "~/services/rate-limit.server";
import { findTokenHolder, type TokenHolder } from "~/services/tokens.server";
import { problem } from "./problem.ts";

export interface Call extends TokenHolder {
  request: Request;
  params: Record<string, string | undefined>;
  query: URLSearchParams;
}

type Handler = (call: Call) => Promise<Response>;

/**
 * One endpoint of the API: the loader and the action of its route. Asks method, token, scope and rate in this
 * order, and turns everything that goes wrong into a problem document.
 */
export function endpoint(handlers: { GET?: Handler; POST?: Handler; DELETE?: Handler }) {
  const allow = Object.keys(handlers).join(", ");
  return async ({ request, params }: Pick<Call, "request" | "params">): Promise<Response> => {
    const method = request.method === "HEAD" ? "GET" : request.method;
    const handler = isAnswered(method) ? handlers[method] : undefined;
    if (!handler) return wrongMethod(request.method, allow);
    try {
      const holder = await requireToken(request, method === "GET" ? "read" : "write");
      return await handler({ ...holder, request, params, query: new URL(request.url).searchParams });
    } catch (thrown) {
      return answerThrown(thrown);
    }
  };
}

function isAnswered(method: string): method is "GET" | "POST" | "DELETE" {
  return method === "GET" || method === "POST" || method === "DELETE";
}

export function wrongMethod(method: string, allow: string): Response {
  const detail = `${method} is not answered here; allowed: ${allow}. Nothing was changed.`;
  return problem({ status: 405, code: "wrong-method", detail }, { Allow: allow });
}

async function requireToken(request: Request, scope: "read" | "write"): Promise<TokenHolder> {
  const [, text] = /^Bearer +([\w.~+/=-]+) *$/i.exec(request.headers.get("Authorization") ?? "") ?? [];
  if (!text) {
    throw problem(
      { status: 401, code: "no-token", detail: `Send a token: "Authorization: Bearer …". ${WHERE}` },
      { "WWW-Authenticate": 'Bearer realm="Swale"' },
    );
  }
  const holder = await findTokenHolder(text);
  if (!holder) {
    throw problem(
      { status: 401, code: "invalid-token", detail: `This token is unknown or was revoked. ${WHERE}` },
      { "WWW-Authenticate": 'Bearer realm="Swale", error="invalid_token"' },
    );
  }
  if (scope === "write" && holder.token.scope !== "write") {
    throw problem(
      { status: 403, code: "scope", detail: `This token may only read. Nothing was changed. ${WHERE}` },
      { "WWW-Authenticate": 'Bearer realm="Swale", error="insufficient_scope", scope="write"' },
    );
  }
  const waitS = await takeOne(scope === "read" ? "api-read" : "api-write", holder.token.publicId);
  if (waitS !== null) {
    const detail = `Too many requests with this token. Nothing was changed; go on in ${waitS} s.`;
    throw problem({ status: 429, code: "too-many", detail }, { "Retry-After": String(waitS) });
  }
  return holder;
}

/** What a service throws for pages (`notFound`, `refused`) is said as a problem document here. */
function answerThrown(thrown: unknown): Response {
  if (thrown instanceof Response) return thrown;
  const { data, init } = thrown as { data?: Partial<PlainError>; init?: ResponseInit | null };
  if (data && init?.status && (init.status < 500 || init.status === 503)) {
    const detail = data.message ?? "The request was refused. Nothing was changed.";
    return problem({ status: init.status, detail });
  }
  log.error({ err: thrown }, "an API request failed");
  const detail = "Something failed here. What was stored before is safe; try again.";
  return problem({ status: 500, code: "fault", detail });
}

const WHERE = "Tokens are made at /settings/tokens.";
