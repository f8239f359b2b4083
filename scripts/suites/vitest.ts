import { existsSync, mkdirSync, readFileSync, rmSync } from "node:fs";
import path from "node:path";
import { ROOT } from "../install.mjs";
import { spawnBound } from "../processes.mjs";
import type { Count } from "./checks.ts";
import type { SuiteReport } from "./report.ts";

const SLOWEST_TOLD = 3;

/** Runs one suite and counts; what failed is told again at the end of everything. */
export async function runVitest(name: string, config: string): Promise<Count> {
  console.log(`\nTests: ${name}`);
  const reportFile = path.join(ROOT, ".test", `report-${name}-${process.pid}.json`);
  mkdirSync(path.dirname(reportFile), { recursive: true });
  const code = await run(config, reportFile);
  if (!existsSync(reportFile)) {
    return {
      passed: 0,
      failed: 1,
      told: [`${name}: vitest ended with ${code} before it reported anything.`],
    };
  }
  const report: SuiteReport = JSON.parse(readFileSync(reportFile, "utf8"));
  rmSync(reportFile);
  const slowest = report.files.slice(0, SLOWEST_TOLD);
  console.log(`Longest: ${slowest.map((file) => `${file.name} ${file.seconds.toFixed(0)} s`).join(", ")}`);
  const failed = report.failures.length;
  return {
    passed: report.passed,
    // Vitest may find something wrong that is no test's: no test at all, for instance.
    failed: failed === 0 && code !== 0 ? 1 : failed,
    told: [
      ...report.failures.map(({ name, why }) => `Failed: ${name}\n${why}`),
      ...report.secondTries.map(({ name, why }) => `Passed at the second try only: ${name}\n${why}`),
    ],
  };
}

function run(config: string, reportFile: string): Promise<number> {
  const vitest = path.join(ROOT, "node_modules", "vitest", "vitest.mjs");
  const reporters = ["--reporter=default", `--reporter=${path.join(ROOT, "scripts", "suites", "report.ts")}`];
  const child = spawnBound(process.execPath, [vitest, "run", "--config", config, ...reporters], {
    cwd: ROOT,
    stdio: ["ignore", "inherit", "inherit"],
    env: { ...process.env, NODE_ENV: "test", REPORT_FILE: reportFile },
  });
  return new Promise((resolve) => {
    child.once("error", () => resolve(1));
    child.once("exit", (code) => resolve(code ?? 1));
  });
}
