import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { freePort } from "../../scripts/stack/ports.ts";
import { startGithub } from "../../scripts/stand-ins/github.ts";

const CALLBACK = "http://localhost:3000/auth/github/callback";
const CLIENT = { id: "one", secret: "first secret", callback: CALLBACK };
const OTHER = { id: "two", secret: "second secret", callback: CALLBACK };
const TEN_MINUTES_MS = 10 * 60 * 1000;

let base = "";
let nowMs = 1_000_000;
let stop: () => Promise<void>;
const folder = mkdtempSync(path.join(tmpdir(), "swale-github-"));

beforeAll(async () => {
  const port = await freePort();
  base = `http://127.0.0.1:${port}`;
  stop = await startGithub({ folder, port, clients: [CLIENT, OTHER], now: () => nowMs });
});
afterAll(async () => {
  await stop();
  rmSync(folder, { recursive: true });
});

const QUERY = { client_id: "one", redirect_uri: CALLBACK, state: "a b&c", scope: "user:email" };

function decide(form: Record<string, string>): Promise<Response> {
  return fetch(`${base}/login/oauth/authorize`, {
    method: "POST",
    body: new URLSearchParams({ ...QUERY, ...form }),
    redirect: "manual",
  });
}

async function newCode(form: Record<string, string> = { login: "ada-marsh" }): Promise<string> {
  const response = await decide({ decision: "allow", ...form });
  expect(response.status).toBe(303);
  return new URL(response.headers.get("location") ?? "").searchParams.get("code") ?? "";
}

async function exchange(
  form: Record<string, string>,
  headers: Record<string, string> = { authorization: basic("one", "first secret") },
): Promise<Record<string, string>> {
  const response = await fetch(`${base}/login/oauth/access_token`, {
    method: "POST",
    body: new URLSearchParams({ grant_type: "authorization_code", redirect_uri: CALLBACK, ...form }),
    headers: { accept: "application/json", ...headers },
  });
  expect(response.status).toBe(200);
  return response.json() as Promise<Record<string, string>>;
}

function basic(id: string, secret: string): string {
  return `Basic ${Buffer.from(`${id}:${secret}`).toString("base64")}`;
}

function ask(where: string, authorization?: string): Promise<Response> {
  return fetch(`${base}${where}`, { headers: authorization ? { authorization } : {} });
}

describe("the authorize page", () => {
  test("offers the demo people and keeps the state for later", async () => {
    const response = await ask(`/login/oauth/authorize?${new URLSearchParams(QUERY)}`);
    const html = await response.text();
    expect(response.status).toBe(200);
    for (const login of ["ada-marsh", "bram-sedge", "cleo-reed", "dov-heron", "site-keeper"]) {
      expect(html).toContain(`value="${login}"`);
    }
    expect(html).toContain('value="a b&#38;c"');
  });

  test.each([
    ["an unknown client", { client_id: "three" }, 404],
    ["another origin", { redirect_uri: "https://elsewhere.example/auth/github/callback" }, 400],
    ["another path", { redirect_uri: "http://localhost:3000/elsewhere" }, 400],
    ["a longer path that only begins alike", { redirect_uri: `${CALLBACK}-not` }, 400],
    ["no address at all", { redirect_uri: "nonsense" }, 400],
  ])("goes back to nobody for %s", async (_what, change, status) => {
    const query = new URLSearchParams({ ...QUERY, ...change });
    const shown = await ask(`/login/oauth/authorize?${query}`);
    expect(shown.status).toBe(status);
    const posted = await decide({ ...change, decision: "allow", login: "ada-marsh" });
    expect(posted.status).toBe(status);
    expect(posted.headers.get("location")).toBeNull();
  });
});

describe("the decision", () => {
  test("hands back the state as it was, with a code", async () => {
    const response = await decide({ decision: "allow", login: "bram-sedge" });
    const back = new URL(response.headers.get("location") ?? "");
    expect(back.origin + back.pathname).toBe(CALLBACK);
    expect(back.searchParams.get("state")).toBe("a b&c");
    expect(back.searchParams.get("code")).toMatch(/^[\da-f]{40}$/);
  });

  test("can be a refusal, which has no code", async () => {
    const back = new URL((await decide({ decision: "deny" })).headers.get("location") ?? "");
    expect(back.searchParams.get("error")).toBe("access_denied");
    expect(back.searchParams.get("state")).toBe("a b&c");
    expect(back.searchParams.has("code")).toBe(false);
  });

  test("can be somebody new, who can come again", async () => {
    const code = await newCode({
      decision: "new",
      new_login: "Iris-Fen",
      name: "Iris Fen",
      email: "iris@fennmarsh.example",
    });
    const { access_token } = await exchange({ code });
    const profile = await (await ask("/user", `Bearer ${access_token}`)).json();
    expect(profile).toMatchObject({ id: 2001, login: "Iris-Fen", name: "Iris Fen" });
    const again = await exchange({ code: await newCode({ login: "iris-fen" }) });
    expect(await (await ask("/user", `Bearer ${again.access_token}`)).json()).toMatchObject({ id: 2001 });
  });

  test.each([
    ["a taken name", { new_login: "ADA-marsh", email: "x@y.example" }, "taken"],
    ["a name with blanks", { new_login: "a b", email: "x@y.example" }, "letters"],
    ["no e-mail address", { new_login: "someone", email: "nobody" }, "not an e-mail"],
  ])("asks again for %s", async (_what, form, words) => {
    const response = await decide({ decision: "new", ...form });
    expect(response.status).toBe(422);
    expect(await response.text()).toContain(words);
  });
});

