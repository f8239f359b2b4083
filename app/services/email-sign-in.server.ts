import { createHash, createHmac, randomBytes, randomInt, timingSafeEqual } from "node:crypto";
import { inTransaction, isDuplicate, type Transaction } from "~/db/client.server";
import * as emailCodes from "~/db/email-codes.server";
import * as people from "~/db/people.server";
import { env } from "~/env.server";
import { queueMail } from "./outbox.server.ts";
import { addIdentity } from "./people.server.ts";
import { takeOne } from "./rate-limit.server.ts";

/**
 * Signing in by a code that is mailed. What is asked for an address is answered in the same way and by the same work
 * whether anybody here has it: who has it is looked up only when the code came back.
 */

export type Asked = { kind: "asked"; token: string } | { kind: "wait"; seconds: number };

/** Mails a code; the answer's `token` belongs into the cookie of the browser that asked. */
export async function askForCode(ask: {
  email: string;
  /** A signed-in person who adds the address to the account. */
  forUserId: number | null;
  /** Where the question came from. */
  address: string;
}): Promise<Asked> {
  const seconds =
    (await takeOne("code-address", hashOf(ask.email))) ??
    (await takeOne("code-from", networkOf(ask.address)));
  if (seconds !== null) return { kind: "wait", seconds };
  const token = randomBytes(32).toString("base64url");
  const code = String(randomInt(10 ** DIGITS)).padStart(DIGITS, "0");
  const { email, forUserId } = ask;
  const expiresAt = new Date(Date.now() + LIFETIME_MS);
  await inTransaction(async (tx) => {
    const row = { askHash: hashOf(token), codeHash: codeHashOf(token, code), email, forUserId, expiresAt };
    await emailCodes.insert(row, tx);
    await queueMail(mailOf(email, code, forUserId !== null), tx);
  });
  return { kind: "asked", token };
}

export type AskStage = { stage: "code" | "name"; email: string; forUserId: number | null };

/** Where a browser's sign-in stands; undefined where it is over, or never began. */
export async function findAsk(token: string): Promise<AskStage | undefined> {
  const row = await emailCodes.findByAsk(hashOf(token));
  if (!row || isOver(row)) return undefined;
  return { stage: row.usedAt ? "name" : "code", email: row.email, forUserId: row.forUserId };
}

export type CodeTried =
  | { kind: "signed-in"; user: people.User }
  /** The address is new here: a name is asked for. */
  | { kind: "newcomer" }
  | { kind: "added"; email: string }
  /** The address signs somebody else in. */
  | { kind: "taken" }
  | { kind: "wrong"; left: number }
  | { kind: "over" };

/** Tries a code. Right ones work once, wrong ones are counted; `byUserId` is who is signed in. */
export async function tryCode(token: string, code: string, byUserId: number | null): Promise<CodeTried> {
  return again(() =>
    inTransaction(async (tx) => {
      const row = await emailCodes.lockByAsk(hashOf(token), tx);
      if (!row || row.usedAt || isOver(row)) return { kind: "over" };
      if (row.forUserId !== null && row.forUserId !== byUserId) return { kind: "over" };
      if (!sameHash(row.codeHash, codeHashOf(token, code.replace(/[\s-]/g, "")))) {
        await emailCodes.update(row.id, { attempts: row.attempts + 1 }, tx);
        const left = MOST_ATTEMPTS - row.attempts - 1;
        return left > 0 ? { kind: "wrong", left } : { kind: "over" };
      }
      const owner = await whoseAddress(row.email, tx);
      if (row.forUserId === null && !owner) {
        const now = new Date();
        await emailCodes.update(row.id, { usedAt: now, expiresAt: new Date(now.getTime() + NAME_MS) }, tx);
        return { kind: "newcomer" };
      }
      await emailCodes.deleteById(row.id, tx);
      if (row.forUserId === null) return { kind: "signed-in", user: owner as people.User };
      if (owner && owner.id !== row.forUserId) return { kind: "taken" };
      await addIdentity(row.forUserId, { provider: "email", subject: row.email, email: row.email }, tx);
      return { kind: "added", email: row.email };
    }),
  );
}

