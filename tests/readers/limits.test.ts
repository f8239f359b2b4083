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

/** `text` again and again up to `bytes`. */
function filled(text: string, bytes: number): Uint8Array {
  const all = new Uint8Array(bytes);
  let done = new TextEncoder().encodeInto(text, all).written;
  for (; done < bytes; done *= 2) all.copyWithin(done, 0, Math.min(done, bytes - done));
  return all;
}

/** Seventy different lines of two digits. */
const PAIRS = Array.from({ length: 70 }, (_, i) => `${i % 10},${i % 7}\n`).join("");

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
    ["64 MB of line ends", () => filled("\n", MAX_FILE_BYTES)],
    ["64 MB of digits on one line", () => filled("1", MAX_FILE_BYTES)],
    ["64 MB of delimiters on one line", () => filled(",", MAX_FILE_BYTES)],
    ["64 MB of quotes on one line", () => filled('"', MAX_FILE_BYTES)],
    ["64 MB of letters", () => filled("a", MAX_FILE_BYTES)],
    ["64 MB of zero bytes", () => filled("\0", MAX_FILE_BYTES)],
    ["3,000,000 short lines of text", () => filled("no number\n", 3_000_000 * 10)],
    ["3,900,000 lines of 4 bytes with two numbers", () => filled(PAIRS, 3_900_000 * 4)],
  ])(
    "ends in bounded time on %s",
    (_, make) => {
      const bytes = make();
      for (const name of ["x.csv", "x.s1p"]) {
        const result = timedRead(name, bytes);
        expect(result.ok).toBe(false);
      }
    },
    120_000,
  );
});
