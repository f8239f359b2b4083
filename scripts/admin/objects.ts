import { createReadStream, createWriteStream } from "node:fs";
import type { Readable } from "node:stream";
import { pipeline } from "node:stream/promises";
import {
  DeleteObjectCommand,
  GetObjectCommand,
  ListObjectsV2Command,
  type S3Client,
} from "@aws-sdk/client-s3";
import { Upload } from "@aws-sdk/lib-storage";

/** The keys of all objects in the bucket. */
export async function* keysOf(client: S3Client, bucket: string): AsyncGenerator<string> {
  let token: string | undefined;
  do {
    const page = await client.send(new ListObjectsV2Command({ Bucket: bucket, ContinuationToken: token }));
    for (const { Key } of page.Contents ?? []) if (Key !== undefined) yield Key;
    token = page.IsTruncated ? page.NextContinuationToken : undefined;
  } while (token);
}

/** Copies an object to a file; returns its content type, or undefined when it has gone in the meantime. */
export async function fetchObject(
  client: S3Client,
  bucket: string,
  key: string,
  file: string,
): Promise<string | undefined> {
  try {
    const answer = await client.send(new GetObjectCommand({ Bucket: bucket, Key: key }));
    await pipeline(answer.Body as Readable, createWriteStream(file));
    return answer.ContentType ?? "application/octet-stream";
  } catch (error) {
    if ((error as { name?: string }).name === "NoSuchKey") return undefined;
    throw error;
  }
}

export async function storeObject(
  client: S3Client,
  bucket: string,
  object: { key: string; contentType: string },
  file: string,
): Promise<void> {
  const body = createReadStream(file);
  const params = { Bucket: bucket, Key: object.key, ContentType: object.contentType, Body: body };
  await new Upload({ client, params }).done();
}

export async function removeObject(client: S3Client, bucket: string, key: string): Promise<void> {
  await client.send(new DeleteObjectCommand({ Bucket: bucket, Key: key }));
}
