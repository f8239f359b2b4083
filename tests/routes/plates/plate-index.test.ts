import { expect, test } from "vitest";
import { indexOf } from "../../../app/routes/plates/plate-index.ts";

const row = (publicId: string, number: number, version: number) => ({ publicId, number, version });

test("a line a number, its newest version on it, in whatever order they came", () => {
  const lines = indexOf([row("b1", 2, 1), row("a2", 1, 2), row("a1", 1, 1), row("a3", 1, 3)]);
  expect(lines.map(({ publicId, earlier }) => [publicId, ...earlier.map((one) => one.publicId)])).toEqual([
    ["a3", "a2", "a1"],
    ["b1"],
  ]);
});

test("nothing of nothing", () => {
  expect(indexOf([])).toEqual([]);
});
