import { eq } from "drizzle-orm";
import { db, inTransaction } from "~/db/client.server";
import { newPublicId } from "~/db/ids.server";
import { outbox } from "~/db/schema";
import { queueMail, sendDue } from "~/services/outbox.server";
import { type Fault, startHostileServer } from "./hostile-mail.ts";

/** What becomes of one mail when its server goes wrong, with time made to pass between the attempts. */

export interface MailTrial {
  name: string;
  faults: Fault[];
  /** Nothing listens for so many attempts. */
  down?: number;
  /** The process dies with the mail in hand: before the server heard of it, or after it took it. */
  crash?: "before" | "after";
  /** As many senders look at the same moment. */
  senders?: number;
}

export interface MailOutcome {
  name: string;
  attempts: number;
  /** How often the server took it on. */
  taken: number;
  messageIds: number;
  state: string;
  reason: string;
}

const twice = (fault: Fault): Fault[] => [fault, fault];

/** `exactly` where the protocol lets one know, else `at least`; `never` where the server said no for good. */
export const MAIL_TRIALS: (MailTrial & { promise: "exactly" | "at least" | "never" })[] = [
  { name: "all is well", faults: [], promise: "exactly" },
  { name: "down for three attempts", faults: [], down: 3, promise: "exactly" },
  { name: "silent, then well", faults: ["silent"], promise: "exactly" },
  { name: "slow", faults: ["slow"], promise: "exactly" },
  { name: "421 as greeting, twice", faults: twice("greets with 421"), promise: "exactly" },
  { name: "554 as greeting, twice", faults: twice("greets with 554"), promise: "exactly" },
  { name: "450 to the recipient, twice", faults: twice("450 to the recipient"), promise: "exactly" },
  { name: "550 to the recipient", faults: ["550 to the recipient"], promise: "never" },
  { name: "451 to the message, twice", faults: twice("451 to the message"), promise: "exactly" },
  { name: "552 to the message", faults: ["552 to the message"], promise: "never" },
  { name: "drops after RCPT, twice", faults: twice("drops after RCPT"), promise: "exactly" },
  { name: "drops in the message, twice", faults: twice("drops in the message"), promise: "exactly" },
  {
    name: "drops before the reply, not kept",
    faults: twice("drops before the reply, not kept"),
    promise: "exactly",
  },
  {
    name: "drops before the reply, kept",
    faults: twice("drops before the reply, kept"),
    promise: "at least",
  },
  {
    name: "drops before every reply, kept",
    faults: Array.from({ length: 30 }, () => "drops before the reply, kept" as const),
    promise: "at least",
  },
  { name: "process dies before sending", faults: [], crash: "before", promise: "exactly" },
  { name: "process dies after the server took it", faults: [], crash: "after", promise: "at least" },
  { name: "eight senders at once", faults: [], senders: 8, promise: "exactly" },
];

export async function tryMail(trial: MailTrial): Promise<MailOutcome> {
  const toAddress = `${newPublicId()}@fennmarsh.example`;
  const words = { heading: "A trial", parts: [{ kind: "text" as const, text: "Invented." }], footer: [] };
  await inTransaction((tx) => queueMail({ toAddress, subject: trial.name, words }, tx));
  const mine = eq(outbox.toAddress, toAddress);
  const row = async () => (await db.select().from(outbox).where(mine))[0];
  const passTime = () =>
    db
      .update(outbox)
      .set({ nextAt: new Date(0) })
      .where(mine);

  let server = await startHostileServer();
  const { url, taken } = server;
  const port = Number(new URL(url).port);
  server.plan(trial.faults);
  const sending = { smtpUrl: url, waits: SHORT_WAITS };
  const attempt = () => Promise.all(Array.from({ length: trial.senders ?? 1 }, () => sendDue(sending)));
  if (trial.down) {
    await server.close();
    for (let i = 0; i < trial.down; i++) {
      await attempt();
      await passTime();
    }
    server = await startHostileServer(port);
  }
  if (trial.crash) {
    if (trial.crash === "after") await attempt();
    // As a process leaves it that died with the mail in hand: claimed, its lease over.
    const { text, html } = await rowAsWritten(row, trial.crash);
    const left = { state: "sending" as const, lockedUntil: new Date(0), sentAt: null, text, html };
    await db.update(outbox).set(left).where(mine);
  }
  for (let i = 0; i < MOST_ROUNDS; i++) {
    await passTime();
    await attempt();
    const { state } = await row();
    if (state === "sent" || state === "failed") break;
  }
  const all = [...taken, ...(server.taken === taken ? [] : server.taken)];
  await server.close();
  const { state, attempts, lastError } = await row();
  const messageIds = new Set(all).size;
  return { name: trial.name, attempts, taken: all.length, messageIds, state, reason: lastError ?? "" };
}

async function rowAsWritten(row: () => Promise<typeof outbox.$inferSelect>, crash: "before" | "after") {
  const { text, html } = await row();
  return crash === "before" ? { text, html } : { text: "Invented.", html: "<p>Invented.</p>" };
}

const SHORT_WAITS = { connectionTimeout: 2000, greetingTimeout: 500, socketTimeout: 3000, dnsTimeout: 500 };
const MOST_ROUNDS = 25;
