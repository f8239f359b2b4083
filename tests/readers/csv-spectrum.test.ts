import { readdirSync, readFileSync } from "node:fs";
import { createRequire } from "node:module";
import path from "node:path";
import { describe, expect, it } from "vitest";
import { read } from "../../app/readers/read.ts";

/** The package's collection of awkward CSV files; none of them holds a sweep. */
const folder = path.join(path.dirname(createRequire(import.meta.url).resolve("csv-spectrum")), "csvs");
const names = readdirSync(folder);

describe("csv-spectrum", () => {
  it("is there", () => {
    expect(names.length).toBeGreaterThanOrEqual(10);
  });

  it.each(names)("%s ends in a located problem", (name) => {
    const result = read({ name, bytes: new Uint8Array(readFileSync(path.join(folder, name))) });
    expect(result.ok).toBe(false);
    if (!result.ok) expect(result.problem.line).toBeGreaterThanOrEqual(1);
  });
});
