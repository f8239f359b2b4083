import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  formatLength,
  formatLengthChange,
  type LengthUnit,
  parseLength,
} from "../../app/measurement/lengths.ts";

const metresOf = (text: string, preferred: LengthUnit = "metres") => {
  const parsed = parseLength(text, preferred);
  if (!parsed.ok) throw new Error(`${text}: ${parsed.message}`);
  return parsed.metres;
};

/** 1 in = 25.4 mm and 1 ft = 304.8 mm exactly (the international inch of 1959; from memory, not seen). */
describe("as people write them", () => {
  test.each([
    ["10 ft 3 in", 3.1242],
    [`10' 3 1/2"`, 3.1369],
    ["10′ 3½″", 3.1369],
    ["10'3\"", 3.1242],
    ["10' 3", 3.1242],
    ["10ft3in", 3.1242],
    ["10 feet, 3 inches", 3.1242],
    ["3.1 m", 3.1],
    ["312 cm", 3.12],
    ["3 m 12 cm", 3.12],
    ["5,07", 5.07],
    ["5,07 m", 5.07],
    [".5 m", 0.5],
    ["1 1/2 in", 0.0381],
    ["1/2 ft", 0.1524],
    ["½ in", 0.0127],
    ["40 mm", 0.04],
    ["12 ''", 0.3048],
    ["  20  m  ", 20],
  ])("%s", (text, metres) => expect(metresOf(text)).toBeCloseTo(metres, 10));

  test("a bare number follows the person's setting", () => {
    expect(metresOf("10", "metres")).toBe(10);
    expect(metresOf("10", "feet")).toBeCloseTo(3.048, 12);
    expect(metresOf("10,5", "feet")).toBeCloseTo(3.2004, 12);
    expect(metresOf("10 m", "feet")).toBe(10);
  });
});

describe("what is no length is refused where the fault is", () => {
  test.each([
    ["", 0, "No length"],
    ["   ", 0, "No length"],
    ["0", 0, "more than zero"],
    ["0 ft 0 in", 0, "more than zero"],
    [" -3 m", 1, "negative"],
    ["−3 m", 0, "negative"],
    ["about 3 m", 0, "number was expected"],
    ["3.1 furlong", 4, "no unit"],
    ["10 ft x", 6, "number was expected"],
    ["3 in 10 ft", 5, "the larger first"],
    ["3 m 4 m", 4, "the larger first"],
    ["3 4", 0, "needs its unit"],
    ["3 1/0 in", 0, "zero"],
    ["3..1 m", 1, "no length"],
    ["NaN", 0, "number was expected"],
    ["{}", 0, "no length"],
  ])("%j at %i: %s", (text, at, message) => {
    const parsed = parseLength(text);
    expect(parsed.ok).toBe(false);
    if (parsed.ok) return;
    expect(parsed.message).toContain(message);
    expect(parsed.at).toBe(at);
  });

  test("a kilometre, a millimetre and a comma before three digits are asked about, and kept", () => {
    expect(parseLength("1 km")).toMatchObject({
      ok: true,
      metres: 1000,
      ask: expect.stringContaining("unit"),
    });
    expect(parseLength("1000")).toMatchObject({ metres: 1000, ask: expect.stringContaining("1000") });
    expect(parseLength("2 mm")).toMatchObject({ metres: 0.002, ask: expect.stringContaining("shorter") });
    expect(parseLength("10,140")).toMatchObject({
      metres: 10.14,
      ask: expect.stringContaining("decimal sign"),
    });
    expect(parseLength("0,140")).toMatchObject({ ask: null });
    expect(parseLength("10.14 m")).toMatchObject({ ask: null });
  });

  test("no text throws, and every fault lies within it", () => {
    const strings = fc.string({ unit: fc.constantFrom(..."0123456789.,/-' \"ftinmck½"), maxLength: 14 });
    fc.assert(
      fc.property(strings, fc.constantFrom<LengthUnit>("metres", "feet"), (text, preferred) => {
        const parsed = parseLength(text, preferred);
        if (parsed.ok) return parsed.metres > 0 && Number.isFinite(parsed.metres);
        return parsed.at >= 0 && parsed.at <= text.length && parsed.message.length > 0;
      }),
    );
  });
});

describe("as they are shown", () => {
  test.each([
    [10.1418, "metres", "10.142\u2009m"],
    [5, "metres", "5\u2009m"],
    [0.25, "metres", "0.25\u2009m"],
    [123.456, "metres", "123.46\u2009m"],
    [3.1369, "feet", "10\u2009ft 3 1/2\u2009in"],
    [3.048, "feet", "10\u2009ft"],
    [3.0479, "feet", "10\u2009ft"],
    [0.0127, "feet", "1/2\u2009in"],
    [0.0381, "feet", "1 1/2\u2009in"],
    [40, "feet", "131\u2009ft 3\u2009in"],
    [null, "feet", "unknown"],
    [Number.NaN, "metres", "unknown"],
  ] as [number | null, LengthUnit, string][])("%d m in %s", (metres, unit, text) => {
    expect(formatLength(metres, unit)).toBe(text);
  });

  test("changes with their sign", () => {
    expect(formatLengthChange(-0.0293)).toBe("−2.9\u2009cm");
    expect(formatLengthChange(0.121)).toBe("+12\u2009cm");
    expect(formatLengthChange(-1.254)).toBe("−1.25\u2009m");
    expect(formatLengthChange(0.028575, "feet")).toBe("+1 1/8\u2009in");
    expect(formatLengthChange(null)).toBe("unknown");
  });

  test("what is shown reads back as the same length, to half of its last step", () => {
    fc.assert(
      fc.property(fc.double({ min: 0.02, max: 400, noNaN: true }), (metres) => {
        for (const [unit, step] of [
          ["metres", 0.01],
          ["feet", 0.0254],
        ] as [LengthUnit, number][]) {
          const back = metresOf(formatLength(metres, unit));
          expect(Math.abs(back - metres)).toBeLessThanOrEqual(step / 2 + 1e-9);
        }
      }),
    );
  });
});
