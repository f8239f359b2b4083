import { describe, expect, it } from "vitest";
import { renormalise } from "../../../app/measurement/renormalise.ts";
import { read } from "../../../app/readers/read.ts";
import type { Given } from "../../../app/readers/reading.ts";

/** Examples and rules of the Touchstone File Format Specification 1.1 and 2.0, IBIS Open Forum; numbers computed with independent code. */

function gamma(name: string, text: string, given?: Given) {
  const result = read({ name, bytes: new TextEncoder().encode(text) }, given);
  if (!result.ok) throw new Error(result.problem.message);
  const { sweep, reading, warnings } = result;
  const at = (i: number) => ({
    size: sweep.magnitude[i],
    angle: (Math.atan2(sweep.gammaIm?.[i] ?? Number.NaN, sweep.gammaRe?.[i] ?? Number.NaN) * 180) / Math.PI,
    swr: (1 + sweep.magnitude[i]) / (1 - sweep.magnitude[i]),
  });
  return { sweep, reading, warnings, at };
}

function problem(name: string, text: string, given?: Given) {
  const result = read({ name, bytes: new TextEncoder().encode(text) }, given);
  if (result.ok) throw new Error("was read");
  return result.problem;
}

const Z_ROWS_NORMALISED = "100 0.99 -4\n200 0.80 -22\n300 0.707 -45\n400 0.40 -62\n500 0.01 -89\n";
const Z_ROWS_OHM = "100 74.25 -4\n200 60 -22\n300 53.025 -45\n400 30 -62\n500 0.75 -89\n";
const TWO_PORT =
  "1.0000 0.3926 -0.1211 -0.0003 -0.0021 -0.0003 -0.0021 0.3926 -0.1211\n2.0000 0.3517 -0.3054 -0.0096 -0.0298 -0.0096 -0.0298 0.3517 -0.3054\n10.000 0.3419 0.3336 -0.0134 0.0379 -0.0134 0.0379 0.3419 0.3336\n";

