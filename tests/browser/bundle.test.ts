import { readFileSync, writeFileSync } from "node:fs";
import { mkdtemp } from "node:fs/promises";
import { tmpdir } from "node:os";
import path from "node:path";
import type { Browser } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import {
  expectAccessible,
  expectFits,
  fileOf,
  launch,
  newcomer,
  newProject,
  SERVER,
  settled,
  signIn,
  sweepText,
  visit,
} from "./browser.ts";

/** A project is taken along as one file, looked at from disk, and taken in by somebody else. */

let browser: Browser;
let folder = "";
let zip = "";
const ada = newcomer("ada");

beforeAll(async () => {
  browser = await launch();
  folder = await mkdtemp(path.join(tmpdir(), "bundle-journey-"));
});
afterAll(() => browser.close());

test("an owner makes a bundle and downloads it, also in pieces", async () => {
  const { page, context, complaints } = await visit(browser);
  await signIn(page, ada);
  const project = await newProject(page, "Pole to take along");
  await page.goto(`${project}/sweeps/new`);
  await settled(page);
  await page.locator("input[type=file]").setInputFiles([fileOf("as built.csv", sweepText(6.99, 25))]);
  await page.getByText(/1 of 1 files? done/).waitFor();
  await page.goto(`${project}/settings`);
  await settled(page);
  await page.getByRole("link", { name: "The whole project as one file" }).click();
  await page.getByRole("heading", { name: "The whole project as one file" }).waitFor();
  await settled(page);
  await expectAccessible(page);
  await page.getByRole("button", { name: "Make a bundle" }).click();
  // It comes by itself: the page looks again.
  const link = page.getByRole("link", { name: "Download" });
  await link.waitFor({ timeout: 60_000 });
  await expectAccessible(page);
  await expectFits(page);
  const [download] = await Promise.all([page.waitForEvent("download"), link.click()]);
  expect(download.suggestedFilename()).toMatch(/^swale-pole-to-take-along-\d{4}-\d\d-\d\d\.zip$/);
  zip = path.join(folder, "b.zip");
  await download.saveAs(zip);
  const address = `${SERVER}${await link.getAttribute("href")}`;
  const whole = readFileSync(zip);
  const part = await page.request.get(address, { headers: { Range: "bytes=100-199" } });
  expect(part.status()).toBe(206);
  expect((await part.body()).equals(whole.subarray(100, 200))).toBe(true);
  const etag = part.headers().etag;
  expect((await page.request.get(address, { headers: { "If-None-Match": etag } })).status()).toBe(304);
  expect((await page.request.get(address, { headers: { Range: "bytes=999999999-" } })).status()).toBe(416);
  await context.close();
  expect(complaints).toEqual([]);
});

test("somebody else takes it in, and is told why another file is not taken", async () => {
  const { page, context, complaints } = await visit(browser, { viewport: { width: 390, height: 800 } });
  await signIn(page, newcomer("bram"));
  await page.goto("/projects");
  await settled(page);
  const way = await page.getByRole("link", { name: "bundle" }).getAttribute("href");
  await page.goto(way ?? "");
  await settled(page);
  await expectAccessible(page);
  await page.getByLabel("The bundle's ZIP").setInputFiles(zip);
  await page.getByRole("button", { name: "Send and check" }).click();
  await page.getByText("Taken in:").waitFor({ timeout: 60_000 });
  const damaged = path.join(folder, "damaged.zip");
  writeFileSync(damaged, readFileSync(zip).subarray(0, 2000));
  await settled(page);
  await page.getByLabel("The bundle's ZIP").setInputFiles(damaged);
  await page.getByRole("button", { name: "Send and check" }).click();
  await page.getByText("It was not taken in. Nothing was written.").waitFor({ timeout: 60_000 });
  await page.getByText(/not a ZIP file, or it is cut short/).waitFor();
  await expectAccessible(page);
  await expectFits(page);
  await page.getByRole("link", { name: "Pole to take along" }).click();
  await page.getByRole("heading", { name: "Pole to take along" }).waitFor();
  await page.getByText("you: owner").waitFor();
  await page.getByRole("link", { name: "as built" }).first().waitFor();
  await context.close();
  expect(complaints).toEqual([]);
});

test("a person takes all their data along", async () => {
  const { page, context, complaints } = await visit(browser);
  await signIn(page, ada);
  await page.goto("/settings/close");
  await settled(page);
  await page.getByRole("link", { name: "Take all your data along" }).click();
  await page.getByRole("heading", { name: "All my data" }).waitFor();
  await settled(page);
  await page.getByRole("button", { name: "Put it together" }).click();
  await page.getByRole("link", { name: "Download" }).waitFor({ timeout: 60_000 });
  await expectAccessible(page);
  await context.close();
  expect(complaints).toEqual([]);
});
