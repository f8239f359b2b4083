import { spawn } from "node:child_process";
import { existsSync, readdirSync, readFileSync } from "node:fs";

/** What runs on this machine, read from /proc. Process ids are used again, so an id alone proves nothing. */

const SETPRIV = "/usr/bin/setpriv";

/** When a process began, in clock ticks since boot; undefined where there is no such process. */
export function startTicksOf(pid) {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, "utf8");
    // The name, in parentheses, may hold blanks: count from behind it. Z and X are processes already ended.
    const fields = stat.slice(stat.lastIndexOf(")") + 2).split(" ");
    return fields[0] === "Z" || fields[0] === "X" ? undefined : Number(fields[19]);
  } catch {
    return undefined;
  }
}

/** Whoever runs this command and would pass a signal on: npm, and the shell that npm puts between. */
export function commandParents() {
  if (!process.env.npm_lifecycle_event) return [];
  const parents = [process.ppid];
  const [program = "", option] = argumentsOf(process.ppid);
  if (/sh$/.test(program) && option === "-c") parents.push(parentOf(process.ppid));
  return parents.map((pid) => ({ pid, ticks: startTicksOf(pid) }));
}

/** Whether each of these processes is still the one it was. */
export function areThere(processes) {
  return processes.every(({ pid, ticks }) => startTicksOf(pid) === ticks);
}

/** The running processes that were started with exactly this argument. */
export function processesWith(argument) {
  return readdirSync("/proc")
    .filter((name) => /^\d+$/.test(name))
    .map(Number)
    .filter((pid) => pid !== process.pid && argumentsOf(pid).includes(argument));
}

/** Ends processes: politely, then after `patienceMs` by force. */
export async function endProcesses(pids, patienceMs = 15_000) {
  const since = new Map(pids.map((pid) => [pid, startTicksOf(pid)]));
  const left = () =>
    pids.filter((pid) => since.get(pid) !== undefined && startTicksOf(pid) === since.get(pid));
  for (const pid of left()) send(pid, "SIGTERM");
  const deadline = Date.now() + patienceMs;
  while (left().length > 0 && Date.now() < deadline) await new Promise((resolve) => setTimeout(resolve, 50));
  for (const pid of left()) send(pid, "SIGKILL");
}

/** Like `spawn`, in a group of its own (Ctrl-C reaches only us), and the kernel ends it when we die. */
export function spawnBound(program, rest, options) {
  const bound = existsSync(SETPRIV);
  const [file, args] = bound ? [SETPRIV, ["--pdeathsig", "TERM", program, ...rest]] : [program, rest];
  return spawn(file, args, { ...options, detached: true });
}

function argumentsOf(pid) {
  try {
    return readFileSync(`/proc/${pid}/cmdline`, "utf8").split("\0");
  } catch {
    return [];
  }
}

function parentOf(pid) {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, "utf8");
    return Number(stat.slice(stat.lastIndexOf(")") + 2).split(" ")[1]);
  } catch {
    return 0;
  }
}

function send(pid, signal) {
  try {
    process.kill(pid, signal);
  } catch (error) {
    if (error.code !== "ESRCH") throw error;
  }
}
