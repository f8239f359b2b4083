import { createCookie, redirect } from "react-router";
import { env } from "~/env.server";

/** One message that outlives a redirect: shown once by the root, then forgotten. */

const flashCookie = createCookie("swale_flash", {
  httpOnly: true,
  sameSite: "lax",
  path: "/",
  maxAge: 60,
  secrets: [env.SESSION_SECRET],
  secure: env.BASE_URL.startsWith("https://"),
});

export async function redirectWithMessage(to: string, message: string, init: { headers?: Headers } = {}) {
  const headers = new Headers(init.headers);
  headers.append("Set-Cookie", await flashCookie.serialize({ message }));
  return redirect(to, { headers });
}

/** The waiting message, if any, and the `Set-Cookie` that forgets it. */
export async function takeMessage(
  request: Request,
): Promise<{ message: string | null; forget: string | null }> {
  const value: unknown = await flashCookie.parse(request.headers.get("Cookie"));
  const message = (value as { message?: unknown } | null)?.message;
  if (typeof message !== "string") return { message: null, forget: null };
  return { message, forget: await flashCookie.serialize("", { maxAge: 0 }) };
}
