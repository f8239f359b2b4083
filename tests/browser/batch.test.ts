import { mkdirSync, mkdtempSync, writeFileSync } from "node:fs";
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
  settled,
  signIn,
  sweepText,
  visit,
} from "./browser.ts";

/** A folder with a table: checked, mended, taken in, and all its dips in one table. */

let browser: Browser;
const ada = newcomer("ada");

beforeAll(async () => {
  browser = await launch();
});
afterAll(() => browser.close());

/** Invented: three sweeps, one of them twice, and a text that is no sweep. */
function makeFolder(): string {
  const folder = mkdtempSync(path.join(tmpdir(), "swale-batch-"));
  mkdirSync(path.join(folder, "wet"));
  writeFileSync(path.join(folder, "wet", "1.csv"), sweepText(7.05));
  writeFileSync(path.join(folder, "wet", "2.csv"), sweepText(7.12, 21));
  writeFileSync(path.join(folder, "wet", "2 again.csv"), sweepText(7.12, 21));
  writeFileSync(path.join(folder, "remarks.txt"), "It rained.\n");
  return folder;
}

const TABLE = [
  "file,title,taken at",
  "1.csv,=First wet night,2026-05-02 20:15",
  "2.csv,Second wet night,3 May",
  "3.csv,Third wet night,2026-05-04",
].join("\n");

test("a folder with a table is checked, mended and taken in; its dips are in the table and its CSV", async () => {
  const { page, context, complaints } = await visit(browser);
  await signIn(page, ada);
  const projectPath = await newProject(page, "Wet nights");

  await page.goto(`${projectPath}/sweeps/batch`);
  await settled(page);
  await expectAccessible(page);
  await page.getByLabel("A folder").setInputFiles(makeFolder());
  await page.getByLabel("The table (CSV)").setInputFiles(fileOf("nights.csv", TABLE));
  await page.getByRole("button", { name: "Send and check" }).click();
  await page.getByRole("heading", { name: "Batch, checked" }).waitFor();
  await settled(page);
  await expectAccessible(page);
  await page.getByText("4 rows to be mended or left out first").waitFor();
  await page.getByText("“3 May” is no date that is read here").waitFor();
  await page.getByText("This is the same file, byte for byte, as “2.csv”.").waitFor();

  // Another visit finds it where it was left.
  await page.reload();
  await settled(page);
  const second = page.getByRole("group", { name: "2.csv", exact: true });
  await second.getByLabel("Taken at").fill("2026-05-03");
  for (const name of [/2 again\.csv/, /remarks\.txt/]) {
    await page.getByRole("group", { name }).getByLabel("Leave out").check();
  }
  await page.getByRole("button", { name: "Keep and check again" }).click();
  await page.getByText("1 row to be mended or left out first").waitFor();
  await settled(page);
  await page.getByLabel("Files", { exact: true }).setInputFiles(fileOf("3.csv", sweepText(7.3)));
  await page.getByRole("button", { name: "Send", exact: true }).click();
  await page.getByRole("button", { name: "Take in 3 sweeps" }).click();
  await page.getByRole("heading", { name: "Batch, taken in" }).waitFor();
  await page.getByText("3 sweeps taken in; 2 left out.").waitFor();
  await settled(page);
  await expectAccessible(page);

  await page.getByRole("link", { name: "See their dips in the table" }).click();
  const table = page.getByRole("table", { name: "Dips of this project" });
  await table.waitFor();
  await settled(page);
  await expectAccessible(page);
  expect(await table.getByRole("row").count()).toBe(1 + 4);
  await page.getByLabel("To", { exact: true }).fill("7,2");
  await page.getByRole("button", { name: "Filter" }).click();
  await page.waitForURL(/to=7/);
  await expect.poll(() => table.getByRole("row").count()).toBe(1 + 2);
  await page.setViewportSize({ width: 390, height: 844 });
  await expectFits(page);

  const [download] = await Promise.all([
    page.waitForEvent("download"),
    page.getByRole("link", { name: "CSV of these 2 dips" }).click(),
  ]);
  const chunks: Buffer[] = [];
  for await (const chunk of await download.createReadStream()) chunks.push(chunk as Buffer);
  const lines = Buffer.concat(chunks).toString().trimEnd().split("\r\n");
  expect(lines).toHaveLength(3);
  expect(lines[0]).toContain("frequency_hz,frequency_uncertainty_hz");
  expect(lines.some((line) => line.includes(",'=First wet night,2026-05-02T20:15:00.000Z,"))).toBe(true);
  expect(complaints).toEqual([]);
  await context.close();
});

test("without scripts the whole form goes at once, and sending it twice makes one batch", async () => {
  const { page, context } = await visit(browser, { javaScriptEnabled: false });
  await signIn(page, ada);
  const projectPath = await newProject(page, "Plain nights");
  await page.goto(`${projectPath}/sweeps/batch`);
  const files = [fileOf("one.csv", sweepText(7)), fileOf("two.csv", sweepText(8))];
  for (let i = 0; i < 2; i++) {
    await page.getByLabel("Files, or a ZIP").setInputFiles(files);
    await page.getByRole("button", { name: "Send and check" }).click();
    await page.waitForURL(/\/batch\/[a-z0-9]{10}$/);
    if (i === 0) await page.goBack();
  }
  await page.getByRole("button", { name: "Take in 2 sweeps" }).click();
  await page.getByRole("heading", { name: "Batch, taken in" }).waitFor();
  await page.goto(`${projectPath}/sweeps`);
  expect(await page.getByRole("table").getByRole("row").count()).toBe(1 + 2);
  await context.close();
});
