import { writeFileSync } from "node:fs";
import type { Reporter, SerializedError, TestCase, TestModule } from "vitest/node";

/** What one run of vitest came to, for scripts/suites/vitest.ts. */
export interface SuiteReport {
  passed: number;
  /** Tests that did not run count as failed, and so do files that do not load and errors outside every test. */
  failures: { name: string; why: string }[];
  /** Passed, but not at the first try. */
  secondTries: string[];
  /** In the order of time taken, longest first. */
  files: { name: string; seconds: number }[];
}

/** Writes the report to the file that REPORT_FILE names. */
export default class ReportWriter implements Reporter {
  onTestRunEnd(modules: readonly TestModule[], unhandled: readonly SerializedError[]): void {
    const tests = modules.flatMap((module) => [...module.children.allTests()]);
    const passed = tests.filter((test) => test.result().state === "passed");
    const failures = [
      ...unhandled.map((error) => ({ name: "outside every test", why: told(error) })),
      ...modules.flatMap((module) =>
        module.errors().map((error) => ({ name: module.relativeModuleId, why: told(error) })),
      ),
      ...tests
        .filter((test) => !passed.includes(test))
        .map((test) => ({ name: nameOf(test), why: whyOf(test) })),
    ];
    const report: SuiteReport = {
      passed: passed.length,
      failures,
      secondTries: passed.filter((test) => test.diagnostic()?.flaky).map(nameOf),
      files: modules
        .map((module) => ({ name: module.relativeModuleId, seconds: secondsOf(module) }))
        .sort((a, b) => b.seconds - a.seconds),
    };
    writeFileSync(process.env.REPORT_FILE ?? "report.json", JSON.stringify(report));
  }
}

const MOST_LINES = 12;

function nameOf(test: TestCase): string {
  return `${test.module.relativeModuleId} > ${test.fullName}`;
}

function whyOf(test: TestCase): string {
  const result = test.result();
  if (result.state !== "failed") return "It did not run, which counts as failed.";
  return result.errors.map(told).join("\n");
}

function told(error: SerializedError): string {
  const at = error.stacks?.[0] ? `\nat ${error.stacks[0].file}:${error.stacks[0].line}` : "";
  return `${error.message ?? ""}`.split("\n").slice(0, MOST_LINES).join("\n") + at;
}

function secondsOf(module: TestModule): number {
  const { duration, collectDuration, setupDuration } = module.diagnostic();
  return (duration + collectDuration + setupDuration) / 1000;
}
