import type { ChildProcess, SpawnOptions } from "node:child_process";

export function startTicksOf(pid: number): number | undefined;
export function processesWith(argument: string): number[];
export function endProcesses(pids: number[], patienceMs?: number): Promise<void>;
export function spawnBound(program: string, rest: string[], options: SpawnOptions): ChildProcess;

export interface ProcessIdentity {
  pid: number;
  ticks: number | undefined;
}
export function commandParents(): ProcessIdentity[];
export function areThere(processes: ProcessIdentity[]): boolean;
