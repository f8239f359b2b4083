import { existsSync } from "node:fs";
import path from "node:path";
import { pathToFileURL } from "node:url";
import { installPrograms, ROOT } from "./install.mjs";
import { reportFailure, step, tellStepsOnStandardError } from "./steps.mjs";
import type { BenchRow } from "./suites/bench-row.ts";
import { benchServer } from "./suites/bench-server.ts";

/** Where the rows come from: a file and the function in it that makes them. */
const SOURCES = [
  ["bench-reading.ts", "benchReading", "Reading"],
  ["bench-pictures.ts", "benchPictures", "Pictures"],
  ["bench-analysis.ts", "benchAnalysis", "Analysis"],
] as const;

try {
  tellStepsOnStandardError();
  await installPrograms({ database: true, tests: true });
  const rows: BenchRow[] = [];
  for (const [file, name, title] of SOURCES) {
    const full = path.join(ROOT, "scripts", file);
    if (!existsSync(full)) continue;
    await step(title, async () => {
      const made: BenchRow[] = await (await import(pathToFileURL(full).href))[name]();
      rows.push(...made);
    });
  }
  await step("Pages of the built server", async () => {
    rows.push(...(await benchServer()));
  });
  if (process.argv.includes("--json")) for (const row of rows) console.log(JSON.stringify(row));
  else console.log(tableOf(rows));
} catch (error) {
  reportFailure(error);
}

function tableOf(rows: BenchRow[]): string {
  const width = Math.max(...rows.map((row) => row.name.length));
  return rows
    .map(({ name, value, goal, unit }) => {
      const figure = Number(value.toPrecision(3)).toString();
      return `${name.padEnd(width)}  ${figure.padStart(9)} ${unit.padEnd(6)}  goal ${goal} or less: ${value <= goal ? "met" : "MISSED"}`;
    })
    .join("\n");
}
