import { createCookie } from "react-router";
import { z } from "zod";
import { env } from "~/env.server";
import { safePath } from "./next.ts";

/** What the browser that asked for a code keeps: without it the code opens nothing. */

export interface EmailAsk {
  token: string;
  next: string;
}

const askCookie = createCookie("swale_email_ask", {
  httpOnly: true,
  sameSite: "lax",
  // Not the page's own path: its data is asked for at /auth/email.data, which is no path below it.
  path: "/auth",
  maxAge: 60 * 60,
  secrets: [env.SESSION_SECRET],
  secure: env.BASE_URL.startsWith("https://"),
});

const shape = z.object({ token: z.string().min(1), next: z.string() });

export async function readAsk(request: Request): Promise<EmailAsk | undefined> {
  const { data } = shape.safeParse(await askCookie.parse(request.headers.get("Cookie")));
  return data && { token: data.token, next: safePath(data.next) };
}

/** The `Set-Cookie` that keeps it. */
export function keepAsk(ask: EmailAsk): Promise<string> {
  return askCookie.serialize(ask);
}

/** The `Set-Cookie` that forgets it. */
export function forgetAsk(): Promise<string> {
  return askCookie.serialize("", { maxAge: 0 });
}
