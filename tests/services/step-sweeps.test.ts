import { describe, expect, it } from "vitest";
import { stepsBetween, sweepsAround } from "~/services/step-sweeps";

function at(n: number): Date {
  return new Date(Date.UTC(2026, 4, n));
}

function step(id: number, when: Date | null, more = {}) {
  return { id, state: "done" as const, at: when, beforeSweepId: null, afterSweepId: null, ...more };
}

/** The third has no date of its own: it came in on the ninth. */
const SWEEPS = [
  { id: 1, takenAt: at(2), createdAt: at(20) },
  { id: 2, takenAt: at(5), createdAt: at(20) },
  { id: 3, takenAt: null, createdAt: at(9) },
];

describe("sweepsAround", () => {
  it.each([
    ["before all", at(1), null, 1],
    ["between two", at(3), 1, 2],
    ["of the moment of one, which is then after it", at(5), 1, 2],
    ["after all", at(10), 3, null],
  ])("of a step %s", (_, when, before, after) => {
    const around = sweepsAround(step(7, when), SWEEPS);
    expect([around.before?.id ?? null, around.after?.id ?? null]).toEqual([before, after]);
    expect([around.beforeSaid, around.afterSaid]).toEqual([false, false]);
  });

  it("believes a person, as long as the sweep is there", () => {
    const around = sweepsAround(step(7, at(3), { beforeSweepId: 2, afterSweepId: 99 }), SWEEPS);
    expect([around.before?.id, around.beforeSaid, around.after?.id, around.afterSaid]).toEqual([
      2,
      true,
      2,
      false,
    ]);
  });

  it("of a planned step is the newest sweep, and none after it", () => {
    const around = sweepsAround(step(7, at(3), { state: "planned" }), SWEEPS);
    expect([around.before?.id, around.after]).toEqual([3, null]);
  });
});

describe("stepsBetween", () => {
  const steps = [step(1, at(3)), step(2, at(4)), step(3, at(6)), step(4, at(4), { state: "planned" })];

  it("names the others between the same sweeps, of one day or not", () => {
    expect(stepsBetween(steps[0], steps, SWEEPS).map(({ id }) => id)).toEqual([2]);
    expect(stepsBetween(steps[1], steps, SWEEPS).map(({ id }) => id)).toEqual([1]);
    expect(stepsBetween(steps[2], steps, SWEEPS)).toEqual([]);
  });

  it("counts those inside a wider pair that a person chose", () => {
    const wide = step(1, at(3), { afterSweepId: 3 });
    expect(stepsBetween(wide, steps, SWEEPS).map(({ id }) => id)).toEqual([2, 3]);
  });
});
