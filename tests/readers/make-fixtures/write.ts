import { mkdirSync, writeFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import type { Fixture } from "./fixture.ts";
import { LAYOUT } from "./text-layout.ts";
import { QUANTITIES } from "./text-quantities.ts";
import { WRITING } from "./text-writing.ts";
import { TOUCHSTONE } from "./touchstone.ts";

export const TEXT_FIXTURES: Fixture[] = [...WRITING, ...LAYOUT, ...QUANTITIES];
export const FIXTURES: Fixture[] = [...TEXT_FIXTURES, ...TOUCHSTONE];
export const FOLDER = fileURLToPath(new URL("../../fixtures/traces/", import.meta.url));

/** `npx tsx tests/readers/make-fixtures/write.ts`: writes every fixture and its truth beside it. */
if (process.argv[1] === fileURLToPath(import.meta.url)) {
  mkdirSync(FOLDER, { recursive: true });
  for (const { file, bytes, truth } of FIXTURES) {
    writeFileSync(FOLDER + file, bytes);
    writeFileSync(`${FOLDER}${file}.json`, `${JSON.stringify(truth, null, 1)}\n`);
  }
  console.log(`${FIXTURES.length} fixtures in ${FOLDER}`);
}
