import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import { demoSweep, launch, settled, signIn, visit } from "./browser.ts";

/** The sweep page of the demo: first paint, zoom, address, keyboard, no scripts. */

let browser: Browser;
let sweepPath = "";

beforeAll(async () => {
  browser = await launch();
  sweepPath = await demoSweep(browser);
});
afterAll(() => browser.close());

const firstDip = (page: Page) =>
  page.getByRole("table", { name: "Dips of this sweep" }).getByRole("row").nth(1);

test("the first paint is whole without scripts, and forms and links still work", async () => {
  const { page, context } = await visit(browser, { javaScriptEnabled: false });
  await page.goto(sweepPath);
  expect(await page.locator(".chart path").count()).toBeGreaterThan(1);
  expect(await firstDip(page).textContent()).toContain("MHz");
  await page.getByRole("link", { name: "SWR", exact: true }).click();
  expect(page.url()).toContain("view=swr");
  await page.getByRole("link", { name: "Logarithmic" }).click();
  expect(page.url()).toContain("axis=log");
  await page.getByRole("link", { name: "Zoom in" }).click();
  expect(page.url()).toMatch(/from=|to=/);
  await firstDip(page).getByRole("link").click();
  expect(page.url()).toContain("dip=");
  await page.getByRole("link", { name: "All about this dip" }).waitFor();
  await context.close();
});

test("no byte of the zooming library comes with the page; it comes when the pointer does, and a drag zooms", async () => {
  const { page, context, complaints } = await visit(browser);
  const scripts: string[] = [];
  page.on("request", (request) => {
    if (request.resourceType() === "script") scripts.push(request.url());
  });
  await page.goto(sweepPath);
  await settled(page);
  expect(scripts.filter((url) => /plotly/i.test(url))).toEqual([]);

  const plot = page.locator(".chart-plot").first();
  const box = await plot.boundingBox();
  if (!box) throw new Error("the chart is not there");
  await page.mouse.move(box.x + 300, box.y + 60);
  await page.mouse.move(box.x + 310, box.y + 62);
  await page.locator(".nsewdrag").waitFor();
  expect(scripts.some((url) => /plotly/i.test(url))).toBe(true);
  await page.mouse.move(box.x + 200, box.y + 80);
  await page.mouse.down();
  await page.mouse.move(box.x + 420, box.y + 80, { steps: 12 });
  await page.mouse.up();
  await page.waitForURL(/from=.*to=/);
  const { searchParams } = new URL(page.url());
  expect(Number(searchParams.get("from"))).toBeLessThan(Number(searchParams.get("to")));
  await page.getByRole("link", { name: "Whole sweep" }).click();
  await page.waitForURL((url) => !url.search.includes("from="));
  expect(complaints).toEqual([]);
  await context.close();
});

test("other settings show at once, are in the address, and change nothing that is kept", async () => {
  const { page, context } = await visit(browser);
  await page.goto(sweepPath);
  await settled(page);
  const table = page.getByRole("table", { name: "Dips of this sweep" });
  const before = await table.getByRole("row").count();
  await page.getByLabel("Least prominence").fill("15");
  await page.getByLabel("Least prominence").press("Enter");
  await page.waitForURL(/prominence=15/);
  await expect.poll(() => table.getByRole("row").count()).toBeLessThan(before);
  const other = await visit(browser);
  await other.page.goto(page.url());
  expect(await other.page.getByRole("table", { name: "Dips of this sweep" }).getByRole("row").count()).toBe(
    await table.getByRole("row").count(),
  );
  await other.page.goto(sweepPath);
  expect(await other.page.getByRole("table", { name: "Dips of this sweep" }).getByRole("row").count()).toBe(
    before,
  );
  await other.context.close();
  await context.close();
});

test("with the keyboard alone: from the front page to a note on a dip", async () => {
  const { page, context, complaints } = await visit(browser);
  await signIn(page, "dov-heron");
  await page.goto(sweepPath);
  await settled(page);
  await page.keyboard.press("Tab");
  await page.keyboard.press("Enter");
  expect(await page.evaluate(() => document.activeElement?.id)).toBe("main");
  await tabTo(page, () => document.activeElement?.closest(".chart-marks") !== null);
  await page.keyboard.press("Enter");
  await page.waitForURL(/dip=/);
  await page.getByRole("link", { name: "All about this dip" }).waitFor();
  await tabTo(page, () => document.activeElement?.tagName === "TEXTAREA");
  const words = `By keys alone ${Date.now()}`;
  await page.keyboard.type(words);
  await tabTo(page, () => /store/i.test(document.activeElement?.textContent ?? ""));
  await page.keyboard.press("Enter");
  await page.getByText(words).first().waitFor();
  expect(complaints).toEqual([]);
  await context.close();
});

/** Presses Tab until the focus is where it should be; a focus that can't be seen is a fault. */
async function tabTo(page: Page, there: () => boolean): Promise<void> {
  for (let presses = 0; presses < 80; presses++) {
    await page.keyboard.press("Tab");
    if (await page.evaluate(there)) return;
  }
  throw new Error("the keyboard does not get there");
}

test("choosing a dip is answered in sight, on a phone too", async () => {
  for (const viewport of [
    { width: 390, height: 844 },
    { width: 1600, height: 1000 },
  ]) {
    const { page, context } = await visit(browser, { viewport });
    await page.goto(sweepPath);
    await settled(page);
    const card = page.locator(".hollow-card a").first();
    await card.click();
    const thread = page.getByRole("complementary", { name: "Thread of the chosen dip" });
    await thread.waitFor();
    const topOf = async () => (await thread.boundingBox())?.y ?? Number.POSITIVE_INFINITY;
    await expect.poll(topOf).toBeLessThan(viewport.height * 0.7);
    // Closing it leaves the keyboard where it was.
    await thread.getByRole("link", { name: "Close" }).click();
    await thread.waitFor({ state: "detached" });
    expect(await card.evaluate((link) => link === document.activeElement)).toBe(true);
    await context.close();
  }
});

test("the thread beside the chart leaves the cards joined to their dips", async () => {
  const { page, context } = await visit(browser, { viewport: { width: 1600, height: 1000 } });
  await page.goto(sweepPath);
  await settled(page);
  await page.locator(".hollow-card a").first().click();
  await page.getByRole("complementary", { name: "Thread of the chosen dip" }).waitFor();
  expect(await page.locator(".hollow-leaders:visible").count()).toBe(1);
  await context.close();
});
