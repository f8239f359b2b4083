import { createRequire } from "node:module";
import { LOOPBACK } from "../stack/ports.ts";

interface Store {
  run(): Promise<unknown>;
  close(): Promise<void>;
}

/** A store that speaks S3 and keeps its objects as files. It checks no signatures, so it stays on loopback. */
export async function startStorage(folder: string, port: number): Promise<() => Promise<void>> {
  const S3rver = createRequire(import.meta.url)("s3rver") as new (options: object) => Store;
  const store = new S3rver({ address: LOOPBACK, port, directory: folder, silent: true, vhostBuckets: false });
  await store.run();
  return () => store.close();
}
