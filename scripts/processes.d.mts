import type { ChildProcess, SpawnOptions } from "node:child_process";

export function startTicksOf(pid: number): number | undefined;
export function processesWith(argument: string): number[];
export function endProcesses(pids: number[], patienceMs?: number): Promise<void>;
export function spawnBound(program: string, rest: string[], options: SpawnOptions): ChildProcess;