describe("examples of the specification", () => {
  it("reads example 1, a one-port at a single frequency", () => {
    const { at, sweep } = gamma("a.s1p", "!1-port S-parameter file\n# MHz S MA R 50\n2.000 0.894 -12.136\n");
    expect(sweep.frequencyHz[0]).toBe(2e6);
    expect(at(0).swr).toBeCloseTo(17.86792, 4);
  });

  it("reads example 2, impedances normalised to 75 Ω, and converts them to 50 Ω", () => {
    const { sweep } = gamma("a.s1p", `# MHz Z MA R 75\n${Z_ROWS_NORMALISED}`);
    expect(sweep.referenceOhm).toBe(75);
    const in50 = renormalise(sweep, 50);
    const swr = [...in50.magnitude].map((m) => (1 + m) / (1 - m));
    for (const [i, wanted] of [1.49459, 1.54633, 2.4201, 4.61126].entries())
      expect(swr[i]).toBeCloseTo(wanted, 4);
    expect(swr[4]).toBeCloseTo(3820.77, 0);
    expect(in50.magnitude[0]).toBeCloseTo(0.198266, 6);
  });

  it("takes version 2 impedances as ohms: the same sweep in other numbers", () => {
    const one = gamma("a.s1p", `# MHz Z MA R 75\n${Z_ROWS_NORMALISED}`).sweep;
    const text = `[Version] 2.0\n# MHz Z MA\n[Number of Ports] 1\n[Number of Frequencies] 5\n[Reference] 20.0\n[Network Data]\n${Z_ROWS_OHM}[End]\n`;
    const two = gamma("a.ts", text).sweep;
    expect(two.referenceOhm).toBe(20);
    const in75 = renormalise(two, 75);
    for (let i = 0; i < 5; i++) {
      expect(in75.gammaRe?.[i]).toBeCloseTo(one.gammaRe?.[i] ?? Number.NaN, 12);
      expect(in75.gammaIm?.[i]).toBeCloseTo(one.gammaIm?.[i] ?? Number.NaN, 12);
    }
  });

  it("reads example 4, a two-port, and asks which reflection, S11 proposed", () => {
    const { at, reading } = gamma("a.s2p", `# GHz S RI R 50.0\n${TWO_PORT}`);
    expect(at(0).size).toBeCloseTo(0.410853, 6);
    expect(at(0).angle).toBeCloseTo(-17.1427, 4);
    expect([at(0).swr, at(1).swr, at(2).swr].map((s) => Number(s.toFixed(5)))).toEqual([
      2.39474, 2.74386, 2.82912,
    ]);
    expect(reading.questions).toMatchObject([
      { id: "port", proposed: "1", choices: [{ label: "S11" }, { label: "S22" }] },
    ]);
  });

  it("turns hybrid parameters into a reflection, h and its inverse g alike", () => {
    const h = gamma("a.s2p", "# kHz H MA R 1\n2 .95 -26 3.57 157 .04 76 .66 -14\n").sweep;
    const g = gamma(
      "a.s2p",
      "# kHz G MA R 1\n2 1.03818 13.03373 5.61562 4.03729 0.06292 -76.627 1.49435 1.03729\n",
    ).sweep;
    expect(g.magnitude[0]).toBeCloseTo(h.magnitude[0], 2);
    const port = { touchstone: { port: 2 } };
    const h2 = gamma("a.s2p", "# kHz H MA R 1\n2 .95 -26 3.57 157 .04 76 .66 -14\n", port).sweep;
    expect(h2.magnitude[0]).not.toBeCloseTo(h.magnitude[0], 3);
  });

  it("reads a four-port matrix in lower triangle as in full, and any of its reflections", () => {
    const head =
      "[Version] 2.0\n# GHz S MA R 50\n[Number of Ports] 4\n[Number of Frequencies] 1\n[Reference] 50 75\n0.01 0.01\n";
    const full =
      "[Matrix Format] Full\n[Network Data]\n5 0.60 161.24 0.40 -42.20 0.42 -66.58 0.53 -79.34\n0.40 -42.20 0.61 161.20 0.53 -79.34 0.42 -66.58\n0.42 -66.58 0.53 -79.34 0.62 161.24 0.40 -42.20\n0.53 -79.34 0.42 -66.58 0.40 -42.20 0.63 161.24\n";
    const lower =
      "[Matrix Format] Lower\n[Network Data]\n5 0.60 161.24\n0.40 -42.20 0.61 161.20\n0.42 -66.58 0.53 -79.34 0.62 161.24\n0.53 -79.34 0.42 -66.58 0.40 -42.20 0.63 161.24\n";
    const ohms = [50, 75, 0.01, 0.01];
    for (let port = 1; port <= 4; port++) {
      const a = gamma("a.ts", head + full, { touchstone: { port } });
      const b = gamma("a.ts", head + lower, { touchstone: { port } });
      expect(a.at(0).size).toBeCloseTo(0.59 + port / 100, 12);
      expect(b.sweep).toEqual(a.sweep);
      expect(a.sweep.referenceOhm).toBe(ohms[port - 1]);
    }
  });

  it("passes over noise data", () => {
    const { sweep, reading } = gamma(
      "a.s2p",
      "#\n2 .95 -26 3.57 157 .04 76 .66 -14\n22 .60 -144 1.30 40 .14 40 .56 -85\n! NOISE\n4 .7 .64 69 .38\n18 2.7 .46 -33 .40\n",
    );
    expect([...sweep.frequencyHz]).toEqual([2e9, 22e9]);
    expect(reading.assumed.join(" ")).toMatch(/noise parameters from line 5/);
  });
});

