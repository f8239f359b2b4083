import { createHash } from "node:crypto";
import { mkdtempSync, readFileSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { describe, expect, it } from "vitest";
import { rowsOf, runApart, runHere } from "./analyse-run.ts";
import { FOLDER } from "./make-fixtures/write.ts";

const SLOW = 60_000;

const fixture = (name: string) => FOLDER + name;
const broken = path.join(mkdtempSync(path.join(tmpdir(), "swale-analyse-")), "broken.csv");
writeFileSync(
  broken,
  `MHz,SWR\n${Array.from({ length: 20 }, (_, i) => `${7 + i},${i === 4 ? "x" : 1.5}`).join("\n")}\n`,
);

const answers = async (...args: string[]) => rowsOf(await runHere(...args, "--json"));

describe("npm run analyse", () => {
  it(
    "prints one JSON object a line, in order, with the contract's fields and no others",
    () => {
      const run = runApart(fixture("s11-comma.csv"), fixture("plain-ma.s1p"), "--json");
      expect(run.code).toBe(0);
      const [text, touchstone] = rowsOf(run);
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
      const run = runApart(broken, fixture("swr-tab.tsv"), "/nowhere/at-all.csv", "--json");
      expect(run.code).toBe(1);
      const [first, second, third] = rowsOf(run);
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
    async () => {
      expect((await answers(fixture("level-preamble.csv")))[0].error.code).toBe("zero-db-needed");
      const [row] = await answers(fixture("level-preamble.csv"), "--points", "--zero-db", "-10.4");
      expect(row.reading.quantity).toBe("level");
      expect(row.points.frequencyHz).toHaveLength(751);
      expect(row.points.value[0]).toBeCloseTo(-10.476, 9);
    },
    SLOW,
  );

  it(
    "takes limit, quantity and reference",
    async () => {
      const [wide] = await answers(fixture("swr-tab.tsv"), "--swr-limit=3");
      expect(wide.dips[0].bandwidth.limitSwr).toBe(3);
      const [other] = await answers(fixture("many-columns.csv"), "--quantity", "swr");
      expect(other.reading.quantity).toBe("swr");
      expect(other.sweep.complex).toBe(false);
      const [kept] = await answers(fixture("ri-75.s1p"), "--reference-ohm", "75");
      const [system] = await answers(fixture("ri-75.s1p"));
      expect(kept.dips[0].minimumSwr).toBeCloseTo(1.118, 2);
      expect(system.dips[0].minimumSwr).toBeCloseTo(1.341, 2);
      expect(system.warnings.map((w: { code: string }) => w.code)).toContain("other-reference");
    },
    SLOW,
  );

  it(
    "prints a table without --json",
    async () => {
      const { code, out } = await runHere(fixture("swr-tab.tsv"), broken);
      expect(code).toBe(1);
      expect(out).toMatch(/swr-tab\.tsv\n {2}text, swr: 301 points from 13 to 16 MHz, 50 Ω/);
      expect(out).toMatch(/lowest SWR/);
      expect(out).toMatch(/broken\.csv\n {2}not read: .*line 6, column 4/);
    },
    SLOW,
  );

  it("ends as a process with 2 and its complaint on standard error", { timeout: SLOW }, () => {
    expect(runApart("a.csv", "--nonsense")).toMatchObject({
      code: 2,
      out: "",
      err: expect.stringMatching(/Usage: npm run analyse/),
    });
  });

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
    async (args) => {
      const { code, out, err } = await runHere(...args);
      expect(code).toBe(2);
      expect(out).toBe("");
      expect(err).toMatch(/Usage: npm run analyse/);
    },
    SLOW,
  );
});
