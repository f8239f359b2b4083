import { readFileSync } from "node:fs";
import { expect, test } from "vitest";
import { assign } from "../../../app/measurement/trails/assignment.ts";

/** Made by tests/reference/scipy_assignment.py. */
const cases: { cost: (number | null)[][]; total: number | null }[] = JSON.parse(
  readFileSync(new URL("../../fixtures/measurement/assignment.json", import.meta.url), "utf8"),
);

test("least totals as SciPy finds them, forbidden pairs included", () => {
  expect(cases.filter(({ total }) => total === null).length).toBe(4);
  for (const { cost: given, total } of cases) {
    const cost = given.map((row) => row.map((value) => value ?? Number.POSITIVE_INFINITY));
    if (total === null) {
      expect(() => assign(cost)).toThrow(RangeError);
      continue;
    }
    const columns = assign(cost);
    expect(new Set(columns).size).toBe(cost.length);
    expect(columns.reduce((sum, j, i) => sum + cost[i][j], 0)).toBe(total);
  }
});

test("nothing to assign, and NaN is forbidden", () => {
  expect(assign([])).toEqual([]);
  expect(assign([[Number.NaN, 3]])).toEqual([1]);
  expect(() => assign([[Number.NaN]])).toThrow(RangeError);
});
