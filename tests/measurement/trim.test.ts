import { describe, expect, test } from "vitest";
import type { StepQuantity } from "../../app/measurement/antenna.ts";
import { fitLengthLine, frequencyAt, lengthFor } from "../../app/measurement/length-line.ts";
import { expectedPlaces, type TrailAtStep, trimByProportion, trimTo } from "../../app/measurement/trim.ts";
import cases from "../fixtures/measurement/length-line.json";
import trims from "../fixtures/nec/trims.json";

describe("in proportion", () => {
  /** REFERENCE 8, computed apart. */
  test.each([
    [10.14, 13.95, 14.2, 9.9615],
    [5.07, 14.436, 14.1, 5.1908],
    [20, 7.25, 7.1, 20.4225],
    [16.5, 28.9, 28.4, 16.7905],
  ])("%d m, %d → %d MHz: %d m", (lengthM, from, to, newM) => {
    const trim = trimByProportion(
      { lengthM, frequencyHz: from * 1e6, frequencyUncertaintyHz: 5e3 },
      to * 1e6,
    );
    expect(trim?.lengthM).toBeCloseTo(newM, 4);
    expect(trim?.changeM).toBeCloseTo(newM - lengthM, 4);
    expect(trim?.method).toBe("proportion");
    expect(trim?.lowM ?? 99).toBeLessThan(newM);
    expect(trim?.highM ?? 0).toBeGreaterThan(newM);
  });

  test("its limits hold f ~ L^-0.66, and are not known without the frequency's", () => {
    const known = trimByProportion({ lengthM: 10, frequencyHz: 7.35e6, frequencyUncertaintyHz: 1e3 }, 7e6);
    expect(known?.highM ?? 0).toBeGreaterThan(10 * 1.05 ** (1 / 0.66));
    expect(trimByProportion({ lengthM: 10, frequencyHz: 7.35e6 }, 7e6)).toMatchObject({
      lowM: null,
      highM: null,
    });
  });

  test("far out past a tenth; nothing from nothing", () => {
    expect(trimByProportion({ lengthM: 10, frequencyHz: 8e6 }, 7e6)?.farOut).toBe(true);
    expect(trimByProportion({ lengthM: 10, frequencyHz: 7.1e6 }, 7e6)?.farOut).toBe(false);
    for (const bad of [0, -1, Number.NaN, Number.POSITIVE_INFINITY]) {
      expect(trimByProportion({ lengthM: bad, frequencyHz: 7e6 }, 7e6)).toBeNull();
      expect(trimByProportion({ lengthM: 10, frequencyHz: bad }, 7e6)).toBeNull();
      expect(trimTo([{ lengthM: 10, frequencyHz: 7e6 }], bad)).toBeNull();
    }
    expect(trimTo([], 7e6)).toBeNull();
  });

  test("written out", () => {
    expect(trimByProportion({ lengthM: 10.2, frequencyHz: 7.2e6 }, 7.1e6)?.how).toBe(
      "10.2\u2009m × 7.2\u2009MHz / 7.1\u2009MHz = 10.344\u2009m (+14\u2009cm), as if all of the antenna changed in proportion",
    );
  });
});

