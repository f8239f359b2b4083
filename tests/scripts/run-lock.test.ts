import { spawn } from "node:child_process";
import { mkdtempSync, readdirSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { afterEach, beforeEach, expect, test } from "vitest";
import { endProcesses, processesWith, spawnBound, startTicksOf } from "../../scripts/processes.mjs";
import { readLock, takeLock } from "../../scripts/run-lock.mjs";

let folder = "";
beforeEach(() => {
  folder = mkdtempSync(path.join(tmpdir(), "swale-lock-"));
});
afterEach(() => rmSync(folder, { recursive: true }));

test("a second run is told where the first one is", async () => {
  const lock = await takeLock(folder);
  lock.tell({ address: "http://localhost:3000" });
  await expect(takeLock(folder)).rejects.toThrow(/already running.*http:\/\/localhost:3000 \(process \d+\)/);
  lock.release();
  expect(readdirSync(folder)).toEqual([]);
  (await takeLock(folder)).release();
});

test("what a killed run left does not count, nor does a process that got its id later", async () => {
  const ended = spawn("true");
  await new Promise((resolve) => ended.once("exit", resolve));
  const left = { pid: ended.pid, ticks: 1, parents: [] };
  writeFileSync(path.join(folder, "run.json"), JSON.stringify(left));
  (await takeLock(folder)).release();
  writeFileSync(path.join(folder, "run.json"), JSON.stringify({ ...left, pid: process.ppid }));
  expect(readLock(folder)).toBeUndefined();
  (await takeLock(folder)).release();
  writeFileSync(path.join(folder, "run.json"), "{ half a file");
  (await takeLock(folder)).release();
});

test("a run on its way out is waited for", async () => {
  const leaving = spawn("sleep", ["0.5"]);
  // Node hears of an exit a moment after the system does, so its event is waited for.
  const exit = new Promise((resolve) => leaving.once("exit", resolve));
  const ticks = startTicksOf(leaving.pid ?? 0);
  expect(ticks).toBeDefined();
  const state = { pid: leaving.pid, ticks, parents: [], leaving: true };
  writeFileSync(path.join(folder, "run.json"), JSON.stringify(state));
  const lock = await takeLock(folder);
  expect(startTicksOf(leaving.pid ?? 0)).not.toBe(ticks);
  expect(await exit).toBe(0);
  lock.release();
});

test("processes are found by an argument and ended, by force where they do not listen", async () => {
  const mark = `--belongs-to=${folder}`;
  const script = "process.on('SIGTERM', () => {}); setInterval(() => {}, 1000); console.log('up')";
  const child = spawnBound(process.execPath, ["-e", script, "--", mark], {
    stdio: ["ignore", "pipe", "ignore"],
  });
  await new Promise((resolve) => child.stdout?.once("data", resolve));
  expect(processesWith(mark)).toEqual([child.pid]);
  const exit = new Promise((resolve) => child.once("exit", (_code, signal) => resolve(signal)));
  await endProcesses(processesWith(mark), 300);
  expect(await exit).toBe("SIGKILL");
  expect(processesWith(mark)).toEqual([]);
});

test("a child ends when the one that started it is killed", async () => {
  const mark = `--belongs-to=${folder}`;
  const processes = JSON.stringify(path.resolve("scripts/processes.mjs"));
  const inner = `setInterval(() => {}, 1000)`;
  const outer = `import(${processes}).then(({ spawnBound }) => {
    spawnBound(process.execPath, ["-e", ${JSON.stringify(inner)}, "--", ${JSON.stringify(mark)}], { stdio: "ignore" });
    setInterval(() => {}, 1000);
  })`;
  const parent = spawn(process.execPath, ["-e", outer], { stdio: "ignore" });
  await expect.poll(() => processesWith(mark).length).toBe(1);
  // Wait until the exec through setpriv is over: then the kernel knows whom to follow.
  await expect.poll(() => processesWith("--pdeathsig").length).toBe(0);
  parent.kill("SIGKILL");
  await expect.poll(() => processesWith(mark).length).toBe(0);
});
