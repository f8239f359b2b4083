import { randomBytes } from "node:crypto";
import type { Transaction } from "~/db/client.server";
import * as outbox from "~/db/outbox.server";
import { env } from "~/env.server";
import { plainText } from "./file-names.ts";
import { log } from "./log.server.ts";
import { drawMail, type MailWords } from "./mail.server.ts";
import { isStillWanted } from "./mail-wanted.server.ts";
import { deliver } from "./smtp.server.ts";

/** Mails on their way: written where they are caused, sent by any process, each at least once and under one Message-ID. */

export interface QueueMail {
  toAddress: string;
  /** Whose mail it is, where that is known: closing the account takes back what was not sent. */
  userId?: number | null;
  subject: string;
  words: MailWords;
  headers?: Record<string, string>;
  /** What may be mailed only once, e.g. "digest:7:2026-12-01". */
  onceKey?: string;
}

/** Writes a mail in the transaction that causes it: what is rolled back is not sent. False: it was written before. */
export function queueMail(mail: QueueMail, tx: Transaction): Promise<boolean> {
  const subject = Array.from(plainText(mail.subject)).slice(0, 200).join("");
  const row = {
    messageId: `<${randomBytes(18).toString("base64url")}@${new URL(env.BASE_URL).hostname}>`,
    onceKey: mail.onceKey ?? null,
    toAddress: mail.toAddress,
    userId: mail.userId ?? null,
    subject,
    headers: mail.headers ?? {},
    ...drawMail(mail.words),
  };
  return outbox.insert(row, tx);
}

export interface Sending {
  smtpUrl?: string;
  leaseMs?: number;
  waits?: Parameters<typeof deliver>[2];
}

/** Sends what is due now, some at a time; answers how many were tried. */
export async function sendDue(sending: Sending = {}): Promise<number> {
  const leaseMs = sending.leaseMs ?? LEASE_MS;
  const due = await outbox.claim(AT_ONCE, leaseMs);
  await Promise.all(due.map((row) => sendOne(row, { ...sending, leaseMs })));
  return due.length;
}

async function sendOne(row: outbox.OutboxRow, sending: Sending & { leaseMs: number }): Promise<void> {
  const { smtpUrl = env.SMTP_URL, leaseMs } = sending;
  const { attempts } = row;
  if (row.onceKey && !(await isStillWanted(row.onceKey, row.toAddress))) return outbox.deleteById(row.id);
  // A slow server may take its time: as long as this process lives, nobody else takes the mail.
  const renewal = setInterval(() => {
    outbox.renew(row.id, new Date(Date.now() + leaseMs)).catch(() => undefined);
  }, leaseMs / 3);
  try {
    const letter = { ...row, from: env.MAIL_FROM, date: row.createdAt };
    const delivery = await deliver(smtpUrl, letter, sending.waits);
    if (delivery.kind === "sent") return await keep(() => outbox.setSent(row.id));
    const { kind, reason } = delivery;
    const most = kind === "unknown" ? MOST_UNKNOWN : MOST_ATTEMPTS;
    if (kind === "refused" || attempts >= most) {
      log.warn({ mail: row.publicId, attempts, reason }, "a mail was given up");
      const said = kind === "unknown" ? `It may have arrived, ${attempts} times: ${reason}` : reason;
      return await keep(() => outbox.setFailed(row.id, said));
    }
    const nextAt = new Date(Date.now() + waitMs(attempts));
    await keep(() => outbox.putOff(row.id, nextAt, reason));
  } finally {
    clearInterval(renewal);
  }
}

/** After the n-th attempt; 20 of them lie within two days. */
export function waitMs(attempts: number, chance = Math.random()): number {
  const plain = Math.min(FIRST_WAIT_MS * 2 ** (attempts - 1), LONGEST_WAIT_MS);
  return plain * (0.8 + 0.4 * chance);
}

/** What came of a mail is worth some patience: forgotten, it would be sent again. */
async function keep(write: () => Promise<void>): Promise<void> {
  for (let attempt = 1; ; attempt++) {
    try {
      return await write();
    } catch (error) {
      if (attempt >= KEEP_ATTEMPTS) throw error;
      await new Promise((resolve) => setTimeout(resolve, 500 * attempt));
    }
  }
}

/** Begins looking for due mails; the answer stops it and waits for what is under way. */
export function startOutbox(everyMs = 1000): () => Promise<void> {
  let stopped = false;
  let tidiedMs = 0;
  let running: Promise<unknown> = Promise.resolve();
  const tick = () => {
    running = round()
      .catch((error) => log.warn({ err: error }, "mails could not be looked for; it is tried again"))
      .finally(() => {
        if (!stopped) timer = setTimeout(tick, everyMs);
      });
  };
  const round = async () => {
    while (!stopped && (await sendDue()) === AT_ONCE);
    if (Date.now() - tidiedMs < TIDY_EVERY_MS) return;
    tidiedMs = Date.now();
    await outbox.deleteSentBefore(new Date(tidiedMs - KEPT_MS));
  };
  let timer = setTimeout(tick, everyMs);
  return async () => {
    stopped = true;
    clearTimeout(timer);
    // A server that takes its time is not waited for: the lease runs out, and the mail is sent again.
    await Promise.race([running, new Promise((resolve) => setTimeout(resolve, PATIENCE_MS))]);
  };
}

const AT_ONCE = 5;
const LEASE_MS = 120_000;
const FIRST_WAIT_MS = 30_000;
const LONGEST_WAIT_MS = 4 * 60 * 60 * 1000;
const MOST_ATTEMPTS = 20;
/** A server that takes mails and never says so would fill somebody's mailbox with copies. */
const MOST_UNKNOWN = 5;
const KEEP_ATTEMPTS = 8;
const PATIENCE_MS = 8_000;
const TIDY_EVERY_MS = 60 * 60 * 1000;
/** How long a sent mail's line is kept: longer than anything that may be mailed only once. */
const KEPT_MS = 60 * 24 * 60 * 60 * 1000;
