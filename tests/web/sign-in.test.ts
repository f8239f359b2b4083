import { describe, expect, it } from "vitest";
import * as people from "~/db/people.server";
import * as sessions from "~/db/sessions.server";
import { Browser, SERVER } from "./browser.ts";
import { makePerson, signIn, unique } from "./world.ts";

/** Signing in against the stand-in for the provider, which checks state, code and client as the real one does. */

const SESSION = "swale_session";

/** Goes to the provider and answers its page; the way back is returned, not yet taken. */
async function askProvider(
  browser: Browser,
  decision: Record<string, string>,
  next = "/settings",
): Promise<URL> {
  const away = await browser.get(`/auth/github?next=${encodeURIComponent(next)}`);
  expect(away.status).toBe(302);
  const page = new URL(away.headers.get("Location") ?? "");
  const form = new URLSearchParams(decision);
  for (const name of ["client_id", "redirect_uri", "state", "scope"]) {
    form.set(name, page.searchParams.get(name) ?? "");
  }
  const back = await fetch(new URL(page.pathname, page), { method: "POST", body: form, redirect: "manual" });
  expect(back.status).toBe(303);
  return new URL(back.headers.get("Location") ?? "");
}

const newcomer = (login: string, email = `${login}@example.com`) => ({
  decision: "new",
  new_login: login,
  name: "A Newcomer",
  email,
});

const pathOf = (url: URL) => url.pathname + url.search;

describe("signing in", () => {
  it("makes a member, sets a guarded cookie and goes where one wanted to go", async () => {
    const browser = new Browser();
    const login = unique("new");
    const back = await askProvider(browser, newcomer(login));
    const home = await browser.get(pathOf(back));
    expect(home.status).toBe(302);
    expect(home.headers.get("Location")).toBe("/settings");
    const cookie = home.headers.getSetCookie().find((line) => line.startsWith(`${SESSION}=`));
    expect(cookie).toMatch(/HttpOnly/i);
    expect(cookie).toMatch(/SameSite=Lax/i);
    const settings = await browser.get("/settings");
    expect(await settings.text()).toContain(login);
    expect((await people.findByUserName(login))?.administrator).toBe(false);
  });

  it("finds the same member again, even under another login", async () => {
    const login = unique("again");
    await signInAs(new Browser(), newcomer(login));
    const first = await people.findByUserName(login);
    await people.update(first?.id ?? 0, { userName: unique("renamed") });
    const second = new Browser();
    await signInAs(second, { decision: "allow", login });
    expect(await people.findByUserName(login)).toBeUndefined();
    expect(await (await second.get("/settings")).text()).toContain("renamed-");
  });

  it("opens nobody's account because of an equal e-mail address", async () => {
    const victim = await makePerson("victim");
    const login = unique("twin");
    await signInAs(new Browser(), newcomer(login, `${victim.userName}@example.com`));
    const twin = await people.findByUserName(login);
    expect(twin).toBeDefined();
    expect(twin?.id).not.toBe(victim.id);
    expect(twin?.email).toBeNull();
  });

  it("gives a newcomer another user name where theirs is taken", async () => {
    const holder = await makePerson("holder");
    const browser = new Browser();
    await signInAs(browser, newcomer(holder.userName));
    expect(await (await browser.get("/settings")).text()).toContain(`${holder.userName}-2`);
  });

  it("starts a new session and ends the one before", async () => {
    const browser = await signIn(await makePerson("rotated"));
    const before = browser.cookie(SESSION);
    await signInAs(browser, newcomer(unique("rotate")));
    expect(browser.cookie(SESSION)).not.toBe(before);
    expect((await withSession(before).get("/settings")).status).toBe(302);
  });

  it("ends on signing out, here and for whoever copied the cookie", async () => {
    const browser = await signIn(await makePerson("leaver"));
    const copied = browser.cookie(SESSION);
    expect((await browser.get("/settings")).status).toBe(200);
    const out = await browser.post("/sign-out", {});
    expect(out.headers.get("Location")).toBe("/");
    expect((await withSession(copied).get("/settings")).status).toBe(302);
  });
});

