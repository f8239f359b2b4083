import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { type DipRange, describeRange, parseQuestion, searchWords } from "~/services/search-question";

const none: DipRange = { fromHz: null, toHz: null, swrUnder: null, swrOver: null, verdict: null };

describe("parseQuestion", () => {
  it.each<[string, string, Partial<DipRange>]>([
    ["dips between 50 and 54 MHz with SWR under 1.5", "", { fromHz: 50e6, toHz: 54e6, swrUnder: 1.5 }],
    ["dips from 7000 kHz to 7.2 MHz", "", { fromHz: 7e6, toHz: 7.2e6 }],
    ["choke 18,068–18,168 MHz", "choke", { fromHz: 18_068_000, toHz: 18_168_000 }],
    ["between 54 and 50 MHz", "", { fromHz: 50e6, toHz: 54e6 }],
    ["settled dips below 10 MHz", "", { toHz: 10e6, verdict: "settled" }],
    ["dips above 1 GHz with swr < 2:1", "", { fromHz: 1e9, swrUnder: 2 }],
    ["SWR at least 3", "", { swrOver: 3 }],
    ["swr between 1.2 and 1.5", "", { swrOver: 1.2, swrUnder: 1.5 }],
    ["dips near 10 MHz", "", { fromHz: 9.8e6, toHz: 10.2e6 }],
    ["the braid with SWR under 2", "braid", { swrUnder: 2 }],
  ])("%s", (text, words, range) => {
    expect(parseQuestion(text)).toEqual({ words, dips: { ...none, ...range } });
  });

  it.each(["swr", "dips", "between you and me", "40 m", "17 radials and 3 chokes", "2:1", ""])(
    "leaves %j as words",
    (text) => {
      expect(parseQuestion(text)).toEqual({ words: text, dips: null });
    },
  );

  it("reads its own sentence back", () => {
    const hz = fc.integer({ min: 1, max: 3_000_000_000 });
    const swr = fc.integer({ min: 1, max: 9_999 }).map((n) => n / 100);
    const range = fc
      .record({
        fromHz: fc.option(hz),
        toHz: fc.option(hz),
        swrUnder: fc.option(swr),
        swrOver: fc.option(swr),
        verdict: fc.option(fc.constantFrom("open" as const, "proposed" as const, "settled" as const)),
      })
      .filter((r) => Object.values(r).some((value) => value !== null))
      .filter((r) => r.fromHz === null || r.toHz === null || r.fromHz <= r.toHz)
      .filter((r) => r.swrUnder === null || r.swrOver === null || r.swrOver <= r.swrUnder);
    fc.assert(
      fc.property(range, (r) => {
        expect(parseQuestion(describeRange(r)).dips).toEqual(r);
      }),
    );
  });

  it("answers any text at once", () => {
    fc.assert(fc.property(fc.string({ unit: "binary", maxLength: 300 }), (text) => void parseQuestion(text)));
    const began = performance.now();
    for (const piece of ["1 ", "swr ", "between 1 and ", "9,9,", "dips ", "< "])
      parseQuestion(piece.repeat(100));
    expect(performance.now() - began).toBeLessThan(3000);
  });
});

describe("searchWords", () => {
  it.each<[string, string[]]>([
    ['+choke -"radial" (a*b) @x ~y', ["choke", "radial", "a", "b", "x", "y"]],
    ["λ/4 Ω 50%", ["λ", "4", "ω", "50"]],
    ["_ __ \\ ' ; --", []],
    ["Choke choke CHOKE", ["choke"]],
    ["e\u0301te\u0301", ["été"]],
  ])("%s", (text, words) => {
    expect(searchWords(text)).toEqual(words);
  });
});
