import * as attachments from "~/db/attachments.server";
import * as emailCodes from "~/db/email-codes.server";
import * as files from "~/db/files.server";
import * as jobs from "~/db/jobs.server";
import * as photographs from "~/db/photographs.server";
import * as plates from "~/db/plates.server";
import * as sessions from "~/db/sessions.server";
import { dropUnsent } from "./attachments.server.ts";
import { sendDigests } from "./digests.server.ts";
import { log } from "./log.server.ts";
import { purgeNote } from "./note-changes.server.ts";
import { tellOf } from "./notices.server.ts";
import { deleteObject } from "./storage.server.ts";

/** Background work. Every kind must be harmless to run twice. */

const KINDS: Record<string, (payload: never) => Promise<void>> = {
  /** Removes a stored object unless a row says that it is in use. */
  "delete-object": async ({ key }: { key: string }) => {
    const rows = ROWS_OF[key.split("/")[0]] ?? files;
    if (!(await rows.isStorageKeyUsed(key))) await deleteObject(key);
  },
  "drop-attachment": ({ attachment }: { attachment: string }) => dropUnsent(attachment),
  "purge-note": ({ note }: { note: string }) => purgeNote(note),
  tell: ({ event }: { event: number }) => tellOf(event),
};

/** Begins looking for due work; the answer stops it and waits for what is under way. */
export function startJobs(everyMs = 2000): () => Promise<void> {
  let stopped = false;
  let running: Promise<unknown> = Promise.resolve();
  let lastSweepMs = 0;
  let lastDigestMs = 0;
  const tick = () => {
    running = runDueJobs(() => stopped)
      .then(async () => {
        if (Date.now() - lastDigestMs >= DIGESTS_EVERY_MS) {
          lastDigestMs = Date.now();
          await sendDigests();
        }
        if (Date.now() - lastSweepMs < SWEEP_EVERY_MS) return;
        lastSweepMs = Date.now();
        await sessions.deleteExpired();
        await emailCodes.deleteExpired();
      })
      .catch((error) =>
        log.warn({ err: error }, "background work could not be looked for; it is tried again"),
      )
      .finally(() => {
        if (!stopped) timer = setTimeout(tick, everyMs);
      });
  };
  let timer = setTimeout(tick, everyMs);
  return async () => {
    stopped = true;
    clearTimeout(timer);
    await running;
  };
}

/** Runs what is due now, some at a time until there is no more or it is stopped; answers how many were done. */
export async function runDueJobs(isStopped = () => false): Promise<number> {
  let done = 0;
  for (;;) {
    const due = await jobs.claim(BATCH, LEASE_MS);
    done += await run(due);
    if (due.length < BATCH || isStopped()) return done;
  }
}

async function run(due: jobs.JobRow[]): Promise<number> {
  let done = 0;
  for (const job of due) {
    try {
      const work = KINDS[job.kind];
      if (!work) throw new Error(`Nobody knows how to do "${job.kind}".`);
      await work(job.payload as never);
      await jobs.deleteById(job.id);
      done++;
    } catch (error) {
      const waitMs = Math.min(1000 * 2 ** job.attempts, LONGEST_WAIT_MS);
      log.warn({ err: error, job: job.id, kind: job.kind }, "background work failed; it is tried again");
      await jobs.putOff(job.id, new Date(Date.now() + waitMs), String(error).slice(0, 2000));
    }
  }
  return done;
}

/** Where the rows are that use an object, by the first part of its key; else those of sweeps' files. */
const ROWS_OF: Record<string, { isStorageKeyUsed: (key: string) => Promise<boolean> }> = {
  photographs,
  attachments,
  plates,
};

const BATCH = 20;
const LEASE_MS = 60_000;
const LONGEST_WAIT_MS = 60 * 60 * 1000;
const SWEEP_EVERY_MS = 10 * 60 * 1000;
const DIGESTS_EVERY_MS = 30_000;
