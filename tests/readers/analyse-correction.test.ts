import { mkdtempSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { describe, expect, it } from "vitest";
import type { Complex } from "../../app/measurement/reflection.ts";
import { codes, measured, polar } from "../measurement/correction/benches.ts";
import { runHere } from "./analyse-run.ts";

/** The command with references and a feedline, on files of an invented bench whose truth is known. */

const FOLDER = mkdtempSync(path.join(tmpdir(), "swale-bench-"));
const SLOW = 60_000;
const AT = Array.from({ length: 291 }, (_, i) => 1e6 + i * 1e5);

/** 40 Ω in series with a resonator of Q 12 at 14.15 MHz: SWR 1.25 there. */
function antenna(hz: number): Complex {
  const x = 40 * 12 * (hz / 14.15e6 - 14.15e6 / hz);
  const power = 90 * 90 + x * x;
  return { re: (-10 * 90 + x * x) / power, im: (90 * x + 10 * x) / power };
}

function seen(gamma: (hz: number) => Complex, hz: number): Complex {
  const turn = (size: number, degrees: number, ns: number) => polar(size, degrees - (360 * ns * hz) / 1e9);
  return measured({ d: turn(0.0043, 40, 9), m: turn(0.03, 70, 14), t: turn(0.245, 0, 3) }, gamma(hz));
}

function file(name: string, lines: string[]): string {
  writeFileSync(path.join(FOLDER, name), `${lines.join("\n")}\n`);
  return path.join(FOLDER, name);
}

function levels(name: string, gamma: (hz: number) => Complex, at = AT): string {
  const db = (hz: number) => 20 * Math.log10(Math.hypot(seen(gamma, hz).re, seen(gamma, hz).im)) - 10;
  return file(`${name}.csv`, ["Frequency (Hz),Level (dBm)", ...at.map((hz) => `${hz},${db(hz).toFixed(3)}`)]);
}

function complex(name: string, gamma: (hz: number) => Complex): string {
  return file(`${name}.s1p`, [
    "# Hz S RI R 50",
    ...AT.map((hz) => `${hz} ${seen(gamma, hz).re.toFixed(12)} ${seen(gamma, hz).im.toFixed(12)}`),
  ]);
}

const STANDARDS = {
  open: () => ({ re: 1, im: 0 }),
  short: () => ({ re: -1, im: 0 }),
  load: () => ({ re: 0, im: 0 }),
};
const text = { sweep: levels("antenna", antenna), open: "", short: "", load: "" };
const touchstone = { sweep: complex("antenna", antenna), open: "", short: "", load: "" };
for (const [role, gamma] of Object.entries(STANDARDS) as [keyof typeof STANDARDS, () => Complex][]) {
  text[role] = levels(role, gamma);
  touchstone[role] = complex(role, gamma);
}

async function row(...args: string[]) {
  const { code, out, err } = await runHere(...args, "--json");
  expect(err).toBe("");
  return { code, ...JSON.parse(out) };
}

const all = (of: typeof text) => ["--open", of.open, "--short", of.short, "--load", of.load];

describe("npm run analyse with references", () => {
  it(
    "refers levels to the mean of open and short",
    async () => {
      const answer = await row(text.sweep, ...all(text));
      expect(answer.code).toBe(0);
      expect(answer.correction).toEqual({ kind: "scalar", plane: "port", fromHz: 1e6, toHz: 30e6 });
      const [dip] = answer.dips;
      expect(Math.abs(dip.frequencyHz - 14.15e6)).toBeLessThan(60e3);
      expect(Math.abs(dip.minimumSwr - 1.25)).toBeLessThan(0.06);
      expect(Object.keys(answer)).toEqual(
        expect.arrayContaining([
          "file",
          "sha256",
          "format",
          "reading",
          "sweep",
          "correction",
          "dips",
          "warnings",
        ]),
      );
    },
    SLOW,
  );

  it(
    "takes out all three errors where there is phase",
    async () => {
      const answer = await row(touchstone.sweep, ...all(touchstone), "--load-return-loss", "45", "--points");
      expect(answer.correction.kind).toBe("three-term");
      const [dip] = answer.dips;
      expect(dip.minimumSwr).toBeCloseTo(1.25, 4);
      expect(Math.abs(dip.frequencyHz - 14.15e6)).toBeLessThan(500);
      expect(dip.q).toBeCloseTo(12, 1);
      expect(codes(answer.warnings)).not.toContain("load-taken-as-ideal");
      expect(answer.points.value[0]).toBeCloseTo(Math.hypot(seen(antenna, 1e6).re, seen(antenna, 1e6).im), 9);
      expect(answer.corrected.re[131]).toBeCloseTo(antenna(AT[131]).re, 9);
    },
    SLOW,
  );

  it(
    "says what was given wrongly and corrects nothing that it can't",
    async () => {
      const short = AT.slice(50, 100);
      const few = {
        open: levels("open-few", STANDARDS.open, short),
        short: levels("short-few", STANDARDS.short, short),
      };
      const early = await row(text.sweep, "--open", few.open, "--short", few.short);
      expect(early.correction).toEqual({ kind: "scalar", plane: "port", fromHz: short[0], toHz: short[49] });
      expect(codes(early.warnings)).toContain("references-short");
      expect(early.dips.filter((dip: { edge: boolean }) => !dip.edge)).toEqual([]);
      const swapped = await row(
        touchstone.sweep,
        "--open",
        touchstone.short,
        "--short",
        touchstone.open,
        "--load",
        touchstone.load,
      );
      expect(codes(swapped.warnings)).toContain("open-short-swapped");
      const twice = await row(
        touchstone.sweep,
        "--open",
        touchstone.open,
        "--short",
        touchstone.open,
        "--load",
        touchstone.load,
      );
      expect(twice.correction).toEqual({ kind: "none", plane: "instrument", fromHz: null, toHz: null });
    },
    SLOW,
  );

  it(
    "fails a file whose reference can't be read",
    async () => {
      const answer = await row(text.sweep, "--open", path.join(FOLDER, "absent.csv"));
      expect(answer.code).toBe(1);
      expect(answer.error.code).toBe("reference-unread");
      expect(answer.error.message).toContain(
        "The open, absent.csv, could not be read, so nothing was corrected.",
      );
    },
    SLOW,
  );
});

describe("npm run analyse with a feedline", () => {
  it(
    "gives dips at the antenna, in words what was done, and says when it can't be",
    async () => {
      const { out } = await runHere(text.sweep, ...all(text), "--cable", "RG-213", "--length-m", "20");
      expect(out).toContain(
        "0 dB line: the mean of open and short, 1 to 30 MHz; limits from the load; 20 m of RG-213/U (solid PE) taken out",
      );
      const answer = await row(text.sweep, ...all(text), "--cable", "0.0056,0.00006", "--length-m", "20");
      expect(answer.correction).toEqual({ kind: "scalar", plane: "antenna", fromHz: 1e6, toHz: 30e6 });
      const lossy = await row(
        touchstone.sweep,
        ...all(touchstone),
        "--cable",
        "0.05,0",
        "--length-m",
        "30",
        "--velocity-factor",
        "0.66",
      );
      expect(codes(lossy.warnings)).toContain("feedline-over-unity");
      const alone = await row(touchstone.sweep, "--cable", "0.0001,0", "--length-m", "1");
      expect(alone.correction).toEqual({ kind: "none", plane: "antenna", fromHz: 1e6, toHz: 30e6 });
      expect(codes(alone.warnings)).toContain("no-velocity-factor");
    },
    SLOW,
  );
});
