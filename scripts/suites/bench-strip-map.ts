import { chromium } from "playwright-core";
import { NO_FEEDLINE, reflection } from "../demo/antenna.ts";
import { returnLossFile } from "../demo/files.ts";
import { gaussBy, randomBy } from "../demo/random.ts";
import { BROWSER, findProgram } from "../install.mjs";
import type { BenchRow } from "./bench-row.ts";

const SWEEPS = 100;
const POINTS = 10_001;
const ROUNDS = 15;
const MOST_BYTES = 1_000_000;
/** Ten times as long as a person takes for an answer at once (common practice, no source). */
const MOST_MS = 1000;

/**
 * The strip map of an invented project of 100 sweeps with 10,001 points each, in the server that the environment names:
 * its time on the server, the bytes that the browser takes, and the time until it answers to a person.
 */
export async function benchStripMap(): Promise<BenchRow[]> {
  const url = `${process.env.SWALE_URL}${await makeProject()}`;
  const times: number[] = [];
  for (let round = 0; round < ROUNDS; round++) {
    const started = performance.now();
    const response = await fetch(url);
    await response.arrayBuffer();
    if (round > 2) times.push(performance.now() - started);
  }
  const serverMs = times.sort((a, b) => a - b)[times.length >> 1];
  const { bytes, htmlBytes, interactiveMs } = await inBrowser(url);
  return [
    { name: "strip map of 100 sweeps, server time", value: serverMs, goal: MOST_MS, unit: "ms" },
    { name: "strip map of 100 sweeps, its page unpacked", value: htmlBytes, goal: MOST_BYTES, unit: "bytes" },
    { name: "strip map of 100 sweeps, everything sent", value: bytes, goal: MOST_BYTES, unit: "bytes" },
    {
      name: "strip map of 100 sweeps, until it is interactive",
      value: interactiveMs,
      goal: 2 * MOST_MS,
      unit: "ms",
    },
  ];
}

/** Answers the project's path. */
async function makeProject(): Promise<string> {
  const { createProject } = await import("~/services/projects.server");
  const { takeIn } = await import("~/services/intake.server");
  const people = await import("~/db/people.server");
  const by = { id: await people.insert({ userName: `bench-${Date.now()}`, name: "Bench", email: null }) };
  const project = await createProject(
    { title: "A hundred sweeps (invented)", summary: "", visibility: "public", ituRegion: 1 },
    by.id,
  );
  const random = randomBy("a hundred sweeps");
  const gauss = gaussBy("a hundred sweeps, noise");
  const parts = [3.6, 7.1, 10.8, 18.1, 21.5, 36, 44, 52].map((mhz) => ({
    hz: mhz * 1e6,
    ohm: 30 + 60 * random(),
    q: 10 + 25 * random(),
  }));
  for (let i = 0; i < SWEEPS; i++) {
    for (const part of parts) part.hz *= 1 + 0.004 * (random() - 0.5);
    const gamma = reflection(parts, NO_FEEDLINE, { noise: 0.002, directivity: 0.01 }, gauss);
    const bytes = returnLossFile({ startHz: 1e6, stopHz: 60e6, points: POINTS }, gamma, `sweep ${i}`);
    const takenAt = new Date(Date.UTC(2026, 0, 1 + i));
    const file = { name: `sweep ${i}.csv`, bytes };
    await takeIn({ project, by, file, title: `Sweep number ${i + 1}`, takenAt, keepUnread: false });
  }
  return `/projects/${project.publicId}`;
}

async function inBrowser(url: string) {
  const browser = await chromium.launch({
    executablePath: findProgram(BROWSER),
    args: ["--no-sandbox", "--disable-gpu", "--no-first-run", "--disable-background-networking"],
  });
  try {
    const page = await browser.newPage();
    await page.goto(url, { waitUntil: "commit" });
    // Scripts have taken over when a trail's link knows them.
    const handle = await page.waitForFunction(() => {
      const link = document.querySelector(".trail-way");
      return link && Object.keys(link).some((key) => key.startsWith("__reactProps"))
        ? performance.now()
        : false;
    });
    const interactiveMs = Number(await handle.jsonValue());
    await page.waitForLoadState("networkidle");
    const sizes = await page.evaluate(() => {
      const all = [
        ...performance.getEntriesByType("navigation"),
        ...performance.getEntriesByType("resource"),
      ];
      const entries = all as PerformanceResourceTiming[];
      return {
        bytes: entries.reduce((sum, one) => sum + one.encodedBodySize, 0),
        htmlBytes: entries[0].decodedBodySize,
      };
    });
    return { ...sizes, interactiveMs };
  } finally {
    await browser.close();
  }
}
