import type { Browser } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import { benchFile, GOOD_BRIDGE, POOR_BRIDGE, type Standard } from "../bench-files.ts";
import {
  expectAccessible,
  expectFits,
  fileOf,
  launch,
  newcomer,
  newProject,
  settled,
  signIn,
  visit,
} from "./browser.ts";

/** A bench applied to a sweep taken before; the limits appear; a rebuild leaves the sweep as it is. */

let browser: Browser;

beforeAll(async () => {
  browser = await launch();
});
afterAll(() => browser.close());

test("somebody applies a bench to an older sweep, and rebuilds it without changing the sweep", async () => {
  const { page, context, complaints } = await visit(browser);
  await signIn(page, newcomer("ada"));
  const project = await newProject(page, "Vertical on the bank");

  await page.goto(`${project}/sweeps/new`);
  await page.getByTestId("drop-zone").waitFor();
  await page
    .locator("input[type=file]")
    .setInputFiles(fileOf("vertical.csv", benchFile(GOOD_BRIDGE, "antenna")));
  await page.getByRole("link", { name: "vertical", exact: true }).click();
  await page.getByText("As measured: nothing is corrected").first().waitFor();
  const sweep = new URL(page.url()).pathname;

  await page.goto(`${project}/benches/new`);
  const give = (kind: Standard, truth = GOOD_BRIDGE) =>
    page.locator(`input[name=${kind}]`).setInputFiles(fileOf(`${kind}.csv`, benchFile(truth, kind)));
  await page.getByLabel("Name", { exact: true }).fill("Tin bridge");
  await page.getByLabel("As it is from").fill("2026-05-03");
  for (const kind of ["open", "short", "load", "through"] as const) await give(kind);
  await page.getByRole("button", { name: "Write the bench down" }).click();
  await page.waitForURL(/benches\/[a-z0-9]{10}$/);
  const bench = new URL(page.url()).pathname;

  await page.goto(sweep);
  await settled(page);
  await page.getByRole("button", { name: "Say the bench" }).click();
  await page.getByRole("combobox", { name: "Bench" }).selectOption({ label: "Tin bridge" });
  await page.getByRole("button", { name: "Analyse with it" }).click();
  await page.getByText("Corrected with the bench “Tin bridge” as of 3 May 2026").first().waitFor();
  const limits = page
    .locator("table")
    .getByText(/1\.2\d? \(1\.\d+–1\.\d+\)/)
    .first();
  await limits.waitFor();
  const before = await limits.textContent();
  await settled(page);
  await expectAccessible(page);
  await expectFits(page);

  await page.getByRole("link", { name: "As measured" }).click();
  await page.waitForURL(/plane=instrument/);
  await page.getByText("As measured: nothing is corrected").first().waitFor();
  await page.getByRole("link", { name: "Back to" }).click();
  await limits.waitFor();

  await page.goto(`${bench}/rebuild`);
  await page.getByLabel("What was rebuilt, in a line").fill("Another arm");
  await page.getByLabel("As it is from").fill("2026-05-04");
  for (const kind of ["open", "short", "load"] as const) await give(kind, POOR_BRIDGE);
  await page.getByRole("button", { name: "Write the rebuilt bench down" }).click();
  await page.getByText("version 2 of 2").waitFor();

  await page.goto(sweep);
  await page.getByText("now has version 2").waitFor();
  expect(await limits.textContent()).toBe(before);
  await page.getByRole("button", { name: "Analyse anew" }).click();
  await page.getByText("as of 4 May 2026").first().waitFor();
  await limits.waitFor();
  expect(await limits.textContent()).not.toBe(before);
  await context.close();
  expect(complaints).toEqual([]);
});
