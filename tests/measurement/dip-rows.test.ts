import { describe, expect, it } from "vitest";
import { dipRows, type RowDip } from "~/measurement/dip-rows";

/** Invented dips; `trail` null where none is known. */
function dip(megahertz: number, trail: string | null = null, more: Partial<RowDip> = {}): RowDip {
  const id = `${megahertz}${trail ?? ""}`;
  return { id, frequencyHz: megahertz * 1e6, returnLossDb: 20, widthHz: 2e5, trail, ...more };
}

function sweep(project: string, ...dips: RowDip[]) {
  return { project, dips };
}

/** Frequencies in MHz, row by row. */
function rows(...sweeps: ReturnType<typeof sweep>[]) {
  return dipRows(sweeps).map((row) => row.map((one) => one && one.frequencyHz / 1e6));
}

describe("dipRows", () => {
  it("pairs by nearest log frequency and orders rows by frequency", () => {
    expect(rows(sweep("p", dip(21.2), dip(7.1)), sweep("q", dip(7.2), dip(21)))).toEqual([
      [7.1, 7.2],
      [21.2, 21],
    ]);
  });

  it("gives a dip that the others do not show a row of its own", () => {
    expect(rows(sweep("p", dip(7.1)), sweep("q", dip(7.2), dip(14)), sweep("r", dip(14.2)))).toEqual([
      [7.1, 7.2, null],
      [null, 14, 14.2],
    ]);
  });

  it("takes the pairing of least total distance where the nearest alone would leave one over", () => {
    // 10.4 is nearest to 10.5, yet 10.5 has no other partner than it, and 10 goes with 9.9.
    expect(rows(sweep("p", dip(10), dip(10.5)), sweep("q", dip(9.9), dip(10.4)))).toEqual([
      [10, 9.9],
      [10.5, 10.4],
    ]);
  });

  it("does not pair across the gate, 13 % in log frequency", () => {
    expect(rows(sweep("p", dip(10)), sweep("q", dip(10 * Math.exp(0.12))))).toHaveLength(1);
    expect(rows(sweep("p", dip(10)), sweep("q", dip(10 * Math.exp(0.14))))).toHaveLength(2);
  });

  it("follows a trail however far it went, and keeps two trails of one project apart", () => {
    expect(rows(sweep("p", dip(7, "a")), sweep("p", dip(9, "a"), dip(7.05, "b")))).toEqual([
      [null, 7.05],
      [7, 9],
    ]);
  });

  it("lets trails of different projects meet", () => {
    expect(rows(sweep("p", dip(7, "a")), sweep("q", dip(7.05, "b")))).toEqual([[7, 7.05]]);
  });

  it("does not depend on what a trail is called, nor on the order of dips", () => {
    const one = sweep("p", dip(7.1, "x"), dip(14, "y"), dip(14.9, "z"));
    const other = sweep("q", dip(14.8), dip(7.3), dip(14.1));
    const back = { ...other, dips: [...other.dips].reverse() };
    expect(rows(one, other)).toEqual(rows(one, back));
    expect(rows(one, other)).toEqual([
      [7.1, 7.3],
      [14, 14.1],
      [14.9, 14.8],
    ]);
  });

  it("holds every dip exactly once, at most one of a sweep in a row", () => {
    const sweeps = Array.from({ length: 12 }, (_, i) =>
      sweep(
        `p${i}`,
        ...Array.from({ length: 8 }, (_, j) => dip(3 * 1.3 ** j * (1 + ((i * 7 + j) % 5) / 100))),
      ),
    );
    const found = dipRows(sweeps);
    expect(found).toHaveLength(8);
    const seen = found.flatMap((row) => row.filter((one) => one !== null));
    expect(new Set(seen).size).toBe(96);
    for (const row of found) expect(row).toHaveLength(12);
  });

  it("leaves out what has no frequency, and has no rows for nothing", () => {
    expect(rows(sweep("p", dip(Number.NaN), dip(0)), sweep("q"))).toEqual([]);
    expect(rows()).toEqual([]);
  });
});
