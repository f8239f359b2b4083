import { existsSync, mkdirSync, readFileSync, rmSync } from "node:fs";
import path from "node:path";
import { ROOT } from "../install.mjs";
import { spawnBound } from "../processes.mjs";
import type { Count } from "./checks.ts";

interface Report {
  numPassedTests: number;
  numFailedTests: number;
  numPendingTests: number;
  numTodoTests: number;
  testResults: { status: string; assertionResults: unknown[] }[];
}

/** Runs one suite and counts. A file that does not load and a test that is skipped count as failed. */
export async function runVitest(name: string, config: string): Promise<Count> {
  console.log(`\nTests: ${name}`);
  const reportFile = path.join(ROOT, ".test", `report-${name}-${process.pid}.json`);
  mkdirSync(path.dirname(reportFile), { recursive: true });
  const code = await run(config, reportFile);
  if (!existsSync(reportFile)) return { passed: 0, failed: 1 };
  const report: Report = JSON.parse(readFileSync(reportFile, "utf8"));
  rmSync(reportFile);
  const broken = report.testResults.filter(
    (file) => file.status === "failed" && file.assertionResults.length === 0,
  );
  const skipped = report.numPendingTests + report.numTodoTests;
  if (skipped > 0) console.log(`${skipped} tests did not run, which counts as failed.`);
  const failed = report.numFailedTests + broken.length + skipped;
  // An error outside every test, or no test at all.
  return { passed: report.numPassedTests, failed: failed === 0 && code !== 0 ? 1 : failed };
}

function run(config: string, reportFile: string): Promise<number> {
  const vitest = path.join(ROOT, "node_modules", "vitest", "vitest.mjs");
  const reporters = ["--reporter=default", "--reporter=json", `--outputFile.json=${reportFile}`];
  const child = spawnBound(process.execPath, [vitest, "run", "--config", config, ...reporters], {
    cwd: ROOT,
    stdio: ["ignore", "inherit", "inherit"],
    env: { ...process.env, NODE_ENV: "test" },
  });
  return new Promise((resolve) => {
    child.once("error", () => resolve(1));
    child.once("exit", (code) => resolve(code ?? 1));
  });
}
