import { createServer, type Server } from "node:http";
import type { AddressInfo } from "node:net";
import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import {
  expectAccessible,
  expectFits,
  fileOf,
  launch,
  newcomer,
  SERVER,
  settled,
  signIn,
  sweepText,
  visit,
} from "./browser.ts";

/** From a sweep to a plate, to an article on another site that shows it, to its reader; and a mistake mended. */

let browser: Browser;
let article: Server;
let articleHtml = "";
const ada = newcomer("ada");
let projectPath = "";
let platePath = "";
let copiedHtml = "";

beforeAll(async () => {
  browser = await launch();
  article = createServer((_request, response) => {
    response.setHeader("Content-Type", "text/html; charset=utf-8");
    // As a careful newsletter would: nothing runs, and only the plate's own site may be shown.
    response.setHeader(
      "Content-Security-Policy",
      `default-src 'none'; img-src ${SERVER}; frame-src ${SERVER}; style-src 'unsafe-inline'`,
    );
    response.end(articleHtml);
  });
  await new Promise<void>((done) => article.listen(0, "127.0.0.1", done));
});
afterAll(async () => {
  await browser.close();
  article.close();
});

test("Ada freezes a plate of her sweep, once although she presses twice", async () => {
  const { page, context, complaints } = await visit(browser);
  await signIn(page, ada);
  await page.goto("/projects/new");
  await page.getByLabel("Title").fill("A dip for the newsletter");
  await page.getByRole("radio", { name: "Private" }).check();
  await page.getByRole("button", { name: /project/i }).click();
  await page.waitForURL(/\/projects\/[a-z0-9]{10}$/);
  projectPath = new URL(page.url()).pathname;
  await page.goto(`${projectPath}/sweeps/new`);
  await settled(page);
  await page.locator("input[type=file]").setInputFiles([fileOf("as built.csv", sweepText(7.05, 18.1))]);
  await page.getByText(/1 of 1 files? done/).waitFor();

  await page.goto(`${projectPath}/plates`);
  await page.getByRole("link", { name: "Make the first plate" }).click();
  await page.getByRole("link", { name: "as built" }).click();
  await page.waitForURL(/plates\/new\?from=sweep/);
  await settled(page);
  const preview = page.getByRole("region", { name: "As it would be frozen" });
  await preview.locator("svg").waitFor();
  const title = page.getByLabel("Title", { exact: true });
  await title.fill("Two dips before anything was cut");
  await preview.locator("svg text", { hasText: "Two dips" }).first().waitFor();
  expect(await title.evaluate((field) => field === document.activeElement)).toBe(true);
  await page.getByLabel("Caption").fill("Measured at the hub, in *dry* weather.");
  await page
    .getByText(/Anyone who has a plate’s address can read it, although this project is private/)
    .waitFor();
  await expectAccessible(page);
  await page.getByRole("button", { name: "Freeze the plate" }).dblclick();
  await page.waitForURL(/\/plates\/[a-z0-9]{10}$/, { timeout: FREEZING_MS });
  platePath = new URL(page.url()).pathname;
  await settled(page);
  await page.getByRole("heading", { level: 1, name: "Two dips before anything was cut" }).waitFor();
  await expectAccessible(page);
  await page.getByText("For Markdown, HTML, LaTeX or plain text").click();
  const html = page.getByRole("region", { name: "HTML, with the figure" });
  copiedHtml = (await html.textContent()) ?? "";
  expect(copiedHtml).toContain(platePath);

  await page.goto(`${projectPath}/plates`);
  expect(await page.getByRole("listitem").filter({ hasText: "Two dips" }).count()).toBe(1);
  await context.close();
  expect(complaints).toEqual([]);
});

