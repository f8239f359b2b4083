import { eq } from "drizzle-orm";
import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { db, inTransaction } from "~/db/client.server";
import { users } from "~/db/schema";
import { record } from "~/services/events.server";
import { drawMail } from "~/services/mail.server";
import { plainText, renderNote } from "~/services/markdown.server";
import { MARKDOWN_EVASIONS } from "../fixtures/hostile/evasions.ts";
import { makePerson, sessionOf } from "../web/world.ts";
import { launch, SERVER, settled, visit } from "./browser.ts";
import { HOSTILE, type HostilePlace, makeHostilePlace, texts } from "./hostile-world.ts";

/**
 * The published list in every text that a person can give, one row each where there are lists. The pages are opened without
 * their content security policy, so that nothing but the drawing itself keeps a text from running.
 */

let browser: Browser;
let place: HostilePlace;

beforeAll(async () => {
  browser = await launch();
  place = await makeHostilePlace();
});
afterAll(() => browser.close());

const surfaces = () => {
  const project = `/projects/${place.project}`;
  return {
    "the list of projects": "/projects",
    "a project and its notes": project,
    activity: `${project}/activity`,
    members: `${project}/members`,
    settings: `${project}/settings`,
    "the list of sweeps": `${project}/sweeps`,
    "a sweep": `${project}/sweeps/${place.sweep}`,
    "a dip": `${project}/dips/${place.dip}`,
    "a trail": `${project}/trails/${place.trail}`,
    steps: `${project}/steps`,
    "a step": `${project}/steps/${place.step}`,
    benches: `${project}/benches`,
    "a bench": `${project}/benches/${place.bench}`,
    cables: `${project}/cables`,
    "captions and names of photographs": `${project}/antenna`,
    "write-ups": `${project}/write-ups`,
    "what a search found": "/search?q=alert",
    "plates that a search found": "/search?q=alert&in=plates",
    "what was searched for": `/search?q=${encodeURIComponent(HOSTILE)}`,
    "the inbox": "/inbox",
    "mail by project": "/settings/mail",
    "own account": "/settings",
    tokens: "/settings/tokens",
    reports: "/admin/reports",
    accounts: "/admin",
    "a published write-up and what it tells other sites": `/write-ups/${place.writeUp}`,
  };
};

describe("nothing that a person gave runs", () => {
  it("on any page", async () => {
    const { page, ran, close } = await watch(await sessionOf(place.owner));
    for (const [name, path] of Object.entries(surfaces())) {
      const response = await page.goto(path);
      expect(response?.status(), name).toBe(200);
      await page.waitForLoadState("load");
      expect(await inHtml(page), `${name}: ${path}`).toEqual([]);
      expect(ran, `${name}: ${path}`).toEqual([]);
    }
    await close();
  });

  it("in what an open page is told of", async () => {
    const { page, ran, close } = await watch(await sessionOf(place.owner));
    await page.goto(`/projects/${place.project}/steps`);
    await settled(page);
    const by = await makePerson("live");
    await db.update(users).set({ name: HOSTILE }).where(eq(users.id, by.id));
    await inTransaction(async (tx) => {
      const about = { step: place.step, title: HOSTILE };
      await record({ projectId: place.projectId, kind: "step.added", actorId: by.id, about }, tx);
    });
    await page.getByText(/1 new step, by/).waitFor();
    expect(await inHtml(page)).toEqual([]);
    expect(ran).toEqual([]);
    await close();
  });

  it("in a mail, which has no policy of ours", async () => {
    const { page, ran, close } = await watch();
    const all = [...texts(20_000), ...MARKDOWN_EVASIONS, HOSTILE];
    const part = (text: string) => [
      { kind: "text" as const, text },
      { kind: "quote" as const, text },
      { kind: "code" as const, text },
      { kind: "link" as const, label: text, href: `${SERVER}/?${text}` },
      { kind: "drawn" as const, html: renderNote(text), text: plainText(text, 4000) },
    ];
    const { html } = drawMail({ heading: all.join(" "), parts: all.flatMap(part), footer: part(HOSTILE) });
    await page.setContent(html, { waitUntil: "load" });
    expect(await inHtml(page)).toEqual([]);
    expect(ran).toEqual([]);
    await close();
  });

  it.each(["activity.atom", "write-ups.atom"])("in the feed %s, which is well-formed", async (feed) => {
    const { page, ran, close } = await watch();
    await page.goto("/sign-in");
    const found = await page.evaluate(async (address) => {
      const text = await (await fetch(address)).text();
      const xml = new DOMParser().parseFromString(text, "application/xml");
      const elements = [...xml.querySelectorAll("*")];
      return {
        broken: xml.querySelector("parsererror")?.textContent ?? null,
        entries: xml.querySelectorAll("entry").length,
        names: [...new Set(elements.map(({ localName }) => localName))],
        foreign: elements.filter(({ namespaceURI }) => namespaceURI !== "http://www.w3.org/2005/Atom").length,
        links: elements.flatMap((element) => element.getAttribute("href") ?? []),
      };
    }, `/projects/${place.project}/${feed}`);
    expect(found).toMatchObject({ broken: null, foreign: 0 });
    expect(found.entries).toBeGreaterThan(0);
    for (const name of found.names) expect(ATOM).toContain(name);
    for (const link of found.links) expect(link.startsWith(`${SERVER}/`), link).toBe(true);
    expect(ran).toEqual([]);
    await close();
  });
});

