import { spawnSync } from "node:child_process";
import { createHash } from "node:crypto";
import { mkdtempSync, readFileSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import { FOLDER } from "./make-fixtures/write.ts";

const ROOT = fileURLToPath(new URL("../..", import.meta.url));
const SLOW = 60_000;

function analyse(...args: string[]) {
  const run = spawnSync(process.execPath, ["--import", "tsx", "scripts/analyse.ts", ...args], {
    cwd: ROOT,
    encoding: "utf8",
  });
  const rows = () =>
    run.stdout
      .trim()
      .split("\n")
      .map((line) => JSON.parse(line));
  return { code: run.status, out: run.stdout, err: run.stderr, rows };
}

const fixture = (name: string) => FOLDER + name;
const broken = path.join(mkdtempSync(path.join(tmpdir(), "swale-analyse-")), "broken.csv");
writeFileSync(
  broken,
  `MHz,SWR\n${Array.from({ length: 20 }, (_, i) => `${7 + i},${i === 4 ? "x" : 1.5}`).join("\n")}\n`,
);

describe("npm run analyse", () => {
  it(
    "prints one JSON object a line, in order, with the contract's fields and no others",
    () => {
      const { code, rows } = analyse(fixture("s11-comma.csv"), fixture("plain-ma.s1p"), "--json");
      expect(code).toBe(0);
      const [text, touchstone] = rows();
      expect([text.file, text.format, touchstone.file, touchstone.format]).toEqual([
        "s11-comma.csv",
        "text",
        "plain-ma.s1p",
        "touchstone",
      ]);
      expect(Object.keys(text)).toEqual(["file", "sha256", "format", "reading", "sweep", "dips", "warnings"]);
      expect(text.sha256).toBe(
        createHash("sha256")
          .update(readFileSync(fixture("s11-comma.csv")))
          .digest("hex"),
      );
      expect(text.reading).toEqual({
        quantity: "s11-db",
        frequencyUnit: "Hz",
        assumed: expect.any(Array),
        confidence: expect.any(Number),
      });
      expect(text.sweep).toEqual({
        points: 581,
        startHz: 1e6,
        stopHz: 30e6,
        referenceOhm: 50,
        complex: false,
      });
      expect(touchstone.sweep.complex).toBe(true);
      expect(text.dips.length).toBeGreaterThanOrEqual(3);
      for (const dip of [...text.dips, ...touchstone.dips]) {
        expect(Object.keys(dip)).toEqual([
          "frequencyHz",
          "frequencyUncertaintyHz",
          "minimumSwr",
          "minimumSwrLow",
          "minimumSwrHigh",
          "returnLossDb",
          "bandwidth",
          "q",
          "method",
          "edge",
        ]);
        if (dip.bandwidth)
          expect(Object.keys(dip.bandwidth)).toEqual([
            "limitSwr",
            "lowHz",
            "highHz",
            "widthHz",
            "open",
            "shared",
          ]);
      }
    },
    SLOW,
  );

  it(
    "ends with 1 where a file can't be read, and still reads the others",
    () => {
      const { code, rows } = analyse(broken, fixture("swr-tab.tsv"), "/nowhere/at-all.csv", "--json");
      expect(code).toBe(1);
      const [first, second, third] = rows();
      expect(first).toMatchObject({
        file: "broken.csv",
        error: { code: "bad-number", line: 6, column: 4, message: expect.stringMatching(/Line 6/) },
      });
      expect(second.sweep.points).toBe(301);
      expect(third).toMatchObject({ file: "at-all.csv", error: { code: "no-file" } });
    },
    SLOW,
  );

  it(
    "takes the 0 dB line, negative numbers and all, and asks for it where it is missing",
    () => {
      expect(analyse(fixture("level-preamble.csv"), "--json").rows()[0].error.code).toBe("zero-db-needed");
      const [row] = analyse(fixture("level-preamble.csv"), "--json", "--points", "--zero-db", "-10.4").rows();
      expect(row.reading.quantity).toBe("level");
      expect(row.points.frequencyHz).toHaveLength(751);
      expect(row.points.value[0]).toBeCloseTo(-10.476, 9);
    },
    SLOW,
  );

  it(
    "takes limit, quantity and reference",
    () => {
      const [wide] = analyse(fixture("swr-tab.tsv"), "--json", "--swr-limit=3").rows();
      expect(wide.dips[0].bandwidth.limitSwr).toBe(3);
      const [other] = analyse(fixture("many-columns.csv"), "--json", "--quantity", "swr").rows();
      expect(other.reading.quantity).toBe("swr");
      expect(other.sweep.complex).toBe(false);
      const [kept] = analyse(fixture("ri-75.s1p"), "--json", "--reference-ohm", "75").rows();
      const [system] = analyse(fixture("ri-75.s1p"), "--json").rows();
      expect(kept.dips[0].minimumSwr).toBeCloseTo(1.118, 2);
      expect(system.dips[0].minimumSwr).toBeCloseTo(1.341, 2);
      expect(system.warnings.map((w: { code: string }) => w.code)).toContain("other-reference");
    },
    SLOW,
  );

  it(
    "prints a table without --json",
    () => {
      const { code, out } = analyse(fixture("swr-tab.tsv"), broken);
      expect(code).toBe(1);
      expect(out).toMatch(/swr-tab\.tsv\n {2}text, swr: 301 points from 13 to 16 MHz, 50 Ω/);
      expect(out).toMatch(/lowest SWR/);
      expect(out).toMatch(/broken\.csv\n {2}not read: .*line 6, column 4/);
    },
    SLOW,
  );

  it.each([
    [[]],
    [["--json"]],
    [["a.csv", "--nonsense"]],
    [["a.csv", "--zero-db"]],
    [["a.csv", "--zero-db", "low"]],
    [["a.csv", "--swr-limit", "1"]],
    [["a.csv", "--scale", "square"]],
    [["a.csv", "--frame", "1,2,3"]],
    [["a.csv", "--cable", "RG-58"]],
    [["a.csv", "--cable", "no-such-cable", "--length-m", "5"]],
    [["a.csv", "--cable", "0.01", "--length-m", "5"]],
    [["a.csv", "--length-m", "5"]],
    [["a.csv", "--cable", "RG-58", "--length-m", "5", "--velocity-factor", "66"]],
    [["a.csv", "--load-return-loss", "40"]],
  ])(
    "ends with 2 on %j",
    (args) => {
      const { code, out, err } = analyse(...args);
      expect(code).toBe(2);
      expect(out).toBe("");
      expect(err).toMatch(/Usage: npm run analyse/);
    },
    SLOW,
  );
});
