import { writeFileSync } from "node:fs";
import type { Reporter, SerializedError, TestCase, TestModule } from "vitest/node";

/** What one run of vitest came to, for scripts/suites/vitest.ts. */
export interface SuiteReport {
  passed: number;
  /** Tests that did not run count as failed, and so do files that do not load and errors outside every test. */
  failures: { name: string; why: string }[];
  /** Passed, but not at the first try. */
  secondTries: { name: string; why: string }[];
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
      ...tests.filter((test) => !passed.includes(test)).map(toldOf),
    ];
    const report: SuiteReport = {
      passed: passed.length,
      failures,
      secondTries: passed.filter((test) => test.diagnostic()?.flaky).map(toldOf),
      files: modules
        .map((module) => ({ name: module.relativeModuleId, seconds: secondsOf(module) }))
        .sort((a, b) => b.seconds - a.seconds),
    };
    writeFileSync(process.env.REPORT_FILE ?? "report.json", JSON.stringify(report));
  }
}

const MOST_LINES = 12;

/** Its errors, those of a first try too. */
function toldOf(test: TestCase): { name: string; why: string } {
  const { errors } = test.result();
  return {
    name: `${test.module.relativeModuleId} > ${test.fullName}`,
    why: errors?.map(told).join("\n") || "It did not run, which counts as failed.",
  };
}

function told(error: SerializedError): string {
  const at = error.stacks?.[0] ? `\nat ${error.stacks[0].file}:${error.stacks[0].line}` : "";
  return `${error.message ?? ""}`.split("\n").slice(0, MOST_LINES).join("\n") + at;
}

function secondsOf(module: TestModule): number {
  const { duration, collectDuration, setupDuration } = module.diagnostic();
  return (duration + collectDuration + setupDuration) / 1000;
}