test("an article on another site shows it, and its reader on a phone follows the link", async () => {
  articleHtml = `<!doctype html><html lang="en"><title>Newsletter</title><body>
    <p>What we found:</p>${copiedHtml}
    <iframe src="${SERVER}${platePath}/embed" title="The plate" style="width:100%;height:30rem;border:0"></iframe>`;
  const reader = await visit(browser, { viewport: { width: 390, height: 844 }, hasTouch: true });
  const { page } = reader;
  const said: string[] = [];
  page.on("console", (message) => said.push(message.text()));
  await page.goto(`http://127.0.0.1:${(article.address() as AddressInfo).port}/`, {
    waitUntil: "networkidle",
  });
  expect(said).toEqual([]);
  const widths = await page
    .locator("img")
    .evaluateAll((all) => (all as HTMLImageElement[]).map(({ naturalWidth }) => naturalWidth));
  expect(widths.length).toBeGreaterThan(0);
  expect(Math.min(...widths)).toBeGreaterThan(0);
  const frame = page.frameLocator("iframe");
  await frame.getByRole("link").first().click();
  await page.waitForURL(`${SERVER}${platePath}`);
  await settled(page);
  await expectFits(page);
  await expectAccessible(page);
  expect(await page.locator("main").textContent()).toMatch(/7\.0[45]\d*\sMHz/);
  await page.getByText("Measured at the hub, in dry weather.").first().waitFor();
  expect(await page.getByRole("link", { name: "New version" }).count()).toBe(0);
  await page.getByRole("button", { name: "Check again" }).click();
  await page.getByText("Identical.").waitFor();
  expect(await page.title()).toMatch(/^Plate 1: Two dips/);
  expect(reader.complaints).toEqual([]);
  await reader.context.close();
});

test("Ada mends a mistake, and withdraws what she should not have shown", async () => {
  const { page, context, complaints } = await visit(browser);
  await signIn(page, ada);
  await page.goto(platePath);
  await page.getByRole("link", { name: "New version" }).click();
  await page.waitForURL(/plates\/new\?mends=/);
  await settled(page);
  await page.getByLabel("Caption").fill("Measured at the hub, in wet weather.");
  await page.getByRole("button", { name: "Freeze the new version" }).click();
  await page.getByText("Say in a line what was wrong").waitFor();
  await page.getByLabel("What was wrong with version 1").and(page.locator(":focus")).waitFor();
  expect(await page.getByLabel("Caption").inputValue()).toBe("Measured at the hub, in wet weather.");
  await page.getByLabel("What was wrong with version 1").fill("It had rained all day.");
  await page.getByRole("button", { name: "Freeze the new version" }).click();
  await page.waitForURL(/\/plates\/[a-z0-9]{10}$/, { timeout: FREEZING_MS });
  await settled(page);
  await page.getByText("Version 2, this one").waitFor();
  const second = new URL(page.url()).pathname;
  await page.goto(platePath);
  await page.getByText("There is a newer version of this plate").waitFor();
  await page.getByText("It had rained all day.").waitFor();
  await page.getByText("Measured at the hub, in dry weather.").first().waitFor();
  await page.goto(second);
  await settled(page);
  await withdraw(page, "The place must not be told.");
  await page.getByText(/Withdrawn on/).waitFor();
  await context.close();
  expect(complaints).toEqual([]);

  const stranger = await visit(browser);
  const answer = await stranger.page.goto(second);
  expect(answer?.status()).toBe(410);
  const main = await stranger.page.locator("main").textContent();
  expect(main).toContain("The place must not be told.");
  expect(main).not.toMatch(/MHz|wet weather/);
  await expectAccessible(stranger.page);
  await stranger.context.close();
});

/** Some seconds at most; more on a machine that has much else to do. */
const FREEZING_MS = 60_000;

async function withdraw(page: Page, reason: string): Promise<void> {
  await page.getByRole("button", { name: "Withdraw", exact: true }).click();
  const dialog = page.getByRole("dialog");
  await dialog.getByLabel("Why").fill(reason);
  await dialog.getByRole("button", { name: "Withdraw the plate" }).click();
}