/** Makes the account of somebody whose code was right; undefined where that is over. */
export async function makeNewcomer(token: string, name: string): Promise<people.User | undefined> {
  return again(() =>
    inTransaction(async (tx) => {
      const row = await emailCodes.lockByAsk(hashOf(token), tx);
      if (!row?.usedAt || isOver(row)) return undefined;
      await emailCodes.deleteById(row.id, tx);
      // Somebody with two windows open has made it in the other one.
      const there = await whoseAddress(row.email, tx);
      if (there) return there;
      const userName = await people.freeUserName(name, tx);
      const id = await people.insert({ userName, name, email: row.email }, tx);
      await people.insertIdentity(id, "email", row.email, tx);
      return people.findById(id, tx);
    }),
  );
}

/**
 * The account that an address opens for whoever reads its mail: by an identity, or as the address that the provider
 * confirmed, or that the administrator gave, which then becomes one.
 */
async function whoseAddress(email: string, tx: Transaction): Promise<people.User | undefined> {
  const known = await people.findByIdentity("email", email, tx);
  if (known) return known;
  const user = await people.findByEmail(email, tx);
  // The database takes some letters for one another; an address must be the very same.
  if (user?.email?.toLowerCase() !== email) return undefined;
  await people.insertIdentity(user.id, "email", email, tx);
  return user;
}

/** Two windows at once may write the same identity or user name: the second look finds it. */
async function again<T>(work: () => Promise<T>): Promise<T> {
  for (let attempt = 1; ; attempt++) {
    try {
      return await work();
    } catch (error) {
      if (attempt >= 4 || !isDuplicate(error)) throw error;
    }
  }
}

function isOver(row: emailCodes.EmailCode): boolean {
  return row.attempts >= MOST_ATTEMPTS || row.expiresAt.getTime() < Date.now();
}

function mailOf(email: string, code: string, adding: boolean) {
  const what = adding ? "adds this address to your account" : "signs you in";
  return {
    toAddress: email,
    subject: "Your code for Swale",
    words: {
      heading: adding ? "Add this address" : "Sign in to Swale",
      parts: [
        { kind: "code" as const, text: `${code.slice(0, 4)} ${code.slice(4)}` },
        {
          kind: "text" as const,
          text: `Typed into the page that asked for it at ${env.BASE_URL}, this code ${what}. It works for ten minutes, once, and only in that browser.`,
        },
        {
          kind: "text" as const,
          text: "Tell it to nobody: whoever runs the site never asks for it.",
        },
      ],
      footer: [
        {
          kind: "text" as const,
          text: "You did not ask for it? Then somebody typed your address by mistake. Without the code nothing happens; you may throw this mail away.",
        },
      ],
    },
  };
}

function hashOf(text: string): string {
  return createHash("sha256").update(text).digest("hex");
}

/** Of use to nobody who has the table alone: eight digits are soon tried out without the key. */
function codeHashOf(token: string, code: string): string {
  return createHmac("sha256", env.SESSION_SECRET).update(`${token} ${code}`).digest("hex");
}

function sameHash(a: string, b: string): boolean {
  return timingSafeEqual(Buffer.from(a), Buffer.from(b));
}

/** One household or one server has a whole /64 of version 6. */
function networkOf(address: string): string {
  return address.includes(":") && !address.includes(".")
    ? address.split(":").slice(0, 4).join(":")
    : address || "unknown";
}

const DIGITS = 8;
const MOST_ATTEMPTS = 5;
const LIFETIME_MS = 10 * 60 * 1000;
/** How long somebody new may think about a name. */
const NAME_MS = 30 * 60 * 1000;