describe("a two-port's impedances", () => {
  it("give S11 with the far port closed by its reference (closed form of a T)", () => {
    // A series resistor of 25 Ω from port 1 to a shunt of 50 Ω: Z11 = 75, Z12 = Z21 = Z22 = 50.
    // Port 2 closed with 50 Ω: 25 + 25 = 50 Ω, so S11 is 0; port 1 closed: 50 ∥ 75 = 30 Ω, so S22 is -0.25.
    const text = "# MHz Z RI R 50\n1 1.5 0 1 0 1 0 1 0\n";
    expect(gamma("a.s2p", text).at(0).size).toBeCloseTo(0, 12);
    const s22 = gamma("a.s2p", text, { touchstone: { port: 2 } }).sweep;
    expect(s22.gammaRe?.[0]).toBeCloseTo(-0.25, 12);
  });

  it("give the same from admittances", () => {
    // Y = Z⁻¹ of the T above, times 50: [[2, -2], [-2, 3]].
    const s11 = gamma("a.s2p", "# MHz Y RI R 50\n1 2 0 -2 0 -2 0 3 0\n").at(0).size;
    expect(s11).toBeCloseTo(0, 12);
  });

  it("are normalised with each port's own reference in version 2", () => {
    const head =
      "[Version] 2.0\n# MHz Z RI\n[Number of Ports] 2\n[Two-Port Data Order] 12_21\n[Number of Frequencies] 1\n[Reference] 25 100\n[Network Data]\n";
    // Same T: port 2 closed with 100 Ω gives 25 + 50 ∥ 100 = 58.33 Ω against 25 Ω.
    const { sweep } = gamma("a.ts", `${head}1 75 0 50 0 50 0 50 0\n[End]\n`);
    expect(sweep.gammaRe?.[0]).toBeCloseTo((175 / 3 - 25) / (175 / 3 + 25), 12);
    expect(sweep.referenceOhm).toBe(25);
  });

  it("agree with hybrid parameters of the same network", () => {
    // h11 = Z11 - Z12·Z21/Z22 = 25, h12 = Z12/Z22 = 1, h21 = -1, h22 = 1/50.
    const head =
      "[Version] 2.0\n# MHz H RI\n[Number of Ports] 2\n[Two-Port Data Order] 12_21\n[Number of Frequencies] 1\n[Reference] 25 100\n[Network Data]\n";
    const { sweep } = gamma("a.ts", `${head}1 25 0 1 0 -1 0 0.02 0\n[End]\n`);
    expect(sweep.gammaRe?.[0]).toBeCloseTo((175 / 3 - 25) / (175 / 3 + 25), 12);
  });
});

describe("option line", () => {
  const row = "1.5 0.5 30\n";
  it.each([
    ["#", 1.5e9, 50],
    ["# R 75", 1.5e9, 75],
    ["# ma mhz r 60 s", 1.5e6, 60],
    ["   #   kHz\tR\t93.5\tMA", 1.5e3, 93.5],
    ["#Hz S MA R50", 1.5, 50],
    ["# MHz S MA R 5e1 ! a comment", 1.5e6, 50],
  ])("%s", (line, hz, ohm) => {
    const { sweep, at } = gamma("a.s1p", `! first\n\n${line}\n${row}`);
    expect(sweep.frequencyHz[0]).toBe(hz);
    expect(sweep.referenceOhm).toBe(ohm);
    expect(at(0).size).toBeCloseTo(0.5, 12);
    expect(at(0).angle).toBeCloseTo(30, 10);
  });

  it.each([
    ["# MHz S MA R (50+50j)", "complex-reference", 14],
    ["# MHz S MA R 0", "bad-reference", 14],
    ["# MHz S MA R -50", "bad-reference", 14],
    ["# MHz S XY R 50", "option-line", 9],
    ["# 50 MHz", "option-line", 3],
  ])("%s is refused where it is wrong", (line, code, column) => {
    expect(problem("a.s1p", `! first\n${line}\n${row}`)).toMatchObject({ code, line: 2, column });
  });

  it("must be there", () => {
    expect(problem("a.s1p", `! first\n${row}`)).toMatchObject({ code: "option-line-missing", line: 2 });
  });
});

