import Papa from "papaparse";
import { analyse } from "../app/measurement/analyse.ts";
import { read } from "../app/readers/read.ts";
import type { BenchRow } from "./suites/bench-row.ts";

const POINTS = 100_001;
const ROUNDS = 9;

/** Reading and analysing a 100,001-point text file, as a multiple of papaparse's plain parse of the same bytes. */
export async function benchReading(): Promise<BenchRow[]> {
  const bytes = new TextEncoder().encode(sweepText());
  const parse = () => Papa.parse(new TextDecoder().decode(bytes), { dynamicTyping: false }).data.length;
  const whole = () => {
    const result = read({ name: "bench.csv", bytes });
    if (!result.ok) throw new Error(result.problem.message);
    return analyse(result.sweep).dips.length;
  };
  const reading = () => (read({ name: "bench.csv", bytes }).ok ? 1 : 0);
  for (const warmUp of [parse, whole, reading]) for (let i = 0; i < 3; i++) warmUp();
  const times = { parse: [] as number[], whole: [] as number[], reading: [] as number[] };
  for (let i = 0; i < ROUNDS; i++) {
    times.parse.push(timed(parse));
    times.whole.push(timed(whole));
    times.reading.push(timed(reading));
  }
  const floor = median(times.parse);
  return [
    {
      name: "reading and analysis of 100,001 points against papaparse",
      value: median(times.whole) / floor,
      goal: 2,
      unit: "ratio",
    },
    {
      name: "reading of 100,001 points against papaparse",
      value: median(times.reading) / floor,
      goal: 2,
      unit: "ratio",
    },
  ];
}

/** Two invented resonances over 1 to 30 MHz with a little deterministic noise. */
function sweepText(): string {
  const lines = ["Frequency (Hz),S11 (dB)"];
  let draw = 1;
  for (let i = 0; i < POINTS; i++) {
    const hz = 1e6 + i * 290;
    draw = (draw * 48271) % 2147483647;
    const noise = (draw / 2147483647 - 0.5) * 0.02;
    const dip = (f0: number, q: number) => 25 / (1 + (2 * q * (hz / f0 - 1)) ** 2);
    lines.push(`${hz},${(-0.3 - dip(7.1e6, 12) - dip(21.2e6, 20) + noise).toFixed(4)}`);
  }
  return lines.join("\n");
}

function timed(work: () => unknown): number {
  const start = performance.now();
  work();
  return performance.now() - start;
}

function median(values: number[]): number {
  return [...values].sort((a, b) => a - b)[values.length >> 1];
}