/** A window that notes whatever ran; `alert` and its like run nothing but the noting. */
async function watch(cookie?: string) {
  const { page, context } = await visit(browser, { bypassCSP: true });
  const ran: string[] = [];
  await context.exposeFunction("toldOf", (what: string) => void ran.push(what));
  await context.addInitScript(() => {
    for (const name of ["alert", "prompt", "confirm", "print"] as const) {
      window[name] = (() => (window as unknown as { toldOf: (what: string) => void }).toldOf(name)) as never;
    }
  });
  await context.route(/fennmarsh\.example/, (route) => {
    ran.push(route.request().url());
    return route.abort();
  });
  // The pictures themselves are nobody's text, and there are hundreds.
  await context.route(/\/(photographs|attachments)\/\w+\/(small|shown)/, (route) => route.abort());
  if (cookie) {
    const [, name, value] = /^([^=]+)=([^;]*)/.exec(cookie) ?? [];
    await context.addCookies([{ name, value, url: SERVER }]);
  }
  return { page, ran, close: () => context.close() };
}

/** What in a page could run or fetch though the page's own code did not put it there. */
function inHtml(page: Page): Promise<string[]> {
  return page.evaluate(() => {
    const found: string[] = [];
    const FORBIDDEN =
      "iframe, frame, frameset, object, embed, applet, base, bgsound, marquee, xml, meta[http-equiv], xss, x";
    for (const element of document.querySelectorAll("*")) {
      const own = (address: string) => new URL(address, location.href).origin === location.origin;
      const tag = element.outerHTML.slice(0, 120);
      if (element.matches(FORBIDDEN)) found.push(tag);
      if (element.matches("script") && !(element as HTMLScriptElement).nonce) {
        if (!own(element.getAttribute("src") ?? "https://none.example")) found.push(tag);
      }
      if (element.matches("link[rel*=style], link[rel*=load]")) {
        if (!own(element.getAttribute("href") ?? "https://none.example")) found.push(tag);
      }
      for (const { name, value } of element.attributes) {
        const address = ["href", "src", "action", "formaction", "xlink:href", "data", "background"].includes(
          name,
        );
        if (name.startsWith("on")) found.push(tag);
        if (address && /^\W*(javascript|vbscript|data:text)/i.test(value)) found.push(tag);
        if (name === "style" && /expression|url\(|behavior/i.test(value)) found.push(tag);
      }
    }
    return found;
  });
}

const ATOM = [
  "feed",
  "entry",
  "id",
  "title",
  "updated",
  "published",
  "author",
  "name",
  "link",
  "summary",
  "content",
];