describe("the line through earlier lengths: tests/reference/length_line.py (scipy)", () => {
  test.each(cases.map((one, i) => [i, one] as const))("case %i", (_, one) => {
    const line = fitLengthLine(one.lengthsM.map((lengthM, i) => ({ lengthM, frequencyHz: one.hz[i] })));
    if (!line) throw new Error("no line");
    // Student's t is an expansion, right to 0.01 % from 8 degrees of freedom on and to 0.1 % at 6.
    const near = (a: number | null, b: number, share: number) =>
      expect(Math.abs((a ?? 0) / b - 1)).toBeLessThan(share);
    near(line.slope, one.slope, 1e-9);
    near(line.slopeHalf, one.slopeHalf, 1e-3);
    const at = frequencyAt(line, one.atM);
    near(at.value, one.atHz, 1e-10);
    near(at.low, one.atLow, 2e-5);
    near(at.high, one.atHigh, 2e-5);
    const length = lengthFor(line, one.wantedHz);
    near(length.value, one.lengthM, 1e-10);
    near(length.low, one.lengthLow, 2e-5);
    near(length.high, one.lengthHigh, 2e-5);
  });

  test("two pairs pass through both; limits only from the frequencies' own", () => {
    const pairs = [
      { lengthM: 10, frequencyHz: 7.2e6 },
      { lengthM: 10.2, frequencyHz: 7.08e6 },
    ];
    const line = fitLengthLine(pairs);
    if (!line) throw new Error("no line");
    expect(frequencyAt(line, 10)).toEqual({ value: expect.closeTo(7.2e6, 3), low: null, high: null });
    expect(line.slopeHalf).toBeNull();
    const known = fitLengthLine(pairs.map((pair) => ({ ...pair, frequencyUncertaintyHz: 2e3 })));
    if (!known) throw new Error("no line");
    // Propagation: 95 % half-width of one point √(1 + 1/2 + d²/Sxx)·u, at the middle √1.5·2 kHz.
    const middle = frequencyAt(known, Math.sqrt(10 * 10.2));
    expect(((middle.high ?? 0) - (middle.low ?? 0)) / 2).toBeCloseTo(Math.sqrt(1.5) * 2e3, -1.5);
  });

  test("one length is no line; a history that can't be of a length falls back to the proportion", () => {
    expect(fitLengthLine([{ lengthM: 10, frequencyHz: 7e6 }])).toBeNull();
    expect(
      fitLengthLine([
        { lengthM: 10, frequencyHz: 7e6 },
        { lengthM: 10, frequencyHz: 7.1e6 },
      ]),
    ).toBeNull();
    expect(
      fitLengthLine([
        { lengthM: 0, frequencyHz: 7e6 },
        { lengthM: Number.NaN, frequencyHz: 7.1e6 },
      ]),
    ).toBeNull();
    const rising = [
      { lengthM: 10, frequencyHz: 7e6 },
      { lengthM: 10.5, frequencyHz: 7.1e6 },
    ];
    expect(trimTo(rising, 7e6)?.method).toBe("proportion");
  });

  test("a slope lost in noise gives no ends", () => {
    const pairs = [10, 10.01, 10.02, 10.03].map((lengthM, i) => ({
      lengthM,
      frequencyHz: 7e6 * (1 + 0.01 * (i % 2)) * (10 / lengthM),
    }));
    const line = fitLengthLine(pairs);
    if (!line) throw new Error("no line");
    expect(lengthFor(line, 7e6)).toMatchObject({ low: null, high: null });
  });
});

const rounds = trims.flatMap(({ model, part, wantedMhz, rounds: all }) =>
  all.map((round) => ({ model, part, wantedMhz, ...round })),
);

/** NEC-2 as the antenna (tests/reference/nec_causes.py): cut by the advice, solved, cut again. */
describe("advice on antennas of the wrong length", () => {
  test("twelve or more lengths wrong by 1, 2 and 5 % either way", () => {
    expect(rounds.length).toBeGreaterThanOrEqual(12 * 6);
  });

  test.each(rounds)(
    "$model $part off by $off: within 0.3 % after two rounds",
    ({ wantedMhz, pairs: [first, second, third] }) => {
      const wantedHz = wantedMhz * 1e6;
      const pairOf = ([lengthM, mhz]: number[]) => ({ lengthM, frequencyHz: mhz * 1e6 });
      const one = trimTo([pairOf(first)], wantedHz);
      expect(one?.method).toBe("proportion");
      expect((one?.lengthM ?? 0) / second[0]).toBeCloseTo(1, 5);
      if (Math.abs(second[1] / wantedMhz - 1) < 1e-3) return;
      const two = trimTo([pairOf(first), pairOf(second)], wantedHz);
      expect(two?.method).toBe("line");
      expect((two?.lengthM ?? 0) / third[0]).toBeCloseTo(1, 4);
      expect(Math.abs(third[1] / wantedMhz - 1)).toBeLessThan(0.003);
    },
  );
});

