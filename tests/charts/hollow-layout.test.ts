import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { chooseTelling, MOST_CARDS, placeCards } from "../../app/charts/hollow-layout.ts";

const fractions = fc
  .array(fc.double({ min: 0, max: 1, noNaN: true }), { minLength: 1, maxLength: MOST_CARDS })
  .map((values) => values.sort((a, b) => a - b));

describe("placeCards", () => {
  it("stands a lonely card in the middle under its dip, its leader straight", () => {
    const [card] = placeCards([0.5]);
    expect(card.left + card.width / 2).toBeCloseTo(0.5, 12);
    expect(card.anchor).toBe(0.5);
  });

  it("keeps a card of a dip at the edge inside the plot, its leader bent to the card's corner", () => {
    const [first, last] = placeCards([0, 1]);
    expect(first.left).toBe(0);
    expect(first.anchor).toBeGreaterThan(0);
    expect(last.left + last.width).toBeCloseTo(1, 12);
  });

  it("spreads two crowded cards evenly to both sides", () => {
    const [left, right] = placeCards([0.5, 0.5]);
    expect((left.left + right.left + right.width) / 2).toBeCloseTo(0.5, 12);
  });

  it("never overlaps, never leaves the plot, keeps the order, arrives inside its card", () => {
    fc.assert(
      fc.property(fractions, (at) => {
        const places = placeCards(at);
        for (const [index, place] of places.entries()) {
          expect(place.left).toBeGreaterThanOrEqual(-1e-9);
          expect(place.left + place.width).toBeLessThanOrEqual(1 + 1e-9);
          expect(place.anchor).toBeGreaterThan(place.left);
          expect(place.anchor).toBeLessThan(place.left + place.width);
          if (index > 0) {
            const before = places[index - 1];
            expect(place.left).toBeGreaterThan(before.left + before.width);
          }
        }
      }),
    );
  });

  it("leaves cards that have room exactly under their dips", () => {
    for (const [index, place] of placeCards([0.15, 0.5, 0.85]).entries()) {
      expect(place.left + place.width / 2).toBeCloseTo([0.15, 0.5, 0.85][index], 12);
    }
  });

  it("has nothing to place for no dips", () => {
    expect(placeCards([])).toEqual([]);
  });
});

describe("chooseTelling", () => {
  const plain = {
    noteCount: 0,
    verdict: "open" as const,
    inDesignBand: null as boolean | null,
    prominenceDb: 10,
  };

  it("takes all while they fit", () => {
    expect(chooseTelling([plain, plain]).told).toHaveLength(2);
    expect(chooseTelling([]).told).toEqual([]);
  });

  it("prefers notes and design bands to depth, and keeps the order", () => {
    const many = Array.from({ length: 40 }, (_, index) => ({ ...plain, index, prominenceDb: index / 4 }));
    many[3].noteCount = 4;
    const design = { ...many[5], inDesignBand: true };
    const { told, rest } = chooseTelling(many.with(5, design));
    expect(told.map((dip) => dip.index)).toEqual([3, 5, 36, 37, 38, 39]);
    expect(rest).toHaveLength(34);
  });
});
