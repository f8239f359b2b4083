import type { Browser, BrowserContext, Page } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import { drawnScreen, PHOTO_CORNERS, PLOT, photographedScreen } from "../drawn-screen.ts";
import {
  expectAccessible,
  expectFits,
  launch,
  newcomer,
  newProject,
  settled,
  signIn,
  visit,
} from "./browser.ts";

/** Pictures of screens: read by themselves, given their axes, straightened, corrected. */

let browser: Browser;
let context: BrowserContext;
let page: Page;
let complaints: string[];
let projectPath: string;

beforeAll(async () => {
  browser = await launch();
  ({ context, page, complaints } = await visit(browser));
  await signIn(page, newcomer("cato"));
  projectPath = await newProject(page, "Screens from the shed");
});
afterAll(async () => {
  await context.close();
  await browser.close();
  expect(complaints).toEqual([]);
});

/** Drops a picture and goes where its result leads. */
async function drop(name: string, buffer: Buffer): Promise<void> {
  await page.goto(`${projectPath}/sweeps/new`);
  await settled(page);
  await page.locator("input[type=file]").setInputFiles([{ name, mimeType: "image/png", buffer }]);
  await page.getByText("1 of 1 file done").waitFor();
  await page.getByRole("list", { name: "Files" }).getByRole("link").click();
  await page.getByRole("heading", { level: 2 }).first().waitFor();
  await settled(page);
}

const firstDip = () => page.getByRole("table", { name: "Dips of this sweep" }).getByRole("row").nth(1);
const reads = () => page.getByRole("region", { name: "What the reading gives" });

async function readItSo(): Promise<void> {
  await page.getByRole("button", { name: "Read it so" }).click();
  await page.waitForURL(/\/sweeps\/[a-z0-9]{10}$/);
  await settled(page);
}

test("a picture reads itself, and the curve is laid over it with one key", async () => {
  await page.goto(`${projectPath}/sweeps/new`);
  await settled(page);
  const buffer = await drawnScreen({ salt: "itself" });
  await page
    .locator("input[type=file]")
    .setInputFiles([{ name: "itself.png", mimeType: "image/png", buffer }]);
  await page.getByRole("list", { name: "Stages of the reading" }).getByText("plot found").waitFor();
  const result = page.getByRole("list", { name: "Files" }).getByRole("listitem");
  await result.getByText(/Read from a picture, half a pixel being 13\skHz; 1 dip found/).waitFor();
  await result.getByRole("link").click();
  await page.getByRole("heading", { name: "itself", level: 2 }).waitFor();
  await settled(page);
  expect(await firstDip().textContent()).toMatch(/^14\.[12]\d*\sMHz/);

  expect(await page.locator('.chart-plot path[opacity="0.25"]').count()).toBe(1);
  const plot = await page.locator(".chart-plot").first().boundingBox();
  const strip = await page.locator(".picture-strip").boundingBox();
  expect(Math.abs((plot?.x ?? 0) - (strip?.x ?? 9))).toBeLessThan(1.5);
  expect(Math.abs((plot?.width ?? 0) - (strip?.width ?? 9))).toBeLessThan(1.5);
  await page.locator("body").press("p");
  await page.getByText("The curve that was read lies over the picture.").waitFor({ state: "attached" });
  expect(await page.locator(".picture-strip polyline").count()).toBe(1);
  await expectAccessible(page);
  await page.getByRole("button", { name: "Take the curve off (p)" }).click();
  expect(await page.locator(".picture-strip polyline").count()).toBe(0);
});

