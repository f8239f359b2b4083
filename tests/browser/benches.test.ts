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

/** Qualifying a bench from four files, correcting a sweep taken before, and rebuilding the bench. */

let browser: Browser;

beforeAll(async () => {
  browser = await launch();
});
afterAll(() => browser.close());

test("somebody qualifies a bench from four files on a telephone, and rebuilds it", async () => {
  const { page, context, complaints } = await visit(browser, { viewport: { width: 390, height: 844 } });
  await signIn(page, newcomer("ada"));
  await newProject(page, "Bridge in the shed");

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

test("a sweep taken before is corrected with the bench of its day, and a rebuild leaves it alone", async () => {
  const { page, context, complaints } = await visit(browser);
  await signIn(page, newcomer("bram"));
  const project = await newProject(page, "Vertical, before the bench was known");
  await page.goto(`${project}/sweeps/new`);
  await settled(page);
  await page
    .locator("input[type=file]")
    .setInputFiles([fileOf("vertical.csv", benchFile(GOOD_BRIDGE, "antenna"))]);
  await page.getByText("1 of 1 file done").waitFor();
  await page.getByRole("list", { name: "Files" }).getByRole("link").click();
  await page.getByRole("heading", { name: "vertical", level: 2 }).waitFor();
  const sweep = new URL(page.url()).pathname;
  await settled(page);
  await page.getByRole("button", { name: "Title and date" }).click();
  await page.getByLabel(/^Taken/).fill("2026-05-20T12:00");
  await page.getByRole("button", { name: "Keep", exact: true }).click();
  await page.getByText("Title and date kept.").first().waitFor();

  const bench = async (path: string, fields: Record<string, string>, truth: typeof GOOD_BRIDGE) => {
    await page.goto(path);
    await settled(page);
    for (const [label, value] of Object.entries(fields))
      await page.getByLabel(label, { exact: true }).fill(value);
    for (const kind of ["open", "short", "load"] as const) {
      await page.locator(`input[name=${kind}]`).setInputFiles(fileOf(`${kind}.csv`, benchFile(truth, kind)));
    }
    await page.getByRole("button", { name: /bench down$/ }).click();
    await page.waitForURL(/benches\/[a-z0-9]{10}$/);
    return new URL(page.url()).pathname;
  };
  const made = await bench(
    `${project}/benches/new`,
    { Name: "Tin bridge", "As it is from": "2026-05-03" },
    GOOD_BRIDGE,
  );

  await page.goto(sweep);
  await settled(page);
  await page.getByRole("button", { name: "Say the bench" }).click();
  await page.getByLabel("Bench", { exact: true }).selectOption({ label: "Tin bridge" });
  await page.getByRole("button", { name: "Analyse with it" }).click();
  const said = page.getByText(
    /Corrected with the bench “Tin bridge” as of 3 May 2026: 0 dB line from open and short/,
  );
  await said.first().waitFor();
  await settled(page);
  await expectAccessible(page);
  const row = page.getByRole("table", { name: "Dips of this sweep" }).getByRole("row").nth(1);
  const corrected = (await row.textContent()) ?? "";
  // Truth: 60 Ω against 50 Ω, an SWR of 1.2.
  const [, low, high] = /1\.\d+ \((1\.\d+)–(1\.\d+)\)/.exec(corrected) ?? [];
  expect(Number(low), corrected).toBeLessThanOrEqual(1.2);
  expect(Number(high), corrected).toBeGreaterThan(1.2);
  expect(Number(high)).toBeLessThan(1.3);

  await bench(
    `${made}/rebuild`,
    { "What was rebuilt, in a line": "Another arm", "As it is from": "2026-07-01" },
    POOR_BRIDGE,
  );
  await page.getByText("version 2 of 2").waitFor();
  await page.getByRole("link", { name: "vertical" }).click();
  await said.first().waitFor();
  expect(await row.textContent()).toBe(corrected);
  expect(await page.getByRole("button", { name: "Analyse anew" }).count()).toBe(0);
  await context.close();
  expect(complaints).toEqual([]);
});
