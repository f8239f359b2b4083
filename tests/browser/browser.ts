import axe from "axe-core";
import {
  type Browser,
  type BrowserContext,
  type BrowserContextOptions,
  chromium,
  type Page,
} from "playwright-core";
import { expect } from "vitest";
import { BROWSER, findProgram } from "../../scripts/install.mjs";

/** A real Chromium against the running server, with what every journey needs. */

export const SERVER = process.env.SWALE_URL ?? "";

const FLAGS = [
  "--no-sandbox",
  "--disable-gpu",
  "--disable-quic",
  "--no-first-run",
  "--disable-background-networking",
  "--disable-component-update",
  "--disable-sync",
];

const ACCESSIBILITY = ["wcag2a", "wcag2aa", "wcag21aa", "wcag22aa"];

export function launch(): Promise<Browser> {
  return chromium.launch({ executablePath: process.env.CHROMIUM ?? findProgram(BROWSER), args: FLAGS });
}

export interface Visitor {
  context: BrowserContext;
  page: Page;
  /** What the page complained of: script errors and console errors. Empty at the end of a good journey. */
  complaints: string[];
}

/** A fresh browser profile with one page. Missing pages and refusals are told by their status, not as complaints. */
export async function visit(browser: Browser, options: BrowserContextOptions = {}): Promise<Visitor> {
  const context = await browser.newContext({
    baseURL: SERVER,
    viewport: { width: 1280, height: 900 },
    // What moves in is drawn many times over, and there is no other processor for that.
    reducedMotion: "reduce",
    ...options,
  });
  const page = await context.newPage();
  page.setDefaultTimeout(45_000);
  const complaints: string[] = [];
  page.on("pageerror", (error) => complaints.push(error.message));
  page.on("console", (message) => {
    const own = message.location().url.startsWith(SERVER);
    const status = /status of 4\d\d/.test(message.text());
    if (own && message.type() === "error" && !status) complaints.push(message.text());
  });
  return { context, page, complaints };
}

/** Signs in through the stand-in, as a newcomer or as somebody it knows. */
export async function signIn(page: Page, login: string): Promise<void> {
  await page.goto("/sign-in");
  await page.getByRole("button", { name: "Sign in with" }).click();
  const known = page.getByRole("button", { name: `(${login})` });
  if ((await known.count()) > 0) await known.click();
  else {
    await page.getByLabel("User name").fill(login);
    await page.getByLabel("Name", { exact: true }).fill(login);
    await page.getByLabel("E-mail").fill(`${login}@fennmarsh.example`);
    await page.getByRole("button", { name: "Sign in as this person" }).click();
  }
  await page.waitForURL(`${SERVER}/**`);
}

/** Makes a project of whoever is signed in; answers its path, and is on its page. */
export async function newProject(
  page: Page,
  title: string,
  visibility?: "Private" | "Public",
): Promise<string> {
  await page.goto("/projects/new");
  await page.getByLabel("Title").fill(title);
  if (visibility) await page.getByRole("radio", { name: visibility }).check();
  await page.getByRole("button", { name: "Make the project" }).click();
  await page.waitForURL(/\/projects\/[a-z0-9]{10}$/);
  return new URL(page.url()).pathname;
}

/** The path of the sweep with phase that ends the demo's story. */
export async function demoSweep(browser: Browser): Promise<string> {
  const { page, context } = await visit(browser);
  await page.goto("/");
  await page.getByRole("link", { name: "The vertical on the reed bank" }).click();
  await page.getByRole("link", { name: "As it stays", exact: true }).first().click();
  await page.waitForURL(/\/sweeps\/[a-z0-9]{10}$/);
  const { pathname } = new URL(page.url());
  await context.close();
  return pathname;
}

/** A login nobody has yet. */
export function newcomer(name: string): string {
  return `${name}-${Math.random().toString(36).slice(2, 8)}`;
}

/** Waits until the page's scripts have taken over: only then do its forms answer without a reload. */
export async function settled(page: Page): Promise<void> {
  await page.waitForLoadState("networkidle");
  await page.waitForFunction(() => {
    const main = document.querySelector("main");
    return !main || Object.keys(main).some((key) => key.startsWith("__reactProps"));
  });
}

/** Nothing serious by axe; the rules' names are in the message otherwise. */
export async function expectAccessible(page: Page): Promise<void> {
  // What is on its way in is half transparent, and so has no contrast yet.
  await page.evaluate(() =>
    Promise.race([
      Promise.allSettled(document.getAnimations().map(({ finished }) => finished)),
      new Promise((done) => setTimeout(done, 1000)),
    ]),
  );
  // Straight from the page: the library's own way in runs it several times over. We have no frames.
  if (!(await page.evaluate(() => "axe" in window))) await page.evaluate(axe.source);
  const violations = await page.evaluate(async (tags) => {
    const { run } = (window as unknown as { axe: typeof import("axe-core") }).axe;
    const results = await run(document, { resultTypes: ["violations"], preload: false, runOnly: tags });
    return results.violations.map(({ id, impact, nodes }) => ({
      id,
      impact,
      nodes: nodes.map(({ target }) => target.join(" ")),
    }));
  }, ACCESSIBILITY);
  const serious = violations
    .filter(({ impact }) => impact === "serious" || impact === "critical")
    .map(({ id, nodes }) => `${id}: ${nodes.join(", ")}`);
  expect(serious, page.url()).toEqual([]);
}

/** Nothing sticks out of the page sideways. */
export async function expectFits(page: Page): Promise<void> {
  const over = await page.evaluate(
    () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
  );
  expect(over, `${page.url()} sticks out`).toBeLessThanOrEqual(0);
}

/** Invented: S11 in dB over 1 to 60 MHz with a dip at each frequency given. */
export function sweepText(...dipsMHz: number[]): string {
  const lines = ["Frequency (MHz),S11 (dB)"];
  for (let i = 0; i <= 800; i++) {
    const mhz = 1 + (59 * i) / 800;
    const db = dipsMHz.reduce((sum, at) => sum - 19 / (1 + (24 * (mhz / at - at / mhz)) ** 2), -0.3);
    lines.push(`${mhz.toFixed(5)},${db.toFixed(4)}`);
  }
  return lines.join("\n");
}

export function fileOf(name: string, text: string) {
  return { name, mimeType: "text/csv", buffer: Buffer.from(text) };
}
