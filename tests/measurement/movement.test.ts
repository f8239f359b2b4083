import { describe, expect, it } from "vitest";
import { completeDip } from "~/measurement/dips/complete";
import { movementsBetween } from "~/measurement/movement";
import type { Dip } from "~/measurement/sweep";

/** Invented dips; only what movement needs is set. */
function dip(frequencyHz: number, frequencyUncertaintyHz: number | null, more: Partial<Dip> = {}): Dip {
  return completeDip({
    frequencyHz,
    frequencyUncertaintyHz,
    minimumSwr: 1.3,
    returnLossDb: 18,
    prominenceDb: 12,
    bandwidth: null,
    q: null,
    method: "fit",
    edge: false,
    sampleIndex: 0,
    advice: null,
    ...more,
  } as Dip);
}

function side(...dips: Dip[]) {
  return { startHz: 1e6, stopHz: 30e6, dips };
}

describe("movementsBetween", () => {
  it("adds the limits of both as squares: 3 and 4 make 5", () => {
    const [move] = movementsBetween(side(dip(7.1e6, 3e3)), side(dip(7.1e6 + 5.1e3, 4e3)));
    expect(move).toMatchObject({ kind: "moved", byHz: 5100, uncertaintyHz: 5000 });
    const [still] = movementsBetween(side(dip(7.1e6, 3e3)), side(dip(7.1e6 - 4.9e3, 4e3)));
    expect(still).toMatchObject({ kind: "still", byHz: -4900 });
  });

  it("says nothing of a movement whose limits are not known", () => {
    const [move] = movementsBetween(side(dip(7.1e6, null)), side(dip(7.3e6, 4e3)));
    expect(move).toMatchObject({ kind: "unsure", byHz: 200e3, uncertaintyHz: null });
  });

  it("tells what appeared and vanished from what the other sweep does not reach", () => {
    const before = side(dip(7e6, 1e3), dip(14e6, 1e3));
    const after = { startHz: 1e6, stopHz: 10e6, dips: [dip(7e6, 1e3), dip(4e6, 1e3)] };
    expect(movementsBetween(before, after).map(({ kind }) => kind)).toEqual(["appeared", "still", "unseen"]);
    expect(movementsBetween(side(dip(7e6, 1e3)), side()).map(({ kind }) => kind)).toEqual(["vanished"]);
    expect(movementsBetween(side(), side())).toEqual([]);
  });

  it("goes by trails where they are known, however far the dip went", () => {
    const [a, b, c] = [dip(7e6, 1e3), dip(9.8e6, 1e3), dip(7.05e6, 1e3)];
    const trails = new Map([
      [a, "one"],
      [b, "one"],
      [c, "two"],
    ]);
    const moves = movementsBetween(side(a), side(b, c), (one) => trails.get(one) ?? null);
    expect(moves.map(({ kind, byHz }) => [kind, byHz])).toEqual([
      ["moved", 2.8e6],
      ["appeared", null],
    ]);
  });

  it("pairs no dip at a sweep's end", () => {
    const moves = movementsBetween(side(dip(7e6, 1e3, { edge: true })), side(dip(7e6, 1e3)));
    expect(moves.map(({ kind }) => kind)).toEqual(["appeared"]);
  });
});
