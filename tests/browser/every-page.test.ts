import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import { demoSweep, expectAccessible, expectFits, launch, settled, signIn, visit } from "./browser.ts";

/** Every page of the demo at three widths, by axe on a phone in the light and on a wide screen in the dark. */

let browser: Browser;
let sweepPath = "";
let project = "";

beforeAll(async () => {
  browser = await launch();
  sweepPath = await demoSweep(browser);
  project = sweepPath.split("/").slice(0, 3).join("/");
});
afterAll(() => browser.close());

const WIDTHS = [1024, 1600, 390] as const;
const HEIGHT = 900;
/** Enough for a machine that is busy with other suites. */
const SLOW = { timeout: 300_000 };

test("what a visitor reads fits and is accessible", SLOW, async () => {
  const { page, context, complaints } = await visit(browser);
  await page.goto(project);
  const dip = await firstLink(page, `${project}/dips/`);
  const trail = await firstLink(page, `${project}/trails/`);
  await look(page, ["/", "/methods", "/sign-in", "/nothing-here", project, sweepPath, dip, trail]);
  const lists = ["antenna", "steps", "benches", "activity", "sweeps", "cables"];
  await look(
    page,
    lists.map((list) => `${project}/${list}`),
  );
  expect(complaints).toEqual([]);
  await context.close();
});

test("what a member uses fits and is accessible", SLOW, async () => {
  const { page, context, complaints } = await visit(browser);
  await signIn(page, "ada-marsh");
  const own = ["members", "settings", "sweeps/new", "antenna/edit", "steps/new", "benches/new", "follow"];
  await look(
    page,
    own.map((rest) => `${project}/${rest}`),
  );
  await look(page, [`${sweepPath}/reading`, "/projects", "/projects/new", "/inbox", "/search?words=dip"]);
  await look(page, ["/settings", "/settings/sign-in", "/settings/tokens", "/settings/mail"]);
  expect(complaints).toEqual([]);
  await context.close();
});

test("what the administrator uses fits and is accessible", SLOW, async () => {
  const { page, context, complaints } = await visit(browser);
  await signIn(page, "site-keeper");
  await look(page, ["/admin", "/admin/mail", "/admin/reports"]);
  expect(complaints).toEqual([]);
  await context.close();
});

/** Each page once: wide and dark, then narrower, and on a telephone in the light. */
async function look(page: Page, paths: string[]): Promise<void> {
  for (const path of paths) {
    await page.emulateMedia({ colorScheme: "dark" });
    await page.goto(path);
    await settled(page);
    for (const width of WIDTHS) {
      await page.setViewportSize({ width, height: HEIGHT });
      await expectFits(page);
      if (width === 1600) await expectAccessible(page);
    }
    await page.emulateMedia({ colorScheme: "light" });
    await expectAccessible(page);
  }
}

async function firstLink(page: Page, beginning: string): Promise<string> {
  const href = await page.locator(`a[href^="${beginning}"]`).first().getAttribute("href");
  return new URL(href ?? "", page.url()).pathname;
}
