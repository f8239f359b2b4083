import { CreateBucketCommand, HeadBucketCommand, S3Client } from "@aws-sdk/client-s3";
import { PlainFailure } from "../steps.mjs";
import type { Environment } from "./settings.ts";

/** A client for the store that the environment names. */
export function storageClient(environment: Environment): S3Client {
  return new S3Client({
    endpoint: environment.S3_ENDPOINT || undefined,
    region: environment.S3_REGION || "us-east-1",
    forcePathStyle: /^(1|true)$/.test(environment.S3_FORCE_PATH_STYLE ?? ""),
    credentials: {
      accessKeyId: environment.S3_ACCESS_KEY_ID ?? "",
      secretAccessKey: environment.S3_SECRET_ACCESS_KEY ?? "",
    },
    // Checksums of streams that the local store would keep as part of the object.
    requestChecksumCalculation: "WHEN_REQUIRED",
    responseChecksumValidation: "WHEN_REQUIRED",
  });
}

export async function ensureBucket(environment: Environment): Promise<string> {
  const client = storageClient(environment);
  const bucket = environment.S3_BUCKET;
  try {
    await client.send(new HeadBucketCommand({ Bucket: bucket }));
    return "";
  } catch (error) {
    if ((error as { name?: string }).name !== "NotFound") throw unreachable(environment, error);
  }
  try {
    await client.send(new CreateBucketCommand({ Bucket: bucket }));
    return "made";
  } catch (error) {
    throw unreachable(environment, error);
  } finally {
    client.destroy();
  }
}

function unreachable(environment: Environment, error: unknown): PlainFailure {
  const where = environment.S3_ENDPOINT ?? "the provider's own address";
  return new PlainFailure(
    `The bucket ${environment.S3_BUCKET} at ${where} cannot be used: ${(error as Error).message}. Nothing was stored. Check S3_ENDPOINT, S3_BUCKET and the two S3 keys.`,
  );
}