describe("what is refused, plainly and with nothing stored", () => {
  it("a state that is not this browser's", async () => {
    const other = new Browser();
    const back = await askProvider(other, newcomer(unique("forged")));
    await expectRefusal(new Browser(), back, "did not begin here");
    const browser = new Browser();
    await browser.get("/auth/github");
    await expectRefusal(browser, back, "did not begin here");
  });

  it("the way back taken twice", async () => {
    const browser = new Browser();
    const back = await askProvider(browser, newcomer(unique("twice")));
    const state = browser.cookie("swale_github") ?? "";
    expect((await browser.get(pathOf(back))).headers.get("Location")).toBe("/settings");
    await expectRefusal(new Browser(), back, "did not begin here");
    const replay = new Browser();
    replay.setCookie("swale_github", state);
    await expectRefusal(replay, back, "did not accept");
  });

  it("a person who says no", async () => {
    const browser = new Browser();
    await expectRefusal(browser, await askProvider(browser, { decision: "deny" }), "called off");
  });

  it("a callback with nothing in it", async () => {
    await expectRefusal(new Browser(), new URL("/auth/github/callback", SERVER), "did not begin here");
    await expectRefusal(new Browser(), new URL("/auth/github/callback?state=x", SERVER), "did not begin");
  });

  it("a suspended account, and its running sessions", async () => {
    const browser = new Browser();
    const login = unique("suspended");
    await signInAs(browser, newcomer(login));
    const user = await people.findByUserName(login);
    await people.update(user?.id ?? 0, { suspendedAt: new Date() });
    expect((await browser.get("/settings")).status).toBe(302);
    const again = new Browser();
    await expectRefusal(again, await askProvider(again, { decision: "allow", login }), "suspended");
  });

  it.each([
    "https://elsewhere.example/",
    "//elsewhere.example/",
    "/\\elsewhere.example/",
    "/\t/elsewhere.example/",
    "\\\\elsewhere.example",
    "javascript:alert(1)",
    "/.//elsewhere.example/",
  ])("a destination on another site: %j", async (next) => {
    const person = await makePerson("tricked");
    const browser = await signIn(person);
    const here = await browser.get(`/sign-in?next=${encodeURIComponent(next)}`);
    expect(here.headers.get("Location")).toBe("/projects");
    const back = await askProvider(browser, newcomer(unique("tricked")), next);
    expect((await browser.get(pathOf(back))).headers.get("Location")).toBe("/projects");
    const theme = await browser.post("/theme", { theme: "dark", returnTo: next });
    expect(theme.headers.get("Location")).toBe("/");
    const caution = await browser.post("/cautions/dismiss", { caution: "walk", returnTo: next });
    expect(caution.headers.get("Location")).toBe("/");
  });
});

describe("sessions", () => {
  it("are listed, and one or all others can be ended", async () => {
    const person = await makePerson("sessions");
    const [here, one, two] = [await signIn(person), await signIn(person), await signIn(person)];
    const rows = await sessions.findAllByUser(person.id);
    expect(rows).toHaveLength(3);
    const text = await (await here.get("/settings")).text();
    const listed = [...text.matchAll(/name="session" value="([0-9a-f]{64})"/g)].map((match) => match[1]);
    expect(new Set(listed).size).toBe(2);
    await here.post("/settings", { intent: "revoke-session", session: listed[0] });
    const left = [await one.get("/settings"), await two.get("/settings")].map((answer) => answer.status);
    expect(left.sort()).toEqual([200, 302]);
    await here.post("/settings", { intent: "revoke-others" });
    expect((await one.get("/settings")).status).toBe(302);
    expect((await two.get("/settings")).status).toBe(302);
    expect((await here.get("/settings")).status).toBe(200);
  });

  it("of somebody else can't be ended", async () => {
    const victim = await makePerson("victim");
    const theirs = await signIn(victim);
    const [row] = await sessions.findAllByUser(victim.id);
    const mine = await signIn(await makePerson("attacker"));
    await mine.post("/settings", { intent: "revoke-session", session: row.id });
    expect((await theirs.get("/settings")).status).toBe(200);
  });

  it("with a forged or unsigned cookie are none", async () => {
    const person = await makePerson("unsigned");
    const real = (await signIn(person)).cookie(SESSION) ?? "";
    expect((await withSession(real).get("/settings")).status).toBe(200);
    const [value] = real.split(".");
    for (const forged of [value, `${value}.AAAA`, encodeURIComponent("x"), ""]) {
      expect((await withSession(forged).get("/settings")).status).toBe(302);
    }
  });
});

describe("forms sent from another site", () => {
  const foreign = { Origin: "https://elsewhere.example" };

  it.each([
    ["/settings", { intent: "revoke-others" }],
    ["/sign-out", {}],
    ["/theme", { theme: "dark" }],
    ["/cautions/dismiss", { caution: "foreign" }],
    ["/settings.data", { intent: "revoke-others" }],
  ])("are refused by %s", async (path, fields) => {
    const browser = await signIn(await makePerson("lured"));
    const answer = await browser.post(path, fields, foreign);
    expect([400, 403]).toContain(answer.status);
    expect((await browser.get("/settings")).status).toBe(200);
    expect(browser.cookie("theme")).toBeUndefined();
  });

  it("are refused without an Origin where the browser says cross-site", async () => {
    const browser = await signIn(await makePerson("lured"));
    const headers = { "Sec-Fetch-Site": "cross-site", Cookie: `${SESSION}=${browser.cookie(SESSION)}` };
    const answer = await fetch(new URL("/sign-out", SERVER), { method: "POST", headers, redirect: "manual" });
    expect(answer.status).toBe(403);
    expect((await browser.get("/settings")).status).toBe(200);
  });
});

async function signInAs(browser: Browser, decision: Record<string, string>): Promise<void> {
  const answer = await browser.get(pathOf(await askProvider(browser, decision)));
  expect(answer.headers.get("Location")).toBe("/settings");
}

async function expectRefusal(browser: Browser, back: URL, words: string): Promise<void> {
  const before = browser.cookie(SESSION);
  const answer = await browser.get(pathOf(back));
  expect(answer.status).toBe(302);
  const page = await browser.get(answer.headers.get("Location") ?? "");
  expect(page.status).toBeGreaterThanOrEqual(400);
  expect(await page.text()).toContain(words);
  expect(browser.cookie(SESSION)).toBe(before);
}

function withSession(value: string | undefined): Browser {
  const browser = new Browser();
  browser.setCookie(SESSION, value ?? "");
  return browser;
}