describe("expected places after a planned step", () => {
  const trail = (over: Partial<TrailAtStep>): TrailAtStep => ({
    trail: "t",
    frequencyHz: 7.2e6,
    frequencyUncertaintyHz: 2e3,
    part: null,
    history: [],
    ...over,
  });
  const longer: StepQuantity = {
    label: "length",
    unit: "m",
    from: 10,
    to: 10.2,
    target: { part: "a", field: "lengthM" },
  };

  test.each(rounds)(
    "$model $part, off by $off: the solver's answer lies in the interval",
    ({ model, part, pairs }) => {
      const kind = model === "ground-plane" && part === "r" ? "radial" : null;
      const [[from, beforeMhz], [to, afterMhz]] = pairs;
      const planned = { ...longer, from, to, target: { part, field: "lengthM" as const } };
      const [place] = expectedPlaces([trail({ frequencyHz: beforeMhz * 1e6, part, kind })], [planned]);
      expect(place.lowHz ?? Number.POSITIVE_INFINITY).toBeLessThan(afterMhz * 1e6);
      expect(place.highHz ?? 0).toBeGreaterThan(afterMhz * 1e6);
    },
  );

  test("in proportion where the part is its cause, with what proportions are off by", () => {
    const [place] = expectedPlaces([trail({ part: "a" })], [longer]);
    expect(place.frequencyHz).toBeCloseTo((7.2e6 * 10) / 10.2, 3);
    expect(place.lowHz ?? 0).toBeLessThan(place.frequencyHz);
    expect(place.highHz ?? 0).toBeGreaterThan(7.2e6 * (10 / 10.2) ** 0.66);
    expect(place.how).toContain("in proportion");
  });

  test("by the line where there is a history, as scipy has it", () => {
    const [one] = cases;
    const pairs = one.lengthsM.map((lengthM, i) => ({ lengthM, frequencyHz: one.hz[i] }));
    const from = one.lengthsM[0];
    const line = fitLengthLine(pairs);
    const frequencyHz = line ? frequencyAt(line, from).value : 0;
    const step = { ...longer, from, to: one.atM };
    const [place] = expectedPlaces(
      [trail({ frequencyHz, frequencyUncertaintyHz: 0, history: [{ part: "a", pairs }] })],
      [step],
    );
    expect(place.frequencyHz / one.atHz).toBeCloseTo(1, 8);
    expect((place.lowHz ?? 0) / one.atLow).toBeCloseTo(1, 4);
    expect(place.how).toContain(`line through ${one.hz.length} earlier lengths`);
  });

  test("two lengths at once multiply; a history of another part does not count", () => {
    const both = [
      longer,
      { ...longer, target: { part: "feedline", field: "lengthM" as const }, from: 20, to: 21 },
    ];
    const history = [
      {
        part: "feedline",
        pairs: [
          { lengthM: 20, frequencyHz: 7.2e6 },
          { lengthM: 19, frequencyHz: (7.2e6 * 20) / 19 },
        ],
      },
    ];
    const [place] = expectedPlaces([trail({ part: "a", history })], both);
    expect(place.frequencyHz).toBeCloseTo((7.2e6 * 10 * 20) / 10.2 / 21, 0);
    expect(place).toMatchObject({ lowHz: null, highHz: null });
  });

  test("what has nothing to do with the step stays, and says so", () => {
    for (const quantities of [
      [],
      [longer],
      [{ ...longer, to: null }],
      [{ ...longer, to: 0 }],
      [{ ...longer, target: null }],
    ] as StepQuantity[][]) {
      const [place] = expectedPlaces([trail({ part: "m" })], quantities);
      expect(place).toMatchObject({
        frequencyHz: 7.2e6,
        lowHz: null,
        highHz: null,
        how: expect.stringContaining("not known to move"),
      });
    }
    expect(expectedPlaces([trail({ frequencyHz: Number.NaN })], [longer])).toEqual([]);
    expect(expectedPlaces([], [longer])).toEqual([]);
  });
});
