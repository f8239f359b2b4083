import { describe, expect, it } from "vitest";
import { decodePlace, encodePlace, startBehind } from "~/services/dips-table/place";

describe("a place in the table", () => {
  it("comes back from its text, and nothing else is one", () => {
    const place = { id: 90_071, count: 300 };
    expect(decodePlace(encodePlace(place))).toEqual(place);
    for (const text of ["", "%%", "MTI", encodePlace({ id: -1, count: 3 }), "a".repeat(60)])
      expect(decodePlace(text)).toBeNull();
  });

  it("is behind its dip wherever that is now, and behind as many as before where it is gone", () => {
    const ids = [11, 5, 8, 2];
    expect(startBehind(ids, null)).toBe(0);
    expect(startBehind(ids, { id: 8, count: 2 })).toBe(3);
    expect(startBehind(ids, { id: 99, count: 2 })).toBe(2);
    expect(startBehind(ids, { id: 99, count: 9 })).toBe(4);
  });
});
