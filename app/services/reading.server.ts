import { availableParallelism } from "node:os";
import { MessageChannel, receiveMessageOnPort } from "node:worker_threads";
import { detect } from "../readers/detect.ts";
import type { ScreenshotSpec } from "../readers/reading.ts";
import type { PictureCopy } from "./picture-copies.server.ts";
import readAndAnalyse, { type ReadOutcome, type ReadTask } from "./read-and-analyse.server.ts";
import type { PictureStage } from "./seen-picture.ts";
import { openThreads, type Threads } from "./threads.server.ts";

/**
 * Reads a file without holding up the pages: small ones in place, the rest in a worker thread, pictures one after
 * another in a thread of their own. `progress` is told each stage of a picture that is done.
 */
export async function readFile(
  task: Omit<ReadTask, "port">,
  progress?: (stage: PictureStage) => void,
): Promise<ReadOutcome> {
  if (detect(task.name, task.bytes).kind === "picture") return readInTurn(task, progress);
  if (task.bytes.length <= IN_PLACE_BYTES) return readAndAnalyse(task);
  return threads("numbers").run(task);
}

/** The plot of a photograph laid flat, for a page; undefined where its corners enclose none. */
export async function layFlat(bytes: Uint8Array, spec: ScreenshotSpec): Promise<PictureCopy | undefined> {
  return threads("corrections").run({ bytes, spec }, { name: "flatPicture" });
}

export async function closeReaders(): Promise<void> {
  const open = [...pools.values()];
  pools.clear();
  await Promise.all(open.map((pool) => pool.close()));
}

async function readInTurn(task: Omit<ReadTask, "port">, progress?: (stage: PictureStage) => void) {
  const pool = threads(task.kept ? "corrections" : "pictures");
  if (!progress) return pool.run(task);
  const { port1, port2 } = new MessageChannel();
  port1.on("message", progress);
  try {
    return await pool.run({ ...task, port: port2 }, { transferList: [port2] });
  } finally {
    // The answer may overtake what was said before it.
    for (let said = receiveMessageOnPort(port1); said; said = receiveMessageOnPort(port1))
      progress(said.message);
    port1.close();
  }
}

/** Pictures have one thread, and with it at most one text recognition; trying a correction must not wait for them. */
const KINDS = {
  numbers: { maxThreads: Math.max(1, Math.min(4, availableParallelism() - 1)), idleTimeout: 30_000 },
  // Pages come first: its work and that of its text recognition yields to theirs.
  pictures: { maxThreads: 1, idleTimeout: 30_000, niceIncrement: 10 },
  corrections: { maxThreads: 1, idleTimeout: 3 * 60_000 },
} as const;

const pools = new Map<keyof typeof KINDS, Threads>();

function threads(kind: keyof typeof KINDS): Threads {
  let pool = pools.get(kind);
  if (!pool) {
    pool = openThreads("reading", { maxQueue: 200, ...KINDS[kind] });
    pools.set(kind, pool);
  }
  return pool;
}

/** About 3,000 points: read and analysed in a few milliseconds, less than a thread costs. */
const IN_PLACE_BYTES = 128 * 1024;
