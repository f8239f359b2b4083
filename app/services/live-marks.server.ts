import { createCipheriv, createDecipheriv, createHash } from "node:crypto";
import { env } from "~/env.server";

/**
 * An event's row id as pages see it. Row ids count the events of every project, so they are given out as one enciphered
 * block with the project's own id in it: any process reads it, no other project takes it, and nobody counts by it.
 */
export function markOf(projectId: number, eventId: number): string {
  const block = Buffer.alloc(16);
  block.writeBigUInt64BE(BigInt(projectId), 0);
  block.writeBigUInt64BE(BigInt(eventId), 8);
  const cipher = createCipheriv(CIPHER, KEY, null).setAutoPadding(false);
  return Buffer.concat([cipher.update(block), cipher.final()]).toString("base64url");
}

/** The row id; undefined for what is no mark of this project. */
export function readMark(projectId: number, mark: string): number | undefined {
  const bytes = Buffer.from(mark, "base64url");
  if (bytes.length !== 16) return undefined;
  const decipher = createDecipheriv(CIPHER, KEY, null).setAutoPadding(false);
  const block = Buffer.concat([decipher.update(bytes), decipher.final()]);
  const eventId = block.readBigUInt64BE(8);
  if (block.readBigUInt64BE(0) !== BigInt(projectId) || eventId > MOST) return undefined;
  return Number(eventId);
}

const CIPHER = "aes-128-ecb";
const KEY = createHash("sha256").update(`marks of events ${env.SESSION_SECRET}`).digest().subarray(0, 16);
const MOST = BigInt(Number.MAX_SAFE_INTEGER);
