import { createHash } from "node:crypto";
import type { Readable } from "node:stream";
import {
  DeleteObjectCommand,
  GetObjectCommand,
  HeadBucketCommand,
  ListObjectsV2Command,
  PutObjectCommand,
  S3Client,
} from "@aws-sdk/client-s3";
import { env } from "~/env.server";

/** Originals and rendered files in an S3 bucket. What is stored is read back and compared once. */

/** A store that does not answer must not hold a request for ever: nothing moving for `socketTimeout` ms is an error. */
export function clientWith(socketTimeout: number, maxAttempts: number): S3Client {
  return new S3Client({
    region: env.S3_REGION,
    endpoint: env.S3_ENDPOINT,
    forcePathStyle: env.S3_FORCE_PATH_STYLE,
    credentials: { accessKeyId: env.S3_ACCESS_KEY_ID, secretAccessKey: env.S3_SECRET_ACCESS_KEY },
    requestChecksumCalculation: "WHEN_REQUIRED",
    responseChecksumValidation: "WHEN_REQUIRED",
    requestHandler: { connectionTimeout: 3_000, socketTimeout },
    maxAttempts,
  });
}

/** Bundles store and fetch in pieces by it; all else goes through the functions here. */
export const client = clientWith(10_000, 2);

export function sha256Of(bytes: Uint8Array): string {
  return createHash("sha256").update(bytes).digest("hex");
}

/** Stores the bytes and reads them back; throws, with the object removed, when they differ. */
export async function putObject(key: string, bytes: Uint8Array, contentType = "application/octet-stream") {
  await client.send(
    new PutObjectCommand({
      Bucket: env.S3_BUCKET,
      Key: key,
      Body: bytes,
      ContentType: contentType,
      ContentLength: bytes.length,
    }),
  );
  const sha256 = sha256Of(bytes);
  for (const waitMs of READ_BACK_WAITS_MS) {
    await new Promise((resolve) => setTimeout(resolve, waitMs));
    if (sha256Of(await getObject(key)) === sha256) return;
  }
  await deleteObject(key);
  throw new Error(`The store gave back other bytes than it was given for ${key}.`);
}

/** The local store answers a put a moment before its file is whole: seen once in 300 puts on a busy machine. */
const READ_BACK_WAITS_MS = [0, 20, 100, 500, 1500];

export async function getObject(key: string): Promise<Uint8Array> {
  const answer = await client.send(new GetObjectCommand({ Bucket: env.S3_BUCKET, Key: key }));
  if (!answer.Body) throw new Error(`The store has no body for ${key}.`);
  return answer.Body.transformToByteArray();
}

export async function getObjectStream(key: string): Promise<Readable> {
  const answer = await client.send(new GetObjectCommand({ Bucket: env.S3_BUCKET, Key: key }));
  return answer.Body as Readable;
}

/** Deleting what is not there is no error. */
export async function deleteObject(key: string): Promise<void> {
  await client.send(new DeleteObjectCommand({ Bucket: env.S3_BUCKET, Key: key }));
}

/** Deletes every object whose key begins so: of what is kept for a while only. */
export async function deleteObjectsUnder(prefix: string): Promise<void> {
  for (;;) {
    const page = await client.send(new ListObjectsV2Command({ Bucket: env.S3_BUCKET, Prefix: prefix }));
    const keys = (page.Contents ?? []).flatMap(({ Key }) => Key ?? []);
    if (keys.length === 0) return;
    for (const key of keys) await deleteObject(key);
  }
}

export async function storageAnswers(): Promise<boolean> {
  try {
    await client.send(new HeadBucketCommand({ Bucket: env.S3_BUCKET }));
    return true;
  } catch {
    return false;
  }
}
