import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { correctSweep } from "../../../app/measurement/correction/correct.ts";
import { zeroLine } from "../../../app/measurement/correction/zero-line.ts";
import { bench, codes, scalarSweep } from "./benches.ts";

/** Made by tests/reference/bridge.py: node equations of a resistive bridge, solved. */
const bridge: {
  arms: number[][];
  mismatched: { openOverShortDb: number; returnLossDb: [number, number][] }[];
  frequencyHz: number[];
  benches: (Record<"open" | "short" | "load" | "antenna", number[]> & { truth: number })[];
} = JSON.parse(readFileSync(new URL("../../fixtures/measurement/bridge.json", import.meta.url), "utf8"));
const F = bridge.frequencyHz;
const level = (db: number) =>
  scalarSweep(
    [1e6, 2e6, 3e6],
    [0, 0, 0].map(() => 10 ** (db / 20)),
  );
const db = (magnitude: number) => 20 * Math.log10(magnitude);

describe("the 0 dB line", () => {
  /**
   * REFERENCE section 5, "averaging kind", average of magnitudes: open and short of Γm = D + Γ/(1 − MΓ), D and M in
   * phase.
   */
  it.each([
    [0.01, 0.05, 0.0217],
    [0.0316, 0.1, 0.0873],
    [0.1, 0.1, 0.0873],
  ])("from D %d and M %d is off by the second order only", (d, m, off) => {
    const at = [1e6, 2e6];
    const open = scalarSweep(at, [d + 1 / (1 - m), d + 1 / (1 - m)]);
    const short = scalarSweep(at, [1 / (1 + m) - d, 1 / (1 + m) - d]);
    expect(db(zeroLine({ open, short }, Float64Array.from(at))?.amplitude[1] ?? 0)).toBeCloseTo(off, 3);
  });

  it("is the mean amplitude, whichever of the two is which, or the one there is", () => {
    const [open, short] = [level(-12), level(-13)];
    const mean = db((open.magnitude[0] + short.magnitude[0]) / 2);
    const sweep = level(-22);
    const read = (references: Parameters<typeof bench>[0]) =>
      db(correctSweep(sweep, bench(references)).sweep.magnitude[1]);
    expect(read({ open, short })).toBeCloseTo(-22 - mean, 12);
    expect(read({ open: short, short: open })).toBeCloseTo(-22 - mean, 12);
    expect(read({ open })).toBeCloseTo(-10, 12);
    expect(read({ short })).toBeCloseTo(-9, 12);
  });

  it("is the given level where nothing was swept, in the unit of the sweep", () => {
    const done = correctSweep(level(-22), bench({}, {}, { zeroDb: -12 }));
    expect(db(done.sweep.magnitude[0])).toBeCloseTo(-10, 12);
    expect(done.correction.kind).toBe("scalar");
    const already = correctSweep(level(-10), bench({}, {}, { zeroDb: -12 }), {
      sweep: { quantity: "level", zeroDb: -12 },
    });
    expect(db(already.sweep.magnitude[0])).toBeCloseTo(-10, 12);
  });

  it("without anything leaves the sweep as it is", () => {
    const sweep = level(-5);
    expect(correctSweep(sweep, bench({}))).toEqual({
      sweep,
      correction: { kind: "none", plane: "instrument", fromHz: null, toHz: null },
      warnings: [],
    });
  });
});

describe("a scalar correction", () => {
  it("interpolates amplitude on another grid, is a gap where a reference is, and ends where they end", () => {
    const open = scalarSweep([2e6, 4e6, 6e6, 8e6], [0.2, 0.4, 0.4, Number.NaN]);
    const sweep = scalarSweep([1e6, 2e6, 3e6, 5e6, 7e6, 9e6], [0.1, 0.1, 0.15, 0.2, 0.2, 0.2]);
    const done = correctSweep(sweep, bench({ open }));
    expect(Array.from(done.sweep.magnitude)).toEqual([
      Number.NaN,
      0.5,
      expect.closeTo(0.5, 12),
      0.5,
      Number.NaN,
      Number.NaN,
    ]);
    expect(done.correction).toEqual({ kind: "scalar", plane: "port", fromHz: 2e6, toHz: 8e6 });
    expect(codes(done.warnings)).toContain("references-short");
  });

  it("takes a picture's limits along", () => {
    const pictureLimits = {
      frequencyHz: Float64Array.of(1, 1, 1),
      magnitudeLow: Float64Array.of(0.01, 0.01, 0.01),
      magnitudeHigh: Float64Array.of(0.03, 0.03, 0.03),
    };
    const done = correctSweep({ ...level(-34), pictureLimits }, bench({ open: level(-20) }));
    expect(done.sweep.pictureLimits?.magnitudeHigh[0]).toBeCloseTo(0.3, 12);
    expect(done.sweep.pictureLimits?.magnitudeLow[0]).toBeCloseTo(0.1, 12);
  });

  it("copes with no points, one point and only gaps", () => {
    const open = level(-12);
    expect(correctSweep(scalarSweep([], []), bench({ open })).correction.kind).toBe("none");
    expect(correctSweep(scalarSweep([2e6], [0.1]), bench({ open })).correction.fromHz).toBe(2e6);
    const gaps = correctSweep(scalarSweep([1e6, 2e6], [Number.NaN, Number.NaN]), bench({ open }));
    expect(gaps.correction.kind).toBe("none");
    const nothing = correctSweep(level(-5), bench({ open: scalarSweep([], []) }));
    expect(nothing.correction.kind).toBe("none");
    expect(codes(nothing.warnings)).toContain("references-short");
  });
});

