import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { TrailDecision } from "../../app/measurement/trails/decisions.ts";
import { trailEvents } from "../../app/measurement/trails/events.ts";
import { findTrails, type TrailSweep } from "../../app/measurement/trails.ts";
import { score, total } from "../../scripts/accuracy-trails.ts";
import { HISTORY_KINDS, inventHistory } from "../../scripts/trails/history.ts";

type Given = number | [mhz: number, rlDb: number, widthMhz: number | null];

/** Dips named by sweep and place, "0.1" the second one of the first sweep; 2 to 60 MHz unless said otherwise. */
function sweep(index: number, dips: Given[], startMhz = 2, stopMhz = 60): TrailSweep {
  return {
    id: `s${index}`,
    startHz: startMhz * 1e6,
    stopHz: stopMhz * 1e6,
    dips: dips.map((given, j) => {
      const [mhz, returnLossDb, widthMhz] = typeof given === "number" ? [given, 15, null] : given;
      return {
        id: `${index}.${j}`,
        frequencyHz: mhz * 1e6,
        returnLossDb,
        widthHz: widthMhz === null ? null : widthMhz * 1e6,
      };
    }),
  };
}
const history = (...all: Given[][]) => all.map((dips, i) => sweep(i, dips));
const ways = (sweeps: TrailSweep[], decisions: TrailDecision[] = []) =>
  findTrails(sweeps, decisions)
    .trails.map(({ stops }) => stops.map(({ dip }) => dip.id).join(" "))
    .sort();
const same = (a: string, b: string): TrailDecision => ({ kind: "same", a, b });
const apart = (a: string, b: string): TrailDecision => ({ kind: "apart", a, b });

