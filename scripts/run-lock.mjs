import { linkSync, mkdirSync, readFileSync, renameSync, rmSync, writeFileSync } from "node:fs";
import path from "node:path";
import { startTicksOf } from "./processes.mjs";
import { PlainFailure } from "./steps.mjs";

/** One run a folder. The lock names its process, so one left behind by a killed run is seen for what it is. */

/** Takes the lock of `folder` or throws with who holds it. */
export function takeLock(folder) {
  mkdirSync(folder, { recursive: true });
  const file = path.join(folder, "run.json");
  const mine = path.join(folder, `run.${process.pid}.json`);
  let state = { pid: process.pid, ticks: startTicksOf(process.pid) };
  writeFileSync(mine, JSON.stringify(state));
  try {
    for (let attempt = 0; ; attempt++) {
      try {
        linkSync(mine, file);
        break;
      } catch (error) {
        if (error.code !== "EEXIST" || attempt > 3) throw error;
        const holder = readLock(folder);
        if (holder) throw new PlainFailure(refusal(holder));
        setAside(file);
      }
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
