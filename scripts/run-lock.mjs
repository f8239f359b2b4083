import { linkSync, mkdirSync, readFileSync, renameSync, rmSync, writeFileSync } from "node:fs";
import path from "node:path";
import { setTimeout as pause } from "node:timers/promises";
import { areThere, commandParents, startTicksOf } from "./processes.mjs";
import { PlainFailure } from "./steps.mjs";

/** One run a folder. The lock names its process, so one left behind by a killed run is seen for what it is. */

const PATIENCE_MS = 90_000;

/** Takes the lock of `folder` or throws with who holds it. A run that is on its way out is waited for. */
export async function takeLock(folder) {
  mkdirSync(folder, { recursive: true });
  const file = path.join(folder, "run.json");
  const mine = path.join(folder, `run.${process.pid}.json`);
  let state = { pid: process.pid, ticks: startTicksOf(process.pid), parents: commandParents() };
  const deadline = Date.now() + PATIENCE_MS;
  writeFileSync(mine, JSON.stringify(state));
  try {
    while (!tryLink(mine, file)) {
      const holder = readLock(folder);
      if (!holder) setAside(file);
      else if ((holder.leaving || !areThere(holder.parents)) && Date.now() < deadline) await pause(100);
      else throw new PlainFailure(refusal(holder));
    }
  } finally {
    rmSync(mine, { force: true });
  }
  return {
    /** Adds what others may want to know, such as the address. */
    tell(more) {
      state = { ...state, ...more };
      writeFileSync(mine, JSON.stringify(state));
      renameSync(mine, file);
    },
    release() {
      if (readLock(folder)?.pid === process.pid) rmSync(file, { force: true });
    },
  };
}

/** What the run that holds the folder says of itself; undefined when none is running. */
export function readLock(folder) {
  try {
    const holder = JSON.parse(readFileSync(path.join(folder, "run.json"), "utf8"));
    return holder.ticks !== undefined && startTicksOf(holder.pid) === holder.ticks ? holder : undefined;
  } catch {
    return undefined;
  }
}

function tryLink(from, to) {
  try {
    linkSync(from, to);
    return true;
  } catch (error) {
    if (error.code === "EEXIST") return false;
    throw error;
  }
}

function setAside(file) {
  const old = `${file}.${process.pid}.old`;
  try {
    renameSync(file, old);
    rmSync(old);
  } catch (error) {
    if (error.code !== "ENOENT") throw error;
  }
}

function refusal({ pid, address }) {
  const where = address ? ` at ${address}` : " and is still starting";
  return `Swale is already running in this folder${where} (process ${pid}).\nNothing was started. Stop it with Ctrl-C in its window, or with: kill ${pid}`;
}
