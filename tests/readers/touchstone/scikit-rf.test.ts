import { execFileSync } from "node:child_process";
import { existsSync, readdirSync, readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { read } from "../../../app/readers/read.ts";
import { FOLDER } from "../make-fixtures/write.ts";

/** Made by tests/reference/touchstone.py with scikit-rf. */
const reference: Record<string, { ohm: number; points: number; rows: number[][] }> = JSON.parse(
  readFileSync(`${FOLDER}gamma/touchstone.json`, "utf8"),
).files;

function sweepOf(name: string, path = FOLDER + name) {
  const result = read({ name, bytes: new Uint8Array(readFileSync(path)) });
  if (!result.ok) throw new Error(`${name}: ${result.problem.message}`);
  return result.sweep;
}

describe("Touchstone against scikit-rf", () => {
  it("has reference values of a dozen files and more", () => {
    expect(Object.keys(reference).length).toBeGreaterThanOrEqual(12);
  });

  it.each(Object.entries(reference))("%s: Γ equal to 1e-12", (name, { ohm, points, rows }) => {
    const sweep = sweepOf(name);
    expect(sweep.referenceOhm).toBe(ohm);
    expect(sweep.frequencyHz).toHaveLength(points);
    const step = Math.ceil(points / rows.length);
    for (const [k, [hz, re, im]] of rows.entries()) {
      const i = k * step;
      expect(Math.abs(sweep.frequencyHz[i] - hz)).toBeLessThan(1e-6 * Math.max(hz, 1) * 1e-3);
      expect(Math.abs((sweep.gammaRe?.[i] ?? Number.NaN) - re)).toBeLessThan(1e-12);
      expect(Math.abs((sweep.gammaIm?.[i] ?? Number.NaN) - im)).toBeLessThan(1e-12);
    }
  });
});

/** Debian's python3-scikit-rf brings files of its own; where it is installed, they are read by both. */
const INSTALLED = "/usr/lib/python3/dist-packages/skrf/tests/";
const ASK = `
import json, sys, warnings
warnings.simplefilter("ignore")
from skrf.io.touchstone import Touchstone
out = {}
for path in sys.argv[1:]:
    f, s = Touchstone(path).get_sparameter_arrays()
    out[path] = [[float(f[i]), float(s[i,0,0].real), float(s[i,0,0].imag)] for i in range(len(f))]
print(json.dumps(out))
`;

if (existsSync(INSTALLED))
  describe("Touchstone against an installed scikit-rf", () => {
    it("reads the package's own measured and simulated files alike", () => {
      const names = readdirSync(INSTALLED).filter((name) =>
        /^(?:hfss_.*|ntwk[123]|RS_.*|Agilent_.*|cst_example_4ports)\.s\dp$/.test(name),
      );
      const answer = execFileSync("/usr/bin/python3", ["-c", ASK, ...names.map((name) => INSTALLED + name)], {
        stdio: ["ignore", "pipe", "ignore"],
        maxBuffer: 2 ** 26,
      });
      const found: Record<string, number[][]> = JSON.parse(answer.toString().trim().split("\n").at(-1) ?? "");
      for (const name of names) {
        const sweep = sweepOf(name, INSTALLED + name);
        for (const [i, [hz, re, im]] of found[INSTALLED + name].entries()) {
          expect(Math.abs(sweep.frequencyHz[i] - hz)).toBeLessThan(1e-9 * Math.max(hz, 1));
          expect(
            Math.hypot((sweep.gammaRe?.[i] ?? Number.NaN) - re, (sweep.gammaIm?.[i] ?? Number.NaN) - im),
          ).toBeLessThan(1e-12);
        }
      }
      expect(names.length).toBeGreaterThan(5);
    });
  });
