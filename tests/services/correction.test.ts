import { describe, expect, it } from "vitest";
import { IDEAL_STANDARDS, NOTHING_GIVEN } from "~/measurement/bench";
import { cableNamed } from "~/measurement/cables";
import type { Sweep } from "~/measurement/sweep";
import type { Reading } from "~/readers/reading";
import { type CorrectionTask, correctAsRead, correctedSweep } from "~/services/correction.server";

/** Scalar sweeps of one value each, 1 to 10 MHz. */
function flat(magnitude: number, fromHz = 1e6, toHz = 10e6): Sweep {
  const n = 10;
  return {
    frequencyHz: Float64Array.from({ length: n }, (_, i) => fromHz + ((toHz - fromHz) * i) / (n - 1)),
    magnitude: new Float64Array(n).fill(magnitude),
    referenceOhm: 50,
    plane: "instrument",
  };
}

const LINE = { name: "own values", k1: 0, k2: 0.01, lengthM: 10, velocityFactor: 0.66 };

function task(more: Partial<CorrectionTask> = {}): CorrectionTask {
  const references = { open: flat(0.2), short: flat(0.2), load: flat(0.002) };
  const bench = { references, standards: IDEAL_STANDARDS, given: NOTHING_GIVEN };
  return { bench, readAs: {}, feedline: LINE, plane: "antenna", ...more };
}

describe("correctedSweep", () => {
  const measured = flat(0.1);

  it("leaves a sweep alone at the instrument, and where nothing is said", () => {
    expect(correctedSweep(measured, task({ plane: "instrument" }))).toMatchObject({
      sweep: measured,
      correction: null,
      warnings: [],
    });
    const none = correctedSweep(measured, task({ bench: null, feedline: null }));
    expect(none).toMatchObject({ sweep: measured, correction: null });
  });

  it("divides by the 0 dB line at the port", () => {
    const { sweep, correction } = correctedSweep(measured, task({ plane: "port" }));
    expect(correction).toMatchObject({ kind: "scalar", plane: "port", fromHz: 1e6, toHz: 10e6 });
    for (const value of sweep.magnitude) expect(value).toBeCloseTo(0.5, 12);
  });

  it("takes the line away after the bench: abs Γ times 10^(A/10), A one way in dB", () => {
    const { sweep, correction } = correctedSweep(measured, task());
    expect(correction).toMatchObject({ kind: "scalar", plane: "antenna" });
    // 10 m of 0.01 dB per metre and MHz: 1 dB at 10 MHz.
    expect(sweep.magnitude[9]).toBeCloseTo(0.5 * 10 ** 0.1, 12);
    expect(sweep.plane).toBe("antenna");
  });

  it("takes the line away without a bench, with the limits unknown", () => {
    const { sweep, correction } = correctedSweep(measured, task({ bench: null }));
    expect(correction).toEqual({ kind: "none", plane: "antenna", fromHz: null, toHz: null });
    expect(sweep.magnitude[9]).toBeCloseTo(0.1 * 10 ** 0.1, 12);
    expect(sweep.benchLimits).toBeUndefined();
  });

  it("keeps abs Γ over 1 behind a line that is too lossy, and says it", () => {
    const feedline = { ...LINE, lengthM: 100 };
    const { sweep, warnings } = correctedSweep(measured, task({ feedline }));
    expect(sweep.magnitude[9]).toBeCloseTo(5, 10);
    expect(warnings.map(({ code }) => code)).toContain("feedline-over-unity");
  });

  it("shows as measured, and says so, what the references nowhere reach", () => {
    const outside = flat(0.1, 20e6, 30e6);
    const done = correctedSweep(outside, task({ feedline: null }));
    expect(done.sweep).toBe(outside);
    expect(done.correction).toMatchObject({ kind: "none", plane: "instrument" });
    expect(done.warnings).not.toHaveLength(0);
  });

  it("shows as measured, and says so, what the cable's sheet nowhere reaches", () => {
    const cable = cableNamed("RG-8X (type 9258, foam PE)");
    if (!cable) throw new Error("no cable");
    const far = flat(0.1, 50e9, 60e9);
    const done = correctedSweep(far, task({ bench: null, feedline: { ...cable, lengthM: 10 } }));
    expect(done.sweep).toBe(far);
    expect(done.correction).toBeNull();
    expect(done.warnings.map(({ code }) => code)).toContain("corrected-nowhere");
  });

  it("passes over a line that can't be, and says it", () => {
    const done = correctedSweep(measured, task({ feedline: { ...LINE, velocityFactor: 0 } }));
    expect(done.correction?.plane).toBe("port");
    expect(done.warnings.map(({ code }) => code)).toContain("feedline-impossible");
  });
});

describe("correctAsRead", () => {
  it("brings levels to one 0 dB line: only their ratio counts", () => {
    // Levels of −34 and −20 dBm: the sweep read against −14 dBm, the references against 0 dBm.
    const sweep = flat(10 ** ((-34 + 14) / 20));
    const level = flat(10 ** (-20 / 20));
    const bench = {
      references: { open: level, short: level },
      standards: IDEAL_STANDARDS,
      given: NOTHING_GIVEN,
    };
    const asLevel = { quantity: "level" as const, zeroDb: 0 };
    const reading = { quantity: "level", spec: { text: { zeroDb: -14 } } } as Reading;
    const done = correctAsRead(sweep, reading, {
      ...task({ plane: "port", bench }),
      readAs: { open: asLevel, short: asLevel },
    });
    for (const value of done.sweep.magnitude) expect(value).toBeCloseTo(10 ** (-14 / 20), 12);
    // The references that were handed over are as they were.
    expect(level.magnitude[0]).toBeCloseTo(0.1, 12);
  });
});
