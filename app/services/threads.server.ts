import { existsSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { Piscina } from "piscina";

// biome-ignore lint/suspicious/noExplicitAny: a thread does several kinds of work, each typed where it is asked for
export type Threads = Piscina<any, any>;

/** Threads that run one of the `*.worker.ts` of this folder: as it was built, else from its source. Started when first asked. */
export function openThreads(
  worker: "reading" | "printing",
  options: { maxThreads: number; maxQueue: number; idleTimeout: number; niceIncrement?: number },
): Threads {
  const built = [`./${worker}.js`, `../${worker}.js`]
    .map((name) => fileURLToPath(new URL(name, import.meta.url)))
    .find(existsSync);
  const source = `./${worker}.worker.ts`;
  return new Piscina({
    filename: built ?? fileURLToPath(new URL(source, import.meta.url)),
    execArgv: built ? [] : ["--import", "tsx"],
    minThreads: 0,
    resourceLimits: { maxOldGenerationSizeMb: 1024 },
    ...options,
  });
}
