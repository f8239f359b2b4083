import { describe, expect, it } from "vitest";
import { analyse } from "../../app/measurement/analyse.ts";
import { read } from "../../app/readers/read.ts";
import { MAX_FILE_BYTES, MAX_POINTS } from "../../app/readers/reading.ts";

/** Processor time that the largest file may take; measured 0.3 to 3 s. */
const MOST_MS = 30_000;
const MEGABYTE = 2 ** 20;

/** A file of `rows` lines, each from `line`, padded to `bytes` with blanks before the line ends where that is asked. */
function bigFile(head: string, rows: number, line: (i: number) => string, bytes?: number): Uint8Array {
  const parts: string[] = [head];
  let used = head.length;
  for (let i = 0; i < rows; i++) {
    let text = line(i);
    if (bytes !== undefined) text = text.padEnd(Math.floor((bytes - used) / (rows - i)) - 1, " ");
    used += text.length + 1;
    parts.push(text);
  }
  return new TextEncoder().encode(`${parts.join("\n")}\n`);
}

function timedRead(name: string, bytes: Uint8Array) {
  const start = process.cpuUsage();
  const result = read({ name, bytes });
  const { user, system } = process.cpuUsage(start);
  expect((user + system) / 1000).toBeLessThan(MOST_MS);
  return result;
}

const s11 = (i: number) => (-0.5 - 20 / (1 + ((i - 400_000) / 20_000) ** 2)).toFixed(4);

describe("limits", () => {
  it("reads and analyses 64 MB with 1,000,000 points", () => {
    const bytes = bigFile(
      "Frequency (Hz);S11 (dB)",
      MAX_POINTS,
      (i) => `${1_000_000 + 29 * i};${s11(i)}`,
      MAX_FILE_BYTES - 64,
    );
    expect(bytes.length).toBeLessThanOrEqual(MAX_FILE_BYTES);
    expect(bytes.length).toBeGreaterThan(MAX_FILE_BYTES - 2 * MEGABYTE);
    const result = timedRead("big.csv", bytes);
    if (!result.ok) throw new Error(result.problem.message);
    expect(result.sweep.frequencyHz).toHaveLength(MAX_POINTS);
    const { dips } = analyse(result.sweep);
    expect(dips).toHaveLength(1);
    expect(dips[0].frequencyHz).toBeCloseTo(1e6 + 29 * 400_000, -3);
  }, 60_000);

  it("reads 1,000,000 rows that need care: quotes, decimal commas, a time of day", () => {
    const bytes = bigFile(
      '"Time","Frequency, MHz","S11, dB"',
      MAX_POINTS,
      (i) => `"10:00:07","${(1 + 29e-6 * i).toFixed(6).replace(".", ",")}","${s11(i).replace(".", ",")}"`,
    );
    const result = timedRead("big.csv", bytes);
    if (!result.ok) throw new Error(result.problem.message);
    expect(result.sweep.frequencyHz).toHaveLength(MAX_POINTS);
  }, 60_000);

  it("reads a Touchstone file of 1,000,000 points", () => {
    const bytes = bigFile(
      "# Hz S DB R 50",
      MAX_POINTS,
      (i) => `${1_000_000 + 29 * i} ${s11(i)} ${(i % 360) - 180}`,
    );
    const result = timedRead("big.s1p", bytes);
    if (!result.ok) throw new Error(result.problem.message);
    expect(result.sweep.frequencyHz).toHaveLength(MAX_POINTS);
  }, 60_000);

  it.each([
    ["big.csv", "Frequency (Hz),S11 (dB)", (i: number) => `${1000 + i},-${i % 9}.5`],
    ["big.s1p", "# Hz S DB R 50", (i: number) => `${1000 + i} -${i % 9}.5 0`],
  ] as const)(
    "says where %s goes over 1,000,000 points",
    (name, head, line) => {
      const result = timedRead(name, bigFile(head, MAX_POINTS + 1, line));
      expect(result).toMatchObject({ ok: false, problem: { code: "too-many-points", line: MAX_POINTS + 2 } });
    },
    60_000,
  );

  it("refuses a byte over 64 MB without reading it", () => {
    const start = performance.now();
    const result = read({ name: "big.csv", bytes: new Uint8Array(MAX_FILE_BYTES + 1) });
    expect(result).toMatchObject({ ok: false, problem: { code: "too-large" } });
    expect(performance.now() - start).toBeLessThan(1000);
  });

  it.each([
    ["line ends", () => new Uint8Array(MAX_FILE_BYTES).fill(10)],
    ["digits on one line", () => new Uint8Array(MAX_FILE_BYTES).fill(49)],
    ["delimiters on one line", () => new Uint8Array(MAX_FILE_BYTES).fill(44)],
    ["quotes on one line", () => new Uint8Array(MAX_FILE_BYTES).fill(34)],
    ["letters", () => new Uint8Array(MAX_FILE_BYTES).fill(97)],
    ["zero bytes", () => new Uint8Array(MAX_FILE_BYTES)],
    ["short lines of text", () => bigFile("", 3_000_000, () => "no number")],
    ["rows of two numbers on lines of 4 bytes", () => bigFile("", 3_900_000, (i) => `${i % 10},${i % 7}`)],
  ])(
    "ends in bounded time on 64 MB of %s",
    (_, make) => {
      for (const name of ["x.csv", "x.s1p"]) {
        const result = timedRead(name, make());
        expect(result.ok).toBe(false);
      }
    },
    120_000,
  );
});
