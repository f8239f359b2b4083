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

/** The main job from end to end, by several people. */

let browser: Browser;
let projectPath = "";
let dipPath = "";
const ada = newcomer("ada");
const bram = newcomer("bram");

beforeAll(async () => {
  browser = await launch();
});
afterAll(() => browser.close());

test("somebody new signs in, makes a project, drops three files and reads a dip", async () => {
  const { page, context, complaints } = await visit(browser);
  await signIn(page, ada);
  projectPath = await newProject(page, "Dipole over the ditch");

  await page.goto(`${projectPath}/sweeps/new`);
  await settled(page);
  await expectAccessible(page);
  await page
    .locator("input[type=file]")
    .setInputFiles([
      fileOf("first.csv", sweepText(7.1, 21.3)),
      fileOf("second.csv", sweepText(7.15, 21.4)),
      fileOf("broken.csv", "dear diary\nno numbers at all today\n"),
    ]);
  const results = page.getByRole("list", { name: "Files" }).getByRole("listitem");
  await page.getByText("3 of 3 files done").waitFor();
  expect(await results.count()).toBe(3);
  expect(await results.nth(0).textContent()).toContain("2 dips");
  expect(await results.nth(2).textContent()).toMatch(/expected/);

  await page.locator("input[type=file]").setInputFiles([fileOf("again.csv", sweepText(7.1, 21.3))]);
  await page.getByText("4 of 4 files done").waitFor();
  expect(await results.nth(3).textContent()).toContain("already here");

  await results.nth(0).getByRole("link").click();
  await page.getByRole("heading", { name: "first", level: 2 }).waitFor();
  await settled(page);
  await expectAccessible(page);
  const row = page.getByRole("table", { name: "Dips of this sweep" }).getByRole("row").nth(1);
  expect(await row.textContent()).toMatch(/^7\.(09|1)\d*\sMHz/);

  await row.getByRole("link").click();
  await page.getByRole("link", { name: "All about this dip" }).click();
  await page.waitForURL(/\/dips\/[a-z0-9]{10}$/);
  dipPath = new URL(page.url()).pathname;
  await settled(page);
  await expectAccessible(page);

  await page.getByRole("textbox", { name: /note/i }).fill("The long wire, **surely**.");
  await page.getByRole("button", { name: "Store the note" }).click();
  await page.locator("strong", { hasText: "surely" }).waitFor();
  expect(new URL(page.url()).pathname).toBe(dipPath);

  await page.goto(`${projectPath}/members`);
  await settled(page);
  await expectAccessible(page);
  await context.close();
  expect(complaints).toEqual([]);
});

test("the broken file says what was expected, and its original can be had", async () => {
  const { page, context } = await visit(browser);
  await signIn(page, ada);
  await page.goto(`${projectPath}/sweeps`);
  await page.getByRole("link", { name: "broken" }).first().click();
  await page.waitForURL(/\/reading$/);
  await settled(page);
  expect(await page.getByRole("alert").first().textContent()).toContain("expected");
  const [download] = await Promise.all([
    page.waitForEvent("download"),
    page.getByRole("link", { name: "broken.csv" }).click(),
  ]);
  expect(download.suggestedFilename()).toBe("broken.csv");
  await context.close();
});

test("a second person is added, answers the note without a reload, and settles the dip", async () => {
  const second = await visit(browser);
  await signIn(second.page, bram);
  const refused = await second.page.goto(projectPath);
  expect(refused?.status(), "a stranger is refused").toBe(404);

  const owner = await visit(browser);
  await signIn(owner.page, ada);
  await owner.page.goto(`${projectPath}/members`);
  await settled(owner.page);
  await owner.page.getByLabel("User name").fill(bram);
  await owner.page.getByLabel("Role").last().selectOption("experimenter");
  await owner.page.getByRole("button", { name: "Add" }).click();
  await owner.page.getByRole("row", { name: new RegExp(bram) }).waitFor();

  await second.page.goto(dipPath);
  await settled(second.page);
  await second.page
    .locator("summary", { hasText: /^Answer/ })
    .first()
    .click();
  await second.page
    .getByRole("textbox", { name: /answer/i })
    .first()
    .fill("It is: twice the length of the ditch.");
  await second.page
    .getByRole("button", { name: /store the (answer|note)/i })
    .first()
    .click();
  await second.page.getByText("twice the length of the ditch").last().waitFor();
  expect(new URL(second.page.url()).pathname).toBe(dipPath);

  await second.page.locator("summary", { hasText: /^Explain it/ }).click();
  await second.page.getByLabel("The explanation in a few words").fill("the long wire's own half wave");
  await second.page.getByRole("button", { name: "Settle it" }).click();
  await second.page.locator(".prose-note, p", { hasText: "the long wire's own half wave" }).first().waitFor();

  await owner.page.goto(dipPath);
  await owner.page.getByText("twice the length of the ditch").first().waitFor();
  expect(await owner.page.locator(".tag", { hasText: "settled" }).first().isVisible()).toBe(true);
  await owner.context.close();
  expect(second.complaints).toEqual([]);
  await second.context.close();
});

test("published, it is read by somebody without an account, on a phone, in the dark", async () => {
  const owner = await visit(browser);
  await signIn(owner.page, ada);
  await owner.page.goto(`${projectPath}/settings`);
  await settled(owner.page);
  await expectAccessible(owner.page);
  await owner.page.getByRole("radio", { name: "Public" }).check();
  await owner.page.getByRole("button", { name: "Keep this", exact: true }).click();
  await owner.page.getByText("public", { exact: true }).first().waitFor();
  await owner.context.close();

  const reader = await visit(browser, { viewport: { width: 390, height: 844 }, colorScheme: "dark" });
  for (const path of ["/", projectPath, `${projectPath}/sweeps`, dipPath]) {
    expect((await reader.page.goto(path))?.status(), path).toBe(200);
    await settled(reader.page);
    await expectAccessible(reader.page);
    await expectFits(reader.page);
  }
  expect(await reader.page.getByRole("button", { name: "Store the note" }).count()).toBe(0);
  const refused = await reader.page.request.post(`${projectPath}/notes`, { form: { body: "not mine" } });
  expect(refused.status()).toBe(403);
  expect(reader.complaints).toEqual([]);
  await reader.context.close();
});
