import * as runs from "~/db/bundle-runs.server";
import type { Queryable } from "~/db/client.server";

/** A run that this process works on, for as long as it says so often enough. */
export class Lease {
  private had: Date;
  private queue: Promise<unknown> = Promise.resolve();
  private toldMs = Date.now();

  constructor(readonly run: runs.RunRow) {
    this.had = run.updatedAt;
  }

  /** Writes how far it is; throws `LeaseLost` when the run is gone or somebody else's. One write at a time. */
  keep(values: Parameters<typeof runs.keep>[2] = {}, tx?: Queryable): Promise<void> {
    const write = async () => {
      // Two writes of one millisecond must differ.
      const next = new Date(Math.max(Date.now(), this.had.getTime() + 1));
      if (!(await runs.keep(this.run.id, this.had, { updatedAt: next, ...values }, tx)))
        throw new LeaseLost();
      this.had = values.updatedAt ?? next;
      this.toldMs = Date.now();
    };
    const turn = this.queue.then(write, write);
    this.queue = turn.catch(() => undefined);
    return turn;
  }

  /** The same, but not more often than every second or two. */
  async tell(values: Parameters<typeof runs.keep>[2]): Promise<void> {
    if (Date.now() - this.toldMs >= TELL_EVERY_MS) await this.keep(values);
  }
}

export class LeaseLost extends Error {
  constructor() {
    super("The run is gone, or another process has taken it over.");
  }
}

/** A worker that is not heard of for so long is taken for dead; every other write comes far sooner. */
export const LEASE_MS = 60_000;
const TELL_EVERY_MS = 1_000;
