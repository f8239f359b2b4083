import S3rver from "s3rver";
import { LOOPBACK } from "../stack/ports.ts";

/** A store that speaks S3 and keeps its objects as files. It checks no signatures, so it stays on loopback. */
export async function startStorage(folder: string, port: number): Promise<() => Promise<void>> {
  const store = new S3rver({ address: LOOPBACK, port, directory: folder, silent: true, vhostBuckets: false });
  await store.run();
  return () => store.close();
}
