import { expect, test } from "vitest";
import { keepIdentities } from "../../../app/measurement/trails/identity.ts";

const stored = (id: number, dipIds: string, cared = false) => ({ id, dipIds: dipIds.split(" "), cared });

test("the majority of dips decides, and a divided trail's smaller part is new", () => {
  const { idOf, left } = keepIdentities(
    [
      ["a", "b"],
      ["c", "d", "e"],
    ],
    [stored(7, "a b c d e")],
  );
  expect(idOf).toEqual([null, 7]);
  expect(left).toEqual([]);
});

test("of two that grow together the larger stays, the other is left", () => {
  const small = stored(1, "a b");
  const { idOf, left } = keepIdentities([["a", "b", "c", "d", "e"]], [small, stored(2, "c d e")]);
  expect(idOf).toEqual([2]);
  expect(left).toEqual([small]);
});

test("one that was named outranks a larger one that was not", () => {
  expect(keepIdentities([["a", "b", "c"]], [stored(1, "a", true), stored(2, "b c")]).idOf).toEqual([1]);
  expect(
    keepIdentities(
      [
        ["a", "x", "y"],
        ["b", "c"],
      ],
      [stored(1, "a b c", true), stored(2, "x y")],
    ).idOf,
  ).toEqual([2, 1]);
});

test("equal shares go to the older; nothing in common is new", () => {
  expect(keepIdentities([["a", "b"]], [stored(4, "b"), stored(3, "a")]).idOf).toEqual([3]);
  expect(keepIdentities([["z"], []], [stored(4, "b")]).idOf).toEqual([null, null]);
  expect(keepIdentities([], []).left).toEqual([]);
});
