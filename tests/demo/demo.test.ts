import { describe, expect, it } from "vitest";
import { analyse } from "~/measurement/analyse";
import { DEFAULT_SETTINGS } from "~/measurement/sweep";
import { read } from "~/readers/read";
import { quarterWave, reflection } from "../../scripts/demo/antenna.ts";
import { ZERO_DBM } from "../../scripts/demo/bridge.ts";
import { randomBy } from "../../scripts/demo/random.ts";
import { reedBankFiles } from "../../scripts/demo/reed-bank.ts";

const files = reedBankFiles();
type Name = keyof typeof files;

function dipsOf(name: Name) {
  const result = read({ name: `${name}.txt`, bytes: files[name] }, { text: { zeroDb: ZERO_DBM } });
  if (!result.ok) throw new Error(`${name}: ${result.problem.message}`);
  return analyse(result.sweep, DEFAULT_SETTINGS).dips.map((dip) => dip.frequencyHz / 1e6);
}

describe("the demo's files", () => {
  it("are the same every time", () => {
    expect(reedBankFiles()).toEqual(files);
  });

  it.each(Object.keys(files) as Name[])("%s is read", (name) => {
    expect(dipsOf(name).length).toBeGreaterThan(0);
  });

  it("are written in several ways", () => {
    const heads = Object.values(files).map((bytes) => new TextDecoder().decode(bytes).slice(0, 200));
    expect(heads.filter((head) => head.includes("# MHz S RI R 50")).length).toBeGreaterThan(1);
    expect(heads.some((head) => head.includes("# Hz S MA R 50"))).toBe(true);
    expect(heads.some((head) => head.includes("Pegel [dBm]"))).toBe(true);
    expect(heads.some((head) => head.includes("\tSWR"))).toBe(true);
    expect(heads.some((head) => head.includes("R/ohm X/ohm"))).toBe(true);
  });

  it("tell the story: the odd dip follows the cable, and goes with the choke", () => {
    const near = (name: Name, mhz: number) => dipsOf(name).filter((hz) => Math.abs(hz - mhz) < 1).length;
    expect(near("radials", 52.2)).toBe(1);
    expect(near("stakeFar", 44.4)).toBe(1);
    expect(near("stakeNear", 52.2)).toBe(0);
    expect(near("stakeNearWide", 62)).toBe(1);
    expect(near("hub", 52.2)).toBe(0);
    for (const mhz of [44.4, 52.2, 62]) expect(near("choked", mhz)).toBe(0);
    for (const name of ["bothCut", "radials", "choked", "final"] as const) {
      expect(near(name, 7.12)).toBe(1);
      expect(near(name, 18.16)).toBe(1);
    }
  });
});

describe("the demo's antenna", () => {
  const quiet = { noise: 0, directivity: 0 };
  const still = () => 0;

  it("is matched where its resistance is the reference, and reflects all far away", () => {
    const [first] = quarterWave(10, 1, 50, 600);
    const gamma = reflection([first], { lengthM: 0, velocityFactor: 1, k1: 0, k2: 0 }, quiet, still);
    expect(Math.hypot(gamma(first.hz).re, gamma(first.hz).im)).toBeLessThan(1e-12);
    expect(Math.hypot(gamma(1e5).re, gamma(1e5).im)).toBeGreaterThan(0.999);
  });

  it("agrees with a series circuit worked out by hand", () => {
    // 100 Ω at resonance, reference 50 Ω: Γ = 1/3.
    const gamma = reflection(
      [{ hz: 1e7, ohm: 100, q: 10 }],
      { lengthM: 0, velocityFactor: 1, k1: 0, k2: 0 },
      quiet,
      still,
    );
    expect(gamma(1e7).re).toBeCloseTo(1 / 3, 12);
    expect(gamma(1e7).im).toBeCloseTo(0, 12);
    // 100 + j100·10·(1.1 − 1/1.1) = 100 + j190.909…: Γ = (Z − 50)/(Z + 50).
    const x = 1000 * (1.1 - 1 / 1.1);
    const size = 150 ** 2 + x ** 2;
    expect(gamma(1.1e7).re).toBeCloseTo((50 * 150 + x * x) / size, 12);
    expect(gamma(1.1e7).im).toBeCloseTo((100 * x) / size, 12);
  });

  it("is seen weaker through a lossy cable, both ways", () => {
    const gamma = reflection([], { lengthM: 10, velocityFactor: 0.66, k1: 0, k2: 0.01 }, quiet, still);
    // 10 m at 0.1 dB/m: 1 dB there and 1 dB back.
    expect(20 * Math.log10(Math.hypot(gamma(1e7).re, gamma(1e7).im))).toBeCloseTo(-2, 10);
  });
});

describe("randomBy", () => {
  it("gives the same numbers for a name, others for another, all from 0 to 1", () => {
    const take = (name: string) => {
      const random = randomBy(name);
      return Array.from({ length: 1000 }, random);
    };
    expect(take("a")).toEqual(take("a"));
    expect(take("a")).not.toEqual(take("b"));
    expect(take("a").every((value) => value >= 0 && value < 1)).toBe(true);
    expect(take("a").reduce((sum, value) => sum + value) / 1000).toBeCloseTo(0.5, 1);
  });
});
