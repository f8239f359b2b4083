import type { Browser } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import { benchFile, GOOD_BRIDGE, POOR_BRIDGE, type Standard } from "../bench-files.ts";
import { expectAccessible, expectFits, fileOf, launch, newcomer, settled, signIn, visit } from "./browser.ts";

/** Qualifying a bench from four files, and rebuilding it. */

let browser: Browser;

beforeAll(async () => {
  browser = await launch();
});
afterAll(() => browser.close());

test("somebody qualifies a bench from four files on a telephone, and rebuilds it", async () => {
  const { page, context, complaints } = await visit(browser, { viewport: { width: 390, height: 844 } });
  await signIn(page, newcomer("ada"));
  await page.goto("/projects/new");
  await page.getByLabel("Title").fill("Bridge in the shed");
  await page.getByRole("button", { name: /project/i }).click();
  await page.waitForURL(/\/projects\/[a-z0-9]{10}$/);

  await page.getByRole("navigation", { name: "Project" }).getByRole("link", { name: "Benches" }).click();
  await page.getByRole("link", { name: "Write the first bench down" }).click();
  await page.waitForURL(/benches\/new$/);
  await settled(page);
  await expectAccessible(page);
  await expectFits(page);
  const give = async (kind: Standard, truth = GOOD_BRIDGE) =>
    page.locator(`input[name=${kind}]`).setInputFiles(fileOf(`${kind}.csv`, benchFile(truth, kind)));
  await page.getByLabel("Name", { exact: true }).fill("Tin bridge");
  await page.getByLabel("As it is from").fill("2026-05-03");
  for (const kind of ["open", "short", "load", "through"] as const) await give(kind);
  await page.getByRole("button", { name: "Write the bench down" }).click();
  await page.waitForURL(/benches\/[a-z0-9]{10}$/);
  await page.getByText("Read: the open, short, load and through.").first().waitFor();
  await page.getByText(/An SWR of 1\.5 is known to ±0\.1 from/).waitFor();
  await settled(page);
  await expectAccessible(page);
  await expectFits(page);

  await page.getByLabel("An SWR of").fill("1.1");
  await page.getByLabel("known to ±").fill("0.01");
  await page.getByRole("button", { name: "Where?" }).click();
  await page.getByText(/An SWR of 1\.1 is known to ±0\.01/).waitFor();
  expect(new URL(page.url()).search).toBe("?swr=1.1&tolerance=0.01");

  await page.getByRole("link", { name: "Rebuilt?" }).click();
  await page.getByLabel("What was rebuilt, in a line").fill("Another arm");
  await page.getByLabel("As it is from").fill("2026-07-01");
  for (const kind of ["open", "short", "load"] as const) await give(kind, POOR_BRIDGE);
  await page.getByRole("button", { name: "Write the rebuilt bench down" }).click();
  await page.getByText("version 2 of 2").waitFor();
  await page.getByRole("link", { name: "Compare with version 2" }).click();
  await page.getByText(/The directivity is \d+\.\d dB worse/).waitFor();
  await settled(page);
  await expectAccessible(page);
  await expectFits(page);
  await context.close();
  expect(complaints).toEqual([]);
});
