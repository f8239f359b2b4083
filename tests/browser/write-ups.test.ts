import { mkdtemp, readFile, rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import path from "node:path";
import { pathToFileURL } from "node:url";
import type { Browser } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import {
  expectAccessible,
  expectFits,
  fileOf,
  launch,
  newcomer,
  newProject,
  settled,
  signIn,
  sweepText,
  visit,
} from "./browser.ts";

/** A write-up of a private project: written with a figure, published, read on a phone, and taken away on a disk. */

let browser: Browser;
let folder = "";
let address = "";
const ada = newcomer("author");

beforeAll(async () => {
  browser = await launch();
  folder = await mkdtemp(path.join(tmpdir(), "swale-write-up-"));
});
afterAll(async () => {
  await browser.close();
  await rm(folder, { recursive: true });
});

test("an author writes, sees how it looks, loses nothing by a reload, and publishes", async () => {
  const { page, context, complaints } = await visit(browser, { viewport: { width: 1600, height: 1000 } });
  await signIn(page, ada);
  const project = await newProject(page, "Loop in the reeds", "Private");
  await page.goto(`${project}/sweeps/new`);
  await settled(page);
  await page.locator("input[type=file]").setInputFiles([fileOf("reeds.csv", sweepText(7.1, 21.3))]);
  await page.getByText(/1 of 1 files? done/).waitFor();

  await page.goto(`${project}/write-ups`);
  await page.getByRole("link", { name: "Begin the first write-up" }).click();
  await page.getByLabel("Title").fill("Two hollows");
  await page.getByRole("button", { name: "Begin" }).click();
  await page.waitForURL(/\/edit$/);
  await settled(page);

  const text = page.getByLabel("Text", { exact: true });
  await text.fill("One more than we built[^1].\n\n## Seen\n\n## Guessed\n\n## Found\n\n[^1]: Of wire.\n\n");
  const look = page.getByRole("region", { name: "How it will look" });
  await look.getByRole("heading", { name: "Guessed" }).waitFor();
  await page.getByText("Put a figure in").click();
  await page.getByRole("button", { name: /^Put in: sweep reeds/ }).click();
  await look.getByText("Figure 1.").waitFor();

  await page.reload();
  await settled(page);
  await page.getByText("You began this earlier on this device").waitFor();
  expect(await text.inputValue()).toMatch(/!\[\]\(#sweep:[a-z0-9]{10}\)/);
  await page.getByRole("button", { name: "Keep the draft" }).click();
  await page.getByText("The draft is kept.").waitFor();
  await expectAccessible(page);

  await page.getByRole("link", { name: "Publish…" }).click();
  await page.getByText("although this project is private").waitFor();
  await expectAccessible(page);
  await page.getByRole("button", { name: "Publish it" }).click();
  await page.waitForURL(/\/write-ups\/[a-z0-9]{10}$/);
  await page.getByText("Published as version 1.").waitFor();
  address = new URL(page.url()).pathname;
  await context.close();
  expect(complaints).toEqual([]);
});

test("a reader on a phone, signed in nowhere, follows the link and finds everything", async () => {
  const { page, context, complaints } = await visit(browser, {
    viewport: { width: 390, height: 844 },
    colorScheme: "dark",
  });
  await page.goto(address);
  await settled(page);
  await page.getByRole("heading", { level: 1, name: "Two hollows" }).waitFor();
  await expectFits(page);
  await expectAccessible(page);
  await page.getByRole("link", { name: "Guessed" }).click();
  expect(new URL(page.url()).hash).toBe("#s-guessed");
  await page.getByRole("link", { name: "Footnote 1", exact: true }).click();
  await page.getByText("Of wire.").waitFor();
  // The narrow drawing, and only it.
  expect(await page.locator(".figure-drawing:visible").count()).toBe(1);
  await page.getByRole("cell", { name: /7\.1\d*\sMHz/ }).waitFor();
  await context.close();
  expect(complaints).toEqual([]);
});

test("the HTML file opens from a disk, with its fonts and figures, and asks nobody for anything", async () => {
  const { page, context } = await visit(browser);
  await page.goto(address);
  const [download] = await Promise.all([
    page.waitForEvent("download"),
    page.getByRole("link", { name: "One HTML file that opens anywhere" }).click(),
  ]);
  expect(download.suggestedFilename()).toBe("two-hollows-v1.html");
  const file = path.join(folder, "two-hollows.html");
  await download.saveAs(file);
  await context.close();

  const bare = await browser.newContext({ viewport: { width: 1000, height: 900 } });
  const reader = await bare.newPage();
  const [said, asked]: string[][] = [[], []];
  reader.on("console", (message) => said.push(message.text()));
  reader.on("pageerror", (error) => said.push(error.message));
  reader.on("request", (request) => asked.push(request.url()));
  await reader.goto(pathToFileURL(file).href);
  await reader.getByRole("heading", { level: 1, name: "Two hollows" }).waitFor();
  expect(await reader.locator(".figure-drawing:visible").count()).toBe(1);
  const fonts = await reader.evaluate(async () => {
    await document.fonts.ready;
    return [...document.fonts].filter(({ status }) => status === "loaded").map(({ family }) => family);
  });
  expect(fonts.join()).toContain("Atkinson Hyperlegible Next");
  await expectFits(reader);
  await expectAccessible(reader);
  expect(asked).toEqual([pathToFileURL(file).href]);
  expect(said).toEqual([]);
  await bare.close();
  expect(await readFile(file, "utf8")).not.toContain("<script");
});