describe("findTrails", () => {
  it("follows each dip, whatever the order in a sweep", () => {
    expect(ways(history([7, 18, 52], [52.4, 7.1, 18.1]))).toEqual(["0.0 1.1", "0.1 1.2", "0.2 1.0"]);
  });

  it("has no trails of no sweeps, no dips, and of what is no frequency", () => {
    expect(ways([])).toEqual([]);
    expect(ways(history([], [], []))).toEqual([]);
    expect(ways(history([Number.NaN, 7], [7, Number.NaN]))).toEqual(["0.1 1.0"]);
  });

  it("does not reach beyond the gate", () => {
    expect(ways(history([10], [11.3]))).toEqual(["0.0 1.0"]);
    expect(ways(history([10], [11.5]))).toEqual(["0.0", "1.0"]);
  });

  it("takes the least total, not the nearest first", () => {
    expect(ways(history([50, 53], [52.4, 55]))).toEqual(["0.0 1.0", "0.1 1.1"]);
  });

  it("tells crossing dips by depth and width where frequency leaves it open", () => {
    const sharp = (mhz: number): Given => [mhz, 22, 0.6];
    const broad = (mhz: number): Given => [mhz, 11, 2.4];
    expect(ways(history([sharp(50), broad(50.8)], [broad(50.2), sharp(50.9)]))).toEqual([
      "0.0 1.1",
      "0.1 1.0",
    ]);
  });

  it("misses three sweeps and returns, not four", () => {
    expect(ways(history([7], [], [], [], [7.1]))).toEqual(["0.0 4.0"]);
    expect(ways(history([7], [], [], [], [], [7.1]))).toEqual(["0.0", "5.0"]);
  });

  it("waits for ever where sweeps do not reach it", () => {
    const short = Array.from({ length: 9 }, (_, i) => sweep(i + 1, [14], 10, 30));
    expect(ways([sweep(0, [7, 14]), ...short, sweep(10, [7.1, 14])])).toContain("0.0 10.0");
  });

  it("lets a person's word stand over every distance", () => {
    const sweeps = history([50, 53], [50.1, 52.9], [50.2, 52.8]);
    expect(ways(sweeps, [same("0.0", "1.1")])).toEqual(["0.0 1.1 2.1", "0.1 1.0 2.0"]);
    expect(ways(sweeps, [apart("0.0", "1.0")])).toEqual(["0.0 1.1 2.1", "0.1 1.0 2.0"]);
    expect(ways(history([7], [7]), [apart("0.0", "1.0")])).toEqual(["0.0", "1.0"]);
    expect(ways(history([7], [40]), [same("0.0", "1.0")])).toEqual(["0.0 1.0"]);
    expect(ways(history([7], [], [], [], [], [], [9]), [same("6.0", "0.0")])).toEqual(["0.0 6.0"]);
  });

  it("keeps the place of a dip that a decision will bring later", () => {
    const sweeps = history([7], [7.1], [7.6, 7.15]);
    expect(ways(sweeps, [same("0.0", "2.0")])).toEqual(["0.0 1.0 2.0", "2.1"]);
    expect(ways(sweeps, [same("0.0", "2.0"), same("1.0", "2.1")])).toEqual(["0.0 2.0", "1.0 2.1"]);
  });

  it("keeps the decision when the sweep between is gone from the list", () => {
    const [first, , last] = history([50, 53], [50, 53], [50, 53]);
    expect(ways([first, last], [same("0.0", "1.1"), same("1.1", "2.1")])).toEqual(["0.0 2.1", "0.1 2.0"]);
  });

  it("puts every dip on one trail, one a sweep, and honours decisions that agree", () => {
    const dips = fc.array(fc.double({ min: 5, max: 9, noNaN: true }), { maxLength: 5 });
    const pair = fc.tuple(fc.nat(4), fc.nat(4), fc.nat(4), fc.nat(4), fc.boolean());
    fc.assert(
      fc.property(fc.array(dips, { maxLength: 5 }), fc.array(pair, { maxLength: 4 }), (all, said) => {
        const sweeps = all.map((mhz, i) => sweep(i, mhz));
        const decisions = said
          .filter(([i, , k]) => i !== k)
          .map(([i, j, k, l, kind]) => (kind ? same : apart)(`${i}.${j}`, `${k}.${l}`));
        const { trails, overruled } = findTrails(sweeps, decisions);
        const seen = trails.flatMap(({ stops }) => stops.map(({ dip }) => dip.id));
        expect(seen.sort()).toEqual(sweeps.flatMap((one) => one.dips.map(({ id }) => id)).sort());
        const trailOf = new Map(trails.flatMap((t, i) => t.stops.map(({ dip }) => [dip.id, i] as const)));
        for (const { stops } of trails) {
          expect(new Set(stops.map((stop) => stop.sweepIndex)).size).toBe(stops.length);
        }
        for (const decision of decisions) {
          if (overruled.includes(decision)) continue;
          const [one, two] = [trailOf.get(decision.a), trailOf.get(decision.b)];
          if (one !== undefined && two !== undefined) expect(one === two).toBe(decision.kind === "same");
        }
      }),
      { numRuns: 500 },
    );
  });

  it("pairs at least 98 % of the invented histories' dips rightly", { timeout: 60_000 }, () => {
    // Forty of the two hundred; all of them with `npm run accuracy -- trails`.
    const scores = HISTORY_KINDS.flatMap((kind) =>
      Array.from({ length: 10 }, (_, i) => score(inventHistory(kind, 1000 + i))),
    );
    const { right, pairings } = total(scores);
    expect(pairings).toBeGreaterThan(1000);
    expect(right / pairings).toBeGreaterThan(0.98);
  });
});

describe("trailEvents", () => {
  const eventsOf = (sweeps: TrailSweep[]) => {
    const { trails } = findTrails(sweeps);
    const events = trailEvents(trails, sweeps);
    return trails.map(({ stops }, i) => [
      stops[0].dip.id,
      ...events[i].map(({ kind, sweepIndex }) => `${kind} ${sweepIndex}`),
    ]);
  };

  it("is silent about a trail that is there all the time, and at the ends of what is covered", () => {
    expect(eventsOf(history([7], [7], [7]))).toEqual([["0.0"]]);
    expect(eventsOf([sweep(0, [14], 10, 30), sweep(1, [7, 14]), sweep(2, [14], 10, 30)])).toEqual([
      ["0.0"],
      ["1.0"],
    ]);
  });

  it("says what appears, vanishes, is missed or not covered", () => {
    expect(eventsOf(history([7], [7, 20], [7]))).toEqual([["0.0"], ["1.1", "appears 1", "vanishes 2"]]);
    expect(eventsOf([sweep(0, [7, 14]), sweep(1, [7]), sweep(2, [14], 10, 30), sweep(3, [7, 14])])).toEqual([
      ["0.0", "not-covered 2"],
      ["0.1", "missed 1"],
    ]);
  });

  it("tells splitting from appearing, merging from vanishing", () => {
    expect(eventsOf(history([50], [49.8, 51.2], [49.7]))).toEqual([
      ["0.0"],
      ["1.1", "splits-from 1", "merges-into 2"],
    ]);
  });
});
