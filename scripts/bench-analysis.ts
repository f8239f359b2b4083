import { execFile } from "node:child_process";
import { existsSync } from "node:fs";
import { mkdtemp, rm, writeFile } from "node:fs/promises";
import { tmpdir } from "node:os";
import path from "node:path";
import { promisify } from "node:util";
import { analyse } from "../app/measurement/analyse.ts";
import { decimate } from "../app/measurement/decimate.ts";
import { findDips } from "../app/measurement/dips/find.ts";
import type { Sweep } from "../app/measurement/sweep.ts";

/**
 * Analysis of 1,000,001 points against scipy's `find_peaks` with a prominence on the same array in the same
 * run; each figure is the best of some rounds. Without /usr/bin/python3 and scipy only the rows that need
 * no floor. Noise of 0.05 dB is the usual case; without noise scipy has next to nothing to do, while an
 * analysis still fits every dip.
 */
export async function benchAnalysis(): Promise<BenchRow[]> {
  const rows: BenchRow[] = [];
  const folder = await mkdtemp(path.join(tmpdir(), "swale-bench-"));
  try {
    for (const [label, noiseDb, goal] of [
      ["0.05 dB of noise", 0.05, 1],
      ["no noise", 0, 1],
    ] as const) {
      const sweep = longSweep(noiseDb);
      const whole = best(() => analyse(sweep));
      const found = best(() => findDips(sweep.magnitude, PROMINENCE_DB));
      const scipy = await scipyMs(folder, sweep.magnitude);
      if (scipy === null) continue;
      rows.push({
        name: `analysis of 1,000,001 points, ${label}, over scipy find_peaks`,
        value: round(whole / scipy),
        goal,
        unit: "×",
      });
      rows.push({
        name: `finding dips alone, ${label}, over scipy find_peaks`,
        value: round(found / scipy),
        goal: 1,
        unit: "×",
      });
    }
    const sweep = longSweep(0.05);
    rows.push({
      name: "analysis of 1,000,001 points",
      value: round(best(() => analyse(sweep))),
      goal: 250,
      unit: "ms",
    });
    rows.push({
      name: "decimation of 1,000,001 points",
      value: round(best(() => decimate(sweep, 1600))),
      goal: 30,
      unit: "ms",
    });
    return rows;
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}

/** Twelve resonators from 1 to 30 MHz, invented. */
function longSweep(noiseDb: number): Sweep {
  const frequencyHz = new Float64Array(POINTS);
  const magnitude = new Float64Array(POINTS);
  let state = 12_345;
  const uniform = () => {
    state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0;
    return state / 4_294_967_296;
  };
  for (let i = 0; i < POINTS; i++) {
    frequencyHz[i] = 1e6 + 29 * i;
    let power = 0.98;
    for (let k = 1; k <= 12; k++) power *= 1 - 0.95 / (1 + ((i / POINTS - k / 13) * 400) ** 2);
    const scatter = noiseDb === 0 ? 0 : 2 * noiseDb * (uniform() + uniform() + uniform() - 1.5);
    magnitude[i] = Math.sqrt(power) * 10 ** (scatter / 20);
  }
  return { frequencyHz, magnitude, referenceOhm: 50, plane: "port" };
}

function best(work: () => unknown): number {
  let least = Number.POSITIVE_INFINITY;
  for (let round = 0; round < ROUNDS; round++) {
    const start = performance.now();
    work();
    least = Math.min(least, performance.now() - start);
  }
  return least;
}

async function scipyMs(folder: string, magnitude: Float64Array): Promise<number | null> {
  if (!existsSync(PYTHON)) return null;
  const file = path.join(folder, "magnitude.f64");
  await writeFile(file, new Uint8Array(magnitude.buffer));
  try {
    const { stdout } = await promisify(execFile)(PYTHON, ["-c", SCIPY, file, String(PROMINENCE_DB)]);
    return Number(stdout);
  } catch {
    return null;
  }
}

function round(value: number): number {
  return Number(value.toPrecision(3));
}

const POINTS = 1_000_001;
const PROMINENCE_DB = 3;
const ROUNDS = 7;
const PYTHON = "/usr/bin/python3";
const SCIPY = `
import sys, time
import numpy as np
from scipy.signal import find_peaks
loss = -20 * np.log10(np.fromfile(sys.argv[1]))
least = 1e9
for _ in range(3):
    start = time.perf_counter()
    find_peaks(loss, prominence=float(sys.argv[2]))
    least = min(least, time.perf_counter() - start)
print(least * 1e3)
`;

import type { BenchRow } from "./suites/bench-row.ts";
