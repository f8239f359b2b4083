/** What must be put down in order when the process is asked to stop. */
const tasks: (() => Promise<void> | void)[] = [];

/** Registers work for an orderly stop; what was registered last is stopped first. */
export function onShutdown(task: () => Promise<void> | void): void {
  tasks.push(task);
}

/** Runs every task once, even where one fails, and throws the first failure at the end. */
export async function runShutdown(): Promise<void> {
  const failures: unknown[] = [];
  for (let task = tasks.pop(); task; task = tasks.pop()) {
    try {
      await task();
    } catch (error) {
      failures.push(error);
    }
  }
  if (failures.length > 0) throw failures[0];
}
