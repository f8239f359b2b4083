import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import {
  expectAccessible,
  fileOf,
  launch,
  newcomer,
  newProject,
  settled,
  signIn,
  sweepText,
  type Visitor,
  visit,
} from "./browser.ts";

/** Two people look at one sweep: they hear of one another at once, and neither loses what they type. */

let browser: Browser;
let ada: Visitor;
let bram: Visitor;
let projectPath = "";
let sweepPath = "";
const names = { ada: newcomer("ada"), bram: newcomer("bram") };

beforeAll(async () => {
  browser = await launch();
  ada = await visit(browser);
  bram = await visit(browser);
  for (const { page } of [ada, bram]) page.setDefaultTimeout(60_000);
});
afterAll(() => browser.close());

test("both have the sweep open and see one another", async () => {
  const { page } = ada;
  await signIn(page, names.ada);
  await signIn(bram.page, names.bram);
  projectPath = await newProject(page, "Two at once");
  await page.goto(`${projectPath}/members`);
  await settled(page);
  const add = page.locator("form", { has: page.getByLabel("User name") }).first();
  await add.getByLabel("User name").fill(names.bram);
  await add.getByLabel("Role").selectOption("experimenter");
  await add.getByRole("button").click();
  await page.getByText(`${names.bram} was added`).waitFor();

  await page.goto(`${projectPath}/sweeps/new`);
  await settled(page);
  await page.locator("input[type=file]").setInputFiles([fileOf("as built.csv", sweepText(6.99, 25))]);
  await page.getByText(/1 of 1 files? done/).waitFor();
  await page.goto(`${projectPath}/sweeps`);
  await page.getByRole("link", { name: "as built" }).first().click();
  await page.waitForURL(/\/sweeps\/[a-z0-9]{10}$/);
  sweepPath = new URL(page.url()).pathname;
  await bram.page.goto(sweepPath);
  await page.getByText(`${names.bram} is here`).waitFor();
  await bram.page.getByText(`${names.ada} is here`).waitFor();
});

test("a note comes to whoever looks, moves nothing, and leaves the draft alone", async () => {
  const { page } = ada;
  const field = page.getByLabel("Write a note on the sweep");
  await field.fill("A thought that is not finished");
  const at = await page.evaluate(() => scrollY);
  await writeNote(bram.page, "The choke is warm.");
  const strip = page.getByText(`1 new note, by ${names.bram}`);
  await strip.waitFor();
  expect(await page.evaluate(() => scrollY)).toBe(at);
  expect(await page.getByText("The choke is warm.").count()).toBe(0);
  await expectAccessible(page);

  await page.getByRole("button", { name: "Show" }).click();
  await page.getByText("The choke is warm.").waitFor();
  await strip.waitFor({ state: "detached" });
  expect(await page.evaluate(() => document.activeElement?.textContent)).toContain("The choke is warm.");
  expect(await field.inputValue()).toBe("A thought that is not finished");
  expect(await bram.page.locator(".live-strip").count(), "his own note is no news to him").toBe(0);
});

test("the later of two who change the title sees both and chooses", async () => {
  for (const { page } of [bram, ada]) {
    await page.getByRole("button", { name: "Title and date" }).click();
    await page.getByRole("dialog").getByLabel("Title").waitFor();
  }
  await keepTitle(bram.page, "As built by Bram");
  await bram.page.getByRole("heading", { name: "As built by Bram" }).waitFor();
  await keepTitle(ada.page, "As built by Ada");
  const asked = ada.page.getByRole("dialog");
  await asked.getByText("Somebody else changed this while you did").waitFor();
  expect(await asked.locator("mark").allTextContents()).toEqual(["Ada", "Bram"]);
  await expectAccessible(ada.page);
  await asked.getByRole("radio", { name: /Keep mine/ }).check();
  await asked.getByRole("button", { name: "Keep what is chosen" }).click();
  await ada.page.getByRole("heading", { name: "As built by Ada" }).waitFor();
  await bram.page.getByText("Title, date or bench changed").waitFor();
});

test("whoever is no member any more is told so, and nothing else", async () => {
  await ada.page.goto(`${projectPath}/members`);
  await ada.page.evaluate(
    ([path, userName]) =>
      fetch(path, { method: "POST", body: new URLSearchParams({ intent: "remove", userName }) }),
    [`${projectPath}/members`, names.bram],
  );
  await bram.page.getByText("This page is told nothing more").waitFor();
  expect([...ada.complaints, ...bram.complaints]).toEqual([]);
});

async function writeNote(page: Page, text: string): Promise<void> {
  await page.getByLabel("Write a note on the sweep").fill(text);
  await page.getByRole("button", { name: "Store the note" }).click();
  await page.getByText(text).first().waitFor();
}

async function keepTitle(page: Page, title: string): Promise<void> {
  const dialog = page.getByRole("dialog");
  await dialog.getByLabel("Title").fill(title);
  await dialog.getByRole("button", { name: "Keep", exact: true }).click();
}
