import { format } from "node:util";
import { afterEach, beforeEach, expect } from "vitest";

/** A test that prints something unexpected fails. One that expects output replaces the method itself. */
const METHODS = ["log", "info", "debug", "warn", "error"] as const;

let printed: string[] = [];
const originals = METHODS.map((method) => console[method]);

beforeEach(() => {
  printed = [];
  for (const method of METHODS) {
    console[method] = (...values: unknown[]) => void printed.push(`console.${method}: ${format(...values)}`);
  }
});

afterEach(() => {
  for (const [i, method] of METHODS.entries()) console[method] = originals[i];
  expect(printed, "unexpected console output").toEqual([]);
});
