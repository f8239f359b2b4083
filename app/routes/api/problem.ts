/** Errors as RFC 9457 problem documents. */

export interface Problem {
  status: number;
  /** What happened, what is safe, what to do. */
  detail: string;
  /** A word that a program can act on. */
  code?: string;
  line?: number;
  column?: number;
  /** What is wrong with single fields of what was sent. */
  errors?: { field: string; message: string }[];
  /** The sweep that is in the way. */
  sweep?: string;
}

/** The answer; RFC 9457 section 4.2.1: a type of "about:blank" has the status's own words as its title. */
export function problem({ status, ...rest }: Problem, headers: Record<string, string> = {}): Response {
  const body = { type: "about:blank", title: TITLES[status] ?? "Error", status, ...rest };
  return new Response(JSON.stringify(body), {
    status,
    headers: { "Content-Type": "application/problem+json", "Cache-Control": "no-store", ...headers },
  });
}

/** RFC 9110 section 15 and RFC 6585 section 4. */
const TITLES: Record<number, string> = {
  400: "Bad Request",
  401: "Unauthorized",
  403: "Forbidden",
  404: "Not Found",
  405: "Method Not Allowed",
  409: "Conflict",
  410: "Gone",
  413: "Content Too Large",
  415: "Unsupported Media Type",
  422: "Unprocessable Content",
  429: "Too Many Requests",
  500: "Internal Server Error",
  503: "Service Unavailable",
};
