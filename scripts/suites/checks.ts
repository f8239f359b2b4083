import { spawnSync } from "node:child_process";
import path from "node:path";
import { ROOT } from "../install.mjs";

export interface Count {
  passed: number;
  failed: number;
  /** What failed and what passed with difficulty, for the end of the whole output. */
  told: string[];
}

/** What a machine can check without running the product. Each counts as one. */
const CHECKS: { title: string; commands: string[][] }[] = [
  { title: "Format and lint", commands: [["@biomejs/biome/bin/biome", "check", "--error-on-warnings", "."]] },
  { title: "Direction of imports", commands: [["../scripts/layers.mjs"]] },
  { title: "Types", commands: [["@react-router/dev/bin.js", "typegen"], ["typescript/bin/tsc"]] },
  { title: "Unused code", commands: [["knip/bin/knip.js"]] },
];

const MOST_LINES = 20;

export async function runChecks(): Promise<Count> {
  console.log("\nChecks");
  const count: Count = { passed: 0, failed: 0, told: [] };
  for (const { title, commands } of CHECKS) {
    const started = Date.now();
    const failure = commands.map(run).find((output) => output !== undefined);
    const seconds = ((Date.now() - started) / 1000).toFixed(1);
    console.log(`  ${failure === undefined ? "✓" : "✗"} ${title.padEnd(46)} ${seconds.padStart(6)} s`);
    if (failure !== undefined) {
      console.log(failure);
      count.told.push(`Failed: ${title}\n${failure.trim().split("\n").slice(0, MOST_LINES).join("\n")}`);
    }
    count[failure === undefined ? "passed" : "failed"] += 1;
  }
  return count;
}

/** What the command printed where it failed, else undefined. */
function run([script, ...rest]: string[]): string | undefined {
  const file = path.join(ROOT, "node_modules", script);
  const result = spawnSync(process.execPath, [file, ...rest], { cwd: ROOT, encoding: "utf8" });
  return result.status === 0 ? undefined : `${result.stdout}\n${result.stderr}`;
}
