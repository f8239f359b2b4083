import type { Browser, Page } from "playwright-core";
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

/** An element is shortened: planned, done, and seen in the sweeps beside it. */

let browser: Browser;
let projectPath = "";
let stepPath = "";
const ada = newcomer("ada");

beforeAll(async () => {
  browser = await launch();
});
afterAll(() => browser.close());

test("the antenna is described, in feet and in metres", async () => {
  const { page, context, complaints } = await visit(browser);
  await signIn(page, ada);
  projectPath = await newProject(page, "Pole on the dike", "Public");

  await page.goto(`${projectPath}/sweeps/new`);
  await settled(page);
  await page.locator("input[type=file]").setInputFiles([fileOf("as built.csv", sweepText(6.99, 25))]);
  await page.getByText(/1 of 1 files? done/).waitFor();

  await dateSweep(page, "as built", "2026-05-01T12:00");

  await page.goto(`${projectPath}/antenna`);
  await page.getByRole("link", { name: "Describe the antenna" }).click();
  await settled(page);
  await expectAccessible(page);
  const first = page.locator('[name="elements[0].kind"]');
  await first.selectOption("vertical");
  await page.locator('[name="elements[0].name"]').fill("Dike pole");
  await page.locator('[name="elements[0].length"]').fill("33 ft 6 in");
  await page.getByRole("button", { name: "Another element" }).click();
  await page.locator('[name="elements[1].kind"]').selectOption("mast");
  await page.locator('[name="elements[1].name"]').fill("Flagpole");
  await page.getByRole("button", { name: "Keep this description" }).click();
  await page.waitForURL(/\/antenna$/);
  await settled(page);
  await expectAccessible(page);
  const row = page.getByRole("table", { name: "Elements" }).getByRole("row", { name: /Dike pole/ });
  expect(await row.textContent()).toMatch(/10\.211\sm/);
  await page.getByText("Dashed: its length is not said.").waitFor();
  await context.close();
  expect(complaints).toEqual([]);
});

test("a step is planned with what to expect, then done, and changes the antenna", async () => {
  const { page, context, complaints } = await visit(browser);
  await signIn(page, ada);
  await page.goto(`${projectPath}/steps`);
  await page.getByRole("link", { name: "Write the first step down" }).click();
  await settled(page);
  await page.getByLabel("What was changed").fill("Shorten the pole");
  await page.getByLabel("Of the antenna").selectOption({ label: "Dike pole, length (10.211\u2009m)" });
  await page.getByLabel("To", { exact: true }).fill("10.00");
  await page.getByRole("radio", { name: "Planned" }).check();
  await page.getByLabel("When").fill("");
  await page.getByRole("button", { name: "Keep the step" }).click();
  await page.waitForURL(/\/steps\/[a-z0-9]{10}$/);
  stepPath = new URL(page.url()).pathname;
  await settled(page);
  await expectAccessible(page);
  const expected = page.getByRole("region", { name: "What to expect" });
  expect(await expected.textContent()).toMatch(/7\.1\d*\sMHz/);

  await page.getByLabel("Done at").fill("2026-05-05T12:00");
  await page.getByRole("button", { name: "Mark it done" }).click();
  await page.getByText("No sweep was taken after it yet").first().waitFor();
  await page.getByRole("link", { name: "antenna as it was then" }).click();
  await page.waitForURL(/\/antenna\?on=/);
  const row = page.getByRole("table", { name: "Elements" }).getByRole("row", { name: /Dike pole/ });
  expect(await row.textContent()).toMatch(/10\sm/);
  await page.getByRole("link", { name: "Shorten the pole" }).waitFor();
  await context.close();
  expect(complaints).toEqual([]);
});

test("the sweep that comes shows what moved, and anyone can read it on a phone", async () => {
  const { page, context } = await visit(browser);
  await signIn(page, ada);
  await page.goto(`${projectPath}/sweeps/new`);
  await settled(page);
  await page.locator("input[type=file]").setInputFiles([fileOf("shortened.csv", sweepText(7.137, 25))]);
  await page.getByText(/1 of 1 files? done/).waitFor();
  await dateSweep(page, "shortened", "2026-05-10T12:00");
  await context.close();

  for (const options of [
    { viewport: { width: 390, height: 844 }, colorScheme: "dark" as const },
    { viewport: { width: 1600, height: 900 } },
  ]) {
    const reader = await visit(browser, options);
    await reader.page.goto(stepPath);
    await settled(reader.page);
    await expectAccessible(reader.page);
    await expectFits(reader.page);
    const movements = reader.page.getByRole("table", { name: "Movements of the dips" }).getByRole("row");
    expect(await movements.nth(1).textContent()).toMatch(/moved \+14\d(\.\d)?\skHz ± /);
    expect(await movements.nth(2).textContent()).toContain("did not move beyond its limits");
    await reader.page.getByText("Met: it came at").waitFor();
    for (const path of [`${projectPath}/antenna`, `${projectPath}/steps`]) {
      await reader.page.goto(path);
      await settled(reader.page);
      await expectAccessible(reader.page);
      await expectFits(reader.page);
    }
    expect(reader.complaints).toEqual([]);
    await reader.context.close();
  }
});

/** Says when a sweep that was just taken in was taken. */
async function dateSweep(page: Page, title: string, at: string): Promise<void> {
  await page.getByRole("list", { name: "Files" }).getByRole("link").first().click();
  await page.getByRole("heading", { name: title, level: 2 }).waitFor();
  await settled(page);
  await page.getByRole("button", { name: "Title and date" }).click();
  await page.getByLabel("Taken at").fill(at);
  await page.getByRole("button", { name: "Keep", exact: true }).click();
  await page.getByText("Title and date kept.").waitFor();
}