describe("what can't be read", () => {
  it.each([
    ["a.s1p", "# MHz S RI R 50\n1 0.1 0.2\n2 0.1 x0.2\n", "bad-number", 3],
    ["a.s1p", "# MHz S RI R 50\n1 0.1 0.2\n2 0.1 0,2\n3 0.1 0.2\n", "row-length", 3],
    ["a.s1p", "# MHz S RI R 50\n1 0.1 0.2\n2 0.1\n3 0.1 0.2\n", "row-length", 3],
    ["a.s1p", "# MHz S RI R 50\n1 0.1 0.2 0.3\n", "row-length", 2],
    ["a.s1p", "# MHz S RI R 50\n-1 0.1 0.2\n", "bad-frequency", 2],
    ["a.s1p", "# MHz S RI R 50\n! nothing\n", "no-data", 2],
    ["a.ts", "[Version] 2.0\n# MHz S RI\n[Number of Ports] two\n", "bad-keyword", 3],
    [
      "a.ts",
      "[Version] 2.0\n# MHz S RI\n[Number of Ports] 2\n[Mixed-Mode Order] D1,2 C1,2\n",
      "mixed-mode",
      4,
    ],
    [
      "a.ts",
      "[Version] 2.0\n# MHz S RI\n[Number of Ports] 1\n[Reference] 50+5j\n[Network Data]\n1 0 0\n",
      "complex-reference",
      4,
    ],
  ])("%s with %j", (name, text, code, line) => {
    expect(problem(name, text)).toMatchObject({ code, line });
  });

  it("refuses a port that the file does not have", () => {
    expect(problem("a.s1p", "# MHz S RI R 50\n1 0.1 0.2\n", { touchstone: { port: 2 } }).code).toBe(
      "no-such-port",
    );
  });
});

describe("odd but sound files", () => {
  it("keeps abs Γ over 1, and a point at zero frequency", () => {
    const { sweep } = gamma("a.s1p", "# Hz S RI R 50\n0 1.0 0.0\n1e9 -1.01 0.0\n");
    expect([...sweep.frequencyHz]).toEqual([0, 1e9]);
    expect(sweep.magnitude[1]).toBeCloseTo(1.01, 12);
  });

  it("takes NaN as a gap", () => {
    expect(gamma("a.s1p", "# Hz S RI R 50\n1 NaN 0\n2 0.5 0\n").sweep.magnitude[0]).toBeNaN();
  });

  it("leaves out a last frequency that is cut off, and says so", () => {
    const { sweep, warnings } = gamma("a.s1p", "# Hz S RI R 50\n1 0.5 0\n2 0.5 0\n3 0.5");
    expect(sweep.frequencyHz).toHaveLength(2);
    expect(warnings.map((w) => w.code)).toEqual(["cut-off"]);
  });

  it("says when the count of frequencies is wrong", () => {
    const { warnings } = gamma(
      "a.ts",
      "[Version] 2.0\n# Hz S RI\n[Number of Ports] 1\n[Number of Frequencies] 3\n[Network Data]\n1 0.5 0\n2 0.5 0\n",
    );
    expect(warnings.map((w) => w.code)).toEqual(["frequency-count"]);
  });

  it("finds Touchstone under another name, by its option line", () => {
    expect(gamma("trace.txt", "! a\n# MHz S RI R 50\n1 0.1 0.2\n2 0.1 0.2\n").reading.format).toBe(
      "touchstone",
    );
  });

  it("does not take a table with a commented heading for Touchstone", () => {
    const result = read({ name: "a.txt", bytes: new TextEncoder().encode("# MHz dB\n1 -1\n2 -9\n3 -1\n") });
    expect(result.ok && result.reading.format).toBe("text");
  });

  it("converts to a reference that is asked for", () => {
    const { sweep, reading } = gamma("a.s1p", "# MHz S RI R 75\n1 0 0\n", {
      touchstone: { referenceOhm: 50 },
    });
    expect(sweep.referenceOhm).toBe(50);
    expect(sweep.gammaRe?.[0]).toBeCloseTo(0.2, 12);
    expect(reading.assumed.join(" ")).toMatch(/75 Ω.*50 Ω/);
  });
});
