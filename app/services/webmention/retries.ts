/** When a server that did not answer is asked again: within a quarter of a day, then no more. Pure. */

/** `attempt` counts from 1; null after the last. */
export function retryAt(attempt: number, now = new Date()): Date | null {
  const waitMs = WAITS_MS[attempt - 1];
  return waitMs === undefined ? null : new Date(now.getTime() + waitMs);
}

const MINUTE_MS = 60_000;
/** Common practice, no source. */
const WAITS_MS = [MINUTE_MS, 10 * MINUTE_MS, 60 * MINUTE_MS, 300 * MINUTE_MS];
