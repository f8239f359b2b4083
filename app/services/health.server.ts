import { HeadBucketCommand, S3Client } from "@aws-sdk/client-s3";
import { ping } from "~/db/health.server";
import { env } from "~/env.server";

const PATIENCE_MS = 3_000;

export interface Readiness {
  ready: boolean;
  parts: Record<string, "answers" | "does not answer">;
}

/** Asks what the product cannot do without; each part within a few seconds. */
export async function readiness(): Promise<Readiness> {
  const [database, storage] = await Promise.all([
    within(ping()),
    within(client.send(new HeadBucketCommand({ Bucket: env.S3_BUCKET }))),
  ]);
  const word = (answers: boolean) => (answers ? "answers" : "does not answer");
  return { ready: database && storage, parts: { database: word(database), storage: word(storage) } };
}

const client = new S3Client({
  endpoint: env.S3_ENDPOINT,
  region: env.S3_REGION,
  forcePathStyle: env.S3_FORCE_PATH_STYLE,
  credentials: { accessKeyId: env.S3_ACCESS_KEY_ID, secretAccessKey: env.S3_SECRET_ACCESS_KEY },
});

async function within(work: Promise<unknown>): Promise<boolean> {
  let timer: NodeJS.Timeout | undefined;
  const late = new Promise<boolean>((resolve) => {
    timer = setTimeout(() => resolve(false), PATIENCE_MS);
  });
  const answered = work.then(
    () => true,
    () => false,
  );
  return Promise.race([answered, late]).finally(() => clearTimeout(timer));
}
