import type { Browser } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import { demoSweep, launch, settled, visit } from "./browser.ts";

/** A sweep with phase on the demo's page, and the methods: without scripts, with the pointer. */

/** Enough for a machine that is busy with other suites. */
const SLOW = { timeout: 20_000 };

let browser: Browser;
let sweepPath = "";

beforeAll(async () => {
  browser = await launch();
  sweepPath = await demoSweep(browser);
});
afterAll(() => browser.close());

test("the plane of Γ, resonances and matching are whole without scripts; a frequency is asked for by a plain form", async () => {
  const { page, context } = await visit(browser, { javaScriptEnabled: false });
  await page.goto(sweepPath);
  expect(await page.locator(".smith path").count()).toBeGreaterThan(20);
  expect(await page.locator(".zero-list li").count()).toBeGreaterThan(0);
  await page.getByLabel("Match at").fill("7.05 MHz");
  await page.getByRole("button", { name: "Show elements" }).click();
  expect(new URL(page.url()).searchParams.get("match")).toBe("7.05 MHz");
  await expect
    .poll(() => page.locator("#match").textContent(), SLOW)
    .toContain("At 7.05\u2009MHz the port sees");
  expect(await page.locator(".network-card").count()).toBeGreaterThan(2);
  await page.goto(`${sweepPath}?match=900e6`);
  expect(await page.locator(".field-error").textContent()).toContain("The sweep goes from");
  await page.goto(`${sweepPath}?match=soon`);
  expect(await page.locator(".field-error").textContent()).toContain("That is no frequency");
  await context.close();
});

test("the pointer reads the line out, a drag zooms the drawing with its dips, and all of it comes back", async () => {
  const { page, context, complaints } = await visit(browser);
  await page.goto(sweepPath);
  await settled(page);
  const plane = page.locator(".smith-frame");
  await plane.scrollIntoViewIfNeeded();
  const box = await plane.boundingBox();
  if (!box) throw new Error("the plane is not there");
  await page.mouse.move(box.x + box.width / 2, box.y + box.height / 2);
  await page.mouse.move(box.x + box.width / 2 + 5, box.y + box.height / 2);
  await plane.locator(".nsewdrag").waitFor({ timeout: 60_000 });
  const viewBox = () => plane.locator("svg.smith").first().getAttribute("viewBox");
  expect(await viewBox()).toBe("-236 -236 472 472");
  await page.mouse.move(box.x + box.width * 0.3, box.y + box.height * 0.3);
  await page.mouse.down();
  await page.mouse.move(box.x + box.width * 0.6, box.y + box.height * 0.6, { steps: 8 });
  await page.mouse.up();
  await expect.poll(viewBox, SLOW).not.toBe("-236 -236 472 472");
  const side = Number((await viewBox())?.split(" ")[2]);
  expect(side).toBeGreaterThan(100);
  expect(side).toBeLessThan(250);
  await page.getByRole("button", { name: "Show all of it" }).click();
  await expect.poll(viewBox, SLOW).toBe("-236 -236 472 472");
  expect(complaints).toEqual([]);
  await context.close();
});

test("the methods reckon what is typed, keep it in the address, and are reached from every page", async () => {
  const { page, context, complaints } = await visit(browser);
  await page.goto("/");
  await page.getByRole("link", { name: "Methods: how each number is reckoned" }).click();
  await page.waitForURL(/\/methods/);
  await settled(page);
  const example = page.getByRole("form", { name: "Example: SWR", exact: true });
  await example.getByLabel("Return loss").fill("20");
  await example.getByRole("button", { name: "Reckon" }).click();
  await expect.poll(() => example.textContent(), SLOW).toContain("1.22");
  expect(new URL(page.url()).searchParams.get("swr.loss")).toBe("20");
  await example.getByLabel("Return loss").fill("much");
  await example.getByLabel("Return loss").press("Enter");
  await expect.poll(() => example.textContent(), SLOW).toContain("Write a number from -3 to 80.");
  expect(complaints).toEqual([]);
  await context.close();
});
