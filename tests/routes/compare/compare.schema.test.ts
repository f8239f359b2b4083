import { describe, expect, it } from "vitest";
import {
  compareSearch,
  countLeftOut,
  MOST_COMPARED,
  parseCompare,
  sweepInAddress,
} from "~/routes/compare/compare.schema";

const read = (text: string) => parseCompare(new URLSearchParams(text));

describe("parseCompare", () => {
  it("keeps the order, each sweep once", () => {
    expect(read("sweep=bbbb&sweep=aaaa&sweep=bbbb").sweeps).toEqual(["bbbb", "aaaa"]);
  });

  it("goes there and back", () => {
    const text =
      "?sweep=aaaa&sweep=bbbb&reference=bbbb&view=swr&axis=log&from=6.9&to=7.3&limit=1.5&q=dry+tiles";
    expect(compareSearch(read(text))).toBe(text);
  });

  it("leaves defaults out of the address", () => {
    expect(compareSearch(read("sweep=aaaa&reference=aaaa&view=rl"))).toBe("?sweep=aaaa");
    expect(compareSearch(read(""))).toBe("?");
  });

  it("takes nothing that makes no sense", () => {
    const view = read("sweep=%3Cb%3E&sweep=../x&axis=round&from=8&to=7&limit=0.5&view=x");
    expect(view).toMatchObject({ sweeps: [], scale: null, fromHz: null, toHz: null, swrLimit: null });
    expect(view.quantity).toBe("rl");
  });

  it("compares twelve and counts the rest", () => {
    const text = Array.from({ length: 15 }, (_, i) => `sweep=sweep${i}`).join("&");
    expect(read(text).sweeps).toHaveLength(MOST_COMPARED);
    expect(countLeftOut(new URLSearchParams(text))).toBe(3);
    expect(countLeftOut(new URLSearchParams("sweep=aaaa&sweep=aaaa"))).toBe(0);
  });
});

describe("sweepInAddress", () => {
  it.each([
    ["https://swale.example/projects/p1p1p1p1p1/sweeps/abcd1234ef", "abcd1234ef"],
    ["https://swale.example/projects/p1p1p1p1p1/sweeps/abcd1234ef?view=swr#dips", "abcd1234ef"],
    ["/projects/p1p1p1p1p1/sweeps/abcd1234ef/reading", "abcd1234ef"],
    ["/api/v1/sweeps/abcd1234ef", "abcd1234ef"],
    ["  abcd1234ef ", "abcd1234ef"],
  ])("finds the sweep in %s", (text, id) => {
    expect(sweepInAddress(text)).toBe(id);
  });

  it.each(["https://swale.example/projects/p1p1p1p1p1", "hello there", "/sweeps/<b>", ""])(
    "finds none in “%s”",
    (text) => {
      expect(sweepInAddress(text)).toBeNull();
    },
  );
});
