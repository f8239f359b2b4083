export interface RunState {
  pid: number;
  address?: string;
  [more: string]: unknown;
}
export interface RunLock {
  tell(more: Record<string, unknown>): void;
  release(): void;
}
export function takeLock(folder: string): Promise<RunLock>;
export function readLock(folder: string): RunState | undefined;
