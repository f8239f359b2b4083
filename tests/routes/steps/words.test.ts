import { describe, expect, it } from "vitest";
import { completeDip } from "~/measurement/dips/complete";
import type { Movement } from "~/measurement/movement";
import type { Dip } from "~/measurement/sweep";
import { expectationWords } from "~/routes/steps/expectation-words";
import { movementWords } from "~/routes/steps/movement-words";
import { stepSchema } from "~/routes/steps/steps.schema";
import { quantityText } from "~/services/step-words";

function dip(frequencyHz: number): Dip {
  return completeDip({
    frequencyHz,
    frequencyUncertaintyHz: 6e3,
    minimumSwr: 1.3,
    minimumSwrLow: null,
    minimumSwrHigh: null,
    minimumSwrNoiseLow: null,
    minimumSwrNoiseHigh: null,
    returnLossDb: 18,
    prominenceDb: 12,
    bandwidth: null,
    q: null,
    qLow: null,
    qHigh: null,
    method: "fit",
    edge: false,
    sampleIndex: 0,
    advice: null,
  });
}

function plain(text: string): string {
  return text.replaceAll("\u2009", " ");
}

describe("movementWords", () => {
  const both = { before: dip(7.1e6), after: dip(7.058e6) };
  it.each<[Movement, string]>([
    [{ ...both, kind: "moved", byHz: -42e3, uncertaintyHz: 9e3 }, "moved −42 kHz ± 9 kHz (−0.59 %)"],
    [
      { ...both, kind: "still", byHz: 3e3, uncertaintyHz: 9e3 },
      "did not move beyond its limits (+3 kHz ± 9 kHz)",
    ],
    [{ ...both, kind: "unsure", byHz: -42e3, uncertaintyHz: null }, "−42 kHz, limits unknown"],
    [{ ...both, before: null, kind: "appeared", byHz: null, uncertaintyHz: null }, "appeared at 7.058 MHz"],
    [{ ...both, after: null, kind: "vanished", byHz: null, uncertaintyHz: null }, "vanished from 7.100 MHz"],
    [
      { ...both, after: null, kind: "unseen", byHz: null, uncertaintyHz: null },
      "the sweep after does not reach here",
    ],
  ])("says %#", (movement, words) => {
    expect(plain(movementWords(movement))).toBe(words);
  });
});

describe("expectationWords", () => {
  const place = {
    trail: "t",
    name: "",
    frequencyHz: 7.2e6,
    lowHz: 7.15e6,
    highHz: 7.25e6,
    how: "",
    was: null,
  };
  const came = (frequencyHz: number) => ({ publicId: "d", frequencyHz, frequencyUncertaintyHz: 6e3 });
  it.each([
    [7.21e6, /^Met: it came at 7.210 MHz/],
    [7.15e6, /^Met/],
    [7.1e6, /^Missed by 50 kHz: it came at 7.100 MHz, under the interval/],
    [7.3e6, /^Missed by 50 kHz: .* over the interval/],
    [7.253e6, /^Missed by 3 kHz, less than the dip's own limits/],
  ])("of a dip at %d Hz", (hz, words) => {
    expect(plain(expectationWords({ ...place, came: came(hz) }, true))).toMatch(words);
  });

  it("does not call a miss what it has no limits for, nor what did not come yet", () => {
    const open = { ...place, lowHz: null, highHz: null, came: came(7.3e6) };
    expect(plain(expectationWords(open, true))).toMatch(
      /\+100 kHz from the expected place; .* can't be said/,
    );
    expect(expectationWords({ ...place, came: null }, true)).toMatch(/shows no dip of this trail/);
    expect(expectationWords({ ...place, came: null }, false)).toMatch(/No sweep was taken after it yet/);
  });
});

describe("quantityText", () => {
  it("speaks in the person's unit, and of what is unknown", () => {
    const target = { part: "a", field: "lengthM" as const };
    const cut = { label: "pole, length", unit: "m", from: 10.21, to: 10.04, target };
    expect(plain(quantityText(cut, "metres"))).toBe("pole, length: 10.21 m → 10.04 m (−17 cm)");
    expect(plain(quantityText(cut, "feet"))).toMatch(/^pole, length: 33 ft 6 in → 32 ft 11 1\/4 in \(−6/);
    expect(quantityText({ ...cut, from: null }, "metres")).toContain("unknown →");
    const turns = { label: "choke", unit: "turns", from: 9, to: 12, target: null };
    expect(plain(quantityText(turns, "metres"))).toBe("choke: 9 → 12 turns");
  });
});

describe("stepSchema", () => {
  const form = { intent: "keep", title: "Cut", state: "done", at: "2026-05-05T12:00" };
  function quantities(...rows: Record<string, string>[]) {
    return stepSchema("feet").safeParse({ ...form, quantities: rows });
  }

  it("reads a bare number in the person's unit, and skips rows that say nothing", () => {
    const parsed = quantities({}, { target: "a.lengthM", to: "33" }, { unit: "m" });
    expect(parsed.data?.quantities).toHaveLength(1);
    expect(parsed.data?.quantities[0].to).toBeCloseTo(33 * 0.3048, 9);
  });

  it("takes a height of zero, a whole number of turns and millimetres", () => {
    const parsed = quantities(
      { target: "a.heightM", to: "0" },
      { target: "choke.turns", to: "12" },
      { target: "a.diameterMm", to: "2,5" },
    );
    expect(parsed.data?.quantities.map(({ to }) => to)).toEqual([0, 12, expect.closeTo(2.5, 9)]);
    expect(quantities({ target: "choke.turns", to: "1.5" }).success).toBe(false);
    expect(quantities({ target: "nothing", to: "1" }).error?.issues[0].path).toEqual([
      "quantities",
      0,
      "target",
    ]);
  });
});
