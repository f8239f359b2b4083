import { createHash, randomBytes } from "node:crypto";
import { createCookie, createSessionStorage } from "react-router";
import * as sessions from "~/db/sessions.server";
import { env } from "~/env.server";

/** Cookie sessions kept in the database: the cookie holds a random token, the table its hash. */

interface SessionData {
  userId: number;
  userAgent?: string;
}

const LIFETIME_S = 60 * 60 * 24 * 30;

const sessionCookie = createCookie("swale_session", {
  httpOnly: true,
  sameSite: "lax",
  path: "/",
  maxAge: LIFETIME_S,
  secrets: [env.SESSION_SECRET],
  secure: env.BASE_URL.startsWith("https://"),
});

const sessionStorage = createSessionStorage<SessionData>({
  cookie: sessionCookie,
  async createData(data, expires) {
    const token = randomBytes(32).toString("base64url");
    const now = new Date();
    await sessions.insert({
      id: sessionIdOf(token),
      userId: data.userId ?? null,
      data: {},
      userAgent: data.userAgent?.slice(0, 200) ?? null,
      createdAt: now,
      lastSeenAt: now,
      expiresAt: expires ?? new Date(now.getTime() + LIFETIME_S * 1000),
    });
    return token;
  },
  async readData(token) {
    const found = await sessions.findById(sessionIdOf(token));
    return found?.session.userId ? { userId: found.session.userId } : null;
  },
  async updateData(token, data) {
    await sessions.update(sessionIdOf(token), { userId: data.userId ?? null });
  },
  async deleteData(token) {
    await sessions.deleteById(sessionIdOf(token));
  },
});

/** The row id of the session that this request carries, signed by us; undefined for none. */
export async function readSessionId(request: Request): Promise<string | undefined> {
  const token: unknown = await sessionCookie.parse(request.headers.get("Cookie"));
  return typeof token === "string" && token !== "" ? sessionIdOf(token) : undefined;
}

function sessionIdOf(token: string): string {
  return createHash("sha256").update(token).digest("hex");
}

/** The `Set-Cookie` of a fresh session; whatever session the browser had before is ended. */
export async function startSession(request: Request, userId: number): Promise<string> {
  const old = await readSessionId(request);
  if (old) await sessions.deleteById(old);
  const session = await sessionStorage.getSession();
  session.set("userId", userId);
  session.set("userAgent", request.headers.get("User-Agent") ?? "");
  return sessionStorage.commitSession(session);
}

/** Ends the session; the `Set-Cookie` clears the cookie. */
export async function endSession(request: Request): Promise<string> {
  const session = await sessionStorage.getSession(request.headers.get("Cookie"));
  return sessionStorage.destroySession(session);
}
