import { describe, expect, it } from "vitest";
import {
  bandEdges,
  bestWords,
  offsetWords,
  shareWords,
  swrWords,
} from "~/routes/sweeps/components/bands/band-words";

const FIGURES = {
  name: "40 m",
  lowHz: 7e6,
  highHz: 7.2e6,
  limitSwr: 2,
  swrLow: 3,
  swrMiddle: 1.5,
  swrHigh: 2.5,
  covered: 1,
  shareUnder: 0.5,
  bestHz: 7.0812e6,
  bestSwr: 1.32,
};

describe("a band's figures in words", () => {
  it("says one unit where both edges have it", () => {
    expect(bandEdges(FIGURES)).toBe("7–7.2\u2009MHz");
    expect(bandEdges({ lowHz: 472e3, highHz: 1.2e6 })).toBe("472\u2009kHz – 1.2\u2009MHz");
  });

  it("says how much of the band is under the limit, and of how much of it", () => {
    expect(shareWords(FIGURES)).toBe("50\u2009% under 2:1");
    expect(shareWords({ ...FIGURES, shareUnder: 1 })).toBe("all under 2:1");
    expect(shareWords({ ...FIGURES, shareUnder: 0 })).toBe("nothing under 2:1");
    expect(shareWords({ ...FIGURES, covered: 0.4 })).toBe(
      "50\u2009% of the 40\u2009% that is swept under 2:1",
    );
  });

  it("never rounds a share to none or to all", () => {
    expect(shareWords({ ...FIGURES, shareUnder: 0.999 })).toBe("99\u2009% under 2:1");
    expect(shareWords({ ...FIGURES, shareUnder: 0.0001 })).toBe("1\u2009% under 2:1");
  });

  it("says what was not swept instead of a number", () => {
    const none = { ...FIGURES, covered: 0, shareUnder: null, bestHz: null, bestSwr: null };
    expect(shareWords(none)).toBe("not swept");
    expect(bestWords(none)).toBe("unknown");
    expect(swrWords(null)).toBe("not swept");
    expect(bestWords(FIGURES)).toBe("1.32 at 7.0812\u2009MHz");
  });

  it("gives no number to a reflection that is all but total", () => {
    expect(swrWords(Number.POSITIVE_INFINITY)).toBe("over 100");
    expect(swrWords(26.63)).toBe("26.6");
  });

  it("signs an offset in kilohertz and per cent", () => {
    expect(offsetWords(42_300, 0.006)).toBe("+42.3\u2009kHz (+0.6\u2009%)");
    expect(offsetWords(-529_000, -0.0522)).toBe("−529\u2009kHz (−5.2\u2009%)");
    expect(offsetWords(20_586_000, 2.033)).toBe("+20.6\u2009MHz (+203\u2009%)");
  });
});