test("a picture without print is given its axes, and undo takes a change back", async () => {
  await drop("bare.png", await drawnScreen({ salt: "axes", bare: true }));
  const left = page.getByLabel("Left line");
  expect(await left.evaluate((field) => field === document.activeElement)).toBe(true);
  await expectAccessible(page);
  await page.setViewportSize({ width: 390, height: 800 });
  await expectFits(page);
  await page.setViewportSize({ width: 1280, height: 900 });
  await left.fill("5");
  await page.getByLabel("Right line").fill("25");
  await page.getByLabel("Top line").fill("0");
  await page.getByLabel("Bottom line").fill("-40");
  await reads()
    .getByText(/14\.[12]\d*\sMHz \(SWR/)
    .waitFor();
  await page.getByLabel("Shows").selectOption("swr");
  await reads()
    .getByText(/14\.[12]\d*\sMHz \(SWR/)
    .waitFor({ state: "detached" });
  await page.getByRole("button", { name: "Undo" }).click();
  await reads()
    .getByText(/14\.[12]\d*\sMHz \(SWR/)
    .waitFor();
  await readItSo();
  expect(await firstDip().textContent()).toMatch(/^14\.[12]\d*\sMHz/);
  await page.getByRole("link", { name: /Read from a picture/ }).click();
  await page.getByText("given by hand").first().waitFor();
});

test("a photograph is straightened by its four corners with the keyboard", async () => {
  await drop("photo.jpg", await photographedScreen({ bare: true, salt: "photo" }));
  await page.getByLabel("The plot is seen").selectOption("angle");
  for (const [i, name] of ["Top left", "Top right", "Bottom right", "Bottom left"].entries()) {
    const handle = page.getByRole("button", { name: `${name} corner` });
    await handle.focus();
    const place = async () => {
      const label = (await handle.getAttribute("aria-label")) ?? "";
      const [, column, row] = /column (-?\d+), row (-?\d+)/.exec(label) ?? [];
      return { x: Number(column), y: Number(row) };
    };
    const from = await place();
    await press("ArrowRight", "ArrowLeft", PHOTO_CORNERS[i].x - from.x);
    await press("ArrowDown", "ArrowUp", PHOTO_CORNERS[i].y - from.y);
    expect(await place()).toEqual(PHOTO_CORNERS[i]);
  }
  await page.getByLabel("Left line").fill("5");
  await page.getByLabel("Right line").fill("25");
  await page.getByLabel("Top line").fill("0");
  await page.getByLabel("Bottom line").fill("-40");
  await reads()
    .getByText(/14\.[12]\d*\sMHz \(SWR/)
    .waitFor();
  await readItSo();
  expect(await firstDip().textContent()).toMatch(/^14\.[12]\d*\sMHz/);
  const picture = page.getByRole("img", { name: "The plot as it was given" });
  await picture.scrollIntoViewIfNeeded();
  await picture.evaluate((image: HTMLImageElement) => image.decode());
  expect(await picture.getAttribute("src")).toContain("?flat");
});

/** So many pixels by the arrow keys: tens with shift, then ones. */
async function press(forward: string, back: string, pixels: number): Promise<void> {
  const key = pixels > 0 ? forward : back;
  const left = Math.abs(pixels);
  for (let i = 0; i < Math.floor(left / 10); i++) await page.keyboard.press(`Shift+${key}`);
  for (let i = 0; i < left % 10; i++) await page.keyboard.press(key);
}

test("a wrong colour is corrected by pressing on the trace", async () => {
  await drop("two.png", await drawnScreen({ salt: "colour", decoy: true }));
  await page.getByText("Which line is the trace is not certain.").waitFor();
  await reads()
    .getByText(/14\.[12]\d*\sMHz \(SWR/)
    .waitFor();
  await settled(page);
  await page.getByRole("button", { name: "Pick the trace" }).click();
  const board = page.locator(".picture-board");
  const box = await board.boundingBox();
  const scale = (box?.width ?? 0) / PLOT.width;
  await board.click({ position: { x: 690.5 * scale, y: DECOY_ROW * scale } });
  await page.waitForFunction(() => {
    const field = document.querySelector<HTMLInputElement>('input[name="traceColor"]');
    return /^#f[0-9a-f]5[0-9a-f]6[0-9a-f]$/.test(field?.value ?? "");
  });
  await reads()
    .getByText(/14\.[12]\d*\sMHz \(SWR/)
    .waitFor({ state: "detached" });
  await readItSo();
  expect(await firstDip().textContent()).not.toMatch(/^14\.[12]/);
});

/** Row of the other trace at 20 MHz. */
const DECOY_ROW = 60.5 + ((20 + 14 * Math.sin(20 / 1.1)) / 40) * 400;
