import { GitHub, OAuth2RequestError, OAuth2Tokens } from "arctic";
import { createCookie } from "react-router";
import { Authenticator } from "remix-auth";
import { GitHubStrategy } from "remix-auth-github";
import { z } from "zod";
import { env } from "~/env.server";
import { safePath } from "../auth/next.ts";
import { log } from "./log.server.ts";

/** Signing in with GitHub, or with whatever speaks like it at the configured addresses. */

export interface GithubProfile {
  /** Its number for the person: logins change hands, numbers do not. */
  subject: string;
  login: string;
  name: string;
  /** The main address, only where it is confirmed. */
  email: string | null;
}

export type SignInProblem = "denied" | "state" | "code" | "provider";

/**
 * The redirect to the provider, with the cookies that the way back is checked against. `addTo` is the row id of a
 * signed-in person who adds it to the account.
 */
export async function beginGithub(next: unknown, addTo: number | null = null): Promise<Response> {
  const bare = new Request(new URL("/auth/github", env.BASE_URL));
  try {
    await authenticator.authenticate("github", bare);
  } catch (thrown) {
    if (!(thrown instanceof Response)) throw thrown;
    const headers = new Headers(thrown.headers);
    headers.append("Set-Cookie", await nextCookie.serialize({ next: safePath(next), addTo }));
    return new Response(null, { status: thrown.status, headers });
  }
  throw new Error("The sign-in strategy did not ask the provider.");
}

export type GithubAnswer =
  | { ok: true; profile: GithubProfile; next: string; addTo: number | null }
  | { ok: false; problem: SignInProblem; next: string };

/** What the provider sent the browser back with: state, then code, then who it is. */
export async function finishGithub(request: Request): Promise<GithubAnswer> {
  const kept = keptAnswer.safeParse(await nextCookie.parse(request.headers.get("Cookie"))).data;
  const [next, addTo] = [safePath(kept?.next), kept?.addTo ?? null];
  const query = new URL(request.url).searchParams;
  if (!query.has("state") && !query.has("error")) return { ok: false, problem: "state", next };
  try {
    return { ok: true, profile: await authenticator.authenticate("github", request), next, addTo };
  } catch (error) {
    return { ok: false, problem: problemOf(error), next };
  }
}

/** State and destination are for one use, whatever came of it. */
export async function forgetGithub(headers: Headers): Promise<void> {
  headers.append("Set-Cookie", `${STATE_COOKIE}=; Path=/; Max-Age=0; HttpOnly; SameSite=Lax`);
  headers.append("Set-Cookie", await nextCookie.serialize("", { maxAge: 0 }));
}

function problemOf(error: unknown): SignInProblem {
  if (error instanceof OAuth2RequestError) return error.code === "access_denied" ? "denied" : "code";
  // The strategy's own words for a state or code that is missing or does not match.
  if (error instanceof ReferenceError || error instanceof RangeError) return "state";
  log.warn({ err: error }, "the sign-in provider did not answer as expected");
  return "provider";
}

const STATE_COOKIE = "swale_github";
const CALLBACK = `${env.BASE_URL}/auth/github/callback`;
const SCOPES = ["read:user", "user:email"] as const;
const PATIENCE_MS = 10_000;
const secure = env.BASE_URL.startsWith("https://");

const nextCookie = createCookie("swale_next", {
  httpOnly: true,
  sameSite: "lax",
  path: "/",
  maxAge: 600,
  secrets: [env.SESSION_SECRET],
  secure,
});

const keptAnswer = z.object({ next: z.string(), addTo: z.number().nullable() });
const tokenAnswer = z.union([
  z.object({ error: z.string() }),
  z.looseObject({ access_token: z.string().min(1), token_type: z.string() }),
]);
const userAnswer = z.object({ id: z.number().int(), login: z.string().min(1), name: z.string().nullish() });
const emailsAnswer = z.array(z.object({ email: z.string(), primary: z.boolean(), verified: z.boolean() }));

/** The library's client has fixed hosts; this one has configured ones, and otherwise says the same. */
class ConfiguredGithub extends GitHub {
  override createAuthorizationURL(state: string, scopes: string[]): URL {
    const url = addressOf(env.GITHUB_BASE_URL, "login/oauth/authorize");
    url.search = super.createAuthorizationURL(state, scopes).search;
    return url;
  }

  override async validateAuthorizationCode(code: string): Promise<OAuth2Tokens> {
    const credentials = Buffer.from(`${env.GITHUB_CLIENT_ID}:${env.GITHUB_CLIENT_SECRET}`);
    const response = await fetch(addressOf(env.GITHUB_BASE_URL, "login/oauth/access_token"), {
      method: "POST",
      headers: { Accept: "application/json", Authorization: `Basic ${credentials.toString("base64")}` },
      body: new URLSearchParams({ grant_type: "authorization_code", code, redirect_uri: CALLBACK }),
      signal: AbortSignal.timeout(PATIENCE_MS),
    });
    const answer = tokenAnswer.parse(await response.json());
    if ("error" in answer) throw new OAuth2RequestError(String(answer.error), null, null, null);
    return new OAuth2Tokens(answer);
  }
}

class ConfiguredStrategy extends GitHubStrategy<GithubProfile> {
  protected override client = new ConfiguredGithub(env.GITHUB_CLIENT_ID, env.GITHUB_CLIENT_SECRET, CALLBACK);
}

const authenticator = new Authenticator<GithubProfile>().use(
  new ConfiguredStrategy(
    {
      clientId: env.GITHUB_CLIENT_ID,
      clientSecret: env.GITHUB_CLIENT_SECRET,
      redirectURI: CALLBACK,
      scopes: [...SCOPES],
      cookie: { name: STATE_COOKIE, ...(secure ? { secure: true as const } : {}) },
    },
    async ({ tokens }) => {
      const token = tokens.accessToken();
      const [user, emails] = await Promise.all([
        ask("user", token).then((answer) => userAnswer.parse(answer)),
        ask("user/emails", token).then((answer) => emailsAnswer.parse(answer)),
      ]);
      const main = emails.find((one) => one.primary && one.verified);
      return {
        subject: String(user.id),
        login: user.login,
        name: user.name?.trim() || user.login,
        email: main?.email ?? null,
      };
    },
  ),
);

async function ask(path: string, token: string): Promise<unknown> {
  const response = await fetch(addressOf(env.GITHUB_API_URL, path), {
    headers: { Accept: "application/json", Authorization: `Bearer ${token}`, "User-Agent": "swale" },
    signal: AbortSignal.timeout(PATIENCE_MS),
  });
  if (!response.ok) throw new Error(`The provider answered ${response.status} for /${path}.`);
  return response.json();
}

/** A path under a base that may have a path of its own. */
function addressOf(base: string, path: string): URL {
  return new URL(path, base.endsWith("/") ? base : `${base}/`);
}
