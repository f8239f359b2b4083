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

/** An unexplained dip from first sight to a verdict settled by two people; and a length planned from its advice. */

let browser: Browser;
let projectPath = "";
let dipPath = "";
const ada = newcomer("ada");
const bram = newcomer("bram");

beforeAll(async () => {
  browser = await launch();
});
afterAll(() => browser.close());

test("Ada describes the antenna, sweeps it and lets Bram in", async () => {
  const newcomers = await visit(browser);
  await signIn(newcomers.page, bram);
  await newcomers.context.close();

  const { page, context, complaints } = await visit(browser);
  await signIn(page, ada);
  projectPath = await newProject(page, "A dip that nobody built", "Public");

  await page.goto(`${projectPath}/settings`);
  await settled(page);
  await page.locator('[name="bands[0].name"]').fill("40 m");
  await page.locator('[name="bands[0].lowMhz"]').fill("7.0");
  await page.locator('[name="bands[0].highMhz"]').fill("7.2");
  await page.getByRole("button", { name: "Keep these bands" }).click();
  await settled(page);

  await page.goto(`${projectPath}/antenna/edit`);
  await settled(page);
  await page.locator('[name="elements[0].kind"]').selectOption("vertical");
  await page.locator('[name="elements[0].name"]').fill("Long element");
  await page.locator('[name="elements[0].length"]').fill("10.21");
  await page.getByRole("button", { name: "Another element" }).click();
  await page.locator('[name="elements[1].kind"]').selectOption("wire");
  await page.locator('[name="elements[1].name"]').fill("Braid to the stake");
  await page.locator('[name="elements[1].length"]').fill("2.76");
  await page.getByRole("button", { name: "Another element" }).click();
  await page.locator('[name="elements[2].kind"]').selectOption("mast");
  await page.locator('[name="elements[2].name"]').fill("Flagpole");
  await page.getByRole("button", { name: "Keep this description" }).click();
  await page.waitForURL(/\/antenna$/);

  await page.goto(`${projectPath}/sweeps/new`);
  await settled(page);
  await page.locator("input[type=file]").setInputFiles([fileOf("as built.csv", sweepText(6.99, 52.2))]);
  await page.getByText(/1 of 1 files? done/).waitFor();

  await page.goto(`${projectPath}/members`);
  await settled(page);
  await page.getByLabel("User name").fill(bram);
  await page.getByLabel("Role").last().selectOption("experimenter");
  await page.getByRole("button", { name: "Add", exact: true }).click();
  await page
    .getByRole("cell", { name: new RegExp(bram) })
    .first()
    .waitFor();
  await context.close();
  expect(complaints).toEqual([]);
});

test("Bram sees it for the first time, and adopts what may be behind it", async () => {
  const { page, context, complaints } = await visit(browser);
  await signIn(page, bram);
  await page.goto(projectPath);
  await page.locator(`a[href*="/dips/"]`, { hasText: /52\.2/ }).first().click();
  await page.waitForURL(/\/dips\/[a-z0-9]{10}$/);
  dipPath = new URL(page.url()).pathname;
  await settled(page);
  await expectAccessible(page);
  const causes = page.getByRole("region", { name: "What it may be" });
  const braid = causes
    .getByRole("listitem")
    .filter({ hasText: /May be Braid to the stake, half wave/ })
    .first();
  // 0.9516 · c / (2 · 2.76 m) = 51.68 MHz.
  expect(await braid.textContent()).toMatch(/= 51\.68\sMHz/);
  expect(await causes.textContent()).toContain("Flagpole (length not said)");
  expect(await causes.textContent()).toContain("What would tell them apart");
  await braid.getByText("with a note").click();
  await braid.getByLabel("Your words on it").fill("It runs free for 2.76 m, and nobody thought of it.");
  await braid.getByRole("button", { name: /Adopt as proposed verdict/ }).click();
  await page
    .getByRole("region", { name: "Verdict" })
    .getByText(/Proposed by/)
    .waitFor();
  const thread = page.getByRole("article", { name: /Note by/ });
  expect(await thread.textContent()).toContain("nobody thought of it");
  expect(await thread.textContent()).toMatch(/On the evidence of.*reckoned: may be Braid to the stake/s);
  await context.close();
  expect(complaints).toEqual([]);
});

test("Ada settles it on evidence, and anyone reads who held what and why", async () => {
  const { page, context, complaints } = await visit(browser);
  await signIn(page, ada);
  await page.goto(dipPath);
  await settled(page);
  const verdict = page.getByRole("region", { name: "Verdict" });
  await verdict.getByText("Answer the proposal").click();
  await verdict.getByLabel("The explanation in a few words").fill("The braid's half wave, up to the stake");
  await verdict.getByText("On what evidence").click();
  await verdict.getByLabel("as built", { exact: true }).check();
  await verdict.getByLabel(/nobody thought of it/).check();
  await expectAccessible(page);
  await verdict.getByRole("button", { name: "Settle it" }).click();
  await verdict.getByText(/Settled by/).waitFor();
  await context.close();
  expect(complaints).toEqual([]);

  for (const options of [
    { viewport: { width: 390, height: 844 }, colorScheme: "dark" as const },
    { viewport: { width: 1600, height: 900 } },
  ]) {
    const reader = await visit(browser, options);
    await reader.page.goto(dipPath);
    await settled(reader.page);
    await expectAccessible(reader.page);
    await expectFits(reader.page);
    const history = reader.page.getByRole("list", { name: "Verdicts so far, newest first" });
    const [last, first] = await history.locator("> li").allTextContents();
    expect(last).toMatch(new RegExp(`settled.*The braid's half wave.*${ada}.*as built`, "s"));
    expect(first).toMatch(new RegExp(`proposed.*May be Braid to the stake.*${bram}.*51\\.68`, "s"));
    expect(await reader.page.getByRole("button", { name: /Adopt/ }).count()).toBe(0);
    expect(reader.complaints).toEqual([]);
    await reader.context.close();
  }
});

test("the advice becomes a planned step with its ghosts on the strip map", async () => {
  const { page, context, complaints } = await visit(browser);
  await signIn(page, ada);
  await page.goto(dipPath);
  await page.getByRole("link", { name: /Lower:/ }).click();
  await page.waitForURL((url) => url.pathname !== dipPath);
  await settled(page);
  const advice = page.getByRole("region", { name: "Where it lies" });
  // 10.21 m × 6.99 / 7.1
  await expect.poll(() => advice.textContent()).toMatch(/Long element: 10\.21\sm → 10\.0[45]\d?\sm/);
  await advice.getByRole("link", { name: "Plan this step" }).first().click();
  await page.waitForURL(/\/steps\/new\?/);
  await settled(page);
  expect(await page.getByRole("radio", { name: "Planned" }).isChecked()).toBe(true);
  await page.getByRole("button", { name: "Keep the step" }).click();
  await page.waitForURL(/\/steps\/[a-z0-9]{10}$/);
  const expected = page.getByRole("region", { name: "What to expect" });
  expect(await expected.textContent()).toMatch(/7\.1\d*\sMHz/);
  await page.goto(projectPath);
  await settled(page);
  expect(await page.locator("g.ghost").count()).toBeGreaterThan(0);
  await context.close();
  expect(complaints).toEqual([]);
});
