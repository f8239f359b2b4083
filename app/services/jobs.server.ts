import * as attachments from "~/db/attachments.server";
import * as bundles from "~/db/bundle-runs.server";
import * as emailCodes from "~/db/email-codes.server";
import * as files from "~/db/files.server";
import * as jobs from "~/db/jobs.server";
import * as photographs from "~/db/photographs.server";
import * as plates from "~/db/plates.server";
import * as sessions from "~/db/sessions.server";
import { env } from "~/env.server";
import { dropUnsent } from "./attachments.server.ts";
import { dropBatch, goOnWithBatch } from "./batch/work.server.ts";
import { sendDigests } from "./digests.server.ts";
import { log } from "./log.server.ts";
import { purgeNote } from "./note-changes.server.ts";
import { tellOf } from "./notices.server.ts";
import { deleteObject } from "./storage.server.ts";
import { checkMention } from "./webmention/check.server.ts";
import { sendMention, sendMentions } from "./webmention/send.server.ts";

/** Background work. Every kind must be harmless to run twice. */

const KINDS: Record<string, (payload: never) => Promise<void>> = {
  /** Removes a stored object unless a row says that it is in use. */
  "delete-object": async ({ key }: { key: string }) => {
    const rows = ROWS_OF[key.split("/")[0]] ?? files;
    if (!(await rows.isStorageKeyUsed(key))) await deleteObject(key);
  },
  batch: ({ run }: { run: string }) => goOnWithBatch(run),
  "drop-batch": ({ run }: { run: string }) => dropBatch(run),
  "drop-attachment": ({ attachment }: { attachment: string }) => dropUnsent(attachment),
  "purge-note": ({ note }: { note: string }) => purgeNote(note),
  tell: ({ event }: { event: number }) => tellOf(event),
  "check-mention": checkMention,
  "send-mentions": sendMentions,
  "send-mention": sendMention,
};

/** Waits for servers that are not ours, so nothing else waits behind it. */
const OUTWARD = ["check-mention", "send-mention"];

/** Begins looking for due work; the answer stops it and waits for what is under way. */
export function startJobs(everyMs = 2000): () => Promise<void> {
  if (env.WEBMENTION_TEST_ORIGIN) {
    log.warn(
      `${env.WEBMENTION_TEST_ORIGIN} may be asked although it is not public: WEBMENTION_TEST_ORIGIN is set`,
    );
  }
  let lastSweepMs = 0;
  let lastDigestMs = 0;
  const stopOwn = again(everyMs, async (isStopped) => {
    await runDueJobs(isStopped, { but: OUTWARD });
    if (Date.now() - lastDigestMs >= DIGESTS_EVERY_MS) {
      lastDigestMs = Date.now();
      await sendDigests();
    }
    if (Date.now() - lastSweepMs < SWEEP_EVERY_MS) return;
    lastSweepMs = Date.now();
    await sessions.deleteExpired();
    await emailCodes.deleteExpired();
  });
  const stopOutward = again(everyMs, (isStopped) => runDueJobs(isStopped, { only: OUTWARD }, ONE));
  return async () => {
    await Promise.all([stopOwn(), stopOutward()]);
  };
}

function again(everyMs: number, work: (isStopped: () => boolean) => Promise<unknown>): () => Promise<void> {
  let stopped = false;
  let running: Promise<unknown> = Promise.resolve();
  const tick = () => {
    running = work(() => stopped)
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
export async function runDueJobs(
  isStopped = () => false,
  which?: jobs.Which,
  batch = BATCH,
): Promise<number> {
  let done = 0;
  for (;;) {
    const due = await jobs.claim(batch, LEASE_MS, which);
    done += await run(due);
    if (due.length < batch || isStopped()) return done;
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
  bundles,
  plates,
};

const BATCH = 20;
/** What may take twenty seconds, well within its lease, and holds up the end of the process as little as it can. */
const ONE = 1;
const LEASE_MS = 60_000;
const LONGEST_WAIT_MS = 60 * 60 * 1000;
const SWEEP_EVERY_MS = 10 * 60 * 1000;
const DIGESTS_EVERY_MS = 30_000;
