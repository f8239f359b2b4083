import type { ChildProcess } from "node:child_process";
import { existsSync, mkdirSync, openSync, readFileSync, renameSync } from "node:fs";
import path from "node:path";
import { pathToFileURL } from "node:url";
import { ROOT } from "../install.mjs";
import { endProcesses, spawnBound } from "../processes.mjs";
import { PlainFailure } from "../steps.mjs";

/** A process beside this one, with its log in a file. */
export interface Part {
  name: string;
  child: ChildProcess;
  logFile: string;
  /** The part was asked to end, so its end is no failure. */
  stopping: boolean;
}

export interface PartOptions {
  name: string;
  folder: string;
  program: string;
  arguments: string[];
  environment?: NodeJS.ProcessEnv;
}

/** What a Node process needs before a TypeScript file. */
export const TSX_ARGUMENTS = [
  "--import",
  pathToFileURL(path.join(ROOT, "node_modules", "tsx", "dist", "loader.mjs")).href,
];

const running: Part[] = [];
let closed = false;

export function startPart(options: PartOptions): Part {
  if (closed) throw new PlainFailure("Stopping.");
  const logFile = newLog(options.folder, options.name);
  const log = openSync(logFile, "a");
  const child = spawnBound(options.program, options.arguments, {
    cwd: ROOT,
    stdio: ["ignore", log, log],
    env: { ...(options.environment ?? process.env), TSX_TSCONFIG_PATH: path.join(ROOT, "tsconfig.json") },
  });
  const part = { name: options.name, child, logFile, stopping: false };
  running.push(part);
  child.once("exit", () => running.splice(running.indexOf(part), 1));
  return part;
}

/** Stops whatever runs, last started first; nothing can be started afterwards. */
export async function stopEveryPart(): Promise<void> {
  closed = true;
  for (const part of running.toReversed()) await stopPart(part);
}

/** Asks until `isReady` says so; fails with the end of the log when the part ends before. */
export async function waitUntilReady(part: Part, isReady: () => Promise<boolean>, patienceMs = 60_000) {
  const deadline = Date.now() + patienceMs;
  while (!(await isReady())) {
    if (hasEnded(part)) throw new PlainFailure(`${tailOf(part.logFile)}\n${part.name} ended while starting.`);
    if (Date.now() > deadline) {
      throw new PlainFailure(
        `${tailOf(part.logFile)}\n${part.name} did not answer within ${patienceMs / 1000} s.`,
      );
    }
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
}

export async function stopPart(part: Part, patienceMs?: number): Promise<void> {
  part.stopping = true;
  if (hasEnded(part) || part.child.pid === undefined) return;
  const ended = new Promise((resolve) => part.child.once("exit", resolve));
  await endProcesses([part.child.pid], patienceMs);
  await ended;
}

/** Runs a program to its end; the output goes to a log, and a failure shows the end of it. */
export async function runToEnd(options: PartOptions): Promise<void> {
  const part = startPart(options);
  const code = await new Promise((resolve) => {
    part.child.once("error", () => resolve(-1));
    part.child.once("exit", (exitCode, signal) => resolve(exitCode ?? signal));
  });
  if (code === 0) return;
  const where = path.relative(ROOT, part.logFile);
  throw new PlainFailure(`${tailOf(part.logFile)}\n${options.name} failed (${code}). All of it: ${where}`);
}

export function tailOf(file: string, lines = 30): string {
  return readFileSync(file, "utf8").trimEnd().split("\n").slice(-lines).join("\n");
}

function hasEnded(part: Part): boolean {
  return part.child.exitCode !== null || part.child.signalCode !== null;
}

/** A fresh log; the one of the run before is kept beside it. */
function newLog(folder: string, name: string): string {
  const file = path.join(folder, "log", `${name}.log`);
  mkdirSync(path.dirname(file), { recursive: true });
  if (existsSync(file)) renameSync(file, `${file}.old`);
  return file;
}
