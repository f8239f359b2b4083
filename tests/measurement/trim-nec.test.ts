import { describe, expect, test } from "vitest";
import { type LengthPair, trimTo } from "../../app/measurement/trim.ts";
import { deckDips, hasNec } from "./nec2c.ts";

/** The whole loop with the solver as the antenna, now: sweep, dips, advice, cut, sweep again. Invented antennas. */
const DECKS = {
  dipole: (lengthM: number) =>
    deckOf([`GW 1 21 0 ${-lengthM / 2} 9 0 ${lengthM / 2} 9 0.001`], "EX 0 1 11 0 1.0 0.0", true),
  // Two radials that stay as they are: f follows the length by two thirds only.
  vertical: (lengthM: number) =>
    deckOf(
      [`GW 1 15 0 0 6 0 0 ${6 + lengthM} 0.005`, "GW 2 15 0 0 6 5 0 6 0.001", "GW 3 15 0 0 6 -5 0 6 0.001"],
      "EX 0 1 1 0 1.0 0.0",
      false,
    ),
};

function deckOf(wires: string[], feed: string, ground: boolean): string {
  return [
    "CE",
    ...wires,
    ...(ground ? ["GE 1", "GN 1"] : ["GE 0"]),
    feed,
    "FR 0 1 0 0 1 1",
    "XQ 0",
    "EN",
    "",
  ].join("\n");
}

describe.skipIf(!hasNec())("at most two trims", () => {
  test.each([
    ["dipole", 10.6, 14.2e6],
    ["dipole", 9.6, 14.2e6],
    ["vertical", 5.3, 14.7e6],
    ["vertical", 4.8, 14.7e6],
  ] as const)(
    "%s of %d m: within 0.3 percent of %d Hz",
    (name, startM, wantedHz) => {
      const history: LengthPair[] = [];
      let lengthM: number = startM;
      for (let round = 0; round < 3; round++) {
        const [dip] = deckDips(DECKS[name](lengthM), 11.5e6, 17.5e6, 80e3);
        history.push({
          lengthM,
          frequencyHz: dip.frequencyHz,
          frequencyUncertaintyHz: dip.frequencyUncertaintyHz,
        });
        lengthM = trimTo(history, wantedHz)?.lengthM ?? Number.NaN;
      }
      expect(Math.abs(history[0].frequencyHz / wantedHz - 1)).toBeGreaterThan(0.01);
      expect(Math.abs(history[2].frequencyHz / wantedHz - 1)).toBeLessThan(0.003);
    },
    60_000,
  );
});
