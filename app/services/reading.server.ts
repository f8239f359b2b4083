import { existsSync } from "node:fs";
import { availableParallelism } from "node:os";
import { fileURLToPath } from "node:url";
import { Piscina } from "piscina";
import readAndAnalyse, { type ReadOutcome, type ReadTask } from "./read-and-analyse.server.ts";

/** Reads a file without holding up the pages: small ones in place, the rest in a worker thread. */
export async function readFile(task: ReadTask): Promise<ReadOutcome> {
  if (task.bytes.length <= IN_PLACE_BYTES) return readAndAnalyse(task);
  return workers().run(task);
}

export async function closeReaders(): Promise<void> {
  await pool?.close();
  pool = undefined;
}

let pool: Piscina<ReadTask, ReadOutcome> | undefined;

function workers(): Piscina<ReadTask, ReadOutcome> {
  if (!pool) {
    const built = ["./worker.js", "../worker.js"]
      .map((name) => fileURLToPath(new URL(name, import.meta.url)))
      .find(existsSync);
    pool = new Piscina({
      filename: built ?? fileURLToPath(new URL("./reading.worker.ts", import.meta.url)),
      execArgv: built ? [] : ["--import", "tsx"],
      maxThreads: Math.max(1, Math.min(4, availableParallelism() - 1)),
      minThreads: 0,
      idleTimeout: 30_000,
      maxQueue: 200,
      resourceLimits: { maxOldGenerationSizeMb: 1024 },
    });
  }
  return pool;
}

/** About 3,000 points: read and analysed in a few milliseconds, less than a thread costs. */
const IN_PLACE_BYTES = 128 * 1024;