describe("a code", () => {
  test("gives a token once, and used again ends that token too", async () => {
    const code = await newCode();
    const { access_token, scope } = await exchange({ code });
    expect(scope).toBe("user:email");
    expect((await ask("/user", `token ${access_token}`)).status).toBe(200);
    expect(await exchange({ code })).toMatchObject({ error: "bad_verification_code" });
    expect((await ask("/user", `token ${access_token}`)).status).toBe(401);
  });

  test("is no good after ten minutes", async () => {
    const [early, late] = [await newCode(), await newCode()];
    nowMs += TEN_MINUTES_MS;
    expect(await exchange({ code: early })).toHaveProperty("access_token");
    nowMs += 1;
    expect(await exchange({ code: late })).toMatchObject({ error: "bad_verification_code" });
  });

  test("is no good to another client, and is not used up by it", async () => {
    const code = await newCode();
    const asOther = await exchange({ code }, { authorization: basic("two", "second secret") });
    expect(asOther).toMatchObject({ error: "bad_verification_code" });
    expect(await exchange({ code })).toHaveProperty("access_token");
  });

  test("is bound to where it was sent", async () => {
    const code = await newCode();
    const elsewhere = await exchange({ code, redirect_uri: `${CALLBACK}/deeper` });
    expect(elsewhere).toMatchObject({ error: "bad_verification_code" });
  });

  test("cannot be guessed", async () => {
    expect(await exchange({ code: "0".repeat(40) })).toMatchObject({ error: "bad_verification_code" });
  });
});

describe("the client", () => {
  test("may say who it is in the form", async () => {
    const form = { code: await newCode(), client_id: "one", client_secret: "first secret" };
    expect(await exchange(form, {})).toHaveProperty("access_token");
  });

  test.each([
    ["a wrong secret", { authorization: basic("one", "guess") }],
    ["another client's secret", { authorization: basic("one", "second secret") }],
    ["no secret", {}],
  ])("is refused with %s, and the code stays good", async (_what, headers: Record<string, string>) => {
    const code = await newCode();
    expect(await exchange({ code }, headers)).toMatchObject({ error: "incorrect_client_credentials" });
    expect(await exchange({ code })).toHaveProperty("access_token");
  });

  test("gets an answer in the form's own shape unless it asks for JSON", async () => {
    const response = await fetch(`${base}/login/oauth/access_token`, {
      method: "POST",
      body: new URLSearchParams({ code: await newCode(), client_id: "one", client_secret: "first secret" }),
    });
    expect(new URLSearchParams(await response.text()).get("token_type")).toBe("bearer");
  });
});

describe("what a token opens", () => {
  test("is nothing without one, or with a made-up one", async () => {
    expect((await ask("/user")).status).toBe(401);
    expect((await ask("/user/emails", "Bearer gho_made-up")).status).toBe(401);
  });

  test("includes the addresses only where their scope was granted", async () => {
    const without = await exchange({ code: await newCode({ login: "cleo-reed", scope: "read:user" }) });
    expect((await ask("/user/emails", `Bearer ${without.access_token}`)).status).toBe(404);
    const granted = await exchange({ code: await newCode({ login: "cleo-reed" }) });
    const emails = await (await ask("/user/emails", `Bearer ${granted.access_token}`)).json();
    expect(emails).toEqual([
      { email: "cleo-reed@fennmarsh.example", primary: true, verified: true, visibility: "private" },
    ]);
  });

  test("tells an address that was never confirmed", async () => {
    const form = {
      decision: "new",
      new_login: "un-sure",
      email: "unsure@fennmarsh.example",
      unverified: "on",
    };
    const { access_token } = await exchange({ code: await newCode(form) });
    const emails = await (await ask("/user/emails", `Bearer ${access_token}`)).json();
    expect(emails).toMatchObject([{ verified: false }]);
  });
});
