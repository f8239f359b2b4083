import { parseArgs } from "node:util";
import { stopEveryPart } from "../stack/child.ts";
import { PlainFailure, reportFailure } from "../steps.mjs";
import { type Count, runChecks } from "./checks.ts";
import { startTestStack } from "./test-stack.ts";
import { runVitest } from "./vitest.ts";

// The browser before HTTP: its journeys look for the demo on the front page, which the walk then fills.
const SUITES = ["checks", "unit", "db", "browser", "web"] as const;
type Suite = (typeof SUITES)[number];
const USAGE = "Usage: npm test -- [--only checks|unit|db|browser|web]… [--keep]";
const INTERRUPTED = 130;

/** Runs the suites, all or those asked for; the last line is the sum. Returns the exit code. */
export async function test(given: string[]): Promise<number> {
  const { only, keep } = readOptions(given);
  for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"] as const) {
    process.once(signal, () => stopEveryPart().then(() => process.exit(INTERRUPTED)));
  }
  const counts: Count[] = [];
  if (only.includes("checks")) counts.push(await runChecks());
  if (only.includes("unit")) counts.push(await runVitest("unit", "tests/vitest.config.ts"));
  if (only.includes("db")) counts.push(await runVitest("db", "tests/vitest.db.config.ts"));
  const overHttp = only.filter((suite) => suite === "web" || suite === "browser");
  if (overHttp.length > 0) counts.push(await runOverHttp(overHttp, keep));
  const passed = counts.reduce((sum, count) => sum + count.passed, 0);
  const failed = counts.reduce((sum, count) => sum + count.failed, 0);
  for (const line of counts.flatMap((count) => count.told)) console.log(`\n${line}`);
  console.log(`\n${passed} passed, ${failed} failed`);
  return failed === 0 && passed > 0 ? 0 : 1;
}

/** One built server with its own database and stand-ins for both suites. */
async function runOverHttp(suites: Suite[], keep: boolean): Promise<Count> {
  console.log("\nA server for the tests");
  const sum: Count = { passed: 0, failed: 0, told: [] };
  try {
    const stack = await startTestStack({ keep });
    for (const suite of suites) {
      const count = await runVitest(suite, `tests/vitest.${suite}.config.ts`);
      sum.passed += count.passed;
      sum.failed += count.failed;
      sum.told.push(...count.told);
    }
    await stack.stop();
  } catch (error) {
    reportFailure(error);
    sum.failed += 1;
    sum.told.push(`Failed: the server for the tests\n${(error as Error).message}`);
  }
  return sum;
}

function readOptions(given: string[]): { only: Suite[]; keep: boolean } {
  try {
    const { values } = parseArgs({
      args: given,
      options: { only: { type: "string", multiple: true }, keep: { type: "boolean", default: false } },
    });
    const only = (values.only ?? [...SUITES]) as Suite[];
    if (!only.every((suite) => SUITES.includes(suite))) throw new Error("No such suite.");
    return { only, keep: values.keep };
  } catch (error) {
    throw new PlainFailure(`${(error as Error).message}\n${USAGE}`);
  }
}
