import { readdirSync, readFileSync } from "node:fs";
import path from "node:path";
import mysql, { type RowDataPacket } from "mysql2/promise";
import { chromium } from "playwright-core";
import { BROWSER, findProgram, ROOT } from "../install.mjs";
import { PlainFailure } from "../steps.mjs";
import { benchPlates } from "./bench-plates.ts";
import type { BenchRow } from "./bench-row.ts";
import { benchStripMap } from "./bench-strip-map.ts";
import { startTestStack } from "./test-stack.ts";

const WARM_UP = 60;
const ROUNDS = 200;
const PAGE_GOAL = 3;
/** A page with the frame of every page and nothing asked of the database. */
const EMPTY_PAGE = "/sign-in";

/** The demo's largest public sweep page against an empty page, and what the browser loads before it paints. */
export async function benchServer(): Promise<BenchRow[]> {
  const stack = await startTestStack({});
  try {
    const sweepPage = await largestPublicSweep(stack.settings.environment.DATABASE_URL ?? "");
    const [sweepMs, emptyMs] = await mediansOf([stack.address + sweepPage, stack.address + EMPTY_PAGE]);
    const bytes = await plotlyBytesBeforePaint(stack.address + sweepPage);
    return [
      {
        name: "sweep page, server time against an empty page",
        value: sweepMs / emptyMs,
        goal: PAGE_GOAL,
        unit: "×",
      },
      { name: "sweep page, Plotly loaded before the first paint", value: bytes, goal: 0, unit: "bytes" },
      ...(await benchStripMap()),
      ...(await benchPlates(stack.address, stack.settings.environment)),
    ];
  } finally {
    await stack.stop();
  }
}

async function largestPublicSweep(databaseUrl: string): Promise<string> {
  const connection = await mysql.createConnection({ uri: databaseUrl });
  const [rows] = await connection.query<RowDataPacket[]>(
    `select p.public_id as project, s.public_id as sweep from sweeps s join projects p on p.id = s.project_id
     where p.visibility = 'public' order by s.point_count desc limit 1`,
  );
  await connection.end();
  if (rows.length === 0) throw new PlainFailure("The demo has no public sweep to measure with.");
  return `/projects/${rows[0].project}/sweeps/${rows[0].sweep}`;
}

/** The addresses in turn, one request at a time, so that whatever else the machine does touches all alike. */
async function mediansOf(urls: string[]): Promise<number[]> {
  const times: number[][] = urls.map(() => []);
  for (let round = -WARM_UP; round < ROUNDS; round++) {
    for (const [i, url] of urls.entries()) {
      const started = performance.now();
      const response = await fetch(url);
      await response.arrayBuffer();
      if (!response.ok) throw new PlainFailure(`${url} answered ${response.status}.`);
      if (round >= 0) times[i].push(performance.now() - started);
    }
  }
  return times.map((list) => list.sort((a, b) => a - b)[Math.floor(list.length / 2)]);
}

async function plotlyBytesBeforePaint(url: string): Promise<number> {
  const files = plotlyFiles();
  const browser = await chromium.launch({
    executablePath: findProgram(BROWSER),
    args: [
      "--no-sandbox",
      "--disable-gpu",
      "--disable-quic",
      "--no-first-run",
      "--disable-background-networking",
    ],
  });
  try {
    const page = await browser.newPage();
    await page.goto(url, { waitUntil: "load" });
    const entries = await page.evaluate(async () => {
      const paint = await new Promise<number>((resolve) => {
        new PerformanceObserver((list) => resolve(list.getEntries()[0].startTime)).observe({
          type: "paint",
          buffered: true,
        });
      });
      const loaded = performance.getEntriesByType("resource") as PerformanceResourceTiming[];
      return loaded
        .filter((entry) => entry.responseStart < paint)
        .map((entry) => ({ name: entry.name, bytes: entry.encodedBodySize }));
    });
    const early = entries.filter((entry) => files.some((file) => entry.name.endsWith(file)));
    return early.reduce((sum, entry) => sum + entry.bytes, 0);
  } finally {
    await browser.close();
  }
}

/** The built files that hold Plotly, told by a class name of its own. */
function plotlyFiles(): string[] {
  const folder = path.join(ROOT, "build", "client", "assets");
  const scripts = readdirSync(folder).filter((name) => name.endsWith(".js"));
  const found = scripts.filter((name) =>
    readFileSync(path.join(folder, name), "utf8").includes("modebar-btn"),
  );
  if (found.length === 0) throw new PlainFailure("No built file holds Plotly, so nothing was measured.");
  return found;
}
