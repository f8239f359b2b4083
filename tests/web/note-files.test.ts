import { beforeAll, expect, it } from "vitest";
import type { Browser } from "./browser.ts";
import { makeCrew, makePlace, onePixel, type Place, signIn, touchstone } from "./world.ts";

/** Files in a note from a browser without scripts: they go along with its form. */

let place: Place;
let browser: Browser;

beforeAll(async () => {
  const crew = await makeCrew();
  place = await makePlace(crew, "private");
  browser = await signIn(crew.commenter);
});

const page = () => `/projects/${place.project}`;
const send = (file: File) =>
  browser.post(`${page()}/notes`, { body: "With a file.", returnTo: page(), file });

it("offers the choice of files where there are no scripts", async () => {
  const html = await (await browser.get(page())).text();
  const bare = /<noscript>(.*?)<\/noscript>/s.exec(html.slice(html.search(/enctype="multipart/i)))?.[1] ?? "";
  expect(bare).toMatch(/<input type="file"[^>]* name="file"/);
});

it("takes a picture and a sweep file with the note, by what is in them", async () => {
  expect((await send(new File([touchstone()], "loop.s1p"))).status).toBe(302);
  expect((await send(new File([onePixel()], "mast.png"))).status).toBe(302);
  const html = await (await browser.get(page())).text();
  expect(html).toMatch(/href="[^"]*\/attachments\/\w+\/file"[^>]*>[^<]*loop\.s1p/);
  expect(html).toMatch(/src="[^"]*\/attachments\/\w+\/(small|shown)"/);
});

it("stores the note without a file that is none of these, and says so", async () => {
  const sent = await send(new File([new Uint8Array([0, 1, 2, 3])], "x.bin"));
  expect(sent.status).toBe(302);
  const html = await (
    await browser.get(new URL(sent.headers.get("Location") ?? "", "http://x").pathname)
  ).text();
  expect(html).toContain("“x.bin” was not taken.");
});