describe("limits", () => {
  it("hold for 24 whole benches whose truth is known, at every frequency", () => {
    let widest = 0;
    for (const one of bridge.benches) {
      const references = {
        open: scalarSweep(F, one.open),
        short: scalarSweep(F, one.short),
        load: scalarSweep(F, one.load),
      };
      const { sweep } = correctSweep(
        scalarSweep(F, one.antenna),
        bench(references, { loadReturnLossDb: 90 }),
      );
      const limits = sweep.benchLimits;
      if (!limits) throw new Error("no limits");
      F.forEach((_, i) => {
        const m = sweep.magnitude[i];
        const half = limits.directivity[i] + limits.tracking[i] * m + limits.match[i] * m * m;
        expect(Math.abs(m - one.truth)).toBeLessThanOrEqual(half + 1e-9);
        widest = Math.max(widest, half);
      });
    }
    expect(widest).toBeLessThan(0.3);
  });

  it("say of an arm of 49.6 Ω that the directivity is 47.92 dB", () => {
    const at = [1e6, 2e6];
    const [, ab] = bridge.arms.find(([ohm]) => ohm === 49.6) ?? [];
    expect(ab).toBeCloseTo(47.92, 2);
    const flat = (value: number) => scalarSweep(at, [value, value]);
    const references = { open: flat(0.25), short: flat(0.25), load: flat(0.25 * 10 ** (-ab / 20)) };
    const { sweep } = correctSweep(flat(0.1), bench(references));
    expect(-db(sweep.benchLimits?.directivity[0] ?? 0)).toBeCloseTo(47.92, 2);
  });

  it("follow the source's and the detector's mismatch as the node equations do", () => {
    // REFERENCE section 5: 40 Ω source or detector, then a detector of infinite resistance.
    expect(bridge.mismatched.map(({ openOverShortDb }) => openOverShortDb)).toEqual([
      expect.closeTo(-0.4827, 3),
      expect.closeTo(-0.4827, 3),
      expect.closeTo(4.437, 3),
    ]);
    expect(bridge.mismatched[0].returnLossDb.map(([, loss]) => loss)).toEqual([
      expect.closeTo(9.4683, 3),
      expect.closeTo(9.6292, 3),
    ]);
    for (const { openOverShortDb, returnLossDb } of bridge.mismatched) {
      const at = [1e6, 2e6];
      const flat = (value: number) => scalarSweep(at, [value, value]);
      const open = 10 ** (openOverShortDb / 20);
      for (const [ohm, loss] of returnLossDb) {
        const references = { open: flat(open), short: flat(1), load: flat(1e-6) };
        const seen = ((open + 1) / 2) * 10 ** (-loss / 20);
        const { sweep } = correctSweep(flat(seen), bench(references, { loadReturnLossDb: 90 }));
        const m = sweep.magnitude[0];
        const limits = sweep.benchLimits;
        const half = limits ? limits.directivity[0] + limits.tracking[0] * m + limits.match[0] * m * m : 0;
        expect(Math.abs(m - Math.abs((ohm - 50) / (ohm + 50)))).toBeLessThanOrEqual(half);
      }
    }
  });

  it("come from the given directivity where there is no load, and are unknown without either", () => {
    const [open, short] = [level(-12), level(-12.5)];
    const given = correctSweep(level(-22), bench({ open, short }, {}, { directivityDb: 35 }));
    expect(given.sweep.benchLimits?.directivity[0]).toBeCloseTo(10 ** (-35 / 20), 12);
    const none = correctSweep(level(-22), bench({ open, short }));
    expect(none.sweep.benchLimits?.directivity[0]).toBeNaN();
    expect(none.sweep.benchLimits?.tracking[0]).toBeNaN();
    expect(codes(none.warnings)).toEqual(["directivity-unknown"]);
  });

  it("add what the load itself may return, and let no notch of an unknown load count", () => {
    const at = [10e6, 10.2e6, 10.4e6, 20e6];
    const references = {
      open: scalarSweep(at, [1, 1, 1, 1]),
      load: scalarSweep(at, [0.03, 0.001, 0.03, 0.01]),
    };
    const sweep = scalarSweep(at, [0.5, 0.5, 0.5, 0.5]);
    const unknown = correctSweep(sweep, bench(references)).sweep.benchLimits?.directivity;
    expect(Array.from(unknown ?? [])).toEqual([0.03, 0.03, 0.03, 0.01]);
    const known = correctSweep(sweep, bench(references, { loadReturnLossDb: 40 })).sweep.benchLimits
      ?.directivity;
    expect(known?.[1]).toBeCloseTo(0.011, 12);
    const ohm = correctSweep(sweep, bench(references, { loadOhm: 51 })).sweep.benchLimits?.directivity;
    expect(ohm?.[3]).toBeCloseTo(0.01 + 1 / 101, 12);
  });

  it("grow with one reference only, and never shrink below the given tracking", () => {
    const references = { open: level(-12), short: level(-12.1), load: level(-52) };
    const two = correctSweep(level(-22), bench(references)).sweep.benchLimits;
    const one = correctSweep(level(-22), bench({ ...references, short: undefined }));
    expect(one.sweep.benchLimits?.tracking[0]).toBeGreaterThan(10 * (two?.tracking[0] ?? 1));
    expect(codes(one.warnings)).toContain("one-reference");
    const drifting = correctSweep(level(-22), bench(references, {}, { trackingDb: 0.2 })).sweep.benchLimits;
    expect(drifting?.tracking[0]).toBeCloseTo(10 ** (0.2 / 20) - 1, 12);
    const matched = correctSweep(level(-22), bench(references, {}, { testPortMatchDb: 30 })).sweep
      .benchLimits;
    expect(matched?.match[0]).toBeCloseTo(10 ** (-30 / 20), 12);
  });
});
