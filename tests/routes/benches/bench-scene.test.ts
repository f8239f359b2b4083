import { describe, expect, it } from "vitest";
import type { BenchQuality } from "~/measurement/correction/bench-quality";
import { benchScene } from "~/routes/benches/bench-scene";

const WISH = { swr: 1.5, tolerance: 0.1 };

function quality(frequencyHz: number[], change: Partial<BenchQuality> = {}): BenchQuality {
  const at = Float64Array.from(frequencyHz);
  const unknown = () => new Float64Array(at.length).fill(Number.NaN);
  return {
    correction: "scalar",
    frequencyHz: at,
    insertionLossDb: unknown(),
    flatnessDb: unknown(),
    openShortDisagreementDb: unknown(),
    directivityDb: unknown(),
    trackingDb: unknown(),
    testPortMatchDb: unknown(),
    left: { directivity: unknown(), tracking: unknown(), match: unknown() },
    wish: WISH,
    ranges: [],
    limits: [],
    missing: [],
    ...change,
  };
}

describe("benchScene", () => {
  it("is nothing without frequencies, or with one", () => {
    expect(benchScene([], WISH)).toBeNull();
    expect(benchScene([quality([])], WISH)).toBeNull();
    expect(benchScene([quality([7e6])], WISH)).toBeNull();
  });

  it("draws what is known and leaves out what is not", () => {
    const scene = benchScene([quality([1e6, 2e6], { directivityDb: Float64Array.of(40, 30) })], WISH);
    expect(scene?.strips.map(({ key }) => key)).toEqual(["directivityDb"]);
  });

  it("puts values where the axis says, and what the wish needs on it", () => {
    const scene = benchScene([quality([1e6, 2e6], { directivityDb: Float64Array.of(40, 20) })], WISH);
    const [strip] = scene?.strips ?? [];
    const byLabel = (label: string) =>
      strip.ticks.find((tick) => tick.label.startsWith(label))?.y ?? Number.NaN;
    const [first, last] = strip.lines[0].line.slice(1).split("L");
    expect(Number(first.split(" ")[1])).toBeCloseTo(byLabel("40"), 2);
    expect(Number(last.split(" ")[1])).toBeCloseTo(byLabel("20"), 2);
    // abs Γ of 1.5 is 0.2 and of 1.6 it is 3/13, of 1.4 it is 1/6: the nearer is 0.0308 away, 30.24 dB.
    expect(strip.needed?.label).toBe("needed: 30.2 dB");
    const perDb = (byLabel("20") - byLabel("40")) / 20;
    expect(strip.needed?.y).toBeCloseTo(byLabel("40") + perDb * (40 - 30.238), 1);
  });

  it("makes room for what the wish needs beyond what the bench has", () => {
    const scene = benchScene([quality([1e6, 2e6], { directivityDb: Float64Array.of(12, 8) })], WISH);
    expect(scene?.strips[0].needed).not.toBeNull();
  });

  it("breaks the line at a gap, and keeps an infinite figure on the paper", () => {
    const directivityDb = Float64Array.of(40, 41, Number.NaN, Number.POSITIVE_INFINITY, 42);
    const scene = benchScene([quality([1e6, 2e6, 3e6, 4e6, 5e6], { directivityDb })], WISH);
    const { line } = scene?.strips[0].lines[0] ?? { line: "" };
    expect(line.match(/M/g)).toHaveLength(2);
    expect(line).not.toMatch(/NaN|Infinity/);
  });

  it("shares one axis between two benches, and washes where the first is known", () => {
    const one = quality([1e6, 101e6], {
      directivityDb: Float64Array.of(40, 40),
      ranges: [{ fromHz: 10e6, toHz: 100e6 }],
    });
    const other = quality([10e6, 1000e6], { directivityDb: Float64Array.of(30, 30) });
    const scene = benchScene([one, other], WISH);
    // A span of three decades is logarithmic: 10 MHz lies at a third, 100 MHz at two thirds.
    expect(scene?.known[0].fraction).toBeCloseTo(1 / 3, 6);
    expect(scene?.known[0].widthFraction).toBeCloseTo(1 / 3, 6);
    expect(scene?.strips[0].lines).toHaveLength(2);
  });
});
