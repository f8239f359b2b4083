import type { Readable } from "node:stream";
import {
  AbortMultipartUploadCommand,
  CompleteMultipartUploadCommand,
  CreateMultipartUploadCommand,
  GetObjectCommand,
  HeadObjectCommand,
  UploadPartCommand,
} from "@aws-sdk/client-s3";
import { Upload } from "@aws-sdk/lib-storage";
import { env } from "~/env.server";
import { log } from "../log.server.ts";
import { client, clientWith } from "../storage.server.ts";

/** Objects that are too large to be held: written and read as streams, and written in parts that outlive a process. */

/** Enough of an upload in parts to go on with it elsewhere. */
export interface UploadState {
  uploadId: string;
  parts: { number: number; etag: string }[];
}

/** An upload in parts, each sent when it is large enough; nothing can be read of it before `finish`. */
export class PartUpload {
  private chunks: Buffer[] = [];
  private waiting = 0;
  private constructor(
    private readonly key: string,
    readonly state: UploadState,
  ) {}

  static async begin(key: string, contentType: string): Promise<PartUpload> {
    const made = await client.send(
      new CreateMultipartUploadCommand({ Bucket: env.S3_BUCKET, Key: key, ContentType: contentType }),
    );
    if (!made.UploadId) throw new Error(`The store did not begin an upload of ${key}.`);
    return new PartUpload(key, { uploadId: made.UploadId, parts: [] });
  }

  /** Goes on after the parts in `state`; later parts that were sent once are written over. */
  static resume(key: string, state: UploadState): PartUpload {
    return new PartUpload(key, state);
  }

  async write(bytes: Buffer): Promise<void> {
    this.chunks.push(bytes);
    this.waiting += bytes.length;
    if (this.waiting >= PART_BYTES) await this.send();
  }

  /** Sends what waits where it is enough for a part; true when nothing waits after that, so that `state` is all there is. */
  async settle(): Promise<boolean> {
    if (this.waiting >= LEAST_PART_BYTES) await this.send();
    return this.waiting === 0;
  }

  async finish(): Promise<void> {
    if (this.waiting > 0 || this.state.parts.length === 0) await this.send();
    const command = new CompleteMultipartUploadCommand({
      Bucket: env.S3_BUCKET,
      Key: this.key,
      UploadId: this.state.uploadId,
      MultipartUpload: {
        Parts: this.state.parts.map(({ number, etag }) => ({ PartNumber: number, ETag: etag })),
      },
    });
    await persistently(async (attempt) => {
      await finisher.send(command).catch(async (error) => {
        // The store did it, and only its answer was lost.
        const done = attempt > 1 && error.name === "NoSuchUpload" && (await sizeOf(this.key)) > 0;
        if (!done) throw error;
      });
    });
  }

  abort(): Promise<void> {
    return abortUpload(this.key, this.state.uploadId);
  }

  private async send(): Promise<void> {
    const body = Buffer.concat(this.chunks);
    const number = this.state.parts.length + 1;
    const command = new UploadPartCommand({
      Bucket: env.S3_BUCKET,
      Key: this.key,
      UploadId: this.state.uploadId,
      PartNumber: number,
      Body: body,
      ContentLength: body.length,
    });
    const sent = await persistently(() => sender.send(command));
    if (!sent.ETag) throw new Error(`The store did not acknowledge part ${number} of ${this.key}.`);
    this.state.parts.push({ number, etag: sent.ETag });
    this.chunks = [];
    this.waiting = 0;
  }
}

/** Again and again where the store does not answer or has a fault: an upload of hours is not lost for half a minute of that. */
export async function persistently<T>(
  work: (attempt: number) => Promise<T>,
  waitsMs: readonly number[] = WAITS_MS,
): Promise<T> {
  for (let attempt = 1; ; attempt++) {
    try {
      return await work(attempt);
    } catch (error) {
      if (attempt > waitsMs.length || isRefusal(error)) throw error;
      log.warn({ err: error, attempt }, "the store did not take a part; it is tried again");
      await new Promise((resolve) => setTimeout(resolve, waitsMs[attempt - 1]));
    }
  }
}

/** What the store understood and does not do, so that no second try helps. */
function isRefusal(error: unknown): boolean {
  const status = (error as { $metadata?: { httpStatusCode?: number } }).$metadata?.httpStatusCode ?? 0;
  return status >= 400 && status < 500 && status !== 408 && status !== 429;
}

/** Gives an upload up. One that is not known any more is no error, and no other stops what it is given up for. */
export async function abortUpload(key: string, uploadId: string): Promise<void> {
  await client
    .send(new AbortMultipartUploadCommand({ Bucket: env.S3_BUCKET, Key: key, UploadId: uploadId }))
    .catch((error) => {
      if (error.name !== "NoSuchUpload")
        log.warn({ err: error, key }, "parts of an upload stay in the store");
    });
}

/** Stores a stream of unknown length. */
export async function putStream(key: string, body: Readable, contentType: string): Promise<void> {
  const params = { Bucket: env.S3_BUCKET, Key: key, Body: body, ContentType: contentType };
  await new Upload({ client, params, queueSize: 1, partSize: PART_BYTES }).done();
}

async function sizeOf(key: string): Promise<number> {
  const head = await client.send(new HeadObjectCommand({ Bucket: env.S3_BUCKET, Key: key }));
  return head.ContentLength ?? 0;
}

/**
 * Bytes `from` to `to`, both included, to the end without `to`: fetched piece by piece, so that whoever takes them slowly
 * holds no connection to the store, which would be cut for doing nothing.
 */
export async function* readPieces(key: string, from = 0, to?: number): AsyncGenerator<Uint8Array> {
  const last = to ?? (await sizeOf(key)) - 1;
  for (let at = from; at <= last; at += PIECE_BYTES) {
    const range = `bytes=${at}-${Math.min(last, at + PIECE_BYTES - 1)}`;
    const answer = await client.send(new GetObjectCommand({ Bucket: env.S3_BUCKET, Key: key, Range: range }));
    if (!answer.Body) throw new Error(`The store has no body for ${key}.`);
    yield await answer.Body.transformToByteArray();
  }
}

/** Of a part, which is up to 8 MB. Once, on a busy machine, 10 s were not enough for an upload of 400 MB. */
const sender = clientWith(30_000, 1);
/** A store may copy all parts to put them together, which grows with the whole and not with a part. */
const finisher = clientWith(5 * 60_000, 1);
/** Together 31 s, beside what each try takes itself. */
const WAITS_MS = [1000, 2000, 4000, 8000, 16_000];
const MEGABYTE = 1024 * 1024;
/** The least that a store takes as a part that is not the last (S3: 5 MB). */
const LEAST_PART_BYTES = 5 * MEGABYTE;
/** With 10,000 parts, the most of an upload, that is 80 GB. */
const PART_BYTES = 8 * MEGABYTE;
const PIECE_BYTES = 4 * MEGABYTE;
